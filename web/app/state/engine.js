import { signal } from '@preact/signals';
import { createEngine } from '../../worker/client.js';
import { Warming } from './warming.js';

/** @typedef {import('../types').Fault} Fault */

/** @type {import('@preact/signals').Signal<'waking' | 'ready' | 'failed'>} */
export const engineState = signal('waking');
/** Why the engine did not start, in plain words; '' while all is well. */
export const engineTrouble = signal('');
export const wakingSince = signal(Date.now());

/** @type {ReturnType<typeof createEngine> | null} */
let engine = null;

const warming = new Warming((method, params) => /** @type {any} */ (engine).call(method, params));

export function startEngine() {
  engine = createEngine({
    onState: (/** @type {any} */ state, /** @type {any} */ detail) => {
      if (state === 'waking') wakingSince.value = Date.now();
      engineTrouble.value = state === 'failed' ? asFault(detail).message : '';
      engineState.value = state;
      if (state === 'ready') warming.begin();
      else warming.end();
    },
  });
}

/** Any rejection as a fault with words in it. @param {any} error @returns {Fault} */
export function asFault(error) {
  if (typeof error === 'string') return { message: error, hint: '', field: '' };
  return { code: error?.code, message: error?.message ?? 'The chemistry gave no answer.', hint: error?.hint ?? '',
    field: error?.field ?? '', value: error?.value };
}

/** @param {string} method @param {object} params @param {{ signal?: AbortSignal, timeoutMs?: number }} [options]
 * @returns {Promise<any>} */
export function call(method, params, options) {
  if (!engine) return Promise.reject(asFault('The chemistry has not been started.'));
  return warming.giveWay(engine.call(method, params, options));
}

/** @typedef {{ promise: Promise<any>, value: any, fault: Fault | null }} Remembered */
/** @type {Map<string, Remembered>} */
const remembered = new Map();
const KEEP = 400;

/** What a question was answered, when it has been asked before; null while it is open.
 * @param {string} key method and parameters as `questionKey` writes them */
export const answered = (key) => {
  const known = remembered.get(key);
  return known && (known.value !== null || known.fault) ? known : null;
};

/** @param {string} method @param {object} params */
export const questionKey = (method, params) => method + JSON.stringify(params);

/** Like `call`, for questions whose answer never changes: asked once, then remembered.
 * @param {string} method @param {object} params @returns {Promise<any>} */
export function ask(method, params) {
  const key = questionKey(method, params);
  const known = remembered.get(key);
  if (known) return known.promise;
  /** @type {Remembered} */
  const entry = { promise: call(method, params), value: null, fault: null };
  remembered.set(key, entry);
  entry.promise.then((value) => { entry.value = value; }, (error) => {
    // A refusal of the input stays true; a crash or a stop does not.
    if (/^invalid/.test(error?.code ?? '')) entry.fault = asFault(error);
    else remembered.delete(key);
  });
  if (remembered.size > KEEP) remembered.delete(/** @type {string} */ (remembered.keys().next().value));
  return entry.promise;
}
