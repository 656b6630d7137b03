/** What the start needs, with the content type that browsers insist on. */
const NEEDED = [
  ['../runtime/pyodide.asm.wasm', 'application/wasm'],
  ['../runtime/RDKit_minimal.wasm', 'application/wasm'],
  ['../runtime/pyodide.mjs', 'text/javascript'],
  ['../runtime/pyodide.asm.mjs', 'text/javascript'],
  ['../runtime/rdkit.mjs', 'text/javascript'],
  ['../engine/kernel-bridge.js', 'text/javascript'],
  ['./worker.mjs', 'text/javascript'],
  ['../runtime/stdlib.zip', ''],
  ['../runtime/hoodside.zip', ''],
];

const PATIENCE_MS = 5_000;

/** @param {string} path @param {string} wanted @returns {Promise<string>} what is wrong with it, or '' */
async function trouble(path, wanted) {
  const url = new URL(path, import.meta.url);
  const name = url.pathname.split('/').at(-1);
  const stop = new AbortController();
  setTimeout(() => stop.abort(), PATIENCE_MS);
  try {
    const response = await fetch(url, { signal: stop.signal });
    stop.abort(); // the headers are enough
    if (!response.ok) return `${name} cannot be had: the host answered ${response.status}.`;
    const type = (response.headers.get('Content-Type') ?? '').split(';')[0].trim();
    return wanted && type !== wanted ? `The host sends ${name} as ${type || 'no type'} instead of ${wanted}.` : '';
  } catch {
    return `${name} cannot be reached and is not kept on this device.`;
  }
}

/** After a failed start: the first of its files that is missing or comes under a wrong type, in plain words.
 * @returns {Promise<string>} '' when all files are as they should be */
export async function diagnose() {
  const troubles = await Promise.all(NEEDED.map(([path, wanted]) => trouble(path, wanted)));
  return troubles.find(Boolean) ?? '';
}
