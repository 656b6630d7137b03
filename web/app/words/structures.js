/** @typedef {import('../types').CaseDoc} CaseDoc */

/** Letter of a structure in its case: A, B, ... Z, AA. @param {number} at @returns {string} */
export function letter(at) {
  const last = String.fromCharCode(65 + (at % 26));
  return at < 26 ? last : letter(Math.floor(at / 26) - 1) + last;
}

/** @param {CaseDoc} doc @param {string} id */
export const letterOf = (doc, id) => letter(doc.structures.findIndex((entry) => entry.id === id));

/** @param {CaseDoc} doc @param {string} id */
export function nameOf(doc, id) {
  const found = doc.structures.find((entry) => entry.id === id);
  return found ? found.name || `structure ${letterOf(doc, id)}` : '';
}

/** Name of the weighed candidate at `at`; a rival is called what the engine's sentences call it.
 * @param {CaseDoc} doc @param {import('../state/check.js').Checked} found @param {number} at */
export function structureName(doc, found, at) {
  const id = found.order[at] ?? '';
  return id ? nameOf(doc, id) : found.answer.candidates[at]?.name ?? '';
}

/** Look-alikes are numbered; what a step has left goes by its part in it. @param {import('../types').Weighed} candidate */
export const isLookAlike = ({ index, name }) => index === null && /^rival \d/.test(name);

/** Atoms other than hydrogen. @param {string} formula as the engine writes it */
export const heavyAtoms = (formula) =>
  [...formula.matchAll(/([A-Z][a-z]?)(\d*)/g)].reduce((sum, [, symbol, n]) => sum + (symbol === 'H' ? 0 : Number(n || 1)), 0);
