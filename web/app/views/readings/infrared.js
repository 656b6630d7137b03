import { toNumber } from '../../words/numbers.js';
import { newId } from '../../state/document.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').IrRegion} IrRegion */
/** @typedef {import('../../types').BandRow} BandRow */
/** @typedef {'seen' | 'clear' | 'open'} RegionState */

export const MEDIA = ['film', 'ATR', 'KBr', 'CCl4', 'CHCl3', 'nujol', 'gas'];

/** @param {BandRow} band @param {IrRegion} region */
function inside(band, region) {
  const at = toNumber(band.cm1);
  return Number.isNaN(at) ? band.region === region.id : at >= region.lo && at < region.hi;
}

/** @param {CaseDoc} doc @param {IrRegion} region */
export const bandsIn = (doc, region) => doc.ir.filter((band) => inside(band, region));

/** Stretches marked flat that cover the middle of the region. @param {CaseDoc} doc @param {IrRegion} region */
const clearsOver = (doc, region) =>
  doc.irClear.filter((clear) => clear.lo <= (region.lo + region.hi) / 2 && clear.hi >= (region.lo + region.hi) / 2);

/** @param {CaseDoc} doc @param {IrRegion} region @returns {RegionState} */
export function stateOf(doc, region) {
  if (bandsIn(doc, region).length) return 'seen';
  return clearsOver(doc, region).length ? 'clear' : 'open';
}

/** Mark a region flat: its bands go, one stretch over the whole of it stays. @param {CaseDoc} draft @param {IrRegion} region */
export function markClear(draft, region) {
  draft.ir = draft.ir.filter((band) => !inside(band, region));
  if (!clearsOver(draft, region).length) draft.irClear.push({ id: newId(), lo: region.lo, hi: region.hi });
}

/** Back to not looked at. @param {CaseDoc} draft @param {IrRegion} region */
export function markOpen(draft, region) {
  const gone = new Set(clearsOver(draft, region).map((clear) => clear.id));
  draft.irClear = draft.irClear.filter((clear) => !gone.has(clear.id));
  draft.ir = draft.ir.filter((band) => !inside(band, region));
}

/** A new band in the region, its position still to be read. @param {CaseDoc} draft @param {IrRegion} region */
export function addBand(draft, region) {
  const gone = new Set(clearsOver(draft, region).map((clear) => clear.id));
  draft.irClear = draft.irClear.filter((clear) => !gone.has(clear.id));
  const band = { id: newId(), cm1: '', strength: 'medium', shape: '', region: region.id };
  draft.ir.push(band);
  return band;
}

/** "7 seen · 2 clear · 9 not looked at" @param {CaseDoc} doc @param {IrRegion[]} regions */
export function sweepWords(doc, regions) {
  const count = { seen: 0, clear: 0, open: 0 };
  for (const region of regions) count[stateOf(doc, region)] += 1;
  return `${count.seen} seen · ${count.clear} clear · ${count.open} not looked at`;
}
