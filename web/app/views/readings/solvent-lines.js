import { currentCheck } from '../../state/check.js';
import { useAnswer } from '../../state/use-answer.js';
import { toNumber, toRange } from '../../words/numbers.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {{ id: string, h?: string, shift?: string, ppm?: string }} Row */
/** Residual lines wander this little with concentration and reference, ppm. */
const NEAR = { h1: 0.03, c13: 0.4 };

/** Rows that the best structure leaves unexplained and the engine has a name for: id of the row -> name. */
function decided() {
  const { found } = currentCheck.value;
  const left = found?.answer.candidates[0]?.unexplained ?? [];
  return new Map(left.filter(({ name }) => name).map(({ ref, name }) => [found?.refs[ref], name]));
}

/** Names the solvent, water or impurity a row probably is: as the check decided, else by place alone, and then
 * only where no H were given to it. @param {CaseDoc} doc @param {'h1' | 'c13'} kind @returns {(row: Row) => string} */
export function useSolventName(doc, kind) {
  const { value } = useAnswer('solvents', {});
  const lines = /** @type {any} */ (value)?.solvents?.find((/** @type {any} */ entry) => entry.name === doc.solvent)?.[kind] ?? [];
  const names = decided();
  return (row) => {
    const known = names.get(row.id);
    if (known) return known;
    const range = toRange((kind === 'h1' ? row.shift : row.ppm) ?? '');
    if (!range || toNumber(row.h ?? '') > 0) return '';
    const line = lines.find((/** @type {any} */ entry) => Math.abs(entry.ppm - (range.lo + range.hi) / 2) <= NEAR[kind]);
    return line ? `${doc.solvent}, ${line.what === 'water' ? 'water' : 'solvent'}` : '';
  };
}
