import { useEffect, useState } from 'preact/hooks';
import { ask, asFault, engineState } from './engine.js';

/** @typedef {import('../types').Fault} Fault */

/** Ask the engine from a view. `params` null asks nothing. While a new question runs the last value stays,
 * so that a drawing does not blink at every keystroke.
 * @template T
 * @param {string} method
 * @param {object | null} params
 * @param {{ delay?: number }} [options] milliseconds to wait for the typing to rest
 * @returns {{ value: T | null, fault: Fault | null, busy: boolean }} */
export function useAnswer(method, params, { delay = 0 } = {}) {
  const key = params === null ? null : method + JSON.stringify(params);
  const [state, setState] = useState(/** @type {{ key: string | null, value: any, fault: Fault | null }} */
    ({ key: null, value: null, fault: null }));
  const ready = engineState.value === 'ready';
  useEffect(() => {
    if (key === null || params === null || !ready) return undefined;
    let wanted = true;
    const timer = setTimeout(() => {
      ask(method, params).then(
        (value) => wanted && setState({ key, value, fault: null }),
        (error) => wanted && setState({ key, value: null, fault: asFault(error) }),
      );
    }, delay);
    return () => { wanted = false; clearTimeout(timer); };
  }, [key, ready]);
  if (key === null) return { value: null, fault: null, busy: false };
  return { value: state.value, fault: state.key === key ? state.fault : null, busy: state.key !== key };
}
