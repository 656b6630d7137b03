import { html } from 'htm/preact';

const WIDTH = 700;
const HEIGHT = 210;
const FOOT = 36;
/** Wavenumbers and NMR shifts run down from left to right on paper; masses run up. */
const RISING = /m\/?z|mass/i;

/** @typedef {{ kind: string, title: string, x: number[], y: number[], x_unit: string, y_unit: string, points: number, nucleus: string,
 *   mhz: number | null, peaks: { x: number, y: number }[] }} Spectrum */

/** @param {number} value */
const round = (value) => String(Math.abs(value) >= 100 ? Math.round(value) : Number(value.toPrecision(3)));

/** The curve of a file as the paper shows it, with the peaks it names. @param {{ spectrum: Spectrum }} props */
export function Curve({ spectrum }) {
  const { x, y, x_unit, y_unit } = spectrum;
  const sticks = x.length ? [] : spectrum.peaks;
  const xs = x.length ? x : sticks.map((peak) => peak.x);
  const ys = x.length ? y : sticks.map((peak) => peak.y);
  if (!xs.length) return null;
  const [low, high] = [Math.min(...xs), Math.max(...xs)];
  const [least, most] = [Math.min(0, ...ys), Math.max(...ys)];
  const rising = RISING.test(x_unit) || spectrum.kind === 'ms';
  const across = (/** @type {number} */ at) => ((rising ? at - low : high - at) / (high - low || 1)) * WIDTH;
  const up = (/** @type {number} */ at) => HEIGHT - ((at - least) / (most - least || 1)) * (HEIGHT - 8);
  const path = x.length ? xs.map((at, i) => `${i ? 'L' : 'M'}${across(at).toFixed(1)} ${up(ys[i] ?? 0).toFixed(1)}`).join('')
    : sticks.map((peak) => `M${across(peak.x).toFixed(1)} ${HEIGHT}V${up(peak.y).toFixed(1)}`).join('');
  const [left, right] = rising ? [low, high] : [high, low];
  return html`<figure class="axis">
    <svg viewBox="0 0 ${WIDTH} ${HEIGHT + FOOT}" aria-hidden="true"><path class=${x.length ? 'file-curve' : 'file-sticks'} d=${path} />
      <path class="axis-rule" d="M0 ${HEIGHT}H${WIDTH}" />
      <text class="axis-word" x="0" y=${HEIGHT + 30}>${round(left)}</text>
      <text class="axis-word" x=${WIDTH / 2} y=${HEIGHT + 30} text-anchor="middle">${x_unit}</text>
      <text class="axis-word" x=${WIDTH} y=${HEIGHT + 30} text-anchor="end">${round(right)}</text></svg>
    <figcaption class="hidden">${spectrum.title}: ${spectrum.points} points from ${round(left)} to ${round(right)} ${x_unit}, ${y_unit}.</figcaption>
  </figure>`;
}
