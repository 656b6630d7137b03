import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Words } from '../../components/chem.js';

/** @typedef {import('./types').ReagentCaution} ReagentCaution */

/** What to mind with what was added: the gravest in a line each, all of it one tap away.
 * @param {{ cautions: ReagentCaution[], without: string[] }} props */
export function Cautions({ cautions, without }) {
  const [open, setOpen] = useState(false);
  const shown = cautions.filter(({ grave }) => open || grave);
  const rest = cautions.filter((entry) => !shown.includes(entry)).map(({ reagent }) => reagent);
  return html`<div class="caution run-cautions" role="note">
    ${shown.map((entry) => html`<${One} key=${entry.reagent} caution=${entry} open=${open} />`)}
    ${open && without.length > 0 && html`<p>None kept here for ${without.join(', ')}: that is no sign of safety.</p>`}
    <div class="run-rules"><p>${rest.length > 0 && html`Mind <${Words} text=${rest.join(', ')} /> too. `}Local rules, the supplier's safety sheet and licensed practice come first.</p>
      ${cautions.length > 0 && html`<button type="button" class="link-button run-more" aria-expanded=${String(open)} aria-label=${open ? 'Show the gravest only' : 'All cautions'}
        onClick=${() => setOpen(!open)}>${open ? 'Less' : 'All'}</button>`}</div>
  </div>`;
}

/** @param {{ caution: ReagentCaution, open: boolean }} props */
const One = ({ caution: { reagent, gravest, words, incompatibilities, quench, source }, open }) => html`<p><b><${Words} text=${reagent} />:</b> <${Words} text=${open ? words : gravest} />.
  ${open && incompatibilities && html` Keep from: <${Words} text=${incompatibilities} />.`}
  ${quench && html` Quench: <${Words} text=${open ? quench : firstOf(quench)} />.`}
  ${open && html`<span class="source">${source}</span>`}</p>`;

/** @param {string} text */
const firstOf = (text) => text.split(';')[0] ?? text;
