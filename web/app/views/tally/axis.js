import { html } from 'htm/preact';
import { fixed, plural, toNumber, toRange } from '../../words/numbers.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../state/check.js').Checked} Checked */
/** @typedef {{ ref: string, lo: number, hi: number, n: number }} Stick */

const WIDTH = 700;
const MIDDLE = 92;
const HEIGHT = 236;
const TALL = 66;
/** The axis reaches at least this far, so that a few neighbouring signals are not torn apart. */
const LEAST_PPM = 4;

/** The 1H signals as sticks. @param {CaseDoc} doc @param {Checked} found @returns {Stick[]} */
export function measured(doc, found) {
  return Object.entries(found.refs).filter(([ref]) => ref.startsWith('h1:')).flatMap(([ref, id]) => {
    const row = doc.h1.find((entry) => entry.id === id);
    const range = row && toRange(row.shift);
    return row && range ? [{ ref, ...range, n: toNumber(row.h) || 1 }] : [];
  });
}

/** Whole ppm ticks with room for all sticks, high end first. @param {number[]} shifts */
function ticksOf(shifts) {
  const high = Math.ceil(Math.max(LEAST_PPM, ...shifts) + 0.3);
  const low = Math.floor(Math.min(0, ...shifts));
  const step = high - low > 12 ? 4 : high - low > 6 ? 2 : 1;
  const ticks = [];
  for (let tick = Math.floor(high / step) * step; tick >= low; tick -= step) ticks.push(tick);
  return { high, low: low - 0.3, ticks };
}

/** Height for n H; six H and more are as tall as it gets. @param {number} n */
const tall = (n) => 22 + (TALL - 22) * Math.min(1, Math.sqrt(n / 6));

/** The 1H axis, high to low: measured sticks up, expected down, assigned ones joined.
 * @param {{ doc: CaseDoc, found: Checked, at: number }} props */
export function Axis({ doc, found, at }) {
  const candidate = found.answer.candidates[at];
  const groups = candidate?.expected ?? [];
  const up = measured(doc, found);
  if (!up.length || !candidate) return null;
  const { high, low, ticks } = ticksOf([...up.flatMap((stick) => [stick.lo, stick.hi]), ...groups.map((group) => group.ppm)]);
  const x = (/** @type {number} */ ppm) => ((high - ppm) / (high - low)) * WIDTH;
  const sizes = doc.raw ? 1 : 0;
  const joins = candidate.assignment.flatMap((pair) => {
    const stick = up.find((entry) => entry.ref === pair.reading);
    const group = groups[Number(pair.predicted.split(':')[1])];
    return stick && group && pair.predicted.startsWith('h1:') ? [{ from: x((stick.lo + stick.hi) / 2), to: x(group.ppm), key: pair.reading + pair.predicted }] : [];
  });
  return html`<figure class="axis">
    <svg viewBox="0 0 ${WIDTH} ${HEIGHT}" aria-hidden="true">
      <text class="axis-word" x="0" y="14">measured</text>
      <text class="axis-word axis-word-expected" x="0" y=${MIDDLE + 98}>expected</text>
      ${groups.map((group, i) => html`<g key=${`p${i}`} class=${group.exchangeable ? 'axis-exchangeable' : ''}>
        <rect class="axis-sure" x=${x(group.ppm + group.sd)}
          width=${Math.max(3, x(group.ppm - group.sd) - x(group.ppm + group.sd))} y=${MIDDLE + 12} height=${tall(group.n)} />
        <path class="axis-expected" d="M${x(group.ppm)} ${MIDDLE + 12}v${tall(group.n)}" /></g>`)}
      ${up.map((stick) => html`<g key=${stick.ref}>
        ${stick.hi > stick.lo && html`<rect class="axis-range" x=${x(stick.hi)} width=${x(stick.lo) - x(stick.hi)}
          y=${MIDDLE - 12 - tall(sizes || stick.n)} height=${tall(sizes || stick.n)} />`}
        <path class="axis-measured"
          d="M${x((stick.lo + stick.hi) / 2)} ${MIDDLE - 12}v${-tall(sizes || stick.n)}" /></g>`)}
      ${joins.map((join) => html`<path key=${join.key} class="axis-join"
        d="M${join.from} ${MIDDLE - 12}L${join.to} ${MIDDLE + 12}" />`)}
      <path class="axis-rule" d="M0 ${HEIGHT - 34}H${WIDTH}" />
      ${ticks.map((tick) => html`<g key=${tick}><path class="axis-tick" d="M${x(tick)} ${HEIGHT - 34}v7" /><text
        class="axis-word" text-anchor="middle" x=${x(tick)} y=${HEIGHT - 3}>${tick}</text></g>`)}
    </svg>
    <figcaption class="hidden">${plural(up.length, 'measured signal')} against ${groups.length} expected:
      ${groups.map((group) => `${group.n} H at ${fixed(group.ppm, 2)}`).join(', ')} ppm.</figcaption>
  </figure>`;
}
