import { toNumber, toRange } from '../../words/numbers.js';
import { kindOf } from './kinds.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Portion} Portion */
/** @typedef {import('../../types').Amounts} Amounts */
/** @typedef {import('./types').Role} Role */

/** @returns {Amounts} */
export const emptyAmounts = () => ({ kind: 'ratio', percent: '', stoichiometry: '', portions: {} });

/** @param {CaseDoc} doc @returns {Amounts} */
export const amountsOf = (doc) => doc.amounts ?? emptyAmounts();

/** @param {CaseDoc} doc @param {string} role */
export const portionsOf = (doc, role) => amountsOf(doc).portions[role] ?? [];

/** Integral of a signal chosen for a portion: as typed there, else as read. @param {CaseDoc} doc @param {import('../../types').PortionSignal} signal */
export const integralOf = (doc, signal) => signal.integral ?? doc.h1.find(({ id }) => id === signal.row)?.h ?? '';

/** What a portion is called; where it has no name, what it is. @param {Portion} portion @param {Role} role @param {number} at */
export const portionName = (portion, role, at) => portion.name.trim() || (role.several ? `${role.one} ${at + 1}` : role.one);

/** The first thing a portion still lacks, '' when nothing. @param {CaseDoc} doc @param {Portion} portion @param {Role} role */
export function lacks(doc, portion, role) {
  if (role.solvent && !portion.name) return 'which solvent';
  if (role.signals && !portion.signals.length) return 'a signal';
  if (role.signals && portion.signals.some((signal) => !(toNumber(integralOf(doc, signal)) > 0))) return 'an integral';
  if (role.signals && !role.solvent && portion.signals.some((signal) => !(toNumber(signal.protons) > 0))) return 'the H behind a signal';
  if (role.mass && !(toNumber(portion.mass) > 0)) return 'a mass';
  const needsMolar = role.mass || (role.key === 'main');
  return needsMolar && !portion.formula && !(toNumber(portion.molar) > 0) ? 'a molar mass' : '';
}

/** @param {string} text @param {string} key @param {number} [scale] */
const given = (text, key, scale = 1) => (toNumber(text) >= 0 ? { [key]: toNumber(text) * scale } : {});

/** A portion as the engine reads it. @param {CaseDoc} doc @param {Portion} portion @param {Role} role @param {string} name */
function asked(doc, portion, role, name) {
  const share = toNumber(amountsOf(doc).percent) / 100;
  const error = (/** @type {number} */ integral) => (share > 0 ? { u: integral * share } : {});
  if (role.solvent) {
    const [signal] = portion.signals;
    const integral = signal ? toNumber(integralOf(doc, signal)) : NaN;
    const range = toRange(doc.h1.find(({ id }) => id === signal?.row)?.shift ?? '');
    return { name: portion.name, integral, ...error(integral), ...(range && { ppm: (range.lo + range.hi) / 2 }) };
  }
  const signals = portion.signals.map((signal) => {
    const integral = toNumber(integralOf(doc, signal));
    return { integral, protons: toNumber(signal.protons), ...error(integral) };
  });
  const molar = toNumber(portion.molar) > 0 ? { molar_mass: toNumber(portion.molar) } : portion.formula ? { formula: portion.formula } : {};
  return { name, ...(role.signals && { signals }), ...molar, ...(role.mass && { ...given(portion.mass, 'mass'), ...given(portion.u, 'u'), ...given(portion.purity, 'purity', 0.01) }) };
}

/** Names made different from each other. @param {string[]} names */
const apart = (names) => names.map((name, i) => (names.indexOf(name) === i ? name : `${name} (${names.slice(0, i + 1).filter((other) => other === name).length})`));

/** The question, or what it lacks. @param {CaseDoc} doc @returns {{ params: any, lacking: string }} */
export function amountsQuestion(doc) {
  const amounts = amountsOf(doc);
  const { roles } = kindOf(amounts.kind);
  /** @type {any} */
  const params = { kind: amounts.kind };
  for (const role of roles) {
    const portions = portionsOf(doc, role.key);
    const least = role.key === 'species' ? 2 : 1;
    if (portions.length < least) return { params: null, lacking: least > 1 ? 'Give two species or more.' : `Say which the ${role.one} is.` };
    const names = apart(portions.map((portion, i) => portionName(portion, role, i)));
    for (const [i, portion] of portions.entries()) {
      const missing = lacks(doc, portion, role);
      if (missing) return { params: null, lacking: `${names[i]} still needs ${missing}.` };
    }
    const rows = portions.map((portion, i) => asked(doc, portion, role, names[i] ?? ''));
    params[role.key] = role.several ? rows : rows[0];
  }
  if (amounts.kind === 'yield' && toNumber(amounts.stoichiometry) > 0) params.stoichiometry = toNumber(amounts.stoichiometry);
  if (amounts.kind === 'solvent') params.nmr_solvent = doc.solvent || 'CDCl3';
  return { params, lacking: '' };
}
