import { useEffect } from 'preact/hooks';
import { dropIfEmpty } from '../state/cases.js';
import { path } from '../state/route.js';

/** A row begun on a sheet and left without a figure goes when its sheets are left.
 * @param {string} id of the case @param {'h1' | 'c13' | 'ms'} kind @param {string} rowId */
export function useLeaveEmpty(id, kind, rowId) {
  useEffect(() => () => {
    if (!path.peek().includes(rowId)) dropIfEmpty(id, kind, rowId);
  }, [id, kind, rowId]);
}
