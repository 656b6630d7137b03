/** @typedef {import('./types').Trace} Trace */
/** @typedef {{ hz: number, intensity: number, width: number }} Line */

/** Width of a line at half height and of one that exchange broadens, Hz. */
export const LINE_HZ = 1;
const BROAD_HZ = 12;
/** Lines closer than this are drawn as one, Hz. */
const MERGE_HZ = 0.1;
/** How far a line is felt, in widths: there a Lorentzian has fallen to 1/3600 of its height. */
const REACH = 30;

/** Lines of one width, the near ones put together. @param {{ hz: number, intensity: number }[]} lines @param {number} width
 * @returns {Line[]} */
function merged(lines, width) {
  /** @type {Line[]} */
  const found = [];
  for (const { hz, intensity } of [...lines].sort((a, b) => a.hz - b.hz)) {
    const last = found.at(-1);
    if (last && hz - last.hz < MERGE_HZ) {
      last.hz += ((hz - last.hz) * intensity) / (last.intensity + intensity);
      last.intensity += intensity;
    } else found.push({ hz, intensity, width });
  }
  return found;
}

/** All lines of a trace, low shift first. @param {Trace} trace @returns {Line[]} */
export function linesOf(trace) {
  const lines = (/** @type {boolean} */ broad) => trace.systems.filter((system) => system.broad === broad).flatMap((system) => system.lines);
  return [...merged(lines(false), LINE_HZ), ...merged(lines(true), BROAD_HZ)].sort((a, b) => a.hz - b.hz);
}

/** The first line at or above `hz`. @param {Line[]} lines @param {number} hz */
function firstAbove(lines, hz) {
  let [low, high] = [0, lines.length];
  while (low < high) {
    const middle = (low + high) >> 1;
    if (/** @type {Line} */ (lines[middle]).hz < hz) low = middle + 1;
    else high = middle;
  }
  return low;
}

/** Sum of Lorentzians, each of area `intensity`, at one place. @param {Line[]} lines @param {number} at Hz @param {number} reach Hz */
function heightAt(lines, at, reach) {
  let sum = 0;
  for (let i = firstAbove(lines, at - reach); i < lines.length; i += 1) {
    const { hz, intensity, width } = /** @type {Line} */ (lines[i]);
    if (hz > at + reach) break;
    const off = ((at - hz) * 2) / width;
    sum += intensity / width / (1 + off * off);
  }
  return sum;
}

/** Lines as the engine gives them, for drawing. @param {{ hz: number, intensity: number }[]} lines @returns {Line[]} */
export const sharp = (lines) => merged(lines, LINE_HZ);

/** The curve of a view as [ppm, height], high shift first. Tops of lines narrower than a column are never lost: every
 * line in view is a point of the curve.
 * @param {Line[]} lines @param {number} mhz @param {{ hi: number, lo: number }} view ppm @param {number} columns
 * @param {number} [unit] what counts as 1; the tallest point when not given
 * @returns {[number, number][]} */
export function curve(lines, mhz, view, columns, unit) {
  const [hi, lo] = [view.hi * mhz, view.lo * mhz];
  const places = Array.from({ length: columns + 1 }, (_, i) => hi - ((hi - lo) * i) / columns);
  for (const { hz } of lines) if (hz > lo && hz < hi) places.push(hz);
  places.sort((a, b) => b - a);
  const reach = REACH * Math.max(LINE_HZ, ...lines.map(({ width }) => width));
  const heights = places.map((hz) => heightAt(lines, hz, reach));
  const top = unit ?? (Math.max(...heights) || 1);
  return places.map((hz, i) => [hz / mhz, /** @type {number} */ (heights[i]) / top]);
}

/** Height of the tallest point in view. @param {Line[]} lines @param {number} mhz @param {{ hi: number, lo: number }} view */
export function tallest(lines, mhz, view) {
  const inside = lines.filter(({ hz }) => hz > view.lo * mhz && hz < view.hi * mhz);
  const reach = REACH * Math.max(LINE_HZ, ...lines.map(({ width }) => width));
  return Math.max(...[view.hi * mhz, view.lo * mhz, ...inside.map(({ hz }) => hz)].map((hz) => heightAt(lines, hz, reach)));
}
