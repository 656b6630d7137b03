import { signal } from '@preact/signals';
import { readSetting, writeSetting } from '../../../store/settings.js';

/** @typedef {import('./types').Run} Run */
/** @typedef {import('./types').Compound} Compound */

/** What was run, by case. @type {import('@preact/signals').Signal<Record<string, Run>>} */
export const runs = signal({});
/** Conditions used before on this device, newest first. @type {import('@preact/signals').Signal<string[]>} */
export const recent = signal([]);

const RECENT_KEPT = 8;

/** @returns {Run} */
const empty = () => ({ start: null, partner: null, steps: [], ticks: {} });

/** @param {string} id of the case @returns {Run} */
export const runOf = (id) => runs.value[id] ?? empty();

/** @param {string} id @param {Partial<Run>} change */
export function changeRun(id, change) {
  const run = { ...runOf(id), ...change };
  runs.value = { ...runs.value, [id]: run };
  // Losing it on a full device is no reason to stop.
  writeSetting(`run ${id}`, run).catch(() => {});
}

/** What was entered before the page was closed. @param {string} id */
export async function recallRun(id) {
  const [kept, used] = await Promise.all([readSetting(`run ${id}`), readSetting('recent conditions')]).catch(() => []);
  if (kept && !runs.value[id]) runs.value = { ...runs.value, [id]: { ...empty(), .../** @type {any} */ (kept) } };
  if (Array.isArray(used) && !recent.value.length) recent.value = used;
}

/** @param {string} text conditions as they are asked about */
export function noteUsed(text) {
  recent.value = [text, ...recent.value.filter((other) => other !== text)].slice(0, RECENT_KEPT);
  writeSetting('recent conditions', recent.value).catch(() => {});
}

/** Another compound or reagent: what was ticked belonged to other outcomes. @param {string} id @param {Partial<Run>} change */
export const changeStep = (id, change) => changeRun(id, { ...change, ticks: {} });

/** Steps as the engine reads them: "OsO4, NMO", or "1) O3 2) Me2S". @param {string[][]} steps */
export function textOf(steps) {
  const full = steps.filter((step) => step.length);
  return full.length < 2 ? (full[0] ?? []).join(', ') : full.map((step, i) => `${i + 1}) ${step.join(', ')}`).join(' ');
}

/** Conditions as they are said: "O3, then Me2S". @param {string} text */
export const said = (text) => stepsOf(text).map((step) => step.join(', ')).join(', then ');

/** @param {string} text @returns {string[][]} */
export function stepsOf(text) {
  const parts = text.split(/(?:^|\s)\d\)\s*/).map((part) => part.trim()).filter(Boolean);
  return parts.map((part) => part.split(/[,;]\s+/).map((name) => name.trim()).filter(Boolean));
}

/** Put a reagent into the last step, or take it out where it stands. @param {string} id @param {string} name */
export function toggleReagent(id, name) {
  const { steps } = runOf(id);
  if (steps.some((step) => step.includes(name))) {
    changeStep(id, { steps: steps.map((step) => step.filter((other) => other !== name)).filter((step) => step.length) });
  } else {
    changeStep(id, { steps: [...steps.slice(0, -1), [...(steps.at(-1) ?? []), name]] });
  }
}

/** @param {string} id @param {string} text all conditions at once; the same again takes them away */
export const toggleConditions = (id, text) =>
  changeStep(id, { steps: textOf(runOf(id).steps) === textOf(stepsOf(text)) ? [] : stepsOf(text) });

/** What follows was added afterwards. @param {string} id */
export function nextStep(id) {
  const { steps } = runOf(id);
  if (steps.at(-1)?.length) changeRun(id, { steps: [...steps, []] });
}
