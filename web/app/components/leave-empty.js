import { useEffect } from 'preact/hooks';
import { dropIfEmpty } from '../state/cases.js';

/** A row begun on a sheet and left without a figure goes when the sheet is left.
 * @param {string} id of the case @param {'h1' | 'c13' | 'ms'} kind @param {string} rowId */
export function useLeaveEmpty(id, kind, rowId) {
  useEffect(() => () => dropIfEmpty(id, kind, rowId), [id, kind, rowId]);
}
