/** Number from text as chemists type it (comma or point, any dash for minus); NaN when it is none.
 * @param {string} text */
export function toNumber(text) {
  const plain = text.trim().replace(/[−–]/g, '-').replace(',', '.');
  return /^[-+]?(\d+\.?\d*|\.\d+)$/.test(plain) ? Number(plain) : NaN;
}

/** A shift or a range, ppm, low end first; null when the text is neither.
 * @param {string} text @returns {{ lo: number, hi: number } | null} */
export function toRange(text) {
  const plain = text.trim().replace(/[−–]/g, '-').replace(/,/g, '.').replace(/\s+/g, '');
  const pair = plain.match(/^(-?[\d.]+)-(-?[\d.]+)$/);
  const ends = pair ? [toNumber(pair[1] ?? ''), toNumber(pair[2] ?? '')] : [toNumber(plain), toNumber(plain)];
  if (ends.some(Number.isNaN)) return null;
  return { lo: Math.min(...ends), hi: Math.max(...ends) };
}

/** Numbers of a list: "8.2, 1.4" or "8.2; 1.4" or "8.2 1.4". Comma decimals are read in "8,2; 1,4".
 * @param {string} text */
export function toNumbers(text) {
  const parts = text.includes(';') ? text.split(';') : text.split(/,\s+|\s+|,(?=\d+\.)/);
  return parts.map((part) => part.trim()).filter(Boolean).map(toNumber);
}

const MINUS = '\u2212';

/** @param {number} value @param {number} digits decimals */
export const fixed = (value, digits) => value.toFixed(digits).replace('-', MINUS);

/** A weight in decibans with its sign, whole numbers.
 * @param {number} db */
export function signed(db) {
  const whole = Math.round(db);
  return whole > 0 ? `+${whole}` : whole < 0 ? `${MINUS}${-whole}` : '0';
}

/** @param {number} value @param {number} digits */
export const signedFixed = (value, digits) => (value > 0 ? '+' : '') + fixed(value, digits);

/** @param {number} count @param {string} one @param {string} [many] */
export const plural = (count, one, many = `${one}s`) => `${count} ${count === 1 ? one : many}`;
