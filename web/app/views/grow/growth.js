import { signal } from '@preact/signals';
import { readSetting, writeSetting } from '../../../store/settings.js';
import { ask, asFault } from '../../state/engine.js';
import { afterBeginning, afterStep } from './places.js';

/** @typedef {import('./types').Growth} Growth */
/** @typedef {import('./types').Step} Step */
/** @typedef {import('./types').Option} Option */
/** @typedef {import('./types').Frame} Frame */
/** @typedef {import('./types').Canvas} Canvas */
/** @typedef {import('./types').Place} Place */

/** Structures being grown, by case and purpose. @type {import('@preact/signals').Signal<Record<string, Growth>>} */
export const growths = signal({});
/** Why the last step could not be done; null when it could. */
export const refusal = signal(/** @type {import('../../types').Fault | null} */ (null));
/** When the step now worked on was asked for, 0 when none is. */
export const growingSince = signal(0);

/** @returns {Step} */
const choosing = () => ({ source: '', touched: null, drawn: null, frame: null });

/** Answers that come after something newer has been done are dropped by comparing with this. */
let newest = 0;

/** @param {string} key @returns {Growth} */
export const growthOf = (key) => growths.value[key] ?? { steps: [choosing()], at: 0 };

/** @param {string} key */
export const stepOf = (key) => /** @type {Step} */ (growthOf(key).steps[growthOf(key).at]);

/** @param {Frame | null} a @param {Frame | null} b */
export const sameFrame = (a, b) => a?.width === b?.width && a?.height === b?.height && a?.formula === b?.formula;

/** @param {string} key @param {Growth} growth */
function put(key, growth) {
  newest += 1;
  growingSince.value = 0;
  refusal.value = null;
  growths.value = { ...growths.value, [key]: growth };
  const kept = { sources: growth.steps.map(({ source }) => source), at: growth.at };
  // Losing the way back on a full device is no reason to stop growing.
  writeSetting(`grow ${key}`, kept).catch(() => {});
}

/** Bring back what was grown before the page was closed. @param {string} key */
export async function recall(key) {
  if (growths.value[key]) return;
  const kept = /** @type {any} */ (await readSetting(`grow ${key}`).catch(() => null));
  if (!kept?.sources?.length || growths.value[key]) return;
  const steps = kept.sources.map((/** @type {string} */ source) => ({ ...choosing(), source }));
  growths.value = { ...growths.value, [key]: { steps, at: Math.min(kept.at, steps.length - 1) } };
}

/** What comes after the present state replaces all that had been undone. @param {string} key @param {Step} step */
function push(key, step) {
  const { steps, at } = growthOf(key);
  put(key, { steps: [...steps.slice(0, at + 1), step], at: at + 1 });
}

/** @param {string} key @param {string} source */
export const begin = (key, source) => push(key, { ...choosing(), source });

/** @param {string} key */
export const beginAnew = (key) => push(key, choosing());

/** @param {string} key @param {-1 | 1} by */
export function turnBack(key, by) {
  const growth = growthOf(key);
  const at = growth.at + by;
  if (growth.steps[at]) put(key, { ...growth, at });
}

/** Start with an empty stage. @param {string} key */
export const clear = (key) => put(key, { steps: [choosing()], at: 0 });

/** Note what is known or touched of the present state. @param {string} key @param {Partial<Step>} more */
function note(key, more) {
  const growth = growthOf(key);
  const steps = growth.steps.map((step, i) => (i === growth.at ? { ...step, ...more } : step));
  growths.value = { ...growths.value, [key]: { ...growth, steps } };
}

/** @param {string} key @param {Place | null} touched */
export function touch(key, touched) {
  refusal.value = null;
  note(key, { touched });
}

/** Keep a drawing that was asked for; one of an older state is dropped. @param {string} key @param {Canvas} drawn @param {Frame} frame */
export function keepDrawing(key, drawn, frame) {
  const step = stepOf(key);
  if (!step.source || sameFrame(step.frame, frame)) return;
  note(key, { drawn, frame, touched: step.touched ?? afterBeginning(drawn) });
}

/** Do one step at the touched place. @param {string} key @param {Option} option @param {Frame} frame @param {number} [second] atom */
export async function take(key, option, frame, second) {
  const before = stepOf(key).drawn;
  if (!before || growingSince.value) return;
  const turn = newest += 1;
  growingSince.value = Date.now();
  refusal.value = null;
  const given = second === undefined ? option.arguments : { ...option.arguments, b: second };
  try {
    const drawn = await ask('edit', { structure: before.source, step: option.step, arguments: given, ...frame });
    if (turn !== newest) return;
    push(key, { source: drawn.source, drawn, frame, touched: afterStep(option, before, drawn) });
  } catch (error) {
    if (turn === newest) refusal.value = asFault(error);
  }
  if (turn === newest) growingSince.value = 0;
}
