import { signal } from '@preact/signals';
import { watchOffline } from '../../worker/offline.js';

/** 'checking' until known; 'never' where this page can have no offline copy (plain HTTP, old browser). */
export const offline = signal(/** @type {import('../../worker/offline.js').OfflineState} */ ('checking'));
/** How much of the offline copy is kept while it is being fetched: "14 of 25 files". */
export const offlineProgress = signal('');
/** Starts the waiting new version; null when none waits. */
export const takeUpdate = signal(/** @type {(() => void) | null} */ (null));

export function startOffline() {
  watchOffline({
    onState: (state, kept) => {
      offlineProgress.value = kept && kept.present < kept.total ? `${kept.present} of ${kept.total} files kept.` : '';
      offline.value = state;
      if (state === 'ready') askToStay();
    },
    onUpdate: (apply) => { takeUpdate.value = apply; },
  });
}

/** Ask the browser not to throw the cases away when the device runs short; it may decline. */
const askToStay = () => void navigator.storage?.persist?.().catch(() => false);
