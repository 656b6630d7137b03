import { withStore } from './db.js';

/** @param {string} key @returns {Promise<unknown>} */
export const readSetting = (key) => withStore((db) => db.get('settings', key));

/** @param {string} key @param {unknown} value */
export const writeSetting = (key, value) => withStore((db) => db.put('settings', value, key));
