import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { currentCheck } from '../../state/check.js';
import { engineState } from '../../state/engine.js';
import { address } from '../../state/route.js';
import { wide } from '../../state/screen.js';
import { structureName } from '../../words/structures.js';
import { signed } from '../../words/numbers.js';
import { CheckTrouble } from '../readings/check-trouble.js';
import { Axis } from './axis.js';
import { Ladder } from './ladder.js';
import { Leftovers } from './leftovers.js';
import { Rows } from './rows.js';
import { rowsOf } from './row-data.js';
import { Table } from './table.js';
import { touchedAt } from './touched.js';
import { Unlisted } from './unlisted.js';
import { VerdictLine } from './verdict-line.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** The third station: what speaks for and against each structure. @param {{ doc: CaseDoc }} props */
export function Tally({ doc }) {
  const { found, fresh } = currentCheck.value;
  if (!found) return html`<div class="tally"><${CheckTrouble} /><${Nothing} doc=${doc} /></div>`;
  const at = touchedAt(doc, found);
  const candidate = found.answer.candidates[at];
  if (!candidate) return html`<${Nothing} doc=${doc} />`;
  const rows = rowsOf(doc, found, at);
  return html`<div class="tally ${fresh ? '' : 'stale'}" aria-busy=${String(!fresh)}>
    <${CheckTrouble} />
    <${VerdictLine} doc=${doc} found=${found} />
    <${Unlisted} doc=${doc} found=${found} />
    ${found.answer.warnings.map((warning) => html`<p class="hint" key=${warning}>${warning}</p>`)}
    <${Ladder} doc=${doc} found=${found} at=${at} />
    <header class="section-head tally-head"><h2>${structureName(doc, found, at)}</h2><p>${signed(candidate.weight_db)}</p></header>
    ${candidate.how.length > 0 && html`<p class="hint">Put up by the program: <${Words} text=${candidate.how.join('; ')} />.</p>`}
    <${Axis} doc=${doc} found=${found} at=${at} />
    <a class="button" href=${address('case', doc.id, 'tally', 'trace')}>Simulated trace, at any field</a>
    <${Rows} doc=${doc} rows=${rows} at=${at} />
    <${Leftovers} doc=${doc} found=${found} at=${at} />
    <a class="button" href=${address('case', doc.id, 'structures', 'rivals')}>What else would fit?</a>
    ${wide.value ? html`<${Table} doc=${doc} found=${found} />`
      : html`<a class="button"
        href=${address('case', doc.id, 'tally', 'table')}>Readings against structures, as a table</a>`}
  </div>`;
}

/** What is missing before anything can be weighed. @param {{ doc: CaseDoc }} props */
function Nothing({ doc }) {
  if (!doc.structures.length) return html`<div class="empty"><p>No structure has been put up yet.</p>
    <a class="button primary" href=${address('case', doc.id, 'structures')}>Put up a structure</a></div>`;
  const bare = !doc.h1.length && !doc.c13.length && !doc.ir.length && !doc.irClear.length && !doc.formula && !doc.hrms.found && !doc.ms.length && !doc.wet.length;
  if (bare) return html`<div class="empty"><p>No reading has been entered yet.</p>
    <a class="button primary" href=${address('case', doc.id, 'readings')}>Enter readings</a></div>`;
  if (engineState.value === 'waking') return html`<p
    class="empty">The chemistry is waking. The verdict appears here by itself.</p>`;
  return html`<p class="empty" role="status">Weighing the readings.</p>`;
}
