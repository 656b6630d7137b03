import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Words } from '../../components/chem.js';
import { Icon } from '../../components/icon.js';
import { Trouble } from '../../components/parts.js';
import { useAnswer } from '../../state/use-answer.js';
import { predictQuestion } from '../structures/predicted.js';

/** @typedef {import('./types').Change} Change */

/** Lines read in ten seconds. */
const AT_A_GLANCE = 6;
/** @type {Record<Change['way'], 'plus' | 'minus' | 'right' | 'check'>} */
const SIGNS = { comes: 'plus', goes: 'minus', moves: 'right', stays: 'check' };

/** What should have changed on the way to a product: the most telling first, the rest one tap away.
 * @param {{ doc: import('../../types').CaseDoc, start: string, product: string }} props */
export function Changes({ doc, start, product }) {
  const [all, setAll] = useState(false);
  const { smiles, medium, ...conditions } = /** @type {any} */ (predictQuestion(doc, product));
  const { value, fault } = useAnswer('changes', { start, product: smiles, ...conditions });
  const changes = /** @type {Change[]} */ (/** @type {any} */ (value)?.changes ?? []);
  if (fault) return html`<${Trouble} fault=${fault} />`;
  if (!value) return html`<p class="whisper">comparing the two</p>`;
  return html`<ul class="run-changes">${(all ? changes : changes.slice(0, AT_A_GLANCE)).map((change) => html`<li key=${change.kind + change.way + change.where + change.text}>
      <${Icon} name=${SIGNS[change.way]} size=${22} /><span><b><${Words} text=${change.kind} /> ${withUnit(change.where)}</b> ${change.way === 'moves' || change.way === 'stays' ? '' : change.way}
        <span class="case-line"><${Words} text=${change.text} /></span>${all && change.source && html`<span class="source">${change.source}</span>`}</span></li>`)}</ul>
    ${changes.length > 0 && html`<button type="button" class="link-button run-more" aria-expanded=${String(all)} onClick=${() => setAll(!all)}>${all ? 'Less' : 'All, with sources'}</button>`}`;
}

/** @param {string} where */
const withUnit = (where) => where.replace('cm-1', 'cm\u207b\u00b9').replace(/^-/, '\u2212');
