// Copies the npm modules that the page imports into OUT and writes the import map that names them.
// usage: node vendor.mjs OUT INDEX_HTML
import { copyFile, mkdir, readFile, writeFile } from 'node:fs/promises';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

const packages = join(dirname(fileURLToPath(import.meta.url)), '../node_modules');

/** Bare import -> file of the package that is its ES module. Add a line here to use another package. */
const MODULES = {
  preact: 'preact/dist/preact.mjs',
  'preact/hooks': 'preact/hooks/dist/hooks.mjs',
  htm: 'htm/dist/htm.mjs',
  'htm/preact': 'htm/preact/index.mjs',
  '@preact/signals-core': '@preact/signals-core/dist/signals-core.mjs',
  '@preact/signals': '@preact/signals/dist/signals.mjs',
  idb: 'idb/build/index.js',
  uplot: 'uplot/dist/uPlot.esm.js',
};
const STYLES = ['uplot/dist/uPlot.min.css'];

const fileName = (/** @type {string} */ bare) => `${bare.replace('@', '').replace('/', '-')}.js`;

/** @param {string} from @param {string} to */
async function copyModule(from, to) {
  const text = await readFile(join(packages, from), 'utf8');
  await writeFile(to, text.replace(/\n?\/\/# sourceMappingURL=\S+\s*$/, '\n'));
}

/** Browsers want the import map before the first script. @param {string} index */
async function insertMap(index) {
  const imports = Object.fromEntries(Object.keys(MODULES).map((bare) => [bare, `./vendor/${fileName(bare)}`]));
  const map = `<script type="importmap">${JSON.stringify({ imports })}</script>`;
  const page = await readFile(index, 'utf8');
  const mapped = page.replace(/(?=<script|<link[^>]+modulepreload)/, `${map}\n    `);
  if (mapped === page) throw new Error('index.html has no script, so there is nothing to put the import map before.');
  await writeFile(index, mapped);
}

const [out, index] = process.argv.slice(2).map((path) => resolve(path));
await mkdir(out, { recursive: true });
for (const [bare, file] of Object.entries(MODULES)) await copyModule(file, join(out, fileName(bare)));
for (const file of STYLES) await copyFile(join(packages, file), join(out, /** @type {string} */ (file.split('/').at(-1))));
await insertMap(index);
