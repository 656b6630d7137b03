import { html } from 'htm/preact';
import { Drawing, Svg } from '../../components/drawing.js';
import { structureName } from '../../words/structures.js';

/** Small drawing of a weighed candidate.
 * @param {{ doc: import('../../types').CaseDoc, found: import('../../state/check.js').Checked, at: number }} props */
export function Thumb({ doc, found, at }) {
  const id = found.order[at];
  const own = doc.structures.find((entry) => entry.id === id);
  const name = structureName(doc, found, at);
  if (own) return html`<${Svg} svg=${own.svg} label=${name} class="thumb-drawing" />`;
  const candidate = found.answer.candidates[at];
  return candidate ? html`<${Drawing} structure=${candidate.smiles} label=${name} width=${160} height=${100} class="thumb-drawing" />` : null;
}
