import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { Section } from '../../components/parts.js';
import { Sign } from '../../components/sign.js';
import { Sheet } from '../../components/sheet.js';
import { currentCheck } from '../../state/check.js';
import { address } from '../../state/route.js';
import { signed } from '../../words/numbers.js';
import { letterOf, structureName } from '../../words/structures.js';
import { readingLabel, rowsOf } from './row-data.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../state/check.js').Checked} Checked */

/** Decibans from which one reading alone is called for or against. */
const SPEAKS_DB = 3;

/** @param {number | undefined} weight */
const signOf = (weight) => (weight === undefined ? 'none' : weight >= SPEAKS_DB ? 'fits' : weight <= -SPEAKS_DB ? 'clashes' : 'undecided');

/** Readings against structures, a sign and a weight in each cell. @param {{ doc: CaseDoc, found: Checked }} props */
export function Table({ doc, found }) {
  const columns = found.answer.candidates.map((_, at) => ({ at, rows: rowsOf(doc, found, at) }));
  const keys = [...new Map(columns.flatMap(({ rows }) => rows.map((row) => [row.key, row]))).values()];
  const short = (/** @type {number} */ at) => (found.order[at] ? letterOf(doc, found.order[at] ?? '') : `R${at + 1}`);
  return html`<${Section} title="Readings against structures" id="table-head">
    <div class="table-pan" tabindex="0" role="region" aria-labelledby="table-head"><table class="tally-table">
      <thead><tr><th scope="col">reading</th>${columns.map(({ at }) => html`<th scope="col" key=${at}><abbr
        title=${structureName(doc, found, at)}>${short(at)}</abbr></th>`)}</tr></thead>
      <tbody>${keys.map((row) => html`<tr key=${row.key}><th scope="row"><${Words}
        text=${row.refs.length <= 2 ? row.refs.map((ref) => readingLabel(doc, found, ref)).join(' + ') : row.label} /></th>
        ${columns.map(({ at, rows }) => {
          const mine = rows.find((entry) => entry.key === row.key);
          return html`<td key=${at}>${mine ? html`<a class="cell"
            href=${address('case', doc.id, 'tally', 'reason', String(at), row.key)}>
              <${Sign} verdict=${signOf(mine.weight)} size=${18} /> ${signed(mine.weight)}</a>`
            : html`<span class="cell"><${Sign} verdict="none" size=${18} /></span>`}</td>`;
        })}</tr>`)}</tbody>
      <tfoot><tr><th scope="row">all together</th>${columns.map(({ at }) => html`<td key=${at}><span
        class="cell"><${Sign} verdict=${found.answer.candidates[at]?.verdict ?? 'none'} size=${18} />
        <b>${signed(found.answer.candidates[at]?.weight_db ?? 0)}</b></span></td>`)}</tr></tfoot>
    </table></div>
  <//>`;
}

/** @param {{ doc: CaseDoc }} props */
export function TableSheet({ doc }) {
  const { found } = currentCheck.value;
  return html`<${Sheet} title="Tally as a table" back=${address('case', doc.id, 'tally')}>
    ${found ? html`<${Table} doc=${doc} found=${found} />` : html`<p
      class="hint">Nothing has been weighed yet.</p>`}<//>`;
}
