import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { Section } from '../../components/parts.js';
import { signed } from '../../words/numbers.js';
import { named } from '../../words/verdict.js';
import { readingLabel } from './row-data.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Weighed} Weighed */
/** @typedef {import('../../state/check.js').Checked} Checked */

/** What was expected and not seen, each with its weight where it carries one.
 * @param {Weighed} candidate @returns {{ text: string, weight: number | null }[]} */
function unseen(candidate) {
  const loose = candidate.findings.filter((finding) => !finding.readings.length);
  const listed = candidate.missing.map(({ text }) => ({ text, weight: loose.find((finding) => finding.text === text)?.weight_db ?? null }));
  const rest = loose.filter((finding) => !candidate.missing.some(({ text }) => text === finding.text));
  return [...listed, ...rest.map((finding) => ({ text: finding.text, weight: finding.weight_db }))];
}

/** Expected but not seen, seen but not explained. @param {{ doc: CaseDoc, found: Checked, at: number }} props */
export function Leftovers({ doc, found, at }) {
  const candidate = found.answer.candidates[at];
  if (!candidate) return null;
  const missed = unseen(candidate);
  return html`${missed.length > 0 && html`<${Section} title="Expected but not seen" id="unseen-head">
      <ul class="plain-list">${missed.map((entry, i) => html`<li key=${i}><span><${Words} text=${entry.text} /></span>
        ${entry.weight !== null && html`<b>${signed(entry.weight)}</b>`}</li>`)}</ul><//>`}
    ${candidate.unexplained.length > 0 && html`<${Section} title="Seen but not explained" id="stray-head">
      <ul class="plain-list">${candidate.unexplained.map((left) => html`<li key=${left.ref}>
        <span><b><${Words} text=${readingLabel(doc, found, left.ref)} /></b><span class="source"><${Words}
          text=${named(doc, found, left.text)} /></span></span></li>`)}</ul><//>`}`;
}
