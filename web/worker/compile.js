const WASM = 'application/wasm';

/** Compile the given wasm files at once, each while it is still being read, ahead of the loaders that will
 * ask for them: those run one after the other on this thread, compiling runs beside it. A loader's own fetch
 * of such a file is answered with a token, for which it then gets the module.
 *
 * Pyodide only logs a failed compile and then waits for good; so failures go to `onFailure`. A host that
 * sends wasm under a wrong type is put up with: compiled after the download instead of during it.
 * @param {string[]} urls @param {(error: unknown) => void} onFailure
 * @returns {Record<string, WebAssembly.Memory>} the memory of each module, by file name, once it is made */
export function compileAhead(urls, onFailure) {
  const fetchFile = self.fetch;
  const compiling = new Map(urls.map((url) => [url, compile(url)]));
  compiling.forEach((module) => module.catch(onFailure));
  /** @type {WeakMap<Response, string>} */
  const tokens = new WeakMap();
  /** @type {Record<string, WebAssembly.Memory>} */
  const memories = {};

  self.fetch = async (input, init) => {
    const url = String(input);
    if (!compiling.has(url)) return fetchFile(input, init);
    const token = new Response();
    tokens.set(token, url);
    return token;
  };

  const streaming = WebAssembly.instantiateStreaming;
  WebAssembly.instantiateStreaming = async (source, imports) => {
    const response = await source;
    const url = tokens.get(response);
    const module = url && compiling.get(url);
    if (!module) return streaming.call(WebAssembly, response, imports);
    try {
      const made = await WebAssembly.instantiate(await module, imports);
      const memory = Object.values(made.exports).find((part) => part instanceof WebAssembly.Memory);
      if (memory) memories[/** @type {string} */ (url.split('/').at(-1))] = memory;
      return { module: await module, instance: made };
    } catch (error) {
      onFailure(error);
      throw error;
    } finally {
      compiling.delete(url); // the loader keeps what it needs
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
