// Runs a list of engine calls in Pyodide with RDKit's wasm, from the sources in the checkout.
//
// usage: node node_calls.mjs NODE_MODULES CALLS.json
// CALLS.json: [[function, argument, ...], ...] with functions named in full ("hoodside.molecule.x.f", or a
// function of tests/parity/calls.py as "calls.f"). Prints one JSON array of {"ok": answer} or {"error": code, "message"}.
import { readFileSync } from 'node:fs';
import { createRequire } from 'node:module';
import { dirname, resolve } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { makeBridge } from '../../web/engine/kernel-bridge.js';

const [modules, callsFile] = process.argv.slice(2).map((path) => resolve(path));
const here = dirname(fileURLToPath(import.meta.url));
const require = createRequire(import.meta.url);
const rdkitFolder = `${modules}/@rdkit/rdkit/dist`;
const initRDKit = require(`${rdkitFolder}/RDKit_minimal.js`);
const { loadPyodide } = await import(pathToFileURL(`${modules}/pyodide/pyodide.mjs`).href);

const [python, rdkit] = await Promise.all([
  loadPyodide({ indexURL: `${modules}/pyodide/` }),
  initRDKit({ locateFile: (file) => `${rdkitFolder}/${file}` }),
]);
python.registerJsModule('hoodside_kernel', makeBridge(rdkit));
python.mountNodeFS('/py', resolve(here, '../../py'));
python.mountNodeFS('/parity', here);
python.runPython('import sys; sys.dont_write_bytecode = True; sys.path[:0] = ["/py", "/parity"]');
const answer = python.runPython('from calls import answer_all; answer_all');
process.stdout.write(answer(readFileSync(callsFile, 'utf8')));
