import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { address } from '../../state/route.js';
import { scouting } from '../../state/scout.js';
import { isLookAlike, structureName } from '../../words/structures.js';
import { hasReadings } from '../rivals/proposals-sheet.js';
import { readingLabel } from './row-data.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Weighed} Weighed */
/** @typedef {import('../../state/check.js').Checked} Checked */

/** Whether the right structure may be missing from the list, and where to look for it.
 * @param {{ doc: CaseDoc, found: Checked }} props */
export function Unlisted({ doc, found }) {
  const doubt = doubtOf(doc, found);
  if (!doubt) return scouting.value ? html`<p class="whisper" role="status">looking for what else would fit</p>` : null;
  return html`<div class="unlisted" role="note"><p><b>The right structure may not be on the list.</b> <${Words} text=${doubt} /></p>
    <div class="two-up"><a class="button" href=${address('case', doc.id, 'structures', 'rivals')}>What else would fit?</a>
      ${hasReadings(doc) && html`<a class="button" href=${address('case', doc.id, 'structures', 'proposals')}>What do the readings say?</a>`}</div></div>`;
}

/** Why the list may lack the right structure, '' when nothing says so. @param {CaseDoc} doc @param {Checked} found */
function doubtOf(doc, found) {
  const { candidates } = found.answer;
  const own = candidates.filter((_, at) => found.order[at]);
  const near = candidates.filter((candidate) => isLookAlike(candidate) && candidate.verdict !== 'clashes');
  const best = own[0];
  if (!best) return '';
  if (near.length) return lookAlikes(near, best, structureName(doc, found, candidates.indexOf(best)));
  const standing = candidates.filter(({ verdict }) => verdict !== 'clashes');
  if (!standing.length) return own.length === 1 ? 'The one put up clashes with the readings.' : 'Every structure put up clashes with the readings.';
  const left = leftByAll(standing);
  return left.length ? `None of those still standing explains ${left.map((ref) => readingLabel(doc, found, ref)).join(', ')}.` : '';
}

/** @param {Weighed[]} near @param {Weighed} best @param {string} name */
function lookAlikes(near, best, name) {
  const gap = Math.round((near[0]?.weight_db ?? 0) - best.weight_db);
  const one = near.length === 1;
  const names = one ? 'Rival 1, put up unasked,' : `Rivals 1 to ${near.length}, put up unasked,`;
  const todo = `Keep or dismiss ${one ? 'it' : 'them'} in the list of what else would fit.`;
  if (gap > 0) return `${names} ${one ? 'suits' : 'suit'} the readings better than ${name}, ${one ? '' : 'the best '}by ${gap} decibans. ${todo}`;
  return `${names} ${one ? 'comes' : 'come'} as near as ${name}: the readings do not tell them apart. ${todo}`;
}

/** Signals that nothing standing explains and that have no name of their own (water, a solvent). @param {Weighed[]} standing */
function leftByAll(standing) {
  const left = standing.map(({ unexplained }) => unexplained.filter(({ name }) => !name).map(({ ref }) => ref));
  return (left[0] ?? []).filter((ref) => left.every((refs) => refs.includes(ref)));
}
