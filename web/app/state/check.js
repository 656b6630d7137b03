import { computed, effect, signal } from '@preact/signals';
import { asFault, call, engineState } from './engine.js';
import { checkInput, stepInput } from './input.js';
import { caseById, cases, noteSummary } from './cases.js';
import { putUpFor } from './put-up.js';
import { caseId } from './route.js';
import { summaryOf } from '../words/verdict.js';

/** @typedef {import('../types').CaseDoc} CaseDoc */
/** @typedef {import('../types').CheckAnswer} CheckAnswer */
/** @typedef {{ key: string, answer: CheckAnswer, refs: Record<string, string>, order: string[] }} Checked
 * `order` holds, per candidate of the answer, the id of the structure it weighs ('' for a rival). */

/** The last answer of each case seen since the start. @type {import('@preact/signals').Signal<Record<string, Checked>>} */
export const checked = signal({});
/** Why the last check gave no answer; `row` is the reading the engine named, '' when it named none.
 * @type {import('@preact/signals').Signal<(import('../types').Fault & { row: string }) | null>} */
export const checkFault = signal(null);
/** When the running check began, 0 when none runs. */
export const checkingSince = signal(0);

const REST_MS = 250;

/** What a check of the case would ask, null while there is nothing to weigh. @param {CaseDoc} doc */
export function question(doc) {
  const usable = doc.structures.filter((structure) => structure.smiles);
  if (!usable.length) return null;
  const input = checkInput(doc);
  if (!Object.keys(input.refs).length && !input.params.formula && !input.params.hrms && !input.params.analysis) return null;
  const params = { id: doc.id, ...input.params, ...stepInput(doc), ...putUpFor(doc), candidates: usable.map((structure) => structure.smiles) };
  const intended = usable.findIndex((structure) => structure.id === doc.intended);
  if (intended >= 0) params.intended = intended;
  return { params, refs: input.refs, ids: usable.map((structure) => structure.id), key: JSON.stringify(params) };
}

/** @typedef {NonNullable<ReturnType<typeof question>>} Question */

/** Which structure each weighed candidate is. @param {Question} asked @param {CheckAnswer} answer */
const orderOf = (asked, answer) =>
  answer.candidates.map(({ index }) => (index === null ? '' : asked.ids[index] ?? ''));

/** @type {AbortController | null} */
let running = null;

/** @param {string} id @param {Question} asked */
async function run(id, asked) {
  running = new AbortController();
  checkingSince.value = Date.now();
  try {
    const answer = await call('check', asked.params, { signal: running.signal, timeoutMs: 60_000 });
    const doc = caseById(id);
    checkFault.value = null;
    checked.value = { ...checked.value, [id]: { key: asked.key, answer, refs: asked.refs, order: orderOf(asked, answer) } };
    if (doc) noteSummary(id, summaryOf(doc, /** @type {Checked} */ (checked.value[id])));
  } catch (error) {
    failedKey = asked.key;
    const fault = asFault(error);
    const [, kind, at] = fault.field.match(/^(\w+)\[(\d+)\]/) ?? [];
    checkFault.value = { ...fault, row: asked.refs[`${kind}:${at}`] ?? '' };
  }
  running = null;
  checkingSince.value = 0;
}

let failedKey = '';
let timer = 0;

/** One check at a time: while one runs the next waits, and only the newest state of the case is asked. */
function watch() {
  clearTimeout(timer);
  const doc = cases.value.find((entry) => entry.id === caseId.value);
  if (!doc || engineState.value !== 'ready' || checkingSince.value) return;
  const asked = question(doc);
  if (!asked) { checkFault.value = null; return; }
  if (checked.peek()[doc.id]?.key === asked.key || failedKey === asked.key) return;
  timer = window.setTimeout(() => run(doc.id, asked), REST_MS);
}

export const startChecking = () => effect(watch);

export function stopCheck() { running?.abort(); }

export function checkAgain() {
  failedKey = '';
  checkFault.value = null;
  cases.value = [...cases.value];
}

/** The case on the screen. */
export const current = computed(() => cases.value.find((doc) => doc.id === caseId.value) ?? null);

/** The answer for the case on the screen, and whether it is of this very state of the readings. */
export const currentCheck = computed(() => {
  const doc = current.value;
  const found = doc ? checked.value[doc.id] ?? null : null;
  const asked = doc ? question(doc) : null;
  return { found: asked ? found : null, fresh: Boolean(found && asked && found.key === asked.key) };
});
