/** @typedef {import('./types').Kind} Kind */
/** @typedef {import('./types').Role} Role */

/** @param {string} key @param {string} one @param {Partial<Role>} given @returns {Role} */
const role = (key, one, given) => ({ key, one, many: one, several: false, signals: false, mass: false, solvent: false, ...given });

/** What can be asked about amounts. @type {Kind[]} */
export const KINDS = [
  { kind: 'ratio', name: 'Ratio', says: 'How much of each: product to starting material, two diastereomers, E to Z, regioisomers.',
    roles: [role('species', 'species', { many: 'Species', several: true, signals: true })] },
  { kind: 'conversion', name: 'Conversion', says: 'How much of the starting material is gone.',
    roles: [role('start', 'starting material', { signals: true }), role('products', 'product', { many: 'Products', several: true, signals: true })] },
  { kind: 'yield', name: 'Yield', says: 'From the mass of what was isolated and of what was limiting.',
    roles: [role('product', 'product', { mass: true }), role('limiting', 'limiting reagent', { mass: true })] },
  { kind: 'purity', name: 'Purity', says: 'By an internal standard weighed in beside the sample.',
    roles: [role('analyte', 'sample', { signals: true, mass: true }), role('standard', 'internal standard', { signals: true, mass: true })] },
  { kind: 'solvent', name: 'Solvent left', says: 'How much solvent the product still holds, by mole and by mass.',
    roles: [role('main', 'product', { signals: true }), role('solvents', 'solvent', { many: 'Solvents', several: true, signals: true, solvent: true })] },
];

/** @param {string} kind */
export const kindOf = (kind) => KINDS.find((entry) => entry.kind === kind) ?? /** @type {Kind} */ (KINDS[0]);
