import { plural, toNumber, toRange } from './numbers.js';

/** @typedef {import('../types').CaseDoc} CaseDoc */
/** @typedef {import('../types').ProtonRow} ProtonRow */

/** Number a row is sorted by: high shift first, rows without a shift last.
 * @param {string} text */
export function sortKey(text) {
  const range = toRange(text);
  return range ? -(range.lo + range.hi) / 2 : Infinity;
}

/** @template T @param {T[]} rows @param {(row: T) => string} text */
export const highFirst = (rows, text) => [...rows].sort((a, b) => sortKey(text(a)) - sortKey(text(b)));

/** Hyphens between numbers as en dashes, for reading only.
 * @param {string} text */
export const dashed = (text) => text.trim().replace(/(\d)\s*[-−]\s*(\d)/, '$1\u2013$2');

/** "7.81 d, 2 H" @param {ProtonRow} row */
export function protonLabel(row) {
  const mult = row.mult ? ` ${row.mult}` : '';
  return `${dashed(row.shift) || 'no shift'}${mult}${row.h ? `, ${row.h.trim()} H` : ''}`;
}

/** Sum of the H entered so far. @param {CaseDoc} doc */
export const protonSum = (doc) => doc.h1.reduce((sum, row) => sum + (toNumber(row.h) || 0), 0);

/** Words for the kinds of reading present: "IR, ¹H, mass". @param {CaseDoc} doc */
export function kindsPresent(doc) {
  const kinds = [];
  if (doc.ir.length || doc.irClear.length) kinds.push('IR');
  if (doc.h1.length) kinds.push('\u00b9H');
  if (doc.c13.length) kinds.push('\u00b9\u00b3C');
  if (doc.ms.length || doc.hrms.found) kinds.push('mass');
  if (Object.values(doc.analysis).some(Boolean)) kinds.push('combustion');
  if (doc.wet.length) kinds.push(plural(doc.wet.length, 'wet test'));
  return kinds.join(', ');
}
