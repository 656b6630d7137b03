/** @typedef {import('./types').Canvas} Canvas */
/** @typedef {import('./types').Option} Option */
/** @typedef {import('./types').Place} Place */

/** How far from an atom or bond a touch still means it, CSS pixels (a gloved fingertip is about 15 mm wide). */
const REACH = 60;
/** The part of a bond that stands for it, from one end; the rest belongs to its atoms. */
const MIDDLE = [0.36, 0.64];

/** @param {Place} a @param {Place | null} b */
export const samePlace = (a, b) => Boolean(b && a.kind === b.kind && a.at === b.at);

/** Where a place stands: ends of the stretch that means it. @param {Canvas} drawn @param {Place} place
 * @returns {[[number, number], [number, number]]} */
function stretch({ coords, bonds }, place) {
  const at = (/** @type {number} */ atom) => coords[atom] ?? [0, 0];
  if (place.kind === 'atom') return [at(place.at), at(place.at)];
  const [a, b] = bonds[place.at] ?? [0, 0];
  const [[x, y], [u, v]] = [at(a), at(b)];
  const part = (/** @type {number} */ t) => /** @type {[number, number]} */ ([x + (u - x) * t, y + (v - y) * t]);
  return [part(MIDDLE[0] ?? 0), part(MIDDLE[1] ?? 1)];
}

/** @param {[[number, number], [number, number]]} line @param {number} x @param {number} y */
function distance([[a, b], [c, d]], x, y) {
  const length = (c - a) ** 2 + (d - b) ** 2;
  const t = length ? Math.min(1, Math.max(0, ((x - a) * (c - a) + (y - b) * (d - b)) / length)) : 0;
  return Math.hypot(x - a - t * (c - a), y - b - t * (d - b));
}

/** All that can be touched, atoms first. @param {Canvas} drawn @returns {Place[]} */
export const places = ({ atoms, bonds }) => [
  ...atoms.map((_, at) => /** @type {Place} */ ({ kind: 'atom', at })),
  ...bonds.map((_, at) => /** @type {Place} */ ({ kind: 'bond', at })),
];

/** Places within reach of a touch, nearest first. @param {Canvas} drawn @param {number} x @param {number} y
 * @param {Place[]} [among] */
export function near(drawn, x, y, among = places(drawn)) {
  return among.map((place) => ({ place, away: distance(stretch(drawn, place), x, y) }))
    .filter(({ away }) => away <= REACH).sort((a, b) => a.away - b.away).map(({ place }) => place);
}

/** The place before or after, round and round. @param {Place[]} all @param {Place | null} from @param {-1 | 1} by */
export function beside(all, from, by) {
  const at = all.findIndex((place) => samePlace(place, from));
  return all[(at + by + all.length) % all.length] ?? null;
}

/** Atoms that could be joined to `from`: with a hydrogen to give, not bonded to it yet.
 * @param {Canvas} drawn @param {number} from @returns {Place[]} */
export function joinable({ atoms, bonds }, from) {
  const bonded = new Set(bonds.filter(([a, b]) => a === from || b === from).flatMap(([a, b]) => [a, b]));
  return atoms.flatMap(({ hydrogens }, at) => (hydrogens && at !== from && !bonded.has(at) ? [/** @type {Place} */ ({ kind: 'atom', at })] : []));
}

/** What is touched when a structure has been begun: the first atom something can be attached to.
 * @param {Canvas} drawn @returns {Place} */
export const afterBeginning = ({ atoms }) => ({ kind: 'atom', at: Math.max(0, atoms.findIndex(({ hydrogens }) => hydrogens > 0)) });

/** What is touched after a step, so that the next one is near: growth goes on at the new carbon.
 * @param {Option} option @param {Canvas} before @param {Canvas} after @returns {Place | null} */
export function afterStep({ step, arguments: given }, before, after) {
  const added = before.atoms.length;
  if (step === 'attach') return atomPlace(after, after.atoms[added]?.symbol === 'C' ? [added, given.atom, ...from(added, after)] : [given.atom, ...from(added, after)]);
  if (step === 'insert') return atomPlace(after, [added]);
  if (step === 'join') return atomPlace(after, [given.a]);
  if (step === 'remove') return afterRemoving(given.atom, before, after);
  if ('atom' in given) return { kind: 'atom', at: given.atom };
  return step === 'cut' ? null : sameBond(before.bonds[given.bond], after);
}

/** @param {number} first @param {Canvas} drawn */
const from = (first, { atoms }) => atoms.map((_, at) => at).slice(first);

/** The first of the atoms that has a hydrogen left, else the first of all.
 * @param {Canvas} drawn @param {number[]} choice @returns {Place} */
const atomPlace = (drawn, choice) => ({ kind: 'atom', at: choice.find((at) => drawn.atoms[at]?.hydrogens) ?? choice[0] ?? 0 });

/** @param {number} gone @param {Canvas} before @param {Canvas} after @returns {Place | null} */
function afterRemoving(gone, before, after) {
  const bond = before.bonds.find(([a, b]) => a === gone || b === gone);
  if (!bond || after.atoms.length !== before.atoms.length - 1) return null;
  const neighbour = bond[0] === gone ? bond[1] : bond[0];
  return { kind: 'atom', at: neighbour > gone ? neighbour - 1 : neighbour };
}

/** @param {[number, number, number] | undefined} bond @param {Canvas} after @returns {Place | null} */
function sameBond(bond, after) {
  const at = after.bonds.findIndex(([a, b]) => bond && Math.min(a, b) === Math.min(bond[0], bond[1]) && Math.max(a, b) === Math.max(bond[0], bond[1]));
  return at < 0 ? null : { kind: 'bond', at };
}
