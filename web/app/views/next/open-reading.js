import { go } from '../../state/route.js';
import { addLine } from '../readings/carbon-section.js';
import { addSignal } from '../readings/proton-section.js';
import { WET_GROUPS } from '../readings/wet-tests.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** The sheet a suggestion belongs to, by the words of the trade in it; first match counts.
 * @type {[RegExp, (doc: CaseDoc) => void][]} */
const SHEETS = [
  [/13C|DEPT|carbon/i, addLine],
  [/accurate mass|HRMS|exact mass|high.resolution/i, (doc) => go('case', doc.id, 'readings', 'hrms')],
  [/combustion|elemental/i, (doc) => go('case', doc.id, 'readings', 'analysis')],
  [/mass|isotope|\bMS\b/i, (doc) => go('case', doc.id, 'readings', 'ms')],
  [/^IR|infrared/i, (doc) => go('case', doc.id, 'readings')],
  [/1H|proton|NOE|COSY|D2O shake/i, addSignal],
  [/formula/i, (doc) => go('case', doc.id, 'readings', 'formula')],
];

/** Open the empty reading a suggestion asks for. @param {CaseDoc} doc @param {import('../../types').Advice} advice */
export function openReading(doc, advice) {
  const tests = WET_GROUPS.flatMap((group) => group.tests);
  const test = advice.test || tests.find((name) => advice.measure.toLowerCase().includes(name.toLowerCase().split(' (')[0] ?? name));
  if (test && !/13C|1H NMR|IR/.test(advice.measure)) { go('case', doc.id, 'readings', 'wet', test); return; }
  const open = SHEETS.find(([words]) => words.test(advice.measure))?.[1];
  if (open) open(doc);
  else go('case', doc.id, 'readings');
}
