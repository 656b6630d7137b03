import { html } from 'htm/preact';
import { Formula } from '../../components/chem.js';
import { StructureDrawing } from '../../components/structure-drawing.js';
import { Section, Trouble } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { Sign } from '../../components/sign.js';
import { changeCase, changeWithUndo } from '../../state/cases.js';
import { address, go } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { letterOf, nameOf } from '../../words/structures.js';
import { touchStructure } from '../tally/touched.js';
import { verdictFor } from './card.js';
import { Predicted } from './predicted.js';
import { useState } from 'preact/hooks';

/** One structure: big, with what can be done and what it should show.
 * @param {{ doc: import('../../types').CaseDoc, id: string }} props */
export function OneStructure({ doc, id }) {
  const [lit, setLit] = useState(/** @type {number[]} */ ([]));
  const structure = doc.structures.find((entry) => entry.id === id);
  const back = address('case', doc.id, 'structures');
  const { value, fault } = useAnswer('describe', structure ? { structure: structure.smiles } : null);
  const described = /** @type {import('../../types').Description | null} */ (value);
  if (!structure) return html`<${Sheet} title="Structure" back=${back}><p
    class="hint">This structure was removed.</p><//>`;
  const intended = doc.intended === id;
  const rename = (/** @type {string} */ name) => changeCase(doc.id, (draft) => {
    const entry = draft.structures.find((other) => other.id === id);
    if (entry) entry.name = name;
  });
  const remove = () => {
    changeWithUndo(doc.id, `${nameOf(doc, id)} removed`, (draft) => {
      draft.structures = draft.structures.filter((entry) => entry.id !== id);
      if (draft.intended === id) draft.intended = '';
    });
    go('case', doc.id, 'structures');
  };
  return html`<${Sheet} title="Structure ${letterOf(doc, id)}" back=${back} class="one-sheet"
    sign=${html`<${Sign} verdict=${verdictFor(id)} size=${26} />`}>
    <${StructureDrawing} structure=${structure} atoms=${lit} label="Drawing of ${nameOf(doc, id)}" size="big" />
    <div class="two-up">
      <button type="button" class="toggle" aria-pressed=${String(intended)}
        onClick=${() => changeCase(doc.id, (draft) => { draft.intended = intended ? '' : id; })}>${intended ? 'Intended' : 'Mark as intended'}</button>
      <button type="button" class="button" onClick=${remove}>Remove</button>
    </div>
    <button type="button" class="button" onClick=${() => { touchStructure(doc, structure.smiles); go('case', doc.id, 'tally', 'trace'); }}>Simulated trace, at any field</button>
    <label class="text-label">Call it<input class="text-field" autocomplete="off" value=${structure.name}
      placeholder="a name, if you like"
      onInput=${(/** @type {any} */ e) => rename(e.currentTarget.value)} /></label>
    <${Trouble} fault=${fault} />
    ${described && html`<dl class="facts-table">
      <div><dt>formula</dt><dd><${Formula} text=${described.formula} /></dd></div>
      <div><dt>unsaturations</dt><dd>${described.dbe}</dd></div>
      <div><dt>exact mass</dt><dd>${described.exact_mass.toFixed(4)}</dd></div>
      <div><dt>SMILES</dt><dd class="code">${described.smiles}</dd></div>
      ${described.inchikey && html`<div><dt>InChIKey</dt><dd class="code">${described.inchikey}</dd></div>`}
    </dl>`}
    <${Section} title="What it should show"><${Predicted} doc=${doc} structure=${structure} onLight=${setLit} /><//>
  <//>`;
}
