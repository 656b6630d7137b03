/** @typedef {import('../types').CaseDoc} CaseDoc */

export const newId = () => globalThis.crypto?.randomUUID?.() ?? fallbackId();

/** `randomUUID` is missing where the page came over plain HTTP. */
function fallbackId() {
  const bytes = crypto.getRandomValues(new Uint8Array(16));
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('');
}

/** @returns {CaseDoc} */
export function emptyCase() {
  const now = new Date().toISOString();
  return {
    id: newId(), kind: 'hoodside-case', version: 1, title: '', created: now, changed: now,
    invented: false, demo: '', story: '', cautions: [], formula: '', solvent: '', mhz: '', raw: false,
    h1: [], c13: [], irMedium: '', ir: [], irClear: [], ms: [], hrms: { found: '', adduct: '[M+H]+', ppm: '5' },
    analysis: {}, wet: [], structures: [], intended: '', photos: [], last: null,
  };
}

/** A stored or imported case with every field present and every row named.
 * @param {any} doc @returns {CaseDoc} */
export function mended(doc) {
  const full = { ...emptyCase(), ...doc };
  for (const rows of [full.h1, full.c13, full.ir, full.irClear, full.ms, full.wet, full.structures]) {
    for (const row of rows) row.id ??= newId();
  }
  return full;
}
