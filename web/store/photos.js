import { withStore } from './db.js';

/** @typedef {{ id: string, caseId: string, blob: Blob }} Photo */

/** @param {Photo} photo */
export const writePhoto = (photo) => withStore((db) => db.put('photos', photo));

/** @param {string} id @returns {Promise<Photo | undefined>} */
export const readPhoto = (id) => withStore((db) => db.get('photos', id));

/** @param {string} id */
export const dropPhoto = (id) => withStore((db) => db.delete('photos', id));
