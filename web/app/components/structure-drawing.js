import { html } from 'htm/preact';
import { Drawing } from './drawing.js';

/** Sizes in which structures are drawn, CSS pixels: letters stay legible because each is drawn for its place. */
const SIZES = { thumb: [100, 60], card: [150, 112], big: [354, 260] };

/** A structure of a case at one of the house sizes.
 * @param {{ structure: import('../types').Candidate, label: string, size: keyof typeof SIZES, atoms?: number[] }} props */
export function StructureDrawing({ structure, label, size, atoms }) {
  const [width, height] = SIZES[size];
  return html`<${Drawing} structure=${structure.smiles} label=${label} width=${width} height=${height} atoms=${atoms}
    meanwhile=${structure.svg} class="drawing-${size}" />`;
}
