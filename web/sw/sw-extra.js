// Beside what workbox generates: says which files of this version are kept, and fetches those that are not.
// `hoodsideFiles` is written by the build: what workbox precaches, with the revision it keeps in the cache key.

/** @typedef {{ url: string, revision: string | null }} PrecacheEntry */
const worker = /** @type {ServiceWorkerGlobalScope & { hoodsideFiles: PrecacheEntry[] }} */ (/** @type {unknown} */ (self));

/** @param {PrecacheEntry} entry */
function cacheKey({ url, revision }) {
  const key = new URL(url, worker.registration.scope);
  if (revision) key.searchParams.set('__WB_REVISION__', revision);
  return key.href;
}

const precache = () => caches.open(`hoodside-precache-v2-${worker.registration.scope}`);

async function missingFiles() {
  const keys = new Set((await (await precache()).keys()).map((request) => request.url));
  return worker.hoodsideFiles.filter((entry) => !keys.has(cacheKey(entry)));
}

async function whatIsKept() {
  const missing = (await missingFiles()).map((entry) => entry.url);
  const total = worker.hoodsideFiles.length;
  return { present: total - missing.length, total, missing };
}

async function fetchMissing() {
  const cache = await precache();
  for (const entry of await missingFiles()) {
    const response = await fetch(new URL(entry.url, worker.registration.scope), { cache: 'reload' });
    if (response.ok) await cache.put(cacheKey(entry), response);
  }
}

worker.addEventListener('message', (event) => {
  const asked = event.data?.type;
  const fetched = asked === 'FETCH_MISSING' ? fetchMissing().catch(() => {}) : null;
  if (fetched || asked === 'WHAT_IS_KEPT') {
    event.waitUntil(Promise.resolve(fetched).then(whatIsKept).then((kept) => event.ports[0].postMessage(kept)));
  }
});
