// What a SMARTS pattern asks for at the least, so that most patterns are ruled out without RDKit.
//
// Only sure things count: an atom whose element cannot be read off plainly needs nothing.

const BARE = /^(Cl|Br|[BCNOSPFI]|[bcnosp]|\*)/;
const SYMBOL = /^(Cl|Br|Si|Se|As|Sn|Ge|Te|[BCNOSPFIKUVWY]|[bcnosp]|se|as)(?![a-z])/;
const BY_NUMBER = ['', 'H', 'He', 'Li', 'Be', 'B', 'C', 'N', 'O', 'F', 'Ne', 'Na', 'Mg', 'Al', 'Si', 'P', 'S', 'Cl'];

/** @type {Record<number, string>} */
const HEAVIER = { 32: 'Ge', 33: 'As', 34: 'Se', 35: 'Br', 50: 'Sn', 52: 'Te', 53: 'I' };

/** Kinds of atom a SMARTS asks for, one list of alternatives per atom ("C" aliphatic, "c" aromatic).
 * @param {string} smarts @returns {string[][]} */
export function patternNeeds(smarts) {
  const needs = [];
  for (let at = 0; at < smarts.length; ) {
    if (smarts[at] === '[') {
      const end = closing(smarts, at, '[', ']');
      const kinds = bracketKinds(smarts.slice(at + 1, end));
      if (kinds) needs.push(kinds);
      at = end + 1;
      continue;
    }
    const bare = BARE.exec(smarts.slice(at));
    if (bare && bare[0] !== '*') needs.push([bare[0]]);
    at += bare ? bare[0].length : 1;
  }
  return needs;
}

/** True when a molecule with these counts of atom kinds might match.
 * @param {string[][]} needs @param {Map<string, number>} counts */
export function mightMatch(needs, counts) {
  const single = new Map();
  for (const kinds of needs) {
    if (!kinds.some((kind) => counts.has(kind))) return false;
    if (kinds.length === 1) single.set(kinds[0], (single.get(kinds[0]) ?? 0) + 1);
  }
  for (const [kind, wanted] of single) if ((counts.get(kind) ?? 0) < wanted) return false;
  return true;
}

/** Counts of atom kinds of a molecule, from RDKit's JSON graph. @param {any} graph @returns {Map<string, number>} */
export function atomKinds(graph) {
  const molecule = graph.molecules[0];
  const extension = molecule.extensions?.find((/** @type {{ name: string }} */ e) => e.name === 'rdkitRepresentation');
  const aromatic = new Set(extension?.aromaticAtoms ?? []);
  const counts = new Map();
  (molecule.atoms ?? []).forEach((/** @type {{ z?: number }} */ atom, /** @type {number} */ index) => {
    const z = atom.z ?? graph.defaults.atom.z;
    const symbol = kindOf(z);
    const kind = aromatic.has(index) ? symbol.toLowerCase() : symbol;
    counts.set(kind, (counts.get(kind) ?? 0) + 1);
  });
  return counts;
}

/** Only the elements that patterns may need by name get one; the rest can never be missed. @param {number} z */
function kindOf(z) {
  return BY_NUMBER[z] ?? HEAVIER[z] ?? `#${z}`;
}

/** @param {string} text @param {number} start @param {string} open @param {string} close */
function closing(text, start, open, close) {
  let depth = 0;
  for (let at = start; at < text.length; at += 1) {
    if (text[at] === open) depth += 1;
    if (text[at] === close && --depth === 0) return at;
  }
  return text.length;
}

/** Kinds a bracket atom allows, or null when it allows more than can be listed. SMARTS precedence: & or
 * nothing binds tightest, then "," and last ";" (Daylight Theory Manual, chapter 4). One factor that
 * names its kinds is enough, since the others can only narrow it. @param {string} body */
function bracketKinds(body) {
  for (const part of split(body, ';')) {
    const alternatives = split(part, ',').map(termKinds);
    if (alternatives.every((kinds) => kinds !== null)) return [...new Set(alternatives.flat())];
  }
  return null;
}

/** @param {string} term */
function termKinds(term) {
  for (const factor of split(term, '&')) {
    const number = /^#(\d+)(?!\d)/.exec(factor);
    if (number) return bothKinds(Number(number[1]));
    const symbol = SYMBOL.exec(factor);
    if (symbol) return [symbol[0]];
  }
  return null;
}

/** @param {number} z */
function bothKinds(z) {
  const symbol = kindOf(z);
  return z === 1 ? null : [symbol, symbol.toLowerCase()];
}

/** Splits outside of recursive patterns. @param {string} text @param {string} mark */
function split(text, mark) {
  const parts = [''];
  for (let at = 0; at < text.length; at += 1) {
    if (text[at] === '(') {
      const end = closing(text, at, '(', ')');
      parts[parts.length - 1] += text.slice(at, end + 1);
      at = end;
    } else if (text[at] === mark) parts.push('');
    else parts[parts.length - 1] += text[at];
  }
  return parts;
}
