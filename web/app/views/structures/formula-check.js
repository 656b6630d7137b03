/** Atoms per element of a plain formula. @param {string} formula @returns {Record<string, number>} */
function counts(formula) {
  /** @type {Record<string, number>} */
  const found = {};
  for (const [, symbol = '', n = ''] of formula.matchAll(/([A-Z][a-z]?)(\d*)/g)) found[symbol] = (found[symbol] ?? 0) + Number(n || 1);
  return found;
}

/** @param {[string, number][]} parts */
const written = (parts) => parts.map(([symbol, n]) => symbol + (n > 1 ? n : '')).join('');

/** How a structure's formula differs from the sample's: what it has too much of, and what it is short of.
 * Both as the engine writes them. @param {string} structure @param {string} sample */
export function formulaCheck(structure, sample) {
  if (!sample || structure === sample) return { differs: false, extra: '', short: '' };
  const [mine, wanted] = [counts(structure), counts(sample)];
  /** @type {[string, number][]} */
  const by = [...new Set([...Object.keys(wanted), ...Object.keys(mine)])].map((symbol) => [symbol, (mine[symbol] ?? 0) - (wanted[symbol] ?? 0)]);
  return { differs: true, extra: written(by.filter(([, n]) => n > 0)), short: written(by.filter(([, n]) => n < 0).map(([symbol, n]) => [symbol, -n])) };
}
