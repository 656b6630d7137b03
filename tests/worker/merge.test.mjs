// Two tabs that change one case: what is kept.
import assert from 'node:assert/strict';
import { test } from 'node:test';
import { merged } from '../../web/app/state/merge.js';

const row = (id, shift, h = '1') => ({ id, shift, h });
const doc = (more) => ({ title: 'a', mhz: '400', h1: [row('1', '7.1'), row('2', '3.8')], cautions: ['x'], hrms: { found: '', ppm: '5' }, ...more });

test('what only one side changed stands as it changed it', () => {
  const found = merged(doc(), doc({ title: 'b' }), doc({ mhz: '60' }));
  assert.deepEqual(found, doc({ title: 'b', mhz: '60' }));
});

test('rows are brought together by their id, fields of a row by their name', () => {
  const theirs = doc({ h1: [row('1', '7.12'), row('2', '3.8'), row('3', '1.2')] });
  const mine = doc({ h1: [row('1', '7.1', '2'), row('4', '5.5'), row('2', '3.8')] });
  assert.deepEqual(merged(doc(), theirs, mine).h1, [row('1', '7.12', '2'), row('4', '5.5'), row('2', '3.8'), row('3', '1.2')]);
});

test('a row removed on one side is gone, unless the other changed it', () => {
  const fewer = doc({ h1: [row('1', '7.1')] });
  assert.deepEqual(merged(doc(), fewer, doc({ mhz: '60' })).h1, [row('1', '7.1')]);
  const changed = doc({ h1: [row('1', '7.1'), row('2', '3.9')] });
  assert.deepEqual(merged(doc(), fewer, changed).h1, changed.h1);
  assert.deepEqual(merged(doc(), changed, fewer).h1, changed.h1);
});

test('the same field changed on both sides: mine', () => {
  assert.equal(merged(doc(), doc({ title: 'theirs' }), doc({ title: 'mine' })).title, 'mine');
});

test('lists of words and records grow from both sides', () => {
  const theirs = doc({ cautions: ['x', 'y'], hrms: { found: '150.1', ppm: '5' }, run: { steps: [['PCC']] } });
  const mine = doc({ cautions: ['z'], hrms: { found: '', ppm: '3' } });
  const found = merged(doc(), theirs, mine);
  assert.deepEqual(found.cautions, ['y', 'z']);
  assert.deepEqual(found.hrms, { found: '150.1', ppm: '3' });
  assert.deepEqual(found.run, { steps: [['PCC']] });
});

test('a field taken out on one side is gone', () => {
  const before = doc({ dismissed: ['CCO'] });
  const { dismissed, ...without } = before;
  assert.ok(!('dismissed' in merged(before, without, { ...before, title: 'b' })));
});

test('rows added at the head on one side come first, at the end come last', () => {
  const theirs = doc();
  const mine = doc({ title: 'b', h1: [row('0', '9.9'), ...doc().h1, row('9', '0.9')] });
  assert.deepEqual(merged(doc(), { ...theirs, h1: [...theirs.h1, row('5', '2.0')] }, mine).h1.map(({ id }) => id), ['0', '1', '2', '9', '5']);
});
