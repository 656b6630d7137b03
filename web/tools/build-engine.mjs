// Compiles the standard library and the engine to byte code inside the Pyodide that will load them.
// usage: node build-engine.mjs OUT [--debug]
import { copyFile, mkdir, readFile, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { loadPyodide } from 'pyodide';

const here = dirname(fileURLToPath(import.meta.url));
const repo = resolve(here, '../..');
const npm = createRequire(import.meta.url);
const pyodideFolder = dirname(npm.resolve('pyodide'));
const rdkitFolder = dirname(npm.resolve('@rdkit/rdkit'));

/** @param {string} out @param {boolean} debug */
async function compileArchives(out, debug) {
  // Byte code without columns is smaller and sooner read; the lines stay.
  /** @type {Record<string, string>} */
  const env = debug ? {} : { PYTHONNODEBUGRANGES: '1' };
  const python = await loadPyodide({ indexURL: `${pyodideFolder}/`, env });
  for (const [inside, outside] of [['/stock', pyodideFolder], ['/py', join(repo, 'py')], ['/tools', here],
    ['/out', out]]) python.mountNodeFS(inside, outside);
  python.registerJsModule('hoodside_kernel', {});
  python.registerJsModule('hoodside_numerics', {});
  python.globals.set('debug', debug);
  python.runPython(`
import sys
sys.dont_write_bytecode = True
sys.path[:0] = ["/py", "/tools"]
import compile_bundle
compile_bundle.standard_library("/stock/python_stdlib.zip", "/out/stdlib.zip", debug)
compile_bundle.engine("/py/hoodside", "/out/hoodside.zip", debug)
`);
}

/** The archives must start by themselves and hold every module that the engine imports. @param {string} out */
async function tryArchives(out) {
  const python = await loadPyodide({ indexURL: `${pyodideFolder}/`, stdLibURL: join(out, 'stdlib.zip') });
  python.registerJsModule('hoodside_kernel', {});
  python.registerJsModule('hoodside_numerics', {});
  python.FS.writeFile('/lib/hoodside.zip', await readFile(join(out, 'hoodside.zip')));
  for (const [inside, outside] of [['/py', join(repo, 'py')], ['/tools', here]]) python.mountNodeFS(inside, outside);
  python.runPython(`
import sys
from importlib import import_module
from pathlib import Path
sys.path.insert(0, "/lib/hoodside.zip")
import hoodside_start
sys.path.append("/tools")
sys.dont_write_bytecode = True
from compile_bundle import module_names
for name in module_names(Path("/py/hoodside")):
    if not import_module(name).__file__.startswith("/lib/hoodside.zip/"):
        raise ImportError(f"{name} does not come from the archive")
`);
}

/** Pyodide asks for its package list at every start; ours is empty. @param {string} out */
async function writeLockFile(out) {
  const lock = JSON.parse(await readFile(join(pyodideFolder, 'pyodide-lock.json'), 'utf8'));
  await writeFile(join(out, 'pyodide-lock.json'), JSON.stringify({ ...lock, packages: {} }));
}

/** RDKit comes as UMD, which a module worker cannot import. @param {string} out */
async function writeRdkitModule(out) {
  const umd = await readFile(join(rdkitFolder, 'RDKit_minimal.js'), 'utf8');
  await writeFile(join(out, 'rdkit.mjs'), `${umd}\nexport default initRDKitModule;\n`);
  await copyFile(join(rdkitFolder, 'RDKit_minimal.wasm'), join(out, 'RDKit_minimal.wasm'));
}

/** @param {string} out @param {boolean} debug */
async function build(out, debug) {
  await mkdir(out, { recursive: true });
  await compileArchives(out, debug);
  await tryArchives(out);
  await writeLockFile(out);
  await writeRdkitModule(out);
  for (const name of ['pyodide.mjs', 'pyodide.asm.mjs', 'pyodide.asm.wasm']) {
    await copyFile(join(pyodideFolder, name), join(out, name));
  }
}

try {
  await build(resolve(process.argv[2]), process.argv.includes('--debug'));
} catch (error) {
  // Without the stack: Node would show the failing line of Pyodide's glue, which is a megabyte long.
  console.error(/** @type {Error} */ (error).message);
  process.exit(1);
}
