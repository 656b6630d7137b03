// Copies the npm modules that the app imports into OUT, with all that they import in turn, and writes the
// import map that names them to the page. Workers have no import map and import by path; the start counts
// there, so what they use of a package becomes one file.
// usage: node vendor.mjs OUT INDEX_HTML
import { existsSync } from 'node:fs';
import { copyFile, mkdir, readFile, writeFile } from 'node:fs/promises';
import { dirname, join, relative, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { nodeResolve } from '@rollup/plugin-node-resolve';
import { rollup } from 'rollup';

const here = dirname(fileURLToPath(import.meta.url));
const packages = join(here, '../node_modules');

/** Bare import -> the ES module of the package. Add a line here to use another package. */
const MODULES = /** @type {Record<string, string>} */ ({
  preact: 'preact/dist/preact.mjs',
  'preact/hooks': 'preact/hooks/dist/hooks.mjs',
  htm: 'htm/dist/htm.mjs',
  'htm/preact': 'htm/preact/index.mjs',
  '@preact/signals-core': '@preact/signals-core/dist/signals-core.mjs',
  '@preact/signals': '@preact/signals/dist/signals.mjs',
  idb: 'idb/build/index.js',
  uplot: 'uplot/dist/uPlot.esm.js',
});
/** What a page names; the other modules are only named by those above and below. */
const FOR_PAGES = ['preact', 'preact/hooks', 'htm', 'htm/preact', '@preact/signals', 'idb', 'uplot'];
/** File in OUT -> the module, in this folder, that names what workers use. */
const FOR_WORKERS = { 'eigen-solver.js': 'eigen-solver.mjs' };
/** Bare import of a page -> file in OUT and the module, in this folder, that names what is used of a large package. */
const JOINED_FOR_PAGES = { 'qr/decode.js': { file: 'qr-decoder.js', entry: 'qr-decoder.mjs' } };
const STYLES = ['uplot/dist/uPlot.min.css'];

const SPECIFIER = /(\b(?:from|import)\s*)(["'])([^"'\n]+)\2/g;
const SOURCE_MAP = /\n?\/\/# sourceMappingURL=\S+\s*$/;

/** @param {string} specifier @param {string} importer @returns {string} path below node_modules */
function locate(specifier, importer) {
  if (!specifier.startsWith('.')) {
    if (!MODULES[specifier]) throw new Error(`${importer} imports ${specifier}, which vendor.mjs does not list.`);
    return MODULES[specifier];
  }
  const path = join(dirname(importer), specifier);
  return existsSync(join(packages, path)) ? path : `${path}.js`;
}

/** Copy a module and its imports, each import rewritten to a relative path.
 * @param {string} out @param {string} path @param {Set<string>} done */
async function copyModule(out, path, done) {
  if (done.has(path)) return;
  done.add(path);
  /** @type {string[]} */
  const imported = [];
  const text = (await readFile(join(packages, path), 'utf8')).replace(SOURCE_MAP, '\n').replace(
    SPECIFIER, (_, lead, quote, specifier) => {
      const target = locate(specifier, path);
      imported.push(target);
      const step = relative(dirname(path), target).replaceAll('\\', '/');
      return `${lead}${quote}${step.startsWith('.') ? step : `./${step}`}${quote}`;
    });
  await mkdir(dirname(join(out, path)), { recursive: true });
  await writeFile(join(out, path), text);
  for (const target of imported) await copyModule(out, target, done);
}

/** A module and all it imports as one file, less what is not used. @param {string} file @param {string} entry */
async function joinModule(file, entry) {
  const joined = await rollup({ input: entry, plugins: [nodeResolve()] });
  await joined.write({ file, format: 'es' });
}

/** Browsers want the import map before the first script. @param {string} index */
async function insertMap(index) {
  const copied = FOR_PAGES.map((bare) => [bare, `./vendor/${MODULES[bare]}`]);
  const joined = Object.entries(JOINED_FOR_PAGES).map(([bare, { file }]) => [bare, `./vendor/${file}`]);
  const imports = Object.fromEntries([...copied, ...joined]);
  const map = `<script type="importmap">${JSON.stringify({ imports })}</script>`;
  const page = await readFile(index, 'utf8');
  const mapped = page.replace(/(?=<script|<link[^>]+modulepreload)/, `${map}\n    `);
  if (mapped === page) throw new Error('index.html has no script, so there is nothing to put the import map before.');
  await writeFile(index, mapped);
}

const [out, index] = process.argv.slice(2).map((path) => resolve(path));
const done = /** @type {Set<string>} */ (new Set());
for (const bare of FOR_PAGES) await copyModule(out, MODULES[bare], done);
const joins = [...Object.entries(FOR_WORKERS), ...Object.values(JOINED_FOR_PAGES).map(({ file, entry }) => [file, entry])];
for (const [file, entry] of joins) await joinModule(join(out, file), join(here, entry));
for (const file of STYLES) await copyFile(join(packages, file), join(out, /** @type {string} */ (file.split('/').at(-1))));
await insertMap(index);
