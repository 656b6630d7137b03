import { computed, signal } from '@preact/signals';
import { dropCase, readCases, writeCase } from '../../store/cases.js';
import { emptyCase, mended, newId } from './document.js';
import { offerUndo } from './toast.js';

/** @typedef {import('../types').CaseDoc} CaseDoc */

/** @type {import('@preact/signals').Signal<CaseDoc[]>} */
export const cases = signal([]);
export const casesLoaded = signal(false);
/** Why the device could not keep the last change; '' when it did. */
export const storeTrouble = signal('');

export const ownCases = computed(() =>
  [...cases.value].sort((a, b) => b.changed.localeCompare(a.changed)));

export async function loadCases() {
  try {
    cases.value = (await readCases()).map(mended);
  } catch (error) {
    storeTrouble.value = `The cases on this device could not be read (${error}).`;
  }
  casesLoaded.value = true;
}

/** @param {string} id */
export const caseById = (id) => cases.value.find((doc) => doc.id === id) ?? null;

/** Writes of one case follow each other, so that the newest is the one that stays.
 * @type {Promise<unknown>} */
let writing = Promise.resolve();

/** Other tabs of this app on this device, told when a case has been written or deleted. */
const tabs = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel('hoodside-cases');
if (tabs) tabs.onmessage = () => { writing.then(loadCases); };

/** @param {CaseDoc} doc */
function keep(doc) {
  const known = cases.value.some((entry) => entry.id === doc.id);
  cases.value = known ? cases.value.map((entry) => (entry.id === doc.id ? doc : entry)) : [...cases.value, doc];
  writing = writing.then(() => writeCase(doc)).then(
    () => { storeTrouble.value = ''; tabs?.postMessage(doc.id); },
    (error) => { storeTrouble.value = `This device did not keep the last change (${error?.message ?? error}).`; },
  );
  return writing;
}

/** Change a case: `edit` works on a copy, which then replaces the case and is written at once.
 * @param {string} id @param {(draft: CaseDoc) => void} edit */
export function changeCase(id, edit) {
  const doc = caseById(id);
  if (!doc) return;
  const draft = structuredClone(doc);
  edit(draft);
  draft.changed = new Date().toISOString();
  keep(draft);
}

/** As `changeCase`, with a line that takes it back. @param {string} id @param {string} what
 * @param {(draft: CaseDoc) => void} edit */
export function changeWithUndo(id, what, edit) {
  const before = caseById(id);
  changeCase(id, edit);
  if (before) offerUndo(what, () => keep(before));
}

/** Take out rows of one kind that were begun and left without a figure.
 * @param {string} id @param {'h1' | 'c13' | 'ms' | 'ir'} kind @param {string} rowId */
export function dropIfEmpty(id, kind, rowId) {
  const row = /** @type {any} */ (caseById(id)?.[kind].find((entry) => entry.id === rowId));
  if (!row || row.shift?.trim() || row.ppm?.trim() || row.mz?.trim() || row.cm1?.trim() || row.h?.trim() || row.j?.trim()) return;
  if (row.lines?.rows.some((/** @type {any} */ line) => line.at.trim())) return;
  changeCase(id, (draft) => { /** @type {any} */ (draft)[kind] = /** @type {any[]} */ (draft[kind]).filter((entry) => entry.id !== rowId); });
}

/** Note what the list shows; no change of the case itself. @param {string} id
 * @param {import('../types').Summary} last */
export function noteSummary(id, last) {
  const doc = caseById(id);
  if (doc && JSON.stringify(doc.last) !== JSON.stringify(last)) keep({ ...doc, last });
}

/** @param {Partial<CaseDoc>} [given] @returns {CaseDoc} the case just added */
export function addCase(given = {}) {
  const doc = { ...emptyCase(), ...given };
  keep(doc);
  return doc;
}

/** @param {CaseDoc} doc */
export function copyCase(doc) {
  const now = new Date().toISOString();
  // Photographs stay with the original: two cases must not share one image that either may delete.
  return addCase({ ...structuredClone(doc), id: newId(), title: `${doc.title}, copy`, demo: '', photos: [],
    created: now, changed: now });
}

/** @param {CaseDoc} doc */
export function deleteCase(doc) {
  cases.value = cases.value.filter((entry) => entry.id !== doc.id);
  writing = writing.then(() => dropCase(doc.id)).then(() => tabs?.postMessage(doc.id), () => {});
  offerUndo(`${doc.title || 'Case'} deleted`, () => keep(doc));
}
