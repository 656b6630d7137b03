import { html } from 'htm/preact';
import { GrowSheet } from '../grow/grow-sheet.js';
import { clear } from '../grow/growth.js';
import { CompoundSheet, putCompound } from './compound-sheet.js';
import { ReagentsSheet } from './reagents-sheet.js';
import { RunSheet } from './run-sheet.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('./compound-sheet.js').Part} Part */

/** Growing the start or the partner. @param {{ doc: CaseDoc, part: Part }} props */
function GrowPart({ doc, part }) {
  const use = (/** @type {CaseDoc} */ of, /** @type {import('../grow/types').Canvas} */ drawn) => {
    putCompound(of, part, { smiles: drawn.smiles, name: '' });
    clear(`${of.id} ${part}`);
  };
  const purpose = { title: part === 'start' ? 'Grow the start' : 'Grow the partner', done: 'Use this', back: ['case', doc.id, 'structures', 'run', part], use };
  return html`<${GrowSheet} doc=${doc} name=${part} purpose=${purpose} />`;
}

/** What was run: the step, and its sheets for the compounds and the reagents. @param {{ doc: CaseDoc, sheet: string }} props */
export function Run({ doc, sheet }) {
  if (sheet === 'start' || sheet === 'partner') return html`<${CompoundSheet} doc=${doc} part=${sheet} key=${sheet} />`;
  if (sheet === 'grow-start' || sheet === 'grow-partner') return html`<${GrowPart} doc=${doc} part=${/** @type {Part} */ (sheet.slice('grow-'.length))} key=${sheet} />`;
  return sheet === 'reagents' ? html`<${ReagentsSheet} doc=${doc} />` : html`<${RunSheet} doc=${doc} />`;
}
