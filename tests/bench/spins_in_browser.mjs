// Times spin simulation in Pyodide under Node, with the numerics bridge over ml-matrix.
//
// usage: node spins_in_browser.mjs NODE_MODULES
// Prints one JSON object: number of spins -> seconds (warm), for a chain and for a fully coupled system.
import { createRequire } from 'node:module';
import { dirname, resolve } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { makeNumerics } from '../../web/engine/numerics-bridge.js';

const modules = resolve(process.argv[2]);
const here = dirname(fileURLToPath(import.meta.url));
const mlMatrix = createRequire(import.meta.url)(`${modules}/ml-matrix`);
const { loadPyodide } = await import(pathToFileURL(`${modules}/pyodide/pyodide.mjs`).href);

const python = await loadPyodide({ indexURL: `${modules}/pyodide/` });
python.registerJsModule('hoodside_numerics', makeNumerics(mlMatrix));
python.mountNodeFS('/py', resolve(here, '../../py'));
python.mountNodeFS('/bench', here);
python.runPython('import sys; sys.dont_write_bytecode = True; sys.path[:0] = ["/py", "/bench"]');
process.stdout.write(python.runPython(`
import json
from spin_timing import seconds
json.dumps({kind: {n: seconds(kind, n) for n in (8, 10)} for kind in ("chain", "full")})
`));
