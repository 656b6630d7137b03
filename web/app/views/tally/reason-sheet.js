import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { Drawing } from '../../components/drawing.js';
import { Section } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { currentCheck } from '../../state/check.js';
import { address } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed, signed, signedFixed } from '../../words/numbers.js';
import { dashed } from '../../words/readings.js';
import { structureName } from '../../words/structures.js';
import { CaseSign } from '../case/sign.js';
import { predictQuestion } from '../structures/predicted.js';
import { rowsOf } from './row-data.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Term} Term */

/** Standard deviations that hold nine in ten of a normal error. */
const NINE_IN_TEN = 1.645;

/** Why one reading speaks for or against one structure. @param {{ doc: CaseDoc, at: number, rowKey: string }} props */
export function ReasonSheet({ doc, at, rowKey }) {
  const { found } = currentCheck.value;
  const back = address('case', doc.id, 'tally');
  const candidate = found?.answer.candidates[at];
  const { value } = useAnswer('predict', candidate ? predictQuestion(doc, candidate.smiles) : null);
  const rows = found ? rowsOf(doc, found, at) : [];
  const row = rows.find((entry) => entry.key === rowKey);
  if (!found || !candidate || !row) return html`<${Sheet} title="Reading" back=${back}><p
    class="hint">The tally has changed. Go back to see it as it stands.</p><//>`;
  const place = rows.indexOf(row);
  const foot = html`<div class="two-up">${[['Previous reading', -1], ['Next reading', 1]].map(([words, by]) => {
    const other = rows[place + Number(by)];
    return other ? html`<a class="button" key=${words}
      href=${address('case', doc.id, 'tally', 'reason', String(at), other.key)}>${words}</a>`
      : html`<button type="button" class="button" key=${words} disabled>${words}</button>`;
  })}</div>`;
  return html`<${Sheet} title=${html`<${Words} text=${row.label} />`} back=${back} sign=${html`<${CaseSign}
    doc=${doc} />`} foot=${foot}>
    <${Drawing} structure=${candidate.smiles} atoms=${row.atoms}
      label="${structureName(doc, found, at)}, atoms concerned marked" width=${354} height=${230} class="drawing-big" />
    <p class="reason"><b>Speaks ${row.weight >= 0 ? 'for' : 'against'} ${structureName(doc, found, at)}, ${signed(row.weight)}.</b></p>
    <ul class="reasons">${row.findings.map((finding, i) => html`<li key=${i}>
      <p><${Words} text=${finding.text} /></p><b>${signed(finding.weight_db)}</b></li>`)}</ul>
    ${row.predicted.map((ref) => html`<${Derivation} key=${ref} reference=${ref} predicted=${value} />`)}
    <${Sources} row=${row} />
  <//>`;
}

/** Where the numbers of the findings come from. @param {{ row: import('./row-data.js').TallyRow }} props */
function Sources({ row }) {
  const all = [...new Set(row.findings.flatMap((finding) => finding.source.split('; ')).filter(Boolean))];
  return all.length ? html`<${Section} title="Sources"><ul>${all.map((source) => html`<li class="source"
    key=${source}>${source}</li>`)}</ul><//>` : null;
}

/** The expected number of one kind of prediction, with its spread and decimals.
 * @param {string} kind @param {any} group */
function expectedNumber(kind, group) {
  if (kind === 'ir') return { digits: 0, text: `${Math.round(group.typical)}`, note: `${dashed(`${group.hi}-${group.lo}`)} cm\u207b\u00b9`, what: 'position' };
  const digits = kind === 'c13' ? 1 : 2;
  return { digits, text: `${fixed(group.ppm, digits)} ± ${fixed(group.sd, digits)}`, what: 'shift',
    note: `9 in 10 within ${fixed(NINE_IN_TEN * group.sd, digits)}` };
}

/** Base and increments that sum to the expected number. @param {{ reference: string, predicted: any }} props */
function Derivation({ reference, predicted }) {
  const [kind = '', at] = reference.split(':');
  const group = predicted?.[kind]?.[Number(at)];
  if (!group?.terms?.length) return null;
  const { digits, text, note, what } = expectedNumber(kind, group);
  return html`<${Section} title="How the expected ${what} came about">
    <dl class="terms">${group.terms.map((/** @type {Term} */ term, /** @type {number} */ i) => html`<div key=${i}>
      <dt><${Words} text=${term.label} /><span class="source">${term.source}</span></dt>
      <dd>${i ? signedFixed(term.value, digits) : fixed(term.value, digits)}</dd></div>`)}
      <div class="terms-sum"><dt>expected<span class="source">${note}</span></dt><dd>${text}</dd></div></dl>
  <//>`;
}
