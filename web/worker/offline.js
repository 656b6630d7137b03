/** @typedef {'checking' | 'fetching' | 'ready' | 'never'} OfflineState */
/** @typedef {{ present: number, total: number, missing: string[] }} Kept */

const POLL_MS = 700;
const ASK_MS = 4_000;
const FETCH_MS = 300_000;
const RETRY_MS = [5_000, 20_000, 60_000, 300_000];

/** Ask a service worker which files of its own version the device keeps, or to fetch those it lacks first.
 * @param {ServiceWorker} worker @param {'WHAT_IS_KEPT' | 'FETCH_MISSING'} type @param {number} patienceMs
 * @returns {Promise<Kept | null>} null when it gives no answer */
function ask(worker, type, patienceMs) {
  const { port1, port2 } = new MessageChannel();
  return new Promise((resolve) => {
    setTimeout(() => resolve(null), patienceMs);
    port1.onmessage = ({ data }) => resolve(data);
    worker.postMessage({ type }, [port2]);
  });
}

/** Keep the app on the device and say truthfully how far that has come.
 *
 * 'ready' is told only when a service worker is active and every file it needs has been found in its
 * cache; 'fetching' comes with the count; 'never' where the page can have no offline copy (plain HTTP
 * anywhere but on the device itself, or an old browser). A new version waits until `apply` is called:
 * it then takes over and the page loads anew, once.
 * @param {{ onState: (state: OfflineState, kept?: Kept) => void, onUpdate?: (apply: () => void) => void }} options
 * @returns {Promise<void>} settled with the verdict 'ready' or 'never' */
export async function watchOffline({ onState, onUpdate = () => {} }) {
  if (!window.isSecureContext || !('serviceWorker' in navigator)) return onState('never');
  onState('checking');
  reloadOnTakeover();
  const registration = await register();
  if (!registration) return onState('never');
  offerUpdates(registration, onUpdate);
  await followUntilReady(registration, onState);
}

async function register() {
  const script = new URL('../sw.js', import.meta.url);
  try {
    return await navigator.serviceWorker.register(script, { updateViaCache: 'none' });
  } catch {
    // Off the network the browser may refuse to look for a new version, though an older one is at work.
    return navigator.serviceWorker.getRegistration(new URL('./', script));
  }
}

/** @param {ServiceWorkerRegistration} registration @param {(state: OfflineState, kept?: Kept) => void} onState */
async function followUntilReady(registration, onState) {
  for (let failures = 0; ;) {
    const worker = registration.active ?? registration.waiting ?? registration.installing;
    const active = worker?.state === 'activated' ? worker : null;
    const kept = worker && await ask(worker, 'WHAT_IS_KEPT', ASK_MS);
    if (active && isWhole(kept)) return onState('ready', kept);
    onState('fetching', kept ?? undefined);
    // The browser may have thrown files away.
    if (active && isWhole(await ask(active, 'FETCH_MISSING', FETCH_MS))) continue;
    await pause(worker && !active ? POLL_MS : RETRY_MS[Math.min(failures++, RETRY_MS.length - 1)]);
    // A first install that broke off leaves nothing behind.
    if (!worker) registration = await register() ?? registration;
  }
}

/** @param {Kept | null} kept @returns {kept is Kept} */
const isWhole = (kept) => kept !== null && kept.present === kept.total;

/** @param {ServiceWorkerRegistration} registration @param {(apply: () => void) => void} onUpdate */
function offerUpdates(registration, onUpdate) {
  const offer = () => {
    const waiting = registration.waiting;
    if (waiting && registration.active) onUpdate(() => waiting.postMessage({ type: 'SKIP_WAITING' }));
  };
  registration.addEventListener('updatefound', () => {
    const coming = registration.installing;
    coming?.addEventListener('statechange', () => { if (coming.state === 'installed') offer(); });
  });
  offer();
}

function reloadOnTakeover() {
  let reloading = !navigator.serviceWorker.controller; // the very first takeover changes nothing
  navigator.serviceWorker.addEventListener('controllerchange', () => {
    if (reloading) return void (reloading = false);
    reloading = true;
    location.reload();
  });
}

const pause = (/** @type {number} */ ms) => new Promise((resolve) => { setTimeout(resolve, ms); });
