import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Formula } from '../../components/chem.js';
import { Drawing } from '../../components/drawing.js';
import { Trouble } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { asFault, call } from '../../state/engine.js';
import { address } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { addStructure } from './add.js';

/** @typedef {{ name: string, smiles: string, formula: string, source: string }} Named */

/** A structure by its common name. @param {{ doc: import('../../types').CaseDoc }} props */
export function NameSheet({ doc }) {
  const [query, setQuery] = useState('');
  const [refused, setRefused] = useState(/** @type {import('../../types').Fault | null} */ (null));
  const { value, fault, busy } = useAnswer('names', { query: query.trim(), limit: 24 }, { delay: 120 });
  const names = /** @type {Named[]} */ (/** @type {any} */ (value)?.names ?? []);
  const take = async (/** @type {Named} */ entry) => {
    try {
      addStructure(doc, await call('describe', { structure: entry.smiles }), entry.name);
    } catch (error) {
      setRefused(asFault(error));
    }
  };
  return html`<${Sheet} title="By name" back=${address('case', doc.id, 'structures')}>
    <input class="text-field search" type="text" inputmode="search" aria-label="Name" placeholder="name, or part of it"
      autocomplete="off" autocapitalize="off"
      spellcheck=${false} value=${query} onInput=${(/** @type {any} */ e) => setQuery(e.currentTarget.value)} />
    <${Trouble} fault=${fault ?? refused} />
    <div aria-live="polite">
      ${query.trim() && !busy && !names.length && html`<p
        class="hint">No such name in the list of common ones. Paste its SMILES instead.</p>`}
      <ul class="picks">${names.map((entry) => html`<li key=${entry.name + entry.smiles}>
        <button type="button" class="pick pick-drawn" onClick=${() => take(entry)}>
          <${Drawing} structure=${entry.smiles} label="" width=${100} height=${60} class="drawing-thumb" />
          <span><b>${entry.name}</b><span class="case-line"><${Formula}
            text=${entry.formula} /></span></span></button></li>`)}</ul>
    </div>
  <//>`;
}
