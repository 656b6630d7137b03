import { fixed, plural } from '../../words/numbers.js';

/** @typedef {import('./types').Trace} Trace */
/** @typedef {import('./types').TracedGroup} TracedGroup */
/** @typedef {import('../../types').ProtonGroup} ProtonGroup */

/** Share of a group's strongest line below which a line does not widen its reach. */
const SEEN = 0.04;
/** Shift difference over J from which first-order rules are trusted: common practice. */
const FIRST_ORDER = 10;

/** Lines of a system, each given to the group nearest to it. @param {Trace} trace @param {number} at place of the group */
function linesNear(trace, at) {
  const system = trace.systems.find(({ groups }) => groups.includes(at));
  if (!system) return [];
  const far = (/** @type {number} */ ppm, /** @type {number} */ group) => Math.abs(ppm - (trace.h1[group]?.ppm ?? Infinity));
  return system.lines.filter(({ ppm }) => system.groups.every((other) => far(ppm, other) >= far(ppm, at)));
}

/** @param {Trace} trace @param {number} at @param {number[]} j */
function nearestOf(trace, at, j) {
  const own = trace.h1[at];
  const others = (trace.systems.find(({ groups }) => groups.includes(at))?.groups ?? []).filter((other) => other !== at);
  if (!own || !j.length || !others.length) return null;
  const hz = Math.min(...others.map((other) => Math.abs((trace.h1[other]?.ppm ?? 0) - own.ppm))) * trace.mhz;
  return { hz, times: hz / Math.max(...j) };
}

/** The groups of a trace, high shift first. @param {Trace} trace @param {ProtonGroup[]} predicted at the same field
 * @returns {TracedGroup[]} */
export function groupsOf(trace, predicted) {
  return trace.h1.map((group, at) => {
    const known = predicted.find(({ atoms }) => atoms.includes(group.atoms[0] ?? -1));
    const lines = linesNear(trace, at);
    const top = Math.max(0, ...lines.map(({ intensity }) => intensity));
    const seen = lines.filter(({ intensity }) => intensity >= SEEN * top).map(({ ppm }) => ppm);
    const j = known?.j ?? [];
    return { at, ppm: group.ppm, n: group.n, atoms: group.atoms, mult: known?.mult ?? '', j, exchangeable: Boolean(known?.exchangeable), sd: known?.sd ?? 0,
      lo: Math.min(group.ppm, ...seen), hi: Math.max(group.ppm, ...seen), lines, nearest: nearestOf(trace, at, j) };
  }).sort((a, b) => b.ppm - a.ppm);
}

/** The group whose lines lie at or next to a place. @param {TracedGroup[]} groups @param {number} ppm */
export function groupAt(groups, ppm) {
  const off = (/** @type {TracedGroup} */ group) => Math.min(Infinity, ...group.lines.map((line) => Math.abs(line.ppm - ppm)), Math.abs(group.ppm - ppm));
  return [...groups].sort((a, b) => off(a) - off(b))[0] ?? null;
}

/** "d, J 8.4 Hz, 2 H at 7.10 ± 0.07" @param {TracedGroup} group */
export function groupWords({ ppm, sd, mult, j, n, exchangeable }) {
  const pattern = [mult, j.length && `J ${j.map((hz) => fixed(hz, 1)).join(', ')} Hz`].filter(Boolean).join(', ');
  return `${fixed(ppm, 2)}${sd ? ` ± ${fixed(sd, 2)}` : ''} ppm, ${pattern ? `${pattern}, ` : ''}${n} H${exchangeable ? ', exchanges' : ''}`;
}

/** @param {TracedGroup} group */
export const isFirstOrder = ({ nearest }) => !nearest || nearest.times >= FIRST_ORDER;

/** Whether first-order rules hold for a group at this field, in words; '' where nothing couples.
 * @param {TracedGroup} group @param {number} mhz */
export function orderWords(group, mhz) {
  const { nearest } = group;
  if (!nearest) return '';
  const far = `${fixed(nearest.hz, 0)} Hz away at ${mhz} MHz, ${fixed(nearest.times, 1)} times the largest J`;
  if (isFirstOrder(group)) return `First order: the nearest group of its spin system is ${far}.`;
  return `Not first order: the nearest group of its spin system is ${far}. Lines lean towards it, and more of them appear than the rules allow; trust the trace.`;
}

/** What the trace shows, for those who hear it. @param {Trace} trace @param {TracedGroup[]} groups */
export function summary(trace, groups) {
  const systems = plural(trace.systems.length, 'spin system');
  return `Simulated 1H trace at ${trace.mhz} MHz, ${systems}, high shift first: ${groups.map((group) => `${groupWords(group)}, lines from ${fixed(group.hi, 2)} to ${fixed(group.lo, 2)}`).join('; ')}.`;
}
