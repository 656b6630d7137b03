// Dense linear algebra for hoodside/numerics_browser.py, on views of Python's own memory.
//
// Python passes array('d') objects; their buffers are read and written in place and given back at once,
// because a view that outlives the call would break when the wasm memory grows.

/** Doubles of a Python array, for the length of one call.
 * @template T @param {any[]} proxies @param {(...views: Float64Array[]) => T} work @returns {T} */
function withViews(proxies, work) {
  const buffers = proxies.map((proxy) => proxy.getBuffer('f64'));
  try {
    return work(...buffers.map((buffer) => buffer.data));
  } finally {
    for (const buffer of buffers) buffer.release();
  }
}

/** out = a b, row-major. @param {number} n @param {number} k @param {number} m @param {Float64Array} a
 * @param {Float64Array} b @param {Float64Array} out @param {boolean} turned */
function multiply(n, k, m, a, b, out, turned) {
  const [rowStep, columnStep] = turned ? [1, n] : [k, 1];
  out.fill(0);
  for (let i = 0; i < n; i += 1) {
    const row = out.subarray(i * m, (i + 1) * m);
    for (let p = 0; p < k; p += 1) {
      const factor = a[i * rowStep + p * columnStep];
      if (factor === 0) continue; // raising operators are nearly empty
      for (let j = 0, at = p * m; j < m; j += 1, at += 1) row[j] += factor * b[at];
    }
  }
}

/** @param {Float64Array} at @param {Float64Array} size @param {Uint32Array} order @param {number} within
 * @param {number} least @param {Float64Array} outAt @param {Float64Array} outSize */
function joinSorted(at, size, order, within, least, outAt, outSize) {
  const groups = [];
  let last = -Infinity;
  for (const k of order) {
    // The centre is taken from the first line, so that nothing is lost where the total is near zero.
    if (at[k] - last > within) groups.push({ start: at[k], total: 0, moment: 0 });
    const group = groups[groups.length - 1];
    group.total += size[k];
    group.moment += (at[k] - group.start) * size[k];
    last = at[k];
  }
  const limit = least * groups.reduce((most, group) => Math.max(most, Math.abs(group.total)), 0);
  const kept = groups.filter((group) => Math.abs(group.total) > limit);
  kept.forEach(({ start, total, moment }, k) => {
    outAt[k] = start + moment / total;
    outSize[k] = total;
  });
  return kept.length;
}

/**
 * @param {{ Matrix: any, EigenvalueDecomposition: any }} mlMatrix the module ml-matrix
 * @returns the object to register in Pyodide as module `hoodside_numerics`
 */
export function makeNumerics({ Matrix, EigenvalueDecomposition }) {
  return {
    /** @param {number} n @param {any} matrix @param {any} values @param {any} vectors */
    eigh: (n, matrix, values, vectors) => withViews([matrix, values, vectors], (a, w, v) => {
      const found = new EigenvalueDecomposition(Matrix.from1DArray(n, n, a), { assumeSymmetric: true });
      w.set(found.realEigenvalues);
      for (let i = 0; i < n; i += 1) v.set(found.eigenvectorMatrix.data[i], i * n);
    }),

    /** @param {number} n @param {number} k @param {number} m @param {any} a @param {any} b @param {any} out
     * @param {boolean} turned */
    product: (n, k, m, a, b, out, turned) => withViews([a, b, out], (left, right, result) => {
      multiply(n, k, m, left, right, result, turned);
    }),

    /** Writes frequency and intensity of every transition whose amplitude exceeds `least`; how many.
     * @param {number} n @param {number} m @param {any} below @param {any} here @param {any} first
     * @param {any} second @param {number} scale @param {number} least @param {any} hz @param {any} intensity */
    transitions: (n, m, below, here, first, second, scale, least, hz, intensity) => withViews(
      [below, here, first, second, hz, intensity],
      (low, high, amplitude, partner, at, size) => {
        let count = 0;
        for (let i = 0, place = 0; i < n; i += 1) {
          for (let k = 0; k < m; k += 1, place += 1) {
            if (Math.abs(amplitude[place]) <= least) continue;
            at[count] = high[k] - low[i];
            size[count] = amplitude[place] * partner[place] * scale;
            count += 1;
          }
        }
        return count;
      }),

    /** Sorts lines, joins near ones and drops weak ones, in place; how many are left.
     * @param {number} count @param {any} hz @param {any} intensity @param {number} within @param {number} least */
    merge: (count, hz, intensity, within, least) => withViews([hz, intensity], (at, size) => {
      const order = Uint32Array.from({ length: count }, (_, k) => k).sort((a, b) => at[a] - at[b] || a - b);
      return joinSorted(at.slice(0, count), size.slice(0, count), order, within, least, at, size);
    }),
  };
}
