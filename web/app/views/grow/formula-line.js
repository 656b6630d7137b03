import { html } from 'htm/preact';
import { Formula } from '../../components/chem.js';
import { fixed, plural } from '../../words/numbers.js';

/** @typedef {import('./types').Canvas} Canvas */
/** @typedef {import('./types').Against} Against */

/** The formula as it stands, and what it still lacks against that of the sample. @param {{ drawn: Canvas | null }} props */
export function FormulaLine({ drawn }) {
  if (!drawn) return html`<div class="facts grow-facts"><span>nothing drawn yet</span></div>`;
  const { formula, exact_mass: mass, dbe, against } = drawn;
  return html`<div class="facts grow-facts" role="status">
    <b><${Formula} text=${formula} /></b>
    ${against ? html`<${Gap} against=${against} />` : html`<span>${fixed(mass, 4)}</span>`}
    <span class="grow-dbe">${against && against.dbe !== null && dbe !== null ? `${dbe} of ${plural(against.dbe, 'unsaturation')}`
      : dbe !== null && plural(dbe, 'unsaturation')}</span>
  </div>`;
}

/** @param {{ against: Against }} props */
function Gap({ against: { needs, over } }) {
  if (!needs && !over) return html`<b class="grow-met">all of the formula</b>`;
  return html`<span>${needs && html`needs <${Formula} text=${needs} /> more`}${needs && over && ', '}
    ${over && html`<span class="grow-over"><${Formula} text=${over} /> too many</span>`}</span>`;
}
