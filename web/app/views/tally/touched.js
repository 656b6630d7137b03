import { signal } from '@preact/signals';
import { subjectAt } from '../../words/verdict.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../state/check.js').Checked} Checked */

/** SMILES of the structure under the finger, per case. @type {import('@preact/signals').Signal<Record<string, string>>} */
const chosen = signal({});

/** @param {CaseDoc} doc @param {string} smiles */
export const touchStructure = (doc, smiles) => { chosen.value = { ...chosen.value, [doc.id]: smiles }; };

/** Place of the touched structure among the weighed; the one of the verdict until another is touched.
 * @param {CaseDoc} doc @param {Checked} found */
export function touchedAt(doc, found) {
  const at = found.answer.candidates.findIndex((candidate) => candidate.smiles === chosen.value[doc.id]);
  return at >= 0 ? at : subjectAt(doc, found);
}
