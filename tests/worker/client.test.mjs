// The worker's client against a thread that misbehaves on purpose: no caller is ever left waiting.
import assert from 'node:assert/strict';
import { test } from 'node:test';
import { createEngine } from '../../web/worker/client.js';

/** Threads that do what `behave(job, thread)` says; each is noted in `threads`. */
function stage({ behave = answer, wakes = () => true, ...options } = {}) {
  const threads = [];
  const states = [];
  const spawn = () => {
    const thread = { ended: false, jobs: [], terminate() { this.ended = true; },
      postMessage(job) { this.jobs.push(job); setTimeout(() => behave(job, this)); },
      say(data) { this.onmessage({ data }); } };
    threads.push(thread);
    setTimeout(() => {
      if (wakes(threads.length)) thread.say({ ready: { engine: 1 } });
    });
    return thread;
  };
  const engine = createEngine({ spawn, findTrouble: async () => '', onState: (...told) => states.push(told), ...options });
  return { engine, threads, states };
}

const answer = (job, thread) => thread.say({ id: job.id, result: job.method });
const crash = (job, thread) => thread.say({ id: job.id, error: { code: 'kernel_crash' } });
const silent = () => {};
const on = (method, act, otherwise = answer) => (job, thread) => (job.method === method ? act : otherwise)(job, thread);
const code = (promise) => promise.then(() => 'answered', (error) => error.code);

test('calls made before the start are answered in order, one at a time', async () => {
  const { engine, threads } = stage();
  assert.deepEqual(await Promise.all(['a', 'b', 'c'].map((method) => engine.call(method))), ['a', 'b', 'c']);
  assert.equal(threads.length, 1);
});

test('an error of the engine arrives with all its fields', async () => {
  const fault = { code: 'invalid_structure', message: 'm', hint: 'h', field: 'f', value: 'v' };
  const { engine } = stage({ behave: (job, thread) => thread.say({ id: job.id, error: fault }) });
  const error = await engine.call('x').catch((caught) => caught);
  assert.ok(error instanceof Error);
  assert.deepEqual({ ...fault, ...error, message: error.message }, { ...fault, name: 'EngineError' });
});

test('aborting the running job ends its thread; the next job runs in a new one', async () => {
  const { engine, threads } = stage({ behave: on('stuck', silent) });
  const stop = new AbortController();
  const stuck = code(engine.call('stuck', {}, { signal: stop.signal }));
  const next = engine.call('next');
  setTimeout(() => stop.abort(), 20);
  assert.equal(await stuck, 'stopped');
  assert.equal(await next, 'next');
  assert.deepEqual(threads.map((thread) => thread.ended), [true, false]);
});

test('aborting a waiting job leaves the running one alone', async () => {
  const { engine, threads } = stage({ behave: (job, thread) => setTimeout(() => answer(job, thread), 30) });
  const stop = new AbortController();
  const first = engine.call('first');
  const dropped = code(engine.call('second', {}, { signal: stop.signal }));
  setTimeout(() => stop.abort(), 10);
  assert.equal(await dropped, 'stopped');
  assert.equal(await first, 'first');
  assert.equal(threads.length, 1);
  assert.deepEqual(threads[0].jobs.map((job) => job.method), ['first']);
});

test('an abort before the call, and one after the answer, do nothing to the thread', async () => {
  const { engine, threads } = stage();
  assert.equal(await code(engine.call('x', {}, { signal: AbortSignal.abort() })), 'stopped');
  const stop = new AbortController();
  await engine.call('y', {}, { signal: stop.signal });
  stop.abort();
  assert.equal(threads.length, 1);
});

test('a crash is repeated once in a new thread', async () => {
  let crashes = 0;
  const { engine, threads } = stage({ behave: on('once', (job, thread) => (crashes++ ? answer : crash)(job, thread)) });
  assert.equal(await engine.call('once'), 'once');
  assert.deepEqual(threads.map((thread) => thread.ended), [true, false]);
});

test('a crash that repeats itself is refused, and the engine goes on', async () => {
  const { engine, threads } = stage({ behave: on('deadly', crash) });
  const deadly = code(engine.call('deadly'));
  const next = engine.call('next');
  assert.equal(await deadly, 'kernel_crash');
  assert.equal(await next, 'next');
  assert.equal(threads.length, 3);
});

test('a job that takes too long is ended', async () => {
  const { engine } = stage({ behave: on('slow', silent) });
  const slow = code(engine.call('slow', {}, { timeoutMs: 20 }));
  assert.equal(await slow, 'timeout');
  assert.equal(await engine.call('next'), 'next');
});

test('an uncaught error in the thread rejects everything pending', async () => {
  const { engine } = stage({ behave: on('break', (_, thread) => thread.onerror({ message: 'out of memory' })) });
  const pending = [code(engine.call('break')), code(engine.call('waiting'))];
  assert.deepEqual(await Promise.all(pending), ['engine_error', 'engine_error']);
  assert.equal(await engine.call('later'), 'later');
});

test('a start that stands still fails with a reason, and rejects what waited', async () => {
  const { engine, states } = stage({ wakes: () => false, startMs: 30 });
  assert.equal(await code(engine.call('x')), 'engine_failed');
  assert.match(states.at(-1)[1], /Nothing happened/);
  assert.equal(await code(engine.call('y')), 'engine_failed');
});

test('what is wrong with the files is said rather than the bare symptom', async () => {
  const { engine, states } = stage({ wakes: () => false, startMs: 20, findTrouble: async () => 'The host sends x as y.' });
  await code(engine.call('x'));
  assert.deepEqual(states.at(-1), ['failed', 'The host sends x as y.']);
});

test('a failed start can be tried again', async () => {
  const { engine } = stage({ wakes: (count) => count > 1, startMs: 20 });
  await code(engine.call('x'));
  engine.restart();
  assert.equal(await engine.call('y'), 'y');
});

test('a failure reported by the thread itself settles every caller', async () => {
  const { engine, threads } = stage({ wakes: () => false });
  const waiting = code(engine.call('x'));
  threads[0].say({ failed: 'no memory' });
  assert.equal(await waiting, 'engine_failed');
});

test('closing settles every caller', async () => {
  const { engine } = stage({ behave: silent });
  const waiting = [code(engine.call('x')), code(engine.call('y'))];
  setTimeout(() => engine.close(), 20);
  assert.deepEqual(await Promise.all(waiting), ['stopped', 'stopped']);
  assert.equal(await code(engine.call('z')), 'engine_failed');
});

test('a late answer of an ended thread reaches nobody', async () => {
  const { engine, threads } = stage({ behave: on('stuck', silent) });
  const stop = new AbortController();
  const stuck = code(engine.call('stuck', {}, { signal: stop.signal }));
  await new Promise((resolve) => { setTimeout(resolve, 20); });
  stop.abort();
  await stuck;
  const next = engine.call('next');
  threads[0].say({ id: 2, result: 'from the dead' });
  assert.equal(await next, 'next');
});
