import { computed, signal } from '@preact/signals';
import { dropCase, readCase, readCases, writeCase } from '../../store/cases.js';
import { emptyCase, mended, newId } from './document.js';
import { merged, same } from './merge.js';
import { offerUndo, say } from './toast.js';

/** @typedef {import('../types').CaseDoc} CaseDoc */

/** @type {import('@preact/signals').Signal<CaseDoc[]>} */
export const cases = signal([]);
export const casesLoaded = signal(false);
/** Why the device could not keep the last change; '' when it did. */
export const storeTrouble = signal('');

export const ownCases = computed(() =>
  [...cases.value].sort((a, b) => b.changed.localeCompare(a.changed)));

/** Each case as this page last knew it to be kept on the device: by it, what another page has written is told from what
 * was changed here. @type {Map<string, { text: string, doc: CaseDoc }>} */
const kept = new Map();

/** @param {CaseDoc} stored @returns {CaseDoc} */
function known(stored) {
  const text = JSON.stringify(stored);
  const doc = mended(stored);
  kept.set(stored.id, { text, doc });
  return doc;
}

export async function loadCases() {
  try {
    cases.value = (await readCases()).map(known);
  } catch (error) {
    storeTrouble.value = `The cases on this device could not be read (${error}).`;
  }
  casesLoaded.value = true;
}

/** @param {string} id */
export const caseById = (id) => cases.value.find((doc) => doc.id === id) ?? null;

/** Reads and writes of cases follow each other. @type {Promise<unknown>} */
let writing = Promise.resolve();

/** Other tabs of this app on this device, told when a case has been written or deleted. */
const tabs = typeof BroadcastChannel === 'undefined' ? null : new BroadcastChannel('hoodside-cases');
if (tabs) tabs.onmessage = ({ data }) => takeUp(data);
// A page that was frozen meanwhile has been told nothing.
document.addEventListener('visibilitychange', () => {
  if (document.visibilityState === 'visible' && casesLoaded.value) takeUpAll();
});

/** @param {CaseDoc} doc */
function show(doc) {
  const there = cases.value.some((entry) => entry.id === doc.id);
  cases.value = there ? cases.value.map((entry) => (entry.id === doc.id ? doc : entry)) : [...cases.value, doc];
}

/** Take up what another page has written; what was changed here and not yet written stays. @param {string} id */
function takeUp(id) {
  writing = writing.then(() => readCase(id)).then((stored) => taken(id, stored)).catch(() => {});
}

function takeUpAll() {
  writing = writing.then(readCases).then((all) => {
    const ids = new Set([...kept.keys(), ...all.map(({ id }) => id)]);
    ids.forEach((id) => taken(id, all.find((doc) => doc.id === id)));
  }).catch(() => {});
}

/** @param {string} id @param {CaseDoc | undefined} stored */
function taken(id, stored) {
  const before = kept.get(id);
  const mine = caseById(id);
  if (!stored) {
    kept.delete(id);
    if (before && mine && same(before.doc, mine)) cases.value = cases.value.filter((doc) => doc.id !== id);
  } else if (before?.text !== JSON.stringify(stored)) {
    const theirs = known(stored);
    show(mine && before ? merged(before.doc, theirs, mine) : theirs);
  }
}

/** Write a case as it stands here, brought together with what another page has written since. @param {string} id */
async function write(id) {
  const mine = caseById(id);
  const before = kept.get(id);
  if (!mine || (before && same(before.doc, mine))) return;
  let met = false;
  const doc = await writeCase(id, (stored) => {
    met = Boolean(stored && before && JSON.stringify(stored) !== before.text);
    return met && stored && before ? merged(before.doc, mended(stored), mine) : mine;
  });
  kept.set(id, { text: JSON.stringify(doc), doc });
  const now = caseById(id);
  if (met && now) show(merged(mine, doc, now));
  if (met) say('This case was changed in another tab too: both changes are kept.');
  storeTrouble.value = '';
  tabs?.postMessage(id);
}

/** @param {CaseDoc} doc */
function keep(doc) {
  show(doc);
  writing = writing.then(() => write(doc.id)).catch((error) => {
    storeTrouble.value = `This device did not keep the last change (${error?.message ?? error}).`;
  });
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
  writing = writing.then(() => dropCase(doc.id)).then(() => {
    kept.delete(doc.id);
    tabs?.postMessage(doc.id);
  }).catch(() => {});
  offerUndo(`${doc.title || 'Case'} deleted`, () => keep(doc));
}
