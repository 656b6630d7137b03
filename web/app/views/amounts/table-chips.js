import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Chips } from '../../components/parts.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed } from '../../words/numbers.js';

/** @typedef {import('./types').AmountTables} AmountTables */

/** Chips shown before anybody asks for all; once one is chosen, it stands alone. */
const FIRST = 8;

/** The engine's tables for amounts; empty until they are there. @param {import('../../types').CaseDoc} doc @returns {AmountTables} */
export function useTables(doc) {
  const { value } = useAnswer('amount_tables', doc.solvent ? { nmr_solvent: doc.solvent } : {});
  return /** @type {any} */ (value) ?? { standards: [], residues: [] };
}

/** Names of a table to choose from, the usual ones first; the whole table one tap away.
 * @param {{ label: string, entries: { name: string, lines: number[] }[], value: string, onPick: (name: string) => void, optional?: boolean }} props */
export function TableChips({ label, entries, value, onPick, optional = true }) {
  const [all, setAll] = useState(false);
  const chosen = entries.filter(({ name }) => name === value);
  const shown = all ? entries : chosen.length ? chosen : entries.slice(0, FIRST);
  const option = (/** @type {{ name: string, lines: number[] }} */ { name, lines }) => ({
    value: name, text: name, name: lines.length ? `${name}, ${lines.map((ppm) => fixed(ppm, 2)).join(' and ')} ppm` : name,
  });
  return html`<${Chips} label=${label} heading class="chips-flow" optional=${optional} value=${value} options=${shown.map(option)}
      onPick=${(/** @type {string} */ name) => { setAll(false); onPick(name); }} />
    ${entries.length > shown.length && html`<button type="button" class="link-button" onClick=${() => setAll(true)}>All ${entries.length} of the table</button>`}`;
}
