import { highFirst } from '../words/readings.js';
import { toNumber, toNumbers, toRange } from '../words/numbers.js';
import { textOf } from '../words/steps.js';

/** @typedef {import('../types').CaseDoc} CaseDoc */
/** @typedef {import('../types').ProtonRow} ProtonRow */
/** @typedef {{ row: string, message: string }} RowFault */
/** @typedef {{ params: any, refs: Record<string, string>, faults: RowFault[] }} CheckInput */

/** What is wrong with a 1H row, '' when nothing is. @param {ProtonRow} row */
export function protonFault(row) {
  if (row.shift.trim() && !toRange(row.shift)) return `${row.shift} is no shift. Type 7.26, or 7.20-7.35 for a range.`;
  if (row.j.trim() && toNumbers(row.j).some((j) => !(j > 0))) return `${row.j} is no list of J. Type 8.2, 1.4.`;
  if (row.h.trim() && !(toNumber(row.h) > 0)) return `${row.h} is no number of H. Type 1, 2, 3 or a step height.`;
  return '';
}

/** @param {ProtonRow} row */
function proton(row) {
  const range = /** @type {{ lo: number, hi: number }} */ (toRange(row.shift));
  const shift = range.lo === range.hi ? { ppm: range.lo } : range;
  const j = toNumbers(row.j).sort((a, b) => b - a);
  const n = toNumber(row.h);
  return { ...shift, ...(row.mult && { mult: row.mult }), ...(j.length && { j }), ...(n > 0 && { n }) };
}

/** Rows that can be read become engine rows; `refs` says which row an engine reading came from.
 * @template T
 * @param {string} key @param {T[]} rows @param {(row: T) => object | null} turn
 * @param {CheckInput} input */
function put(key, rows, turn, input) {
  /** @type {object[]} */
  const list = [];
  for (const row of rows) {
    const value = turn(row);
    if (!value) continue;
    input.refs[`${key}:${list.length}`] = /** @type {any} */ (row).id;
    list.push(value);
  }
  if (list.length) input.params[key] = list;
}

/** The check object of a case. Rows still empty or wrong are left out and named in `faults`.
 * @param {CaseDoc} doc @returns {CheckInput} */
export function checkInput(doc) {
  /** @type {CheckInput} */
  const input = { params: {}, refs: {}, faults: [] };
  put('h1', highFirst(doc.h1, (row) => row.shift), (row) => {
    const message = protonFault(row);
    if (message) input.faults.push({ row: row.id, message });
    return message || !row.shift.trim() ? null : proton(row);
  }, input);
  put('c13', highFirst(doc.c13, (row) => row.ppm), (row) => numbered(row, 'ppm', input,
    (ppm) => ({ ppm, ...(row.kind && { kind: row.kind }), ...(toNumber(row.n) > 1 && { n: toNumber(row.n) }) })), input);
  put('ir', highFirst(doc.ir, (row) => row.cm1), (row) => numbered(row, 'cm1', input,
    (cm1) => ({ cm1, ...(row.strength && { strength: row.strength }), ...(row.shape && { shape: row.shape }) })), input);
  put('ms', doc.ms, (row) => numbered(row, 'mz', input,
    (mz) => ({ mz, ...(toNumber(row.rel) > 0 && { rel: toNumber(row.rel) }) })), input);
  put('wet', doc.wet, ({ test, result }) => ({ test, result }), input);
  addLoose(doc, input);
  return input;
}

/** @param {any} row @param {string} field @param {CheckInput} input @param {(value: number) => object} turn */
function numbered(row, field, input, turn) {
  const text = row[field].trim();
  if (!text) return null;
  const value = toNumber(text);
  if (Number.isNaN(value)) input.faults.push({ row: row.id, message: `${text} is no number.` });
  return Number.isNaN(value) ? null : turn(value);
}

/** @param {CaseDoc} doc @param {CheckInput} input */
function addLoose(doc, { params, refs }) {
  if (doc.formula.trim()) params.formula = doc.formula.trim();
  if (doc.solvent) params.solvent = doc.solvent;
  if (toNumber(doc.mhz) > 0) params.mhz = toNumber(doc.mhz);
  if (doc.raw) params.raw_integrals = true;
  if (doc.irMedium) params.ir_medium = doc.irMedium;
  if (doc.irClear.length) params.ir_clear = doc.irClear.map(({ lo, hi }) => [lo, hi]);
  doc.irClear.forEach((row, i) => { refs[`ir_clear:${i}`] = row.id; });
  const found = toNumber(doc.hrms.found);
  if (found > 0) params.hrms = { adduct: doc.hrms.adduct, found, ppm: toNumber(doc.hrms.ppm) || 5 };
  const analysis = Object.entries(doc.analysis).filter(([, text]) => toNumber(text) > 0);
  if (analysis.length) params.analysis = Object.fromEntries(analysis.map(([el, text]) => [el, toNumber(text)]));
}

/** The step that was run, as the engine takes it; nothing while no start is named. @param {CaseDoc} doc */
export function stepInput({ run }) {
  if (!run?.start) return {};
  return { step: { start: run.start.smiles, reagents: textOf(run.steps), ...(run.partner && { partner: run.partner.smiles }) } };
}
