import { withStore } from './db.js';

/** @typedef {import('../app/types').CaseDoc} CaseDoc */

/** @returns {Promise<CaseDoc[]>} */
export const readCases = () => withStore((db) => db.getAll('cases'));

/** Resolves when the case is committed to the device.
 * @param {CaseDoc} doc */
export const writeCase = (doc) => withStore(async (db) => {
  const tx = db.transaction('cases', 'readwrite', { durability: 'strict' });
  await Promise.all([tx.store.put(doc), tx.done]);
});

/** @param {string} id */
export const dropCase = (id) => withStore((db) => db.delete('cases', id));
