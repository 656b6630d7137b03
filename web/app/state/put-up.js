import { signal } from '@preact/signals';

/** @typedef {import('../types').CaseDoc} CaseDoc */
/** What a search in the background has found for a case: look-alikes that stand near, of how many.
 * @typedef {{ key: string, near: { smiles: string, how: string[] }[], weighed: number }} Scouted */

/** @type {import('@preact/signals').Signal<Record<string, Scouted>>} */
export const scouted = signal({});

/** So many look-alikes are put up unasked. */
const MOST = 3;

/** Look-alikes that stand in the check of a case beside its structures: the nearest found, less those the case has
 * already and those waved away. @param {CaseDoc} doc */
export function putUpFor(doc) {
  const gone = new Set([...doc.structures.map(({ smiles }) => smiles), ...(doc.dismissed ?? [])]);
  const near = (scouted.value[doc.id]?.near ?? []).filter(({ smiles }) => !gone.has(smiles)).slice(0, MOST);
  return near.length ? { put_up: near } : {};
}
