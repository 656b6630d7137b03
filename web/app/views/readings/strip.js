import { html } from 'htm/preact';
import { toNumber } from '../../words/numbers.js';
import { stateOf } from './infrared.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').IrRegion} IrRegion */

const WIDTH = 1000;
const HEIGHT = 260;
const BASE = 36;
const DEEP = HEIGHT - BASE - 14;
const DEPTH = { weak: 0.3, medium: 0.6, strong: 0.95, '': 0.6 };
/** Half width at half depth, cm-1. */
const SPREAD = { broad: 110, sharp: 11, '': 20 };

/** Printouts give 2000-500 the larger part of the paper; so does the strip. @param {number} cm1 */
export const across = (cm1) => (cm1 >= 2000 ? ((4000 - cm1) / 2000) * 0.4 : 0.4 + ((2000 - cm1) / 1500) * 0.6) * WIDTH;

/** @param {number} fraction 0 at 4000, 1 at 500 */
export const wavenumberAt = (fraction) => (fraction <= 0.4 ? 4000 - (fraction / 0.4) * 2000 : 2000 - ((fraction - 0.4) / 0.6) * 1500);

/** @typedef {{ at: number, depth: number, spread: number }} Dip */

/** @param {CaseDoc} doc @param {IrRegion[]} regions @returns {Dip[]} */
const dips = (doc, regions) => doc.ir.map((band) => {
  const region = regions.find((entry) => entry.id === band.region);
  const typed = toNumber(band.cm1);
  return {
    at: Number.isNaN(typed) ? (region ? (region.lo + region.hi) / 2 : NaN) : typed,
    depth: DEPTH[/** @type {keyof typeof DEPTH} */ (band.strength)] ?? DEPTH.medium,
    spread: SPREAD[/** @type {keyof typeof SPREAD} */ (band.shape)] ?? SPREAD[''],
  };
}).filter((dip) => !Number.isNaN(dip.at));

/** @param {number} cm1 @param {Dip[]} all */
function passing(cm1, all) {
  let left = 1;
  for (const dip of all) left *= 1 - dip.depth * Math.exp(-Math.LN2 * ((cm1 - dip.at) / dip.spread) ** 2);
  return left;
}

/** @param {IrRegion} region @param {Dip[]} all */
function curve(region, all) {
  const steps = Math.max(16, Math.round((across(region.lo) - across(region.hi)) / 3));
  const points = [];
  for (let i = 0; i <= steps; i += 1) {
    const cm1 = region.hi - ((region.hi - region.lo) * i) / steps;
    points.push(`${across(cm1).toFixed(1)} ${(BASE + DEEP * (1 - passing(cm1, all))).toFixed(1)}`);
  }
  return `M${points.join('L')}`;
}

/** The sweep as a cartoon of the printout: dotted where not looked at, flat where clear, dipping where seen.
 * A tap takes the region nearest to the finger.
 * @param {{ doc: CaseDoc, regions: IrRegion[], at: string, onPick: (id: string) => void }} props */
export function Strip({ doc, regions, at, onPick }) {
  const all = dips(doc, regions);
  const pick = (/** @type {any} */ event) => {
    const box = event.currentTarget.getBoundingClientRect();
    const cm1 = wavenumberAt((event.clientX - box.left) / box.width);
    const region = regions.find((entry) => cm1 >= entry.lo && cm1 < entry.hi) ?? regions[0];
    if (region) onPick(region.id);
  };
  return html`<div class="strip" onClick=${pick}>
    <svg viewBox="0 0 ${WIDTH} ${HEIGHT}" preserveAspectRatio="none" aria-hidden="true">
      ${regions.map((region) => html`<g key=${region.id}>
        ${region.id === at && html`<rect class="strip-at" x=${across(region.hi)} y="0"
          width=${across(region.lo) - across(region.hi)} height=${HEIGHT} />`}
        <path class="strip-edge" d="M${across(region.hi)} 0V${HEIGHT}" />
        <path class="strip-${stateOf(doc, region)}" d=${stateOf(doc, region) === 'seen' ? curve(region, all)
          : `M${across(region.hi)} ${BASE}H${across(region.lo)}`} />
      </g>`)}
      <path class="strip-edge" d="M${WIDTH} 0V${HEIGHT}" />
    </svg>
    <div class="strip-scale" aria-hidden="true">
      ${[4000, 3000, 2000, 1500, 1000, 500].map((tick) => html`<span key=${tick} class="tick-${tick}">${tick}</span>`)}
    </div>
  </div>`;
}
