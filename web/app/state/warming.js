/** How long the engine has been let alone before it makes itself ready, and between two slices of that, ms. */
const REST_MS = 600;
const BETWEEN_MS = 30;

/** @typedef {(method: string, params: object, options?: object) => Promise<any>} Call */

/** Lets the engine read its tables and compile its patterns while nobody asks it anything, so that the first check does
 * not have to. A slice is short, and none is begun while a call is open or the page is out of sight. */
export class Warming {
  #call;
  #open = 0;
  /** From when the engine is awake until all is done. */
  #wanted = false;
  #busy = false;
  #timer = 0;

  /** @param {Call} call */
  constructor(call) {
    this.#call = call;
  }

  /** The engine is awake, with nothing read yet. */
  begin() {
    this.#wanted = true;
    this.#rest(REST_MS);
  }

  end() {
    this.#wanted = false;
    clearTimeout(this.#timer);
  }

  /** Wait while a call of the user's is open. @template T @param {Promise<T>} answer @returns {Promise<T>} */
  giveWay(answer) {
    this.#open += 1;
    clearTimeout(this.#timer);
    const settled = () => { this.#open -= 1; this.#rest(REST_MS); };
    answer.then(settled, settled);
    return answer;
  }

  /** @param {number} ms */
  #rest(ms) {
    clearTimeout(this.#timer);
    if (this.#wanted && !this.#busy && !this.#open) this.#timer = window.setTimeout(() => this.#slice(), ms);
  }

  async #slice() {
    if (document.hidden) return this.#rest(REST_MS);
    this.#busy = true;
    // Failing costs nothing: the first check then takes its time.
    const { done } = await this.#call('warm', {}).catch(() => ({ done: true }));
    this.#busy = false;
    if (done) this.end();
    this.#rest(BETWEEN_MS);
  }
}
