import { signal } from '@preact/signals';
import { caseById } from './cases.js';
import { asFault, call } from './engine.js';
import { checkInput, stepInput } from './input.js';

/** @typedef {import('../types').CaseDoc} CaseDoc */
/** @typedef {import('../types').Rival} Rival */
/** @typedef {import('../types').Fault} Fault */
/** @typedef {import('../types').Verdict} Verdict */
/** @typedef {{ weight_db: number, verdict: Verdict, reason: string }} Standing */
/** What the engine has told of a hunt so far. @typedef {{ done: boolean, looked_at: number, weighed: number, structure: Standing | null,
 *   rivals: Rival[], complete: boolean, note: string }} Told */
/** A search for look-alikes of one structure, for the best `limit`. `since` is 0 while nothing runs; `stopped` by hand.
 * @typedef {Told & { key: string, limit: number, since: number, stopped: boolean, fault: Fault | null }} Hunt */

/** The last search of each case since the start. @type {import('@preact/signals').Signal<Record<string, Hunt>>} */
export const hunts = signal({});

/** How many are looked for at first, and how many when asked to look further. */
const LIMITS = [40, 100, 200];

/** The hunt that may go on; slices that come for any other are dropped. @type {object | null} */
let running = null;

/** @param {string} id of the case @param {Partial<Hunt>} given */
function note(id, given) {
  const before = hunts.value[id];
  if (before) hunts.value = { ...hunts.value, [id]: { ...before, ...given } };
}

/** @param {CaseDoc} doc @param {string} smiles whose look-alikes @param {boolean} allowed only what the readings allow */
export function huntQuestion(doc, smiles, allowed) {
  const { params } = checkInput(doc);
  return { structure: smiles, readings: params, ...stepInput(doc), allowed, limit: LIMITS[0] ?? 0, formula_known: Boolean(doc.formula.trim()) };
}

/** @typedef {ReturnType<typeof huntQuestion>} Question */

/** The structures of a case, none of which is a look-alike to it. @param {string} id */
export const besides = (id) => ({ besides: caseById(id)?.structures.map(({ smiles }) => smiles).filter(Boolean) ?? [] });

/** @param {Question} question @returns {Hunt} */
const fresh = (question) => ({ key: JSON.stringify(question), limit: question.limit, since: 0, stopped: false, fault: null,
  done: false, looked_at: 0, weighed: 0, structure: null, rivals: [], complete: false, note: '' });

/** Search and weigh, slice by slice, from where the same question was left. The engine does a slice at a time, so that
 * other calls come in between and stopping costs nothing. @param {string} id of the case @param {Question} question */
export async function hunt(id, question) {
  const mine = running = {};
  const key = JSON.stringify(question);
  if (hunts.value[id]?.key !== key) hunts.value = { ...hunts.value, [id]: fresh(question) };
  note(id, { since: Date.now(), stopped: false, fault: null });
  try {
    while (running === mine && !hunts.value[id]?.done) {
      const told = await call('hunt', { ...question, ...besides(id), limit: hunts.value[id]?.limit });
      if (hunts.value[id]?.key === key) note(id, told);
    }
  } catch (error) {
    if (running === mine) note(id, { fault: asFault(error) });
  }
  if (running !== mine) return;
  running = null;
  note(id, { since: 0 });
}

/** The next wider search, 0 when there is none: all are found, or it is wide enough. @param {Hunt} now */
export const wider = ({ done, complete, rivals, weighed, limit }) =>
  (done && !complete && Math.max(weighed, rivals.length) >= limit ? LIMITS.find((next) => next > limit) ?? 0 : 0);

/** Go on to more look-alikes. @param {string} id of the case @param {Question} question @param {number} limit */
export function huntFurther(id, question, limit) {
  note(id, { limit, done: false });
  hunt(id, question);
}

/** Leave off; what was found stays. @param {string} id of the case @param {boolean} byHand */
export function stopHunt(id, byHand) {
  running = null;
  if (hunts.value[id]?.since) note(id, { since: 0, stopped: byHand });
}
