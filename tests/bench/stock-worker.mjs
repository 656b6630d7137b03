// The measure for start-up: Pyodide as published, with the package's own files and nothing else.
import { loadPyodide } from './pyodide.mjs';

const python = await loadPyodide();
self.postMessage(python.runPython('1 + 1'));
