import { signal } from '@preact/signals';

/** @type {import('@preact/signals').Signal<{ text: string, undo: (() => void) | null } | null>} */
export const toast = signal(null);

const STAYS_MS = 9000;
let timer = 0;

/** Say what was done and offer to take it back. @param {string} text @param {(() => void) | null} undo */
export function offerUndo(text, undo) {
  clearTimeout(timer);
  toast.value = { text, undo };
  timer = window.setTimeout(() => { toast.value = null; }, STAYS_MS);
}

/** @param {string} text */
export const say = (text) => offerUndo(text, null);

export function takeBack() {
  toast.value?.undo?.();
  toast.value = null;
}
