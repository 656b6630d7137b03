import { withStore } from './db.js';

/** @typedef {import('../app/types').CaseDoc} CaseDoc */

/** @returns {Promise<CaseDoc[]>} */
export const readCases = () => withStore((db) => db.getAll('cases'));

/** @param {string} id @returns {Promise<CaseDoc | undefined>} */
export const readCase = (id) => withStore((db) => db.get('cases', id));

/** Resolves when the case is committed to the device, with what was written. No other page can write it between reading
 * and writing.
 * @param {string} id @param {(kept: CaseDoc | undefined) => CaseDoc} settle what to write, given what is there */
export const writeCase = (id, settle) => withStore(async (db) => {
  const tx = db.transaction('cases', 'readwrite', { durability: 'strict' });
  const doc = settle(await tx.store.get(id));
  await Promise.all([tx.store.put(doc), tx.done]);
  return doc;
});

/** @param {string} id */
export const dropCase = (id) => withStore((db) => db.delete('cases', id));
