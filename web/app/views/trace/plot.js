import { html } from 'htm/preact';
import { useMemo } from 'preact/hooks';
import { Icon } from '../../components/icon.js';
import { curve, linesOf, sharp, tallest } from './envelope.js';
import { useGestures } from './gestures.js';
import { shifted, ticksIn, zoomed } from './view.js';

/** @typedef {import('./types').Trace} Trace */
/** @typedef {import('./types').TracedGroup} TracedGroup */
/** @typedef {import('./types').TypedSignal} TypedSignal */
/** @typedef {import('./types').Fitted} Fitted */
/** @typedef {import('./view.js').View} View */
/** @typedef {import('../tally/axis.js').Stick} Stick */

const WIDTH = 700;
/** Where the measured sticks stand, where the trace stands and ends, and the axis. */
const STICKS = 112;
const TOP = 150;
const BASE = 410;
const HEIGHT = 470;
const STICK_TALL = 76;
const ZOOM = 2;

/** @param {number} n H of a signal */
const tall = (n) => 24 + (STICK_TALL - 24) * Math.min(1, Math.sqrt(n / 6));

/** The simulated trace under the measured sticks, high shift first, and a fitted one over it. `gain` makes it taller.
 * @param {{ trace: Trace, sticks: Stick[], typed: TypedSignal[], fitted: Fitted | null, gain: number, group: TracedGroup | null,
 *   view: View, whole: View, setView: (view: View) => void, onTap: (ppm: number) => void, words: string }} props */
export function Plot({ trace, sticks, typed, fitted, gain, group, view, whole, setView, onTap, words }) {
  const lines = useMemo(() => linesOf(trace), [trace]);
  const x = (/** @type {number} */ ppm) => ((view.hi - ppm) / (view.hi - view.lo)) * WIDTH;
  const unit = useMemo(() => (tallest(lines, trace.mhz, view) || 1) / gain, [lines, view.hi, view.lo, gain]);
  const drawn = (/** @type {import('./envelope.js').Line[]} */ some) => curve(some, trace.mhz, view, WIDTH, unit).map(([ppm, height], i) =>
    `${i ? 'L' : 'M'}${x(ppm).toFixed(1)} ${(BASE - height * (BASE - TOP)).toFixed(1)}`).join('');
  const path = useMemo(() => drawn(lines), [lines, view.hi, view.lo, unit]);
  const over = useMemo(() => fitted && drawn(sharp(fitted.lines)), [fitted, view.hi, view.lo, unit]);
  const shown = sticks.filter((stick) => stick.hi >= view.lo && stick.lo <= view.hi);
  return html`<figure class="axis trace">
    <svg viewBox="0 0 ${WIDTH} ${HEIGHT}" aria-hidden="true" class="trace-plot" ...${useGestures({ view, whole, setView, onTap })}>
      <rect class="trace-ground" x="0" y="0" width=${WIDTH} height=${HEIGHT} />
      <clipPath id="trace-frame"><rect x="0" y="0" width=${WIDTH} height=${HEIGHT} /></clipPath>
      <clipPath id="trace-field"><rect x="0" y=${STICKS + 4} width=${WIDTH} height=${BASE - STICKS} /></clipPath>
      <g clip-path="url(#trace-frame)">
      ${group && html`<rect class="trace-group" y="0" height=${BASE} x=${x(group.hi) - 6}
        width=${Math.max(12, x(group.lo) - x(group.hi) + 12)} />`}
      ${shown.map((stick) => html`<g key=${stick.ref}>${stick.hi > stick.lo && html`<rect class="axis-range" x=${x(stick.hi)}
          width=${x(stick.lo) - x(stick.hi)} y=${STICKS - tall(stick.n)} height=${tall(stick.n)} />`}
        ${!typed.some((signal) => signal.lines.some(({ ppm }) => ppm >= stick.lo && ppm <= stick.hi)) && html`<path class="axis-measured"
          d="M${x((stick.lo + stick.hi) / 2)} ${STICKS}v${-tall(stick.n)}" />`}</g>`)}
      ${typed.flatMap((signal) => signal.lines.map(({ ppm, height }, i) => html`<path key=${`${signal.id}${i}`} class="trace-typed"
        d="M${x(ppm)} ${STICKS}v${-STICK_TALL * (height / Math.max(...signal.lines.map((line) => line.height)))}" />`))}</g>
      <g clip-path="url(#trace-field)"><path class="trace-line" d=${path} />${over && html`<path class="trace-fitted" d=${over} />`}</g>
      ${sticks.length > 0 && html`<path class="axis-rule" d="M0 ${STICKS}H${WIDTH}" /><text class="axis-word" x="0" y="24">measured</text>`}
      <text class="axis-word axis-word-expected" x="0" y=${TOP + 4}>${trace.mhz} MHz, simulated${gain > 1 ? `, ${gain} times as tall` : ''}</text>
      <path class="axis-rule" d="M0 ${BASE + 6}H${WIDTH}" />
      ${ticksIn(view, 7).map(({ ppm, text }) => html`<g key=${text}><path class="axis-tick" d="M${x(ppm)} ${BASE + 6}v8" /><text
        class="axis-word" text-anchor="middle" x=${x(ppm)} y=${HEIGHT - 14}>${text}</text></g>`)}
    </svg>
    <figcaption class="hidden">${words}</figcaption>
    <${ViewButtons} view=${view} whole=${whole} setView=${setView} about=${middleOf(view, group)} />
  </figure>`;
}

/** The place that stays put when one comes nearer: the touched group where it is in view. @param {View} view @param {TracedGroup | null} group */
function middleOf(view, group) {
  const middle = group ? (group.hi + group.lo) / 2 : NaN;
  return middle > view.lo && middle < view.hi ? middle : (view.hi + view.lo) / 2;
}

/** What the fingers do on the plot, as buttons. @param {{ view: View, whole: View, setView: (view: View) => void, about: number }} props */
function ViewButtons({ view, whole, setView, about }) {
  const all = view.hi - view.lo >= whole.hi - whole.lo - 1e-6;
  const key = (/** @type {string} */ name, /** @type {any} */ face, /** @type {boolean} */ off, /** @type {View} */ next) =>
    html`<button type="button" class="step" aria-label=${name} disabled=${off} onClick=${() => setView(next)}>${face}</button>`;
  return html`<div class="trace-buttons" role="group" aria-label="View">
    ${key('To higher shift', html`<${Icon} name="left" />`, view.hi >= whole.hi - 1e-6, shifted(view, 0.5, whole))}
    ${key('Farther', html`<${Icon} name="minus" />`, all, zoomed(view, 1 / ZOOM, whole))}
    ${key('Whole trace', 'whole', all, whole)}
    ${key('Nearer', html`<${Icon} name="plus" />`, false, zoomed(view, ZOOM, whole, about))}
    ${key('To lower shift', html`<${Icon} name="right" />`, view.lo <= whole.lo + 1e-6, shifted(view, -0.5, whole))}
  </div>`;
}
