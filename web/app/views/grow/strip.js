import { html } from 'htm/preact';
import { Formula } from '../../components/chem.js';
import { Icon } from '../../components/icon.js';
import { beside, places } from './places.js';

/** @typedef {import('./types').Canvas} Canvas */
/** @typedef {import('./types').Place} Place */

/** What is touched, in words, and the way to the one before and after it.
 * @param {{ drawn: Canvas | null, touched: Place | null, name: { short: string, words: string } | null, onTouch: (place: Place) => void }} props */
export function Strip({ drawn, touched, name, onTouch }) {
  const all = drawn ? places(drawn) : [];
  const step = (/** @type {-1 | 1} */ by) => { const next = beside(all, touched, by); if (next) onTouch(next); };
  return html`<div class="grow-strip">
    <button type="button" class="grow-step" aria-label="The atom or bond before" disabled=${all.length < 2} onClick=${() => step(-1)}><${Icon} name="left" size=${28} /></button>
    <p aria-live="polite">${name && html`<b><${Formula} text=${name.short} /></b> <span>${name.words}</span>`}</p>
    <button type="button" class="grow-step" aria-label="The next atom or bond" disabled=${all.length < 2} onClick=${() => step(1)}><${Icon} name="right" size=${28} /></button>
  </div>`;
}
