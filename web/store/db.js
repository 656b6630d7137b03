import { openDB } from 'idb';

/** Append only: a device may come from any earlier version. The schema version is the length of this list.
 * @type {((db: import('idb').IDBPDatabase) => void)[]} */
const MIGRATIONS = [
  (db) => {
    db.createObjectStore('cases', { keyPath: 'id' });
    db.createObjectStore('photos', { keyPath: 'id' });
  },
  (db) => void db.createObjectStore('settings'),
];

/** @type {Promise<import('idb').IDBPDatabase> | null} */
let opening = null;

function open() {
  opening ??= openDB('hoodside', MIGRATIONS.length, {
    upgrade: (db, oldVersion) => MIGRATIONS.slice(oldVersion).forEach((migrate) => migrate(db)),
    blocking: (_current, _blocked, event) => {
      /** @type {IDBDatabase} */ (event.target).close();
      opening = null;
    },
    terminated: () => { opening = null; },
  });
  opening.catch(() => { opening = null; });
  return opening;
}

/** Run `work` on an open database. Phones drop the connection of a page that was in the background,
 * so a failure is answered by opening afresh and trying once more.
 * @template T
 * @param {(db: import('idb').IDBPDatabase) => Promise<T>} work
 * @returns {Promise<T>} */
export async function withStore(work) {
  try {
    return await work(await open());
  } catch (first) {
    opening = null;
    try {
      return await work(await open());
    } catch {
      throw first;
    }
  }
}
