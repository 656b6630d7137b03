/** @param {unknown} a @param {unknown} b */
export const same = (a, b) => JSON.stringify(a) === JSON.stringify(b);

/** @param {unknown} value @returns {value is Record<string, unknown>} */
const isRecord = (value) => typeof value === 'object' && value !== null && !Array.isArray(value);
/** @param {unknown} value @returns {value is { id: string }[]} */
const isRows = (value) => Array.isArray(value) && value.every((row) => isRecord(row) && typeof row.id === 'string');
/** @param {unknown} value @returns {value is string[]} */
const isTexts = (value) => Array.isArray(value) && value.every((entry) => typeof entry === 'string');

/** Two versions of one thing brought together: what only one of them changed stands as it changed it, rows by their id,
 * fields by their name. Where both changed the very same field, `mine` stands. Nothing that either added is lost, and a
 * row that one removed and the other changed stays.
 * @template T @param {T} base what both began from @param {T} theirs @param {T} mine @returns {T} */
export function merged(base, theirs, mine) {
  if (same(mine, base) || same(mine, theirs)) return theirs;
  if (same(theirs, base)) return mine;
  if (isRecord(theirs) && isRecord(mine)) return /** @type {T} */ (mergedFields(isRecord(base) ? base : {}, theirs, mine));
  const lists = /** @type {unknown[]} */ ([base ?? [], theirs, mine]);
  if (lists.every(isRows)) return /** @type {T} */ (mergedRows(.../** @type {[Row[], Row[], Row[]]} */ (lists)));
  if (lists.every(isTexts)) return /** @type {T} */ (mergedTexts(.../** @type {[string[], string[], string[]]} */ (lists)));
  return mine;
}

/** @typedef {{ id: string }} Row */

/** @param {Record<string, unknown>} base @param {Record<string, unknown>} theirs @param {Record<string, unknown>} mine */
function mergedFields(base, theirs, mine) {
  const names = [...new Set([...Object.keys(theirs), ...Object.keys(mine)])];
  const fields = names.map((name) => [name, merged(base[name], theirs[name], mine[name])]);
  return Object.fromEntries(fields.filter(([, value]) => value !== undefined));
}

/** In the order of `theirs`, with each row that only `mine` has behind the one it stood behind there.
 * @param {Row[]} base @param {Row[]} theirs @param {Row[]} mine */
function mergedRows(base, theirs, mine) {
  const find = (/** @type {Row[]} */ rows, /** @type {string} */ id) => rows.find((row) => row.id === id);
  /** @type {Row[]} */
  const rows = [];
  for (const row of theirs) {
    const [before, here] = [find(base, row.id), find(mine, row.id)];
    if (here) rows.push(merged(before ?? here, row, here));
    else if (!before || !same(before, row)) rows.push(row);
  }
  mine.forEach((row, i) => {
    const before = find(base, row.id);
    if (find(theirs, row.id) || (before && same(before, row))) return;
    const ahead = rows.findIndex(({ id }) => id === mine[i - 1]?.id);
    rows.splice(i === 0 ? 0 : ahead < 0 ? rows.length : ahead + 1, 0, row);
  });
  return rows;
}

/** @param {string[]} base @param {string[]} theirs @param {string[]} mine */
function mergedTexts(base, theirs, mine) {
  const gone = base.filter((text) => !theirs.includes(text) || !mine.includes(text));
  return [...new Set([...theirs, ...mine])].filter((text) => !gone.includes(text));
}
