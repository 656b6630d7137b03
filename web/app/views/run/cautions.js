import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Words } from '../../components/chem.js';

/** @typedef {import('./types').ReagentCaution} ReagentCaution */

/** What to mind with what was added: the gravest in a line each, all of it one tap away.
 * @param {{ cautions: ReagentCaution[], without: string[] }} props */
export function Cautions({ cautions, without }) {
  const [open, setOpen] = useState(false);
  return html`<div class="caution run-cautions" role="note">
    ${cautions.map((entry) => html`<p key=${entry.reagent}><b><${Words} text=${entry.reagent} />:</b> <${Words} text=${open ? entry.words : entry.gravest} />.
      ${open && entry.incompatibilities && html` Keep from: <${Words} text=${entry.incompatibilities} />.`}
      ${entry.quench && html` Quench: <${Words} text=${open ? entry.quench : firstOf(entry.quench)} />.`}
      ${open && html`<span class="source">${entry.source}</span>`}</p>`)}
    ${open && without.length > 0 && html`<p>None kept here for ${without.join(', ')}: that is no sign of safety.</p>`}
    <p>Local rules, the supplier's safety sheet and licensed practice come first.</p>
    ${cautions.length > 0 && html`<button type="button" class="link-button run-more" aria-expanded=${String(open)} onClick=${() => setOpen(!open)}>${open ? 'Less' : 'All cautions'}</button>`}
  </div>`;
}

/** @param {string} text */
const firstOf = (text) => text.split(';')[0] ?? text;
