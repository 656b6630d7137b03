import { signal } from '@preact/signals';
import { asFault, call } from './engine.js';
import { checkInput } from './input.js';

/** @typedef {import('../types').CaseDoc} CaseDoc */
/** @typedef {import('../types').Rival} Rival */
/** @typedef {import('../types').Fault} Fault */
/** @typedef {{ weight: number, verdict: import('../types').Verdict, sentence: string }} Standing */
/** A search for look-alikes of one structure. `since` is 0 once nothing runs; `own` is how the structure itself stands.
 * @typedef {{ key: string, smiles: string, since: number, stopped: boolean, found: Rival[], complete: boolean, note: string, fault: Fault | null,
 *   weighed: Record<string, Standing>, own: Standing | null }} Hunt */

/** The last search of each case since the start. @type {import('@preact/signals').Signal<Record<string, Hunt>>} */
export const hunts = signal({});

/** How many are looked for, and weighed at a time so that the first stand early. */
const LIMIT = 40;
const BATCH = 5;
const LONGEST_MS = 180_000;

/** @type {AbortController | null} */
let running = null;

/** @param {string} id of the case @param {Partial<Hunt>} given */
function note(id, given) {
  const before = hunts.value[id];
  if (before) hunts.value = { ...hunts.value, [id]: { ...before, ...given } };
}

/** What the search depends on. @param {CaseDoc} doc @param {string} smiles @param {boolean} allowed only what the readings allow */
export const huntKey = (doc, smiles, allowed) => JSON.stringify([checkInput(doc).params, smiles, allowed]);

/** Weigh look-alikes beside the structure itself, a few at a time. @param {CaseDoc} doc @param {string} smiles
 * @param {Rival[]} found @param {AbortSignal} stop */
async function weigh(doc, smiles, found, stop) {
  const { params, refs } = checkInput(doc);
  if (!Object.keys(refs).length && !params.formula) return;
  for (let from = 0; from < found.length; from += BATCH) {
    const candidates = [smiles, ...found.slice(from, from + BATCH).map((rival) => rival.smiles)];
    const { candidates: weighed } = await call('check', { ...params, candidates, intended: 0 }, { signal: stop, timeoutMs: LONGEST_MS });
    /** @type {Record<string, Standing>} */
    const standing = {};
    for (const { index, weight_db, verdict, sentence } of weighed) {
      const asked = candidates[index ?? -1];
      if (asked) standing[asked] = { weight: weight_db, verdict, sentence };
    }
    note(doc.id, { weighed: { ...hunts.value[doc.id]?.weighed, ...standing }, own: standing[smiles] ?? null });
  }
}

/** Search and weigh. @param {CaseDoc} doc @param {string} smiles whose look-alikes @param {boolean} allowed only what the readings allow */
export async function hunt(doc, smiles, allowed) {
  running?.abort();
  const controller = new AbortController();
  running = controller;
  const { params } = checkInput(doc);
  hunts.value = { ...hunts.value, [doc.id]: { key: huntKey(doc, smiles, allowed), smiles, since: Date.now(), stopped: false, found: [], complete: false, note: '', fault: null, weighed: {}, own: null } };
  try {
    const asked = { structure: smiles, limit: LIMIT, formula_known: Boolean(doc.formula.trim()), ...(allowed && { readings: params }) };
    const { rivals, complete, note: said } = await call('rivals', asked, { signal: controller.signal, timeoutMs: LONGEST_MS });
    note(doc.id, { found: rivals, complete, note: said });
    await weigh(doc, smiles, rivals, controller.signal);
  } catch (error) {
    if (running !== controller) return;
    const stopped = /** @type {any} */ (error)?.code === 'stopped';
    note(doc.id, { stopped, fault: stopped ? null : asFault(error) });
  }
  if (running === controller) { running = null; note(doc.id, { since: 0 }); }
}

export const stopHunt = () => running?.abort();
