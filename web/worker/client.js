import { diagnose } from './diagnose.js';
import { crashedTwice, EngineError, notStarted, stopped, tookTooLong } from './engine-error.js';

export { EngineError };

/** @typedef {'waking' | 'ready' | 'failed'} EngineState */
/** @typedef {{ signal?: AbortSignal, timeoutMs?: number }} CallOptions */
/** @typedef {Pick<Worker, 'postMessage' | 'terminate' | 'onmessage' | 'onerror'>} Thread */
/** @typedef {{ id: number, method: string, params: object, timeoutMs: number, crashes: number,
 *   settle: (error: EngineError | null, result?: any) => void }} Job */
/** @typedef {{ onState: (state: EngineState, detail?: any) => void, spawn: () => Thread, startMs: number,
 *   findTrouble: () => Promise<string> }} Options */

const ANSWER_MS = 60_000;

/** @type {Options} */
const USUAL = {
  onState: () => {},
  spawn: () => new Worker(new URL('./worker.mjs', import.meta.url), { type: 'module', name: 'chemistry' }),
  startMs: 60_000,
  findTrouble: diagnose,
};

/** The chemistry in its own thread, called as if it were here.
 *
 * Jobs are handed over one at a time, so that one can be stopped (by ending the thread and starting
 * another) without loss to those behind it. Every call is settled: by its answer, its abort, its time
 * limit, a crash that repeats itself, or the failure of the start. */
class Engine {
  /** @type {EngineState} */
  #state = 'waking';
  /** @type {Thread | null} */
  #thread = null;
  /** @type {Job[]} */
  #queue = [];
  /** @type {Job | null} */
  #running = null;
  #lastId = 0;
  #failure = '';
  /** @type {ReturnType<typeof setTimeout> | undefined} */
  #watchdog;
  #options;

  /** @param {Partial<Options>} options */
  constructor(options) {
    this.#options = { ...USUAL, ...options };
    this.#start();
  }

  /** The engine's answer, parsed. Rejects with EngineError. `timeoutMs` counts from the moment its turn comes.
   * @param {string} method @param {object} [params] @param {CallOptions} [options] @returns {Promise<any>} */
  call(method, params = {}, { signal, timeoutMs = ANSWER_MS } = {}) {
    if (signal?.aborted) return Promise.reject(stopped());
    if (this.#state === 'failed') return Promise.reject(notStarted(this.#failure));
    return new Promise((resolve, reject) => {
      const abort = () => this.#drop(job);
      /** @type {Job} */
      const job = { id: ++this.#lastId, method, params, timeoutMs, crashes: 0, settle(error, result) {
        signal?.removeEventListener('abort', abort);
        if (error) reject(error);
        else resolve(result);
      } };
      signal?.addEventListener('abort', abort);
      this.#queue.push(job);
      this.#next();
    });
  }

  /** Try again after a failed start. */
  restart() {
    if (this.#state === 'failed') this.#start();
  }

  /** End the thread; calls still open are rejected. */
  close() {
    this.#end();
    this.#rejectAll(stopped());
    this.#enter('failed', this.#failure = 'It was closed.');
  }

  /** @param {EngineState} next @param {any} [detail] */
  #enter(next, detail) {
    this.#state = next;
    this.#options.onState(next, detail);
  }

  #start() {
    this.#end();
    this.#enter('waking', 'starting');
    const mine = this.#thread = this.#options.spawn();
    // A message on its way from a thread already ended must not reach the next one's jobs.
    mine.onmessage = ({ data }) => { if (mine === this.#thread) this.#receive(data); };
    mine.onerror = (event) => { if (mine === this.#thread) this.#broke(/** @type {ErrorEvent} */ (event).message); };
    this.#watchStart('it was begun');
  }

  #end() {
    clearTimeout(this.#watchdog);
    this.#thread?.terminate();
    this.#thread = null;
  }

  /** @param {number} ms @param {() => void} act */
  #watch(ms, act) {
    clearTimeout(this.#watchdog);
    this.#watchdog = setTimeout(act, ms);
  }

  /** @param {string} since */
  #watchStart(since) {
    const ms = this.#options.startMs;
    this.#watch(ms, () => this.#fail(`Nothing happened for ${Math.round(ms / 1000)} s after ${since}.`));
  }

  /** @param {any} data */
  #receive(data) {
    if (data.stage) this.#reached(data.stage);
    else if (data.ready) this.#woke(data.ready);
    else if (data.failed) this.#fail(data.failed);
    else if (data.id === this.#running?.id) this.#answered(data);
  }

  /** @param {string} stage */
  #reached(stage) {
    this.#enter('waking', stage);
    this.#watchStart(`the stage "${stage}"`);
  }

  /** @param {Record<string, number>} marks milliseconds from the start of the thread, by stage */
  #woke(marks) {
    clearTimeout(this.#watchdog);
    const now = performance.now();
    performance.measure('engine start', { start: Math.max(0, now - marks.engine), end: now, detail: marks });
    this.#enter('ready', marks);
    this.#next();
  }

  #next() {
    if (this.#state !== 'ready' || this.#running || !this.#queue.length) return;
    const job = this.#running = /** @type {Job} */ (this.#queue.shift());
    this.#thread?.postMessage({ id: job.id, method: job.method, params: job.params });
    this.#watch(job.timeoutMs, () => this.#interrupt(tookTooLong(job.timeoutMs)));
  }

  /** @param {{ result?: any, error?: import('./engine-error.js').Fault }} data */
  #answered({ result, error }) {
    if (error?.code === 'kernel_crash') return this.#crashed();
    clearTimeout(this.#watchdog);
    const job = this.#running;
    this.#running = null;
    job?.settle(error ? new EngineError(error) : null, result);
    this.#next();
  }

  /** The molecule toolkit stays broken once it has trapped: a fresh thread, and the same job once more. */
  #crashed() {
    const job = /** @type {Job} */ (this.#running);
    job.crashes += 1;
    if (job.crashes > 1) return this.#interrupt(crashedTwice());
    this.#running = null;
    this.#queue.unshift(job);
    this.#start();
  }

  /** End the running job, and with it the thread. @param {EngineError} reason */
  #interrupt(reason) {
    const job = this.#running;
    this.#running = null;
    job?.settle(reason);
    this.#start();
  }

  /** An uncaught error in the thread. @param {string | undefined} message */
  #broke(message) {
    if (this.#state === 'waking') return this.#fail(message ?? '');
    this.#rejectAll(new EngineError({ message: `The chemistry broke down. ${message ?? ''}`.trim(),
      hint: 'It has been started again: try once more.' }));
    this.#start();
  }

  /** @param {string} reason */
  async #fail(reason) {
    this.#end();
    const found = await this.#options.findTrouble().catch(() => '');
    this.#failure = found || reason || 'No reason was given.';
    this.#enter('failed', this.#failure);
    this.#rejectAll(notStarted(this.#failure));
  }

  /** @param {EngineError} error */
  #rejectAll(error) {
    const jobs = this.#running ? [this.#running, ...this.#queue] : this.#queue;
    this.#running = null;
    this.#queue = [];
    jobs.forEach((job) => job.settle(error));
  }

  /** @param {Job} job */
  #drop(job) {
    if (job === this.#running) return this.#interrupt(stopped());
    this.#queue = this.#queue.filter((waiting) => waiting !== job);
    job.settle(stopped());
  }
}

/** Start the chemistry. `onState` is told 'waking' with the stage reached, 'ready' with the milliseconds each
 * stage took, or 'failed' with the reason in plain words. The other options are for tests.
 * @param {Partial<Options>} [options] */
export function createEngine(options = {}) {
  return new Engine(options);
}
