/** The bench tests offered, in groups; the names are the engine's keys. */
export const WET_GROUPS = [
  { name: 'Unsaturated?', tests: ['Br2 in CH2Cl2', 'cold dilute KMnO4 (Baeyer)', 'ignition test'] },
  { name: 'C=O?', tests: ['2,4-DNP', 'Tollens', 'Fehling', 'Benedict', 'iodoform'] },
  { name: 'OH, acid, ester?', tests: ['chromic acid (Jones)', 'Lucas', 'ferric chloride', 'ceric ammonium nitrate', 'NaHCO3 (5 %)',
    'ferric hydroxamate', 'periodic acid (vicinal diol)', 'D2O shake (NMR)'] },
  { name: 'N, halogen, S?', tests: ['Hinsberg', 'solubility in 5 % HCl', 'AgNO3 in EtOH', 'NaI in acetone', 'Beilstein flame',
    'sodium fusion N', 'sodium fusion S', 'sodium fusion X'] },
  { name: 'Peroxide?', tests: ['starch-iodide (peroxides)'] },
];
