// Everything in dist/ is kept on the device: the app must start whole with the network off.
const { writeFileSync } = require('node:fs');
const { join } = require('node:path');

const dist = process.env.HOODSIDE_DIST ?? join(__dirname, '..', 'dist');

/** Without these the chemistry does not start; a build that leaves one out must fail. */
const NEEDED = [
  'index.html', 'worker/client.js', 'worker/offline.js', 'worker/worker.mjs', 'engine/kernel-bridge.js',
  'runtime/pyodide.mjs', 'runtime/pyodide.asm.mjs', 'runtime/pyodide.asm.wasm', 'runtime/pyodide-lock.json',
  'runtime/stdlib.zip', 'runtime/hoodside.zip', 'runtime/rdkit.mjs', 'runtime/RDKit_minimal.wasm',
];

/** @param {{ url: string, revision: string | null, size: number }[]} entries */
function checkAndList(entries) {
  const missing = NEEDED.filter((url) => !entries.some((entry) => entry.url === url));
  // Small files first: a broken download then loses least, and the largest are begun when all else is there.
  const manifest = [...entries].sort((a, b) => a.size - b.size);
  const files = manifest.map(({ url, revision }) => ({ url, revision }));
  writeFileSync(join(dist, 'sw-files.js'), `self.hoodsideFiles = ${JSON.stringify(files)};\n`);
  return { manifest, warnings: missing.map((url) => `${url} is needed offline but not in dist/.`) };
}

module.exports = {
  globDirectory: dist,
  globPatterns: ['**/*.{html,js,mjs,css,json,wasm,zip,webmanifest,png,svg,ico,woff2,csv,txt}'],
  globIgnores: ['sw.js', 'sw-*.js', '**/*.gz'],
  maximumFileSizeToCacheInBytes: 32 * 1024 * 1024,
  swDest: join(dist, 'sw.js'),
  cacheId: 'hoodside',
  cleanupOutdatedCaches: true,
  clientsClaim: true,
  skipWaiting: false,
  navigateFallback: 'index.html',
  navigateFallbackDenylist: [/\/api\//],
  importScripts: ['sw-files.js', 'sw-extra.js'],
  inlineWorkboxRuntime: true,
  sourcemap: false,
  manifestTransforms: [checkAndList],
};
