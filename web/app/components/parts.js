import { html } from 'htm/preact';

/** @typedef {import('../types').Fault} Fault */

/** @param {{ children: any }} props */
export const Caution = ({ children }) => html`<p class="caution" role="note">${children}</p>`;

/** What is wrong and the mend, beside the field it is about.
 * @param {{ fault: Fault | null, id?: string }} props */
export function Trouble({ fault, id }) {
  if (!fault) return null;
  return html`<p class="trouble"
    role="alert" id=${id}>${fault.message} ${fault.hint && html`<span>${fault.hint}</span>`}</p>`;
}

/** @param {{ title: any, aside?: any, children?: any, id?: string, class?: string }} props */
export function Section({ title, aside, children, id, class: extra = '' }) {
  return html`<section class="section ${extra}" aria-labelledby=${id}>
    <header class="section-head"><h2 id=${id}>${title}</h2>${aside && html`<p>${aside}</p>`}</header>
    ${children}
  </section>`;
}

/** A row of chips of which one (or none) is chosen. `heading` shows the label above them.
 * @param {{ label: string, options: { value: string, text: any, name?: string }[], value: string,
 *   onPick: (value: string) => void, class?: string, optional?: boolean, heading?: boolean }} props */
export function Chips({ label, options, value, onPick, class: extra = '', optional = true, heading = false }) {
  return html`<div class="chips ${extra}" role="group" aria-label=${label}>
    ${heading && html`<span class="chips-label" aria-hidden="true">${label}</span>`}
    ${options.map((option) => html`<button type="button" class="chip" key=${option.value}
      aria-pressed=${String(option.value === value)} aria-label=${option.name}
      onClick=${() => onPick(optional && option.value === value ? '' : option.value)}>${option.text}</button>`)}
  </div>`;
}

/** @param {{ children: any }} props */
export const Empty = ({ children }) => html`<p class="empty">${children}</p>`;
