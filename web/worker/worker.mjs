// The chemistry's own thread: Python (Pyodide) and RDKit side by side, answering one call at a time.
// in: {id, method, params}; out: {id, result} or {id, error}, and before that {stage} ..., {ready} or {failed}.
import { compileAhead } from './compile.js';

const ENGINE_ZIP = '/lib/hoodside.zip';
const runtime = (/** @type {string} */ name) => new URL(`../runtime/${name}`, import.meta.url).href;
const send = (/** @type {object} */ message) => self.postMessage(message);
const reached = (/** @type {string} */ stage) => {
  performance.mark(stage);
  send({ stage });
};

async function fetchEngine() {
  const response = await fetch(runtime('hoodside.zip'));
  if (!response.ok) throw new Error(`hoodside.zip: the host answered ${response.status}.`);
  return new Uint8Array(await response.arrayBuffer());
}

async function startPython() {
  import('../runtime/pyodide.asm.mjs'); // large, and Pyodide asks for it late: read it meanwhile
  const { loadPyodide } = await import('../runtime/pyodide.mjs');
  const python = await loadPyodide({
    indexURL: runtime(''),
    lockFileURL: runtime('pyodide-lock.json'),
    stdLibURL: runtime('stdlib.zip'),
  });
  reached('python');
  return python;
}

async function startMolecules() {
  const { default: initRDKit } = await import('../runtime/rdkit.mjs');
  const molecules = await initRDKit({ locateFile: () => runtime('RDKit_minimal.wasm') });
  reached('molecules');
  return molecules;
}

async function loadNumerics() {
  const [{ makeNumerics }, solver] = await Promise.all([
    import('../engine/numerics-bridge.js'), import('../vendor/eigen-solver.js')]);
  return makeNumerics(solver);
}

async function wake() {
  reached('loading');
  const [python, molecules, archive, { makeBridge }, numerics] = await Promise.all([
    startPython(), startMolecules(), fetchEngine(), import('../engine/kernel-bridge.js'), loadNumerics()]);
  python.FS.writeFile(ENGINE_ZIP, archive);
  python.registerJsModule('hoodside_kernel', makeBridge(molecules));
  python.registerJsModule('hoodside_numerics', numerics);
  python.runPython(`import sys; sys.path.insert(0, "${ENGINE_ZIP}")`);
  const { handle } = python.pyimport('hoodside_start');
  reached('engine');
  return { handle };
}

/** @typedef {Awaited<ReturnType<typeof wake>>} Engine */

/** What the thread answers about itself, beside the engine.
 * @type {Record<string, () => object>} */
const OWN = {
  /** Bytes held by each wasm memory. They grow and never shrink: so this is also their peak. */
  'worker.memory': () => Object.fromEntries(
    Object.entries(memories).map(([name, memory]) => [name, memory.buffer.byteLength])),
};

/** @param {Engine} engine @param {{ method: string, params: object }} call */
function answer(engine, { method, params }) {
  if (OWN[method]) return { result: OWN[method]() };
  try {
    return JSON.parse(engine.handle(method, JSON.stringify(params)));
  } catch (error) {
    return { error: fatal(error) };
  }
}

/** `handle` answers every foreseen trouble itself: what is thrown here left Python or RDKit unusable.
 * @param {unknown} error */
function fatal(error) {
  return { code: 'kernel_crash', message: lastLine(error), hint: '', field: '', value: null };
}

const marks = () => Object.fromEntries(performance.getEntriesByType('mark').map((m) => [m.name, m.startTime]));
const lastLine = (/** @type {unknown} */ error) => /** @type {string} */ (String(error).trim().split('\n').at(-1));

/** @param {unknown} error */
function failed(error) {
  console.error(error);
  send({ failed: lastLine(error) });
}

const memories = compileAhead([runtime('pyodide.asm.wasm'), runtime('RDKit_minimal.wasm')], failed);
const engine = wake();
engine.then(() => send({ ready: marks() }), failed);
self.onmessage = async ({ data }) => send({ id: data.id, ...answer(await engine, data) });
