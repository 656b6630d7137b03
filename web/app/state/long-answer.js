import { useEffect, useState } from 'preact/hooks';
import { asFault, call, questionKey } from './engine.js';

/** @typedef {import('../types').Fault} Fault */
/** @typedef {{ key: string, value: any, fault: Fault | null, since: number, stopped: boolean }} Held */

/** What was answered before, by question. @type {Map<string, any>} */
const kept = new Map();
const KEEP = 40;
/** Stopping work ends the engine's thread, so what has hardly begun is rather let finish, ms. */
const WORTH_STOPPING_MS = 1500;
const LONGEST_MS = 180_000;

/** @param {string} key @param {any} value */
function keep(key, value) {
  kept.set(key, value);
  if (kept.size > KEEP) kept.delete(/** @type {string} */ (kept.keys().next().value));
}

/** @type {Held} */
const NOTHING = { key: '', value: null, fault: null, since: 0, stopped: false };

/** Ask the engine something that may take long: `since` says when the work began (0 when none runs), `stop` ends it,
 * `again` takes it up anew. The last answer stays while the next is worked out. `params` null asks nothing.
 * @template T
 * @param {string} method @param {object | null} params
 * @returns {{ value: T | null, fault: Fault | null, since: number, stopped: boolean, current: boolean, stop: () => void, again: () => void }} */
export function useLongAnswer(method, params) {
  const key = params === null ? '' : questionKey(method, params);
  const [held, setHeld] = useState(NOTHING);
  const [turn, setTurn] = useState(0);
  const [running, setRunning] = useState(/** @type {AbortController | null} */ (null));
  useEffect(() => {
    if (!key || !params) return undefined;
    if (kept.has(key)) { setHeld({ ...NOTHING, key, value: kept.get(key) }); return undefined; }
    const began = Date.now();
    const controller = new AbortController();
    let wanted = true;
    let open = true;
    setRunning(controller);
    setHeld((before) => ({ ...before, fault: null, since: began, stopped: false }));
    call(method, params, { signal: controller.signal, timeoutMs: LONGEST_MS }).then(
      (value) => { keep(key, value); if (wanted) setHeld({ ...NOTHING, key, value }); },
      (error) => {
        const stopped = error?.code === 'stopped';
        if (wanted) setHeld((before) => ({ ...before, key, fault: stopped ? null : asFault(error), since: 0, stopped }));
      },
    ).finally(() => { open = false; });
    return () => {
      wanted = false;
      if (open && Date.now() - began > WORTH_STOPPING_MS) controller.abort();
    };
  }, [key, turn]);
  const value = key ? kept.get(key) ?? held.value : null;
  return { value, fault: held.key === key ? held.fault : null, since: kept.has(key) ? 0 : held.since, stopped: held.stopped,
    current: kept.has(key), stop: () => running?.abort(), again: () => setTurn(turn + 1) };
}
