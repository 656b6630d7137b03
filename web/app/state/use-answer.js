import { useEffect, useState } from 'preact/hooks';
import { answered, ask, asFault, engineState, questionKey } from './engine.js';

/** @typedef {import('../types').Fault} Fault */
/** @typedef {{ key: string | null, value: any, fault: Fault | null }} Held */

/** Ask the engine from a view. `params` null asks nothing. What was answered before is there at once; while a new
 * question runs the last value stays, so that a drawing does not blink at every keystroke.
 * @template T
 * @param {string} method
 * @param {object | null} params
 * @param {{ delay?: number }} [options] milliseconds to wait for the typing to rest
 * @returns {{ value: T | null, fault: Fault | null, busy: boolean }} */
export function useAnswer(method, params, { delay = 0 } = {}) {
  const key = params === null ? null : questionKey(method, params);
  const [held, setHeld] = useState(/** @type {Held} */ ({ key: null, value: null, fault: null }));
  const ready = engineState.value === 'ready';
  const known = key === null ? null : answered(key);
  useEffect(() => {
    if (key === null || params === null) return undefined;
    if (known) setHeld({ key, value: known.value, fault: known.fault });
    if (known || !ready) return undefined;
    let wanted = true;
    const timer = setTimeout(() => {
      ask(method, params).then(
        (value) => wanted && setHeld({ key, value, fault: null }),
        (error) => wanted && setHeld({ key, value: null, fault: asFault(error) }),
      );
    }, delay);
    return () => { wanted = false; clearTimeout(timer); };
  }, [key, ready]);
  if (key === null) return { value: null, fault: null, busy: false };
  if (known) return { value: known.value, fault: known.fault, busy: false };
  return { value: held.value, fault: held.key === key ? held.fault : null, busy: held.key !== key };
}
