import { html } from 'htm/preact';
import { checkInput } from '../../state/input.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed, toNumber } from '../../words/numbers.js';
import { dashed } from '../../words/readings.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').ProtonRow} ProtonRow */
/** @typedef {{ shared: { a: number, b: number, hz: number, counts_fit: boolean, times?: number }[], lone: { signal: number, hz: number }[] }} Partners */

/** Difference of two shifts over J from which first-order rules are trusted: common practice. */
const FIRST_ORDER = 10;

/** @param {ProtonRow | undefined} row */
const named = (row) => (row ? `${dashed(row.shift)} (${[row.mult, row.h && `${row.h} H`].filter(Boolean).join(', ')})` : 'another signal');

/** Which signals a signal shares its J with, within the reading error. @param {{ doc: CaseDoc, row: ProtonRow }} props */
export function PartnerNote({ doc, row }) {
  const { params, refs } = checkInput(doc);
  const mhz = toNumber(doc.mhz);
  const asked = row.j.trim() && params.h1?.length > 1 ? { h1: params.h1, ...(mhz > 0 && { mhz }) } : null;
  const { value } = useAnswer('partners', asked, { delay: 200 });
  if (!asked || !value) return null;
  const { shared, lone } = /** @type {Partners} */ (value);
  const rowAt = (/** @type {number} */ at) => doc.h1.find(({ id }) => id === refs[`h1:${at}`]);
  const all = shared.filter(({ a, b }) => rowAt(a)?.id === row.id || rowAt(b)?.id === row.id);
  const fitting = all.filter((pair) => pair.counts_fit);
  const mine = fitting.length ? fitting : all;
  const near = fitting.find(({ times = FIRST_ORDER }) => times < FIRST_ORDER);
  const alone = lone.filter(({ signal }) => rowAt(signal)?.id === row.id);
  return html`<p class="hint partner-note">${mine.map(({ a, b, hz, counts_fit }, i) => html`<span key=${i}>Shares ${fixed(hz, 1)} Hz with ${named(rowAt(a)?.id === row.id ? rowAt(b) : rowAt(a))}${counts_fit ? '' : ', though the H do not fit the pattern'}. </span>`)}
    ${alone.map(({ hz }) => html`<span key=${hz}>No other signal shares ${fixed(hz, 1)} Hz. </span>`)}
    ${near && html`<span>They lie only ${fixed(near.times ?? 0, 1)} times <i>J</i> apart at ${doc.mhz} MHz: not first order, so lines lean and <i>J</i> read as a gap may be off.</span>`}</p>`;
}
