import { computed, signal } from '@preact/signals';

export const STATIONS = /** @type {const} */ (['readings', 'structures', 'tally', 'next']);
/** @typedef {typeof STATIONS[number]} Station */

/** @param {string} step */
function decoded(step) {
  try {
    return decodeURIComponent(step);
  } catch {
    return step; // a percent sign typed by hand
  }
}

const read = () => location.hash.replace(/^#\/?/, '').split('/').filter(Boolean).map(decoded);

/** Steps of the address: ["case", id, station, sheet, ...arguments]. */
export const path = signal(read());
window.addEventListener('hashchange', () => { path.value = read(); });

export const caseId = computed(() => (path.value[0] === 'case' ? path.value[1] ?? '' : ''));

/** @param {...string} steps */
export const address = (...steps) => `#/${steps.map(encodeURIComponent).join('/')}`;

/** @param {...string} steps */
export function go(...steps) {
  location.hash = address(...steps);
  path.value = read();
}

/** Go without leaving a step behind for the back button. @param {...string} steps */
export function swap(...steps) {
  history.replaceState(null, '', address(...steps));
  path.value = read();
}
