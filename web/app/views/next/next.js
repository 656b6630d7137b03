import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { Caution } from '../../components/parts.js';
import { currentCheck } from '../../state/check.js';
import { address } from '../../state/route.js';
import { weighedFor } from '../../state/scout.js';
import { isLookAlike } from '../../words/structures.js';
import { Thumb } from '../tally/thumb.js';
import { openReading } from './open-reading.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Advice} Advice */
/** @typedef {import('../../state/check.js').Checked} Checked */

const COUNTS = ['No', 'One', 'Two', 'Three', 'Four', 'Five', 'Six'];

/** The fourth station: what to measure next, best first. @param {{ doc: CaseDoc }} props */
export function NextStation({ doc }) {
  const { found, fresh } = currentCheck.value;
  if (!found) return html`<div
    class="empty"><p>Once readings and at least one structure are in, the measurements that would decide stand here, best first.</p>
    <a class="button primary"
      href=${address('case', doc.id, doc.structures.length ? 'readings' : 'structures')}>${doc.structures.length ? 'Enter readings' : 'Put up a structure'}</a></div>`;
  const stand = found.answer.candidates.filter((candidate) => candidate.verdict !== 'clashes').length;
  const advice = found.answer.next;
  return html`<div class="next ${fresh ? '' : 'stale'}">
    <p class="next-head">${COUNTS[stand] ?? stand} ${stand === 1 ? 'structure still stands' : 'structures still stand'}.${' '}
      ${advice.length ? 'Best first:' : outlook(stand, found.answer.candidates.some(isLookAlike) ? 0 : weighedFor(doc))}</p>
    <ul class="slips-next">${advice.map((entry, i) => html`<${Slip} key=${entry.measure + i} doc=${doc}
      found=${found} advice=${entry} />`)}</ul>
  </div>`;
}

/** What to say when there is nothing to measure. @param {number} stand structures still standing
 * @param {number} weighed look-alikes weighed beside them */
function outlook(stand, weighed) {
  if (stand > 1) return 'No measurement on the list would tell them apart.';
  if (stand === 1 && weighed) return 'None of the look-alikes weighed beside it comes near.';
  return stand === 1 ? 'Put up what else it could be before resting on it.' : 'Put up another structure: none of these made the readings.';
}

/** @param {{ doc: CaseDoc, found: Checked, advice: Advice }} props */
function Slip({ doc, found, advice }) {
  const [pair] = advice.separates;
  return html`<li class="next-slip">
    <button type="button" class="next-open" onClick=${() => openReading(doc, advice)}>
      <span class="next-title"><b><${Words} text=${advice.measure} /></b><span>${advice.effort}</span></span>
      ${pair && pair.length >= 2 ? html`<span class="scales"><${Thumb} doc=${doc} found=${found}
        at=${/** @type {number} */ (pair[0])} />
        <span class="scales-beam"><svg viewBox="0 0 100 12" preserveAspectRatio="none" aria-hidden="true"><path
          d="M0 6H100M50 0V12" /></svg>
          <span>about <b>${Math.round(advice.expected_db)}</b> decibans</span></span>
        <${Thumb} doc=${doc} found=${found} at=${/** @type {number} */ (pair[1])} /></span>`
        : html`<span class="scales-plain">about <b>${Math.round(advice.expected_db)}</b> decibans</span>`}
      <span class="next-why"><${Words} text=${advice.why} /></span>
      ${advice.if_then.map((line) => html`<span class="next-why" key=${line}><${Words} text=${line} /></span>`)}
    </button>
    ${advice.separates.length > 1 && html`<p
      class="hint">and ${advice.separates.length - 1} more ${advice.separates.length === 2 ? 'pair' : 'pairs'}</p>`}
    ${advice.cautions.map((line) => html`<${Caution} key=${line}>${line}<//>`)}
  </li>`;
}
