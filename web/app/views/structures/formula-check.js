/** Atoms per element of a plain formula. @param {string} formula @returns {Record<string, number>} */
function counts(formula) {
  /** @type {Record<string, number>} */
  const found = {};
  for (const [, symbol = '', n = ''] of formula.matchAll(/([A-Z][a-z]?)(\d*)/g)) found[symbol] = (found[symbol] ?? 0) + Number(n || 1);
  return found;
}

/** How a structure's formula differs from the sample's: "2 H too many, 1 O short". Both as the engine writes them.
 * @param {string} structure @param {string} sample */
export function formulaCheck(structure, sample) {
  if (!sample || structure === sample) return { differs: false, words: '' };
  const [mine, wanted] = [counts(structure), counts(sample)];
  const parts = [...new Set([...Object.keys(wanted), ...Object.keys(mine)])]
    .map((symbol) => ({ symbol, by: (mine[symbol] ?? 0) - (wanted[symbol] ?? 0) })).filter(({ by }) => by !== 0)
    .map(({ symbol, by }) => `${Math.abs(by)} ${symbol} ${by > 0 ? 'too many' : 'short'}`);
  return { differs: true, words: parts.length ? parts.join(', ') : `is ${structure}` };
}
