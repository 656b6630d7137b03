import { effect, signal } from '@preact/signals';
import { heavyAtoms } from '../words/structures.js';
import { leadAt } from '../words/verdict.js';
import { checkingSince, current, currentCheck } from './check.js';
import { call, engineState } from './engine.js';
import { scouted } from './put-up.js';
import { besides, huntQuestion } from './rivals.js';
import { path } from './route.js';
import { wide } from './screen.js';

/** @typedef {import('../types').CaseDoc} CaseDoc */
/** @typedef {import('./rivals.js').Told} Told */

/** How long a case has been let alone before its look-alikes are sought, ms. */
const REST_MS = 1000;
/** More are kept than are put up, so that others follow those waved away. */
const KEPT = 8;

/** Look-alikes of larger structures are sought only when asked for: a single one takes the engine seconds. */
const LARGEST = 60;

/** Where a verdict is on the screen. */
const SHOWING = ['structures', 'tally', 'next'];

/** The question whose look-alikes are being sought, '' when none are. */
export const scouting = signal('');

/** What is asked of the engine about a case as it stands checked: isomers that the readings allow.
 * @param {CaseDoc} doc */
export function scoutQuestion(doc) {
  const { found, fresh } = currentCheck.value;
  const id = found && fresh ? found.order[leadAt(doc, found)] : '';
  const subject = doc.structures.find((structure) => structure.id === id);
  return subject && heavyAtoms(subject.formula) <= LARGEST ? { ...huntQuestion(doc, subject.smiles, true), formula_known: true } : null;
}

/** How many look-alikes of the structure of the verdict were weighed for the case as it stands, 0 while none have been.
 * @param {CaseDoc} doc */
export function weighedFor(doc) {
  const question = scoutQuestion(doc);
  const known = scouted.value[doc.id];
  return question && known?.key === JSON.stringify(question) ? known.weighed : 0;
}

/** Look-alikes that stand near enough to take the verdict away, heaviest first. @param {Told} told */
const nearOf = ({ rivals }) => rivals.filter(({ near }) => near).slice(0, KEPT).map(({ smiles, how }) => ({ smiles, how }));

/** @param {string} id of the case @param {object} question @param {string} key */
async function scout(id, question, key) {
  scouting.value = key;
  try {
    /** @type {Told | null} */
    let told = null;
    while (scouting.value === key && !told?.done) told = await call('hunt', { ...question, ...besides(id) });
    if (told?.done) scouted.value = { ...scouted.value, [id]: { key, near: nearOf(told), weighed: told.weighed } };
  } catch {
    // Nobody has asked for it: what the chemist does next tells of any trouble.
    scouted.value = { ...scouted.value, [id]: { key, near: [], weighed: 0 } };
  }
  if (scouting.value === key) scouting.value = '';
}

let timer = 0;

function watch() {
  clearTimeout(timer);
  const doc = current.value;
  const showing = wide.value || SHOWING.includes(path.value[2] ?? '');
  const question = doc && showing && engineState.value === 'ready' && !checkingSince.value ? scoutQuestion(doc) : null;
  const key = question ? JSON.stringify(question) : '';
  if (scouting.peek() && scouting.peek() !== key) scouting.value = '';
  if (!doc || !question || scouting.peek() === key || scouted.peek()[doc.id]?.key === key) return;
  timer = window.setTimeout(() => scout(doc.id, question, key), REST_MS);
}

/** Seek the look-alikes of whatever stands best, unasked: a verdict is worth little until they are ruled out. */
export const startScouting = () => effect(watch);
