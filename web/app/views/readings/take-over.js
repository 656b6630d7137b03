import { newId } from '../../state/document.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

const text = (/** @type {unknown} */ value) => (value === undefined || value === null ? '' : String(value));

/** Shifts print with the decimals chemists use. @param {number} ppm @param {number} digits */
const shift = (ppm, digits) => (Number.isInteger(ppm * 10 ** digits) || text(ppm).split('.')[1]?.length <= digits ? ppm.toFixed(digits) : text(ppm));

/** @type {Record<string, (row: any) => any>} */
const ROWS = {
  h1: (row) => ({ id: newId(), shift: row.ppm !== undefined && (row.lo === undefined || row.lo === row.hi) ? shift(row.ppm, 2) : `${shift(row.hi, 2)}-${shift(row.lo, 2)}`,
    mult: text(row.mult), j: (row.j ?? []).join(', '), h: text(row.n), ...(row.note && { note: text(row.note) }) }),
  c13: (row) => (typeof row === 'number' ? { id: newId(), ppm: shift(row, 1), kind: '', n: '' }
    : { id: newId(), ppm: shift(row.ppm, 1), kind: text(row.kind), n: row.n > 1 ? text(row.n) : '' }),
  ir: (row) => ({ id: newId(), cm1: text(row.cm1 ?? row), strength: text(row.strength), shape: text(row.shape), region: '' }),
  ms: (row) => ({ id: newId(), mz: text(row.mz ?? row), rel: text(row.rel) }),
  wet: (row) => ({ id: newId(), test: row.test, result: row.result }),
};
const KINDS = /** @type {const} */ (['h1', 'c13', 'ir', 'ms', 'wet']);

/** How many readings an engine reading object holds. @param {any} readings */
export function countOf(readings) {
  const rows = KINDS.reduce((sum, kind) => sum + (readings[kind]?.length ?? 0), 0);
  return rows + (readings.ir_clear?.length ?? 0) + ['formula', 'hrms', 'analysis'].filter((key) => readings[key] && Object.keys(readings[key]).length).length;
}

/** Whether the case already holds readings of a kind that comes in. @param {CaseDoc} doc @param {any} readings */
export const collides = (doc, readings) => KINDS.some((kind) => readings[kind]?.length && doc[kind].length)
  || Boolean(readings.formula && doc.formula.trim() && readings.formula !== doc.formula.trim());

/** Put engine readings into the case. @param {CaseDoc} draft @param {any} readings @param {boolean} replace */
export function takeOver(draft, readings, replace) {
  for (const kind of KINDS) {
    const rows = (readings[kind] ?? []).map(ROWS[kind]);
    if (!rows.length) continue;
    /** @type {any} */ (draft)[kind] = replace ? rows : [...draft[kind], ...rows];
  }
  for (const [lo, hi] of (readings.ir_clear ?? []).map((/** @type {any} */ row) => (Array.isArray(row) ? row : [row.lo, row.hi]))) {
    draft.irClear.push({ id: newId(), lo, hi });
  }
  // A formula typed before is not overruled by one that merely stands in a pasted line.
  if (readings.formula && (replace || !draft.formula.trim())) draft.formula = readings.formula;
  if (readings.solvent) draft.solvent = readings.solvent;
  if (readings.mhz) draft.mhz = text(readings.mhz);
  if (readings.ir_medium) draft.irMedium = readings.ir_medium;
  if (readings.raw_integrals) draft.raw = true;
  if (readings.hrms) draft.hrms = { found: text(readings.hrms.found), adduct: readings.hrms.adduct || '[M+H]+', ppm: text(readings.hrms.ppm ?? 5) };
  for (const [element, percent] of Object.entries(readings.analysis?.found ?? readings.analysis ?? {})) draft.analysis[element] = text(percent);
}
