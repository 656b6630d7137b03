import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { OptionChip } from './offers.js';

/** @typedef {import('./types').Option} Option */

/** All groups that can be attached, found by a part of their name or formula, or by what they hold.
 * @param {{ options: Option[], busy: boolean, onTake: (option: Option) => void }} props */
export function Groups({ options, busy, onTake }) {
  const [sought, setSought] = useState('');
  const plain = sought.trim().toLowerCase();
  const found = options.filter(({ step, label, name }) => step === 'attach' && `${label} ${name}`.toLowerCase().includes(plain));
  const families = [...new Set(found.map(({ family }) => family))].sort((a, b) => ORDER.indexOf(a) - ORDER.indexOf(b));
  return html`<input class="text-field search" type="text" inputmode="search" aria-label="Search the groups" placeholder="name or formula of a group"
      autocomplete="off" autocapitalize="off" spellcheck=${false} value=${sought} onInput=${(/** @type {any} */ e) => setSought(e.currentTarget.value)} />
    ${families.map((family) => html`<div class="chips grow-family" key=${family} role="group" aria-label=${family}>
      <span class="chips-label" aria-hidden="true">${family}</span>
      ${found.filter((option) => option.family === family).map((option) => html`<${OptionChip} key=${option.label + option.name} option=${option} busy=${busy} onTake=${onTake} />`)}</div>`)}
    ${!found.length && html`<p class="hint">No group of that name can be attached here. Attach a part of it and grow on from there.</p>`}`;
}

const ORDER = ['carbon alone', 'with O', 'halogens', 'with N', 'with S, P, Si or B'];
