import { signal } from '@preact/signals';
import { readSetting, writeSetting } from '../../../store/settings.js';
import { caseById, changeCase } from '../../state/cases.js';
import { stepsOf, textOf } from '../../words/steps.js';

export { said, stepsOf, textOf } from '../../words/steps.js';

/** @typedef {import('./types').Run} Run */
/** @typedef {import('./types').Compound} Compound */

/** @typedef {Run['ticks']} Ticks */

/** What is to be taken over, by case. @type {import('@preact/signals').Signal<Record<string, Ticks>>} */
const ticked = signal({});
/** Conditions used before on this device, newest first. @type {import('@preact/signals').Signal<string[]>} */
export const recent = signal([]);

const RECENT_KEPT = 8;

/** @returns {import('../../types').Ran} */
const nothing = () => ({ start: null, partner: null, steps: [] });

/** What was run stands with the case; the ticks are of this device. @param {string} id of the case @returns {Run} */
export const runOf = (id) => ({ ...nothing(), ...caseById(id)?.run, ticks: ticked.value[id] ?? {} });

/** @param {string} id @param {Partial<Run>} change */
export function changeRun(id, { ticks, ...ran }) {
  if (Object.keys(ran).length) changeCase(id, (draft) => { draft.run = { ...nothing(), ...draft.run, ...ran }; });
  if (!ticks) return;
  ticked.value = { ...ticked.value, [id]: ticks };
  // Losing it on a full device is no reason to stop.
  writeSetting(`run ${id}`, { ticks }).catch(() => {});
}

/** What was entered before the page was closed; earlier versions kept the step itself there too. @param {string} id */
export async function recallRun(id) {
  const [kept, used] = /** @type {any[]} */ (await Promise.all([readSetting(`run ${id}`), readSetting('recent conditions')]).catch(() => []));
  if (kept?.start && !caseById(id)?.run) changeRun(id, { start: kept.start, partner: kept.partner ?? null, steps: kept.steps ?? [] });
  if (kept?.ticks && !ticked.value[id]) ticked.value = { ...ticked.value, [id]: kept.ticks };
  if (Array.isArray(used) && !recent.value.length) recent.value = used;
}

/** @param {string} text conditions as they are asked about */
export function noteUsed(text) {
  recent.value = [text, ...recent.value.filter((other) => other !== text)].slice(0, RECENT_KEPT);
  writeSetting('recent conditions', recent.value).catch(() => {});
}

/** Another compound or reagent: what was ticked belonged to other outcomes. @param {string} id @param {Partial<Run>} change */
export const changeStep = (id, change) => changeRun(id, { ...change, ticks: {} });

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
