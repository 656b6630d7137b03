const WASM = 'application/wasm';

/** Compile the given wasm files at once, each while it is still being read, ahead of the loaders that will
 * ask for them: those run one after the other on this thread, compiling runs beside it.
 *
 * Pyodide only logs a failed compile and then waits for good; so failures go to `onFailure`. A host that
 * sends wasm under a wrong type is put up with: compiled after the download instead of during it.
 * @param {string[]} urls @param {(error: unknown) => void} onFailure
 * @returns {Record<string, WebAssembly.Memory>} the memory of each module, by file name, once it is made */
export function compileAhead(urls, onFailure) {
  const modules = new Map(urls.map((url) => [url, compile(url)]));
  modules.forEach((module) => module.catch(onFailure));
  /** @type {Record<string, WebAssembly.Memory>} */
  const memories = {};
  WebAssembly.instantiateStreaming = async (source, imports) => {
    try {
      const { url } = await source;
      const module = await (modules.get(url) ?? compile(url));
      modules.delete(url); // the loader keeps what it needs
      const instance = await WebAssembly.instantiate(module, imports);
      const memory = Object.values(instance.exports).find((part) => part instanceof WebAssembly.Memory);
      if (memory) memories[/** @type {string} */ (url.split('/').at(-1))] = memory;
      return { module, instance };
    } catch (error) {
      onFailure(error);
      throw error;
    }
  };
  return memories;
}

/** @param {string} url */
async function compile(url) {
  const response = await fetch(url);
  if (!response.ok) throw new Error(`${url}: the host answered ${response.status}.`);
  const type = response.headers.get('Content-Type')?.split(';')[0].trim();
  if (type === WASM) return WebAssembly.compileStreaming(response);
  console.warn(`${url} came as ${type ?? 'no type'} instead of ${WASM}: the start is slower.`);
  return WebAssembly.compile(await response.arrayBuffer());
}
