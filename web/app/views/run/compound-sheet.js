import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Formula } from '../../components/chem.js';
import { Drawing } from '../../components/drawing.js';
import { Section } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { address, go } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { nameOf } from '../../words/structures.js';
import { changeStep, runOf } from './runs.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('./types').Compound} Compound */
/** @typedef {'start' | 'partner'} Part */

/** @param {CaseDoc} doc @param {Part} part @param {Compound | null} compound */
export function putCompound(doc, part, compound) {
  changeStep(doc.id, { [part]: compound });
  go('case', doc.id, 'structures', 'run');
}

const TITLES = { start: 'Started from', partner: 'The partner' };
const LISTED = 12;

/** Which compound went in: one of the case, grown, or by name or SMILES. @param {{ doc: CaseDoc, part: Part }} props */
export function CompoundSheet({ doc, part }) {
  const [text, setText] = useState('');
  const plain = text.trim();
  const { value: listed } = useAnswer('names', plain ? { query: plain, limit: LISTED } : null, { delay: 120 });
  const { value: read } = useAnswer('describe', plain ? { structure: plain } : null, { delay: 250 });
  const names = /** @type {(Compound & { formula: string })[]} */ (plain ? /** @type {any} */ (listed)?.names ?? [] : []);
  const described = /** @type {import('../../types').Description | null} */ (plain ? read : null);
  const own = doc.structures.filter(({ smiles }) => smiles).map(({ id, smiles, formula }) => ({ name: nameOf(doc, id), smiles, formula }));
  const put = (/** @type {Compound} */ { name, smiles }) => putCompound(doc, part, { name, smiles });
  const row = (/** @type {Compound & { formula: string }} */ entry) => html`<li key=${entry.name + entry.smiles}><button type="button" class="pick pick-drawn" onClick=${() => put(entry)}>
    <${Drawing} structure=${entry.smiles} label="" width=${100} height=${60} class="drawing-thumb" />
    <span><b>${entry.name || entry.smiles}</b><span class="case-line"><${Formula} text=${entry.formula} /></span></span></button></li>`;
  return html`<${Sheet} title=${TITLES[part]} back=${address('case', doc.id, 'structures', 'run')}>
    <input class="text-field search" type="text" inputmode="search" aria-label="Name or SMILES" placeholder="name or SMILES" autocomplete="off" autocapitalize="off"
      spellcheck=${false} value=${text} onInput=${(/** @type {any} */ e) => setText(e.currentTarget.value)} />
    <div class=${runOf(doc.id)[part] ? 'two-up' : ''}><a class="button primary" href=${address('case', doc.id, 'structures', 'run', `grow-${part}`)}>Grow it</a>
      ${runOf(doc.id)[part] && html`<button type="button" class="button" onClick=${() => putCompound(doc, part, null)}>${part === 'start' ? 'Leave it open' : 'No partner'}</button>`}</div>
    <div aria-live="polite">
      ${(names.length > 0 || described) && html`<ul class="picks">${described && row({ name: '', smiles: described.smiles, formula: described.formula })}${names.map(row)}</ul>`}
      ${plain && listed && !names.length && !described && html`<p class="hint">No such name among the common ones, and no SMILES either.</p>`}
    </div>
    ${own.length > 0 && html`<${Section} title="Of this case"><ul class="picks">${own.map(row)}</ul><//>`}
  <//>`;
}
