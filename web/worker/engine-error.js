/** @typedef {{ code?: string, message?: string, hint?: string, field?: string, value?: string | null }} Fault */

/** Why a call has no result: what is wrong, and the mend. */
export class EngineError extends Error {
  /** @param {Fault} fault */
  constructor({ code = 'engine_error', message = 'The chemistry gave no answer.', hint = '', field = '', value = null }) {
    super(message);
    this.name = 'EngineError';
    this.code = code;
    this.hint = hint;
    this.field = field;
    this.value = value;
  }
}

export const stopped = () => new EngineError({ code: 'stopped', message: 'Stopped.' });

/** @param {number} ms */
export const tookTooLong = (ms) => new EngineError({
  code: 'timeout',
  message: `No answer within ${Math.round(ms / 1000)} s, so the work was stopped.`,
  hint: 'Try fewer or smaller structures.',
});

export const crashedTwice = () => new EngineError({
  code: 'kernel_crash',
  message: 'The chemistry broke down on this twice, the second time freshly started.',
  hint: 'Check the structure that was added last, or leave it out.',
});

/** @param {string} reason */
export const notStarted = (reason) => new EngineError({
  code: 'engine_failed',
  message: `The chemistry did not start. ${reason}`.trim(),
  hint: 'Start again; if that does not help, load the page anew while on the network.',
});
