import { plural, timesAsLikely } from './numbers.js';
import { structureName } from './structures.js';

/** @typedef {import('../types').CaseDoc} CaseDoc */
/** @typedef {import('../types').Weighed} Weighed */
/** @typedef {import('../types').Verdict} Verdict */
/** @typedef {import('../state/check.js').Checked} Checked */

/** Two structures closer than this many decibans (ten times as likely) are spoken of as not told apart. */
const TELLS_APART_DB = 10;

/** Where the structure of the verdict stands among the weighed: the intended one, else the best.
 * @param {CaseDoc} doc @param {Checked} found */
export function subjectAt(doc, found) {
  const intended = doc.intended ? found.order.indexOf(doc.intended) : -1;
  return Math.max(intended, 0);
}

/** @param {CaseDoc} doc @param {Checked} found @returns {Verdict} */
export const verdictOf = (doc, found) => found.answer.candidates[subjectAt(doc, found)]?.verdict ?? 'none';

/** The verdict as a bold word and the rest of its sentence.
 * @param {CaseDoc} doc @param {Checked} found @returns {{ verdict: Verdict, word: string, rest: string }} */
export function sentence(doc, found) {
  const at = subjectAt(doc, found);
  const all = found.answer.candidates;
  const subject = all[at];
  if (!subject) return { verdict: 'none', word: 'Nothing weighed yet.', rest: '' };
  const names = all.map((_, i) => structureName(doc, found, i));
  const rest = subject.verdict === 'clashes' ? clash(subject, all, names, at) : standing(all, names, at);
  const word = { fits: 'Fits.', clashes: 'Clashes.', undecided: 'Undecided.', none: 'Not measured.' }[subject.verdict];
  return { verdict: subject.verdict, word, rest };
}

/** @param {Weighed} subject @param {Weighed[]} all @param {string[]} names @param {number} at */
function clash(subject, all, names, at) {
  const worst = [...subject.findings].sort((a, b) => a.weight_db - b.weight_db)[0];
  const better = all.findIndex((entry, i) => i !== at && entry.verdict === 'fits');
  const instead = better < 0 ? '' : ` ${names[better]} fits instead.`;
  return `${worst ? worst.text : ''}${instead}`.trim();
}

/** @param {Weighed[]} all @param {string[]} names @param {number} at */
function standing(all, names, at) {
  const subject = /** @type {Weighed} */ (all[at]);
  const others = all.map((entry, i) => ({ entry, name: names[i], i })).filter(({ i }) => i !== at);
  if (!others.length) return 'It stands alone: put up what else it could be.';
  const near = others.filter(({ entry }) => Math.abs(entry.weight_db - subject.weight_db) < TELLS_APART_DB);
  const ahead = near.filter(({ entry }) => entry.weight_db > subject.weight_db);
  if (ahead[0] && ahead[0].entry.weight_db - subject.weight_db >= 3) return `${ahead[0].name} is ${gap(ahead[0].entry, subject)} ahead.`;
  if (near.length) return `${list(near.map(({ name }) => name ?? ''))} ${near.length > 1 ? 'are' : 'is'} not told apart from it by these readings.`;
  const first = others[0];
  if (!first) return '';
  const lead = subject.weight_db - first.entry.weight_db;
  return lead >= 0 ? `The nearest, ${first.name}, is ${Math.round(lead)} behind: ${timesAsLikely(lead)}.`
    : `${first.name} is ${Math.round(-lead)} ahead.`;
}

/** @param {Weighed} a @param {Weighed} b */
const gap = (a, b) => Math.round(a.weight_db - b.weight_db);

/** @param {string[]} names */
function list(names) {
  const short = names.length > 3 ? [...names.slice(0, 2), `${names.length - 2} more`] : names;
  return short.length < 2 ? short.join('') : `${short.slice(0, -1).join(', ')} and ${short.at(-1)}`;
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
