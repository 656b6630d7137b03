// RDKit's wasm behind a few calls of text: what hoodside/molecule/kernel_browser.py talks to.
//
// Every answer is a string. One that starts with "!" is RDKit's complaint about the input. Exceptions
// mean that the module has trapped (or ran out of memory) and must be started afresh.

import { atomKinds, mightMatch, patternNeeds } from './pattern-needs.js';

/** RDKit's own objects; its typings name only some of their methods. @typedef {any} Mol @typedef {any} Reaction */
/** A kept object; `kinds` counts the kinds of atom of a molecule once they were asked for.
 * @typedef {{ handle: any, kinds?: Map<string, number> }} Entry */
/** @typedef {{ smarts: string, needs: string[][] }} Pattern */

const MAX_MOLECULES = 256;
const MAX_PATTERNS = 6000;
const MAX_REACTIONS = 256;
const MAX_PATTERN_LISTS = 64;
// RDKit stops at 1,000 matches without saying so.
const SILENT_LIMIT = 1000;
const MAX_MATCHES = 100_000;
const MAX_PRODUCT_SETS = 1000;
const NO_MATCH = '{}';
const GRAPH_OPTIONS = JSON.stringify({ assignCIPLabels: true });

class BadPattern extends Error {}

/** A cache of objects that must be freed by hand, least recently used first. */
class HandleCache {
  /** @type {Map<string, Entry>} */
  #open = new Map();
  #limit;

  /** @param {number} limit */
  constructor(limit) {
    this.#limit = limit;
  }

  get size() {
    return this.#open.size;
  }

  /** @param {string} key @param {() => Entry | null} make */
  obtain(key, make) {
    const entry = this.#open.get(key) ?? make();
    if (entry === null) return null;
    this.#open.delete(key); // and in again, as the one used last
    this.#open.set(key, entry);
    if (this.#open.size > this.#limit) this.#drop(/** @type {string} */ (this.#open.keys().next().value));
    return entry;
  }

  clear() {
    for (const key of [...this.#open.keys()]) this.#drop(key);
  }

  /** @param {string} key */
  #drop(key) {
    this.#open.get(key)?.handle.delete();
    this.#open.delete(key);
  }
}

/**
 * @param {any} RDKit the initialised RDKit MinimalLib module
 * @returns the object to register in Pyodide as module `hoodside_kernel`
 */
export function makeBridge(RDKit) {
  RDKit.use_legacy_stereo_perception(true);
  RDKit.allow_non_tetrahedral_chirality(false);
  const molecules = new HandleCache(MAX_MOLECULES);
  const patterns = new HandleCache(MAX_PATTERNS);
  const reactions = new HandleCache(MAX_REACTIONS);
  /** @type {Map<string, Pattern[]>} */
  const lists = new Map();

  let complaint = '';
  /** Runs `make` and, when nothing comes of it, keeps what RDKit said.
   * @param {() => any} make @returns {Entry | null} */
  const listening = (make) => {
    const log = RDKit.set_log_capture('rdApp.error');
    try {
      const handle = make();
      complaint = handle ? '' : log.get_buffer();
      return handle && { handle };
    } finally {
      log?.delete();
    }
  };

  /** Only the newer perception reads double-bond marks from a JSON graph (and drops those that no longer hold),
   * and only under it are they told. @template T @param {() => T} act @returns {T} */
  const withNewPerception = (act) => {
    RDKit.use_legacy_stereo_perception(false);
    try {
      return act();
    } finally {
      RDKit.use_legacy_stereo_perception(true);
    }
  };
  const fromGraph = (/** @type {string} */ source) => withNewPerception(() => RDKit.get_mol(source, GRAPH_OPTIONS));
  const isGraph = (/** @type {string} */ source) => source.trimStart().startsWith('{');
  const parse = (/** @type {string} */ source) => (isGraph(source) ? fromGraph(source) : RDKit.get_mol(source));
  const molecule = (/** @type {string} */ source) => molecules.obtain(source, () => listening(() => parse(source)));
  /** @param {string} source @param {(mol: Mol, entry: Entry) => string} answer */
  const withMolecule = (source, answer) => {
    const entry = molecule(source);
    return entry ? answer(entry.handle, entry) : `!${complaint}`;
  };
  const pattern = (/** @type {string} */ smarts) =>
    patterns.obtain(smarts, () => listening(() => RDKit.get_qmol(smarts)));
  const reaction = (/** @type {string} */ smarts) =>
    reactions.obtain(smarts, () => listening(() => RDKit.get_rxn(smarts)));

  /** Names are taken from the SMILES, so that one molecule has one name whatever it was read from.
   * @param {Mol} mol @param {string} source @returns {Mol} */
  const named = (mol, source) => (isGraph(source) ? molecule(mol.get_smiles())?.handle : mol);
  const inchi = (/** @type {Mol} */ mol, /** @type {string} */ source) => named(mol, source).get_inchi();
  const tags = (/** @type {Mol} */ mol) => onCopy(mol, (copy) => copy.get_stereo_tags());
  /** @type {Record<string, (mol: Mol, source: string) => string>} */
  const answers = {
    graph: (mol) => mol.get_json(),
    stereo: (mol, source) => (isGraph(source) ? withNewPerception(() => tags(mol)) : tags(mol)),
    smiles: (mol, source) => named(mol, source).get_smiles(),
    inchi,
    inchikey: (mol, source) => RDKit.get_inchikey_for_inchi(inchi(mol, source)),
    molblock: (mol) => laidOut(mol, (flat) => flat.get_molblock()),
    coords: (mol) => laidOut(mol, (flat) => JSON.stringify([...flat.get_coords()].map(([x, y]) => [x, y]))),
  };

  const kindsOf = (/** @type {Entry} */ entry) => (entry.kinds ??= atomKinds(JSON.parse(entry.handle.get_json())));

  /** @param {Mol} mol @param {string} smarts @param {string} options @returns {number[][] | null} */
  const matchesOf = (mol, smarts, options) => {
    const query = pattern(smarts);
    if (!query) throw new BadPattern(smarts);
    let found = options ? mol.get_substruct_matches(query.handle, options) : mol.get_substruct_matches(query.handle);
    if (found === NO_MATCH) return null;
    found = JSON.parse(found);
    if (!options && found.length >= SILENT_LIMIT) return matchesOf(mol, smarts, matchOptions(true));
    return found.map((/** @type {{ atoms: number[] }} */ match) => match.atoms);
  };

  /** @param {Entry} entry @param {Pattern[]} list @param {boolean} unique */
  const matchList = (entry, list, unique) => {
    const kinds = kindsOf(entry);
    const options = unique ? '' : matchOptions(false);
    /** @type {[number, number[][]][]} */
    const found = [];
    list.forEach(({ smarts, needs }, index) => {
      const matches = mightMatch(needs, kinds) ? matchesOf(entry.handle, smarts, options) : null;
      if (matches) found.push([index, matches]);
    });
    return JSON.stringify(found);
  };

  return {
    version: () => RDKit.version(),

    /** One fact about a molecule: graph, stereo, smiles, inchi, inchikey, molblock or coords (JSON).
     * @param {string} what @param {string} source */
    ask: (what, source) => withMolecule(source, (mol) => answers[what](mol, source)),

    /** RDKit's SVG with the given drawing options (JSON). @param {string} source @param {string} options */
    svg: (source, options) => withMolecule(source, (mol) => markedSvg(mol, options)),

    /** Remembers a list of SMARTS (JSON) under a name, so that it crosses the border once.
     * @param {string} name @param {string} smartsJson */
    keepPatterns(name, smartsJson) {
      if (lists.size >= MAX_PATTERN_LISTS) lists.delete(/** @type {string} */ (lists.keys().next().value));
      const list = /** @type {string[]} */ (JSON.parse(smartsJson));
      lists.set(name, list.map((smarts) => ({ smarts, needs: patternNeeds(smarts) })));
      return '';
    },

    /** Matches of a kept list: JSON [[index in list, [[atom, …], …]], …], patterns without any left out.
     * @param {string} source @param {string} name @param {boolean} unique */
    matchAll(source, name, unique) {
      const list = lists.get(name);
      if (!list) return '?';
      return withMolecule(source, (_, entry) => {
        try {
          return matchList(entry, list, unique);
        } catch (error) {
          if (error instanceof BadPattern) return `!SMARTS ${error.message}`;
          throw error;
        }
      });
    },

    /** Product sets of a reaction SMARTS as JSON [[smiles, …], …], duplicates and impossible ones left out.
     * @param {string} smarts @param {string} sourcesJson */
    react(smarts, sourcesJson) {
      const rxn = reaction(smarts);
      if (!rxn) return `!REACTION ${complaint}`;
      const reactants = /** @type {string[]} */ (JSON.parse(sourcesJson)).map(molecule);
      if (reactants.includes(null)) return `!${complaint}`;
      return JSON.stringify(runReaction(RDKit, rxn.handle, reactants.map((entry) => entry?.handle)));
    },

    liveHandles: () => molecules.size,

    close() {
      for (const cache of [molecules, patterns, reactions]) cache.clear();
      lists.clear();
      return '';
    },
  };
}

const FLAT = 2;

/** Gives `use` the molecule with flat coordinates: its own, or new ones on a copy.
 * @param {Mol} mol @param {(flat: Mol) => string} use */
function laidOut(mol, use) {
  if (mol.has_coords() === FLAT) return use(mol);
  return onCopy(mol, (copy) => {
    copy.set_new_coords();
    return use(copy);
  });
}

/** @param {Mol} mol @param {(copy: Mol) => string} use */
function onCopy(mol, use) {
  const copy = mol.copy();
  try {
    return use(copy);
  } finally {
    copy.delete();
  }
}

/** Every atom marked, so that Python can tell where it was drawn. @param {Mol} mol @param {string} options */
function markedSvg(mol, options) {
  const atoms = Array.from({ length: mol.get_num_atoms() }, (_, index) => index);
  return laidOut(mol, (flat) => flat.get_svg_with_highlights(JSON.stringify({ ...JSON.parse(options), atoms })));
}

const matchOptions = (/** @type {boolean} */ uniquify) => JSON.stringify({ uniquify, maxMatches: MAX_MATCHES });

/** @param {any} RDKit @param {Reaction} rxn @param {Mol[]} reactants */
function runReaction(RDKit, rxn, reactants) {
  const list = new RDKit.MolList();
  reactants.forEach((mol) => list.append(mol));
  const sets = rxn.run_reactants(list, MAX_PRODUCT_SETS);
  const found = new Map();
  for (let i = 0; i < sets.size(); i += 1) {
    const products = sets.get(i);
    /** @type {(string | null)[]} */
    const smiles = [];
    for (let k = 0; k < products.size(); k += 1) smiles.push(cleaned(RDKit, products.at(k)));
    if (!smiles.includes(null)) found.set(smiles.join('.'), smiles);
    products.delete();
  }
  sets.delete();
  list.delete();
  return [...found.values()];
}

/** Products come unsanitised: reading their SMILES again checks valence and finds aromaticity.
 * @param {any} RDKit @param {Mol} product @returns {string | null} */
function cleaned(RDKit, product) {
  const raw = product.get_smiles();
  product.delete();
  const mol = RDKit.get_mol(raw);
  const smiles = mol ? mol.get_smiles() : null;
  mol?.delete();
  return smiles;
}
