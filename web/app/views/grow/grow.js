import { html } from 'htm/preact';
import { asFault, call } from '../../state/engine.js';
import { say } from '../../state/toast.js';
import { addStructure } from '../structures/add.js';
import { clear } from './growth.js';
import { GrowSheet } from './grow-sheet.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** Growing a structure for the case itself. @param {{ doc: CaseDoc }} props */
export function Grow({ doc }) {
  const use = async (/** @type {CaseDoc} */ of, /** @type {import('./types').Canvas} */ drawn) => {
    try {
      addStructure(of, await call('describe', { structure: drawn.smiles }), '');
      clear(`${of.id} structure`);
    } catch (error) {
      say(asFault(error).message);
    }
  };
  return html`<${GrowSheet} doc=${doc} name="structure" purpose=${{ title: 'Grow a structure', done: 'Use this structure', back: ['case', doc.id, 'structures'], use }} />`;
}
