import { html } from 'htm/preact';
import { signal } from '@preact/signals';
import { Formula } from '../../components/chem.js';
import { Svg } from '../../components/drawing.js';
import { Trouble } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { address } from '../../state/route.js';
import { canReadClipboard } from '../../state/screen.js';
import { useAnswer } from '../../state/use-answer.js';
import { plural } from '../../words/numbers.js';
import { addStructure } from './add.js';

/** Text of the box, kept while the sheet is closed and opened again. */
export const pastedStructure = signal('');
const named = signal('');

/** @typedef {import('../../types').Description} Description */

/** A structure from SMILES or CTfile text, drawn before it is taken over. @param {{ doc: import('../../types').CaseDoc }} props */
export function PasteStructure({ doc }) {
  const text = pastedStructure.value;
  const { value, fault, busy } = useAnswer('describe', text.trim() ? { structure: text } : null, { delay: 250 });
  const described = /** @type {Description | null} */ (text.trim() && !fault ? value : null);
  const take = () => {
    if (!described) return;
    addStructure(doc, described, named.value.trim());
    pastedStructure.value = '';
    named.value = '';
  };
  const fromClipboard = async () => { pastedStructure.value = await navigator.clipboard.readText(); };
  return html`<${Sheet} title="Paste a structure" back=${address('case', doc.id, 'structures')}
      foot=${html`<button type="button" class="button primary" disabled=${!described || busy}
        onClick=${take}>Put it up</button>`}>
    <textarea class="paste-box" rows="3" aria-label="SMILES or CTfile" spellcheck=${false} autocapitalize="off"
      value=${text}
      placeholder="SMILES, or the text of a CTfile" aria-invalid=${fault ? 'true' : undefined}
      onInput=${(/** @type {any} */ e) => { pastedStructure.value = e.currentTarget.value; }}></textarea>
    <div class="two-up">
      ${canReadClipboard && html`<button type="button" class="button"
        onClick=${() => fromClipboard().catch(() => {})}>From the clipboard</button>`}
      <button type="button" class="button" disabled=${!text}
        onClick=${() => { pastedStructure.value = ''; }}>Empty the box</button>
    </div>
    <${Trouble} fault=${fault} />
    ${described && html`<${Described} described=${described} />
      <label class="text-label">Call it<input class="text-field" autocomplete="off" value=${named.value}
        placeholder="a name, if you like"
        onInput=${(/** @type {any} */ e) => { named.value = e.currentTarget.value; }} /></label>`}
  <//>`;
}

/** @param {{ described: Description }} props */
export function Described({ described }) {
  return html`<div class="described"><${Svg} svg=${described.svg} label="Drawing of ${described.smiles}"
    class="drawing-big" />
    <p class="described-line"><b><${Formula}
      text=${described.formula} /></b> <span>${described.exact_mass.toFixed(4)}</span>
      <span>${plural(described.dbe, 'unsaturation')}</span></p>
    ${described.warnings.map((warning) => html`<p class="hint" key=${warning}>${warning}</p>`)}</div>`;
}
