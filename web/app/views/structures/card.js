import { html } from 'htm/preact';
import { Formula, Words } from '../../components/chem.js';
import { Drawing } from '../../components/drawing.js';
import { StructureDrawing } from '../../components/structure-drawing.js';
import { Sign } from '../../components/sign.js';
import { changeWithUndo } from '../../state/cases.js';
import { currentCheck } from '../../state/check.js';
import { newId } from '../../state/document.js';
import { call } from '../../state/engine.js';
import { address } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { letterOf, structureName } from '../../words/structures.js';
import { formulaCheck } from './formula-check.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Candidate} Candidate */

/** Verdict on one structure of the case. @param {string} id */
export function verdictFor(id) {
  const { found } = currentCheck.value;
  const at = found ? found.order.indexOf(id) : -1;
  return found && at >= 0 ? found.answer.candidates[at]?.verdict ?? 'none' : 'none';
}

/** "C9H8O short, Cl too many" @param {{ check: ReturnType<typeof formulaCheck> }} props */
const Differs = ({ check }) => html`${check.short && html`<${Formula}
  text=${check.short} /> short`}${check.short && check.extra && ', '}
  ${check.extra && html`<${Formula} text=${check.extra} /> too many`}`;

/** @param {{ doc: CaseDoc, structure: Candidate }} props */
export function StructureCard({ doc, structure }) {
  const text = doc.formula.trim();
  const { value } = useAnswer('formula', text ? { text } : null);
  const check = formulaCheck(structure.formula, /** @type {any} */ (value)?.formula ?? '');
  const name = structure.name || `structure ${letterOf(doc, structure.id)}`;
  return html`<li><a class="card" href=${address('case', doc.id, 'structures', 'one', structure.id)}>
    ${doc.intended === structure.id && html`<span class="flag">intended</span>`}
    <b class="card-letter" aria-hidden="true">${letterOf(doc, structure.id)}</b>
    <${StructureDrawing} structure=${structure} label="Drawing of ${name}" size="card" />
    <span class="card-foot"><span class="card-name">${structure.name || html`<${Formula} text=${structure.formula} />`}
      ${check.differs ? html`<span class="card-formula card-differs"><${Differs} check=${check} /></span>`
        : structure.name && html`<span class="card-formula"><${Formula} text=${structure.formula} /></span>`}</span>
      <${Sign} verdict=${verdictFor(structure.id)} size=${22} /></span>
  </a></li>`;
}

/** How a rival was reached, without what its name says already: "the start of the step, unchanged".
 * @param {string} name @param {string} how */
const said = (name, how) => (how.startsWith(name) ? how.split(', ').slice(1).join(', ') : how);

/** A structure the program put up itself; dashed. @param {{ doc: CaseDoc, candidate: import('../../types').Weighed, at: number }} props */
export function RivalCard({ doc, candidate, at }) {
  const { found } = currentCheck.value;
  const name = found ? structureName(doc, found, at) : 'rival';
  const take = async () => {
    const entry = await call('describe', { structure: candidate.smiles });
    changeWithUndo(doc.id, 'Rival taken over', (draft) => {
      draft.structures.push({ id: newId(), source: candidate.smiles, name: '', smiles: entry.smiles, formula: entry.formula, svg: entry.svg });
    });
  };
  return html`<li><button type="button" class="card card-rival" onClick=${take}
    aria-label="Take ${name} over as a structure">
    <${Drawing} structure=${candidate.smiles} label=${name} width=${150} height=${112} class="drawing-card" />
    <span class="card-foot"><span class="card-name">${name}
      <span class="card-formula"><${Words} text=${said(name, candidate.how.join('; '))} /></span></span><${Sign} verdict=${candidate.verdict}
      size=${22} /></span>
  </button></li>`;
}
