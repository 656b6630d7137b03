import { plural } from './numbers.js';
import { letter, structureName } from './structures.js';

/** @typedef {import('../types').CaseDoc} CaseDoc */
/** @typedef {import('../types').Verdict} Verdict */
/** @typedef {import('../state/check.js').Checked} Checked */

/** Where the structure of the verdict stands among the weighed: the intended one, else the best of the case's own.
 * @param {CaseDoc} doc @param {Checked} found */
export function subjectAt(doc, found) {
  const intended = doc.intended ? found.order.indexOf(doc.intended) : -1;
  return Math.max(intended < 0 ? found.order.findIndex(Boolean) : intended, 0);
}

/** Where look-alikes are sought from: the structure of the verdict, unless it is ruled out and another of the case's own
 * does better. @param {CaseDoc} doc @param {Checked} found */
export function leadAt(doc, found) {
  const at = subjectAt(doc, found);
  return found.answer.candidates[at]?.verdict === 'clashes' ? Math.max(found.order.findIndex(Boolean), 0) : at;
}

/** @param {CaseDoc} doc @param {Checked} found @returns {Verdict} */
export const verdictOf = (doc, found) => found.answer.candidates[subjectAt(doc, found)]?.verdict ?? 'none';

/** The engine speaks of "structure B"; where the chemist gave it a name, that name is said.
 * @param {CaseDoc} doc @param {Checked} found @param {string} text */
export function named(doc, found, text) {
  return text.replace(/\b([Ss])tructure ([A-Z])\b/g, (whole, first, mark) => {
    const at = found.answer.candidates.findIndex(({ index }) => index !== null && letter(index) === mark);
    const name = at < 0 ? whole : structureName(doc, found, at);
    return first === 'S' ? name.charAt(0).toUpperCase() + name.slice(1) : name;
  });
}

/** The verdict as a bold word and the rest of its sentence.
 * @param {CaseDoc} doc @param {Checked} found @returns {{ verdict: Verdict, word: string, rest: string }} */
export function sentence(doc, found) {
  const subject = found.answer.candidates[subjectAt(doc, found)];
  if (!subject) return { verdict: 'none', word: 'Nothing weighed yet.', rest: '' };
  const [word = '', rest = ''] = subject.sentence.split(/(?<=^\w+\.) /);
  return { verdict: subject.verdict, word, rest: named(doc, found, rest) };
}

/** The line of the case list. @param {CaseDoc} doc @param {Checked} found @returns {import('../types').Summary} */
export function summaryOf(doc, found) {
  const verdict = verdictOf(doc, found);
  const stand = found.answer.candidates.filter((entry) => entry.verdict !== 'clashes').length;
  const text = {
    fits: 'fits', clashes: doc.intended ? 'intended clashes' : 'all clash',
    undecided: stand > 1 ? `${plural(stand, 'structure')} still stand` : 'undecided', none: '',
  }[verdict];
  return { verdict, text, lead: found.order[subjectAt(doc, found)] ?? '' };
}
