import { html } from 'htm/preact';
import { fixed } from '../../words/numbers.js';

/** Number of equivalent partners by the letter of the pattern. @type {Record<string, number>} */
const PARTNERS = { d: 1, t: 2, q: 3, quint: 4, sext: 5, sept: 6, oct: 7, non: 8 };
const WIDTH = 700;
const STEM = 26;
const FALL = 62;
const FOOT = 40;

/** Splittings of a first-order pattern, largest J first; null when the name does not say.
 * @param {string} mult @param {number[]} j @returns {{ hz: number, partners: number, letter: string }[] | null} */
export function splittings(mult, j) {
  const letters = mult.replace(/^br\s*/, '').match(/quint|sext|sept|oct|non|[dtq]/g) ?? [];
  if (!letters.length || letters.join('') !== mult.replace(/^br\s*/, '') || letters.length !== j.length) return null;
  return letters.map((letter, i) => ({ hz: j[i] ?? 0, partners: PARTNERS[letter] ?? 0, letter })).sort((a, b) => b.hz - a.hz);
}

/** Lines of each level of the tree, offsets from the centre in Hz, weights by Pascal's triangle.
 * @param {{ hz: number, partners: number }[]} steps */
function levels(steps) {
  let nodes = [{ at: 0, weight: 1, from: 0 }];
  return steps.map(({ hz, partners }) => {
    nodes = nodes.flatMap(({ at, weight }) => {
      let ways = 1;
      return Array.from({ length: partners + 1 }, (_, k) => {
        if (k) ways = (ways * (partners - k + 1)) / k;
        return { at: at + (partners / 2 - k) * hz, weight: weight * ways, from: at };
      });
    });
    return nodes;
  });
}

/** The splitting lines of a first-order multiplet, largest J on top, and the lines they end in.
 * @param {{ mult: string, j: number[] }} props */
export function Tree({ mult, j }) {
  const steps = splittings(mult, j);
  if (!steps) return null;
  const rows = levels(steps);
  const ends = rows.at(-1) ?? [];
  const reach = Math.max(...ends.map(({ at }) => Math.abs(at)), 1);
  const x = (/** @type {number} */ hz) => 330 - (hz / reach) * 210;
  const y = (/** @type {number} */ level) => STEM + level * FALL;
  const tallest = Math.max(...ends.map(({ weight }) => weight));
  const bottom = y(steps.length) + FOOT + 14;
  return html`<figure class="tree">
    <svg viewBox="0 0 ${WIDTH} ${bottom + 4}" aria-hidden="true">
      <path class="tree-line" d="M${x(0)} 2V${STEM}" />
      ${rows.map((nodes, level) => html`<g key=${level}>
        ${nodes.map(({ at, from }, i) => html`<path key=${i} class="tree-line"
          d="M${x(from)} ${y(level)}L${x(at)} ${y(level + 1) - 14}V${y(level + 1)}" />`)}
        <text class="axis-word" x=${WIDTH - 4} y=${y(level + 1) - 22} text-anchor="end">${fixed(steps[level]?.hz ?? 0, 1)} Hz</text></g>`)}
      ${ends.map(({ at, weight }, i) => html`<path key=${i} class="tree-end"
        d="M${x(at)} ${bottom}v${-(10 + (weight / tallest) * (FOOT - 8))}" />`)}
      <path class="axis-rule" d="M60 ${bottom}H600" />
    </svg>
    <figcaption class="hidden">Splitting, largest J first: ${steps.map(({ hz, letter }) => `${letter} by ${fixed(hz, 1)} Hz`).join(', then ')};
      ${ends.length} branches.</figcaption>
  </figure>`;
}
