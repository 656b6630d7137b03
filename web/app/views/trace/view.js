/** A stretch of the axis, ppm. @typedef {{ hi: number, lo: number }} View */

/** Narrowest view, ppm. */
const LEAST = 0.02;

/** Keep a view within the whole. @param {View} view @param {View} whole @returns {View} */
export function within(view, whole) {
  const span = Math.min(Math.max(view.hi - view.lo, LEAST), whole.hi - whole.lo);
  const middle = (view.hi + view.lo) / 2;
  const hi = Math.min(Math.max(middle + span / 2, whole.lo + span), whole.hi);
  return { hi, lo: hi - span };
}

/** Nearer by a factor above 1, farther by one below; the place `at` stays where it is. @param {View} view
 * @param {number} factor @param {View} whole @param {number} [at] ppm */
export function zoomed(view, factor, whole, at = (view.hi + view.lo) / 2) {
  return within({ hi: at + (view.hi - at) / factor, lo: at - (at - view.lo) / factor }, whole);
}

/** Shifted by a part of its own width; positive goes to higher shift. @param {View} view @param {number} part @param {View} whole */
export function shifted(view, part, whole) {
  const by = (view.hi - view.lo) * part;
  return within({ hi: view.hi + by, lo: view.lo + by }, whole);
}

/** Ticks in round steps, high first, with the decimals they need. @param {View} view @param {number} most */
export function ticksIn(view, most) {
  const steps = [0.005, 0.01, 0.02, 0.05, 0.1, 0.2, 0.5, 1, 2, 5];
  const step = steps.find((size) => (view.hi - view.lo) / size <= most) ?? 10;
  const digits = step >= 1 ? 0 : step >= 0.1 ? 1 : step >= 0.01 ? 2 : 3;
  const ticks = [];
  for (let i = Math.floor(view.hi / step + 1e-9); i * step >= view.lo; i -= 1) ticks.push({ ppm: i * step, text: (i * step).toFixed(digits).replace('-', '\u2212') });
  return ticks;
}
