const WASM = 'application/wasm';

/** Pyodide only logs a failed compile and then waits for good. So failures are caught here, and a host
 * that sends wasm under a wrong type is put up with: compiled after the download instead of during it.
 * @param {(error: unknown) => void} onFailure */
export function guardCompile(onFailure) {
  const streaming = WebAssembly.instantiateStreaming;
  WebAssembly.instantiateStreaming = async (source, imports) => {
    try {
      const response = await source;
      if (!response.ok) throw new Error(`${response.url}: the host answered ${response.status}.`);
      const type = response.headers.get('Content-Type')?.split(';')[0].trim();
      if (type === WASM) return await streaming.call(WebAssembly, response, imports);
      console.warn(`${response.url} came as ${type ?? 'no type'} instead of ${WASM}: the start is slower.`);
      return await WebAssembly.instantiate(await response.arrayBuffer(), imports);
    } catch (error) {
      onFailure(error);
      throw error;
    }
  };
}
