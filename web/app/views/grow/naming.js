/** @typedef {import('./types').Canvas} Canvas */
/** @typedef {import('./types').Place} Place */

/** @type {Record<string, string>} */
const ELEMENTS = { C: 'carbon', N: 'nitrogen', O: 'oxygen', S: 'sulfur', F: 'fluorine', Cl: 'chlorine', Br: 'bromine',
  I: 'iodine', P: 'phosphorus', Si: 'silicon', B: 'boron', Se: 'selenium' };
const LINES = ['', '\u2013', '=', '\u2261'];
const ORDERS = ['', 'single', 'double', 'triple'];

/** An atom with its hydrogens: "CH3". @param {{ symbol: string, hydrogens: number } | undefined} atom */
const group = (atom) => (atom ? `${atom.symbol}${atom.hydrogens ? 'H' : ''}${atom.hydrogens > 1 ? atom.hydrogens : ''}` : '');

/** A place in short and in words: what it is, and which of how many.
 * @param {Canvas} drawn @param {Place} place @returns {{ short: string, words: string }} */
export function placeName({ atoms, bonds, labels }, place) {
  if (place.kind === 'atom') {
    const atom = atoms[place.at];
    const label = labels.atoms[place.at];
    return { short: `${group(atom)}${label ? `, ${label}` : ''}`, words: `${ELEMENTS[atom?.symbol ?? ''] ?? atom?.symbol} ${place.at + 1} of ${atoms.length}` };
  }
  const [a = 0, b = 0, order = 1] = bonds[place.at] ?? [];
  const label = labels.bonds[place.at];
  const ends = [a, b].map((at) => group(atoms[at]));
  return { short: `${ends[0]}${LINES[order] ?? LINES[1]}${ends[1]}${label ? `, ${label}` : ''}`,
    words: `${ORDERS[order] ?? ''} bond ${place.at + 1} of ${bonds.length}` };
}
