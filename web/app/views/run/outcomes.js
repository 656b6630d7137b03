import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Formula, Words } from '../../components/chem.js';
import { Drawing } from '../../components/drawing.js';
import { Icon } from '../../components/icon.js';
import { heavyAtoms } from '../../words/structures.js';
import { Changes } from './changes.js';

/** @typedef {import('./types').Outcome} Outcome */
/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** Small companions (water, methanol, CO2 ...) are not proposed as structures of the sample. */
const SMALLEST = 4;
const PRODUCTS_PROPOSED = 3;

/** What is ticked before anybody has: the likely products, the first of what else may be there, and the start.
 * @param {Outcome[]} outcomes @param {number} at */
export function proposed(outcomes, at) {
  const outcome = /** @type {Outcome} */ (outcomes[at]);
  if (outcome.role === 'no reaction') return true;
  if (heavyAtoms(outcome.formula) < SMALLEST) return false;
  const before = outcomes.slice(0, at).filter(({ role, formula }) => role === outcome.role && heavyAtoms(formula) >= SMALLEST).length;
  return before < (outcome.role === 'product' ? PRODUCTS_PROPOSED : 1);
}

/** One thing that may be in the flask: a tap on it tells more, a tap on the box takes or leaves it.
 * @param {{ doc: CaseDoc, start: string, outcome: Outcome, formula: string, ticked: boolean, onTick: () => void }} props */
export function OutcomeRow({ doc, start, outcome, formula, ticked, onTick }) {
  const [open, setOpen] = useState(false);
  const { smiles, role, name, note, stereo } = outcome;
  return html`<li class="run-outcome">
    <button type="button" class="run-open" aria-expanded=${String(open)} onClick=${() => setOpen(!open)}>
      <${Drawing} structure=${smiles} label="Drawing of ${name}" width=${132} height=${92} class="run-drawing" />
      <span><b><${Words} text=${name} /></b><span class="case-line">${[role, stereo].filter(Boolean).join(', ')}</span>
        <span class="case-line"><${Formula} text=${outcome.formula} />${formula && outcome.formula === formula ? html`, <b>as the sample</b>` : ''}</span></span></button>
    <button type="button" class="run-tick" role="checkbox" aria-checked=${String(ticked)} aria-label="take over: ${name}" onClick=${onTick}>
      <span>${ticked && html`<${Icon} name="check" size=${22} />`}</span></button>
    ${open && html`<div class="run-more-of">${note && html`<p><${Words} text=${note} /></p>`}<p class="source">Source: ${outcome.source}</p>
      ${smiles !== start && html`<h3>What should have changed</h3><${Changes} doc=${doc} start=${start} product=${smiles} />`}</div>`}
  </li>`;
}
