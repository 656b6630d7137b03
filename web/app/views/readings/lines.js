import { toNumber } from '../../words/numbers.js';

/** @typedef {import('../../types').LineList} LineList */

/** Rough heights by eye, and the numbers they stand for. @type {Record<string, number>} */
export const ROUGH = { low: 1, mid: 2, high: 3 };

/** @returns {LineList} */
export const emptyLines = () => ({ unit: 'ppm', heights: 'rough', rows: [{ at: '', tall: '' }, { at: '', tall: '' }] });

/** @param {string} tall */
const heightOf = (tall) => ROUGH[tall] ?? toNumber(tall);

/** The next rough height in the round: none, low, mid, high. @param {string} tall */
export function nextRough(tall) {
  const steps = ['', ...Object.keys(ROUGH)];
  return steps[(steps.indexOf(tall) + 1) % steps.length] ?? '';
}

/** The question for the engine, null while fewer than two lines can be read. Heights go along only when every line has one.
 * @param {LineList} lines @param {string} mhz of the case */
export function linesQuestion(lines, mhz) {
  const read = lines.rows.filter(({ at }) => !Number.isNaN(toNumber(at)));
  if (read.length < 2) return null;
  const heights = read.map(({ tall }) => heightOf(tall));
  const full = lines.heights !== 'none' && heights.every((height) => height > 0);
  return { lines: read.map(({ at }) => toNumber(at)), unit: lines.unit, ...(full && { heights }), ...(toNumber(mhz) > 0 && { mhz: toNumber(mhz) }) };
}

/** The lines of a signal that can be read, with heights where every line has one, else all alike.
 * @param {LineList} lines @param {number} mhz @returns {{ ppm: number, height: number }[]} */
export function linesInPpm(lines, mhz) {
  const read = lines.rows.filter(({ at }) => !Number.isNaN(toNumber(at)));
  const heights = read.map(({ tall }) => heightOf(tall));
  const full = lines.heights !== 'none' && heights.every((height) => height > 0);
  return read.map(({ at }, i) => ({ ppm: toNumber(at) / (lines.unit === 'hz' ? mhz : 1), height: full ? heights[i] ?? 1 : 1 }));
}

/** What is wrong with a line as typed, '' when nothing is. @param {string} text @param {string} unit */
export const lineFault = (text, unit) => (text.trim() && Number.isNaN(toNumber(text)) ? `${text} is no line. Type ${unit === 'hz' ? '2784.2' : '6.960'}.` : '');
