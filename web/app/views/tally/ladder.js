import { html } from 'htm/preact';
import { Sign, VERDICT_WORDS } from '../../components/sign.js';
import { signed } from '../../words/numbers.js';
import { letterOf, structureName } from '../../words/structures.js';
import { Thumb } from './thumb.js';
import { touchStructure } from './touched.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../state/check.js').Checked} Checked */

/** A scale that holds all weights, in round steps, and its ticks. @param {number[]} weights decibans */
export function scaleOf(weights) {
  const low = Math.min(0, ...weights);
  const high = Math.max(10, ...weights);
  const step = [5, 10, 20, 50, 100, 200, 500, 1000].find((size) => (high - low) / size <= 4) ?? 2000;
  const from = low < 0 ? Math.floor((low - step * 0.15) / step) * step : 0;
  const to = Math.ceil((high + step * 0.15) / step) * step;
  const ticks = [];
  for (let tick = from; tick <= to; tick += step) ticks.push(tick);
  return { ticks, place: (/** @type {number} */ db) => ((db - from) / (to - from)) * 100 };
}

/** All structures on one scale of decibans, best first; a tap takes one under the finger.
 * @param {{ doc: CaseDoc, found: Checked, at: number }} props */
export function Ladder({ doc, found, at }) {
  const all = found.answer.candidates;
  const { ticks, place } = scaleOf(all.map((candidate) => candidate.weight_db));
  return html`<div class="ladder" role="group" aria-label="Structures by weight of evidence, best first">
    <div class="ladder-grid" aria-hidden="true"><svg viewBox="0 0 100 100" preserveAspectRatio="none">
      ${ticks.map((tick) => html`<path key=${tick} class="ladder-line" d="M${place(tick)} 0V100" />`)}</svg></div>
    ${all.map((candidate, i) => html`<button type="button" class="rung" key=${candidate.smiles}
      aria-pressed=${String(i === at)}
      onClick=${() => touchStructure(doc, candidate.smiles)}
      aria-label="${structureName(doc, found, i)}: ${VERDICT_WORDS[candidate.verdict]}, ${signed(candidate.weight_db)} decibans">
      <span class="rung-thumb"><${Thumb} doc=${doc} found=${found} at=${i} />${found.order[i] && html`<span
        class="rung-letter" aria-hidden="true">${letterOf(doc, found.order[i])}</span>`}</span>
      <span class="rung-line"><svg viewBox="0 0 100 10" preserveAspectRatio="none"><path
        d="M0 5H${place(candidate.weight_db)}" /></svg>
        <span class="rung-sign" style=${{ left: `${place(candidate.weight_db)}%` }}><${Sign} verdict=${candidate.verdict} size=${22} quiet /></span></span>
    </button>`)}
    <div class="ladder-scale" aria-hidden="true">${ticks.map((tick) => html`<span
      key=${tick} style=${{ left: `${place(tick)}%` }}>${signed(tick)}</span>`)}</div>
    <p class="ladder-words">decibans: each 10 is ten times as likely</p>
  </div>`;
}
