import { html } from 'htm/preact';
import { Drawing } from '../../components/drawing.js';
import { StructureDrawing } from '../../components/structure-drawing.js';
import { structureName } from '../../words/structures.js';

/** Small drawing of a weighed candidate.
 * @param {{ doc: import('../../types').CaseDoc, found: import('../../state/check.js').Checked, at: number }} props */
export function Thumb({ doc, found, at }) {
  const id = found.order[at];
  const own = doc.structures.find((entry) => entry.id === id);
  const name = structureName(doc, found, at);
  if (own) return html`<${StructureDrawing} structure=${own} label=${name} size="thumb" />`;
  const candidate = found.answer.candidates[at];
  return candidate ? html`<${Drawing} structure=${candidate.smiles} label=${name} width=${100} height=${60}
    class="drawing-thumb" />` : null;
}
