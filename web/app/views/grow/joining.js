import { html } from 'htm/preact';
import { Formula } from '../../components/chem.js';
import { placeName } from './naming.js';

/** @typedef {import('./types').Canvas} Canvas */
/** @typedef {import('./types').Place} Place */

/** The second atom of a new bond: touched in the drawing, or taken from the list of those that have a hydrogen to give.
 * @param {{ drawn: Canvas | null, choice: Place[], onPick: (place: Place) => void, onCancel: () => void }} props */
export function Joining({ drawn, choice, onPick, onCancel }) {
  const name = (/** @type {Place} */ place) => (drawn ? placeName(drawn, place) : { short: '', words: '' });
  return html`<div class="grow-joining"><p>${choice.length ? 'Touch the atom to join to.' : 'No other atom here has a hydrogen to give.'}</p>
      <button type="button" class="button" onClick=${onCancel}>Leave it</button></div>
    <div class="grow-chips"><div class="chips chips-3">${choice.map((place) => html`<button type="button" class="chip grow-chip" key=${place.at} aria-label="join to ${name(place).words}"
      onClick=${() => onPick(place)}><span><${Formula} text=${name(place).short} /> <small>${place.at + 1}</small></span></button>`)}</div></div>`;
}
