import { currentCheck } from '../../state/check.js';
import { useAnswer } from '../../state/use-answer.js';
import { toNumber, toRange } from '../../words/numbers.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** Residual lines shift this little with water and concentration, ppm; 13C lines less than the second figure. */
const NEAR = { h1: 0.03, c13: 0.4 };

/** Names the line of the solvent or its water a row may be: as the check decided, else by place alone.
 * @param {CaseDoc} doc @param {'h1' | 'c13'} kind
 * @returns {(row: { id: string, h?: string, shift?: string, ppm?: string }) => string} */
export function useSolventName(doc, kind) {
  const { value } = useAnswer('solvents', {});
  const lines = /** @type {any} */ (value)?.solvents?.find((/** @type {any} */ entry) => entry.name === doc.solvent)?.[kind] ?? [];
  const { found } = currentCheck.value;
  const decided = new Map();
  for (const finding of found?.answer.candidates[0]?.findings ?? []) {
    if (!/solvent|water/.test(finding.kind)) continue;
    for (const ref of finding.readings) decided.set(found?.refs[ref], finding.text);
  }
  return (row) => {
    const range = kind === 'h1' ? toRange(row.shift ?? '') : toRange(row.ppm ?? '');
    if (!range || toNumber(row.h ?? '') > 0 && !decided.has(row.id)) return '';
    const line = lines.find((/** @type {any} */ entry) => Math.abs(entry.ppm - (range.lo + range.hi) / 2) <= NEAR[kind]);
    if (line) return `${doc.solvent}, ${line.what === 'residual' || line.what === 'carbon' ? 'solvent' : line.what}`;
    return decided.has(row.id) ? 'solvent or water' : '';
  };
}
