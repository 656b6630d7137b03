import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { Section } from '../../components/parts.js';
import { useAnswer } from '../../state/use-answer.js';
import { signed } from '../../words/numbers.js';
import { predictQuestion } from '../structures/predicted.js';
import { readingLabel } from './row-data.js';
import { expected } from './rows.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../state/check.js').Checked} Checked */

/** Expected but not seen, seen but not explained. @param {{ doc: CaseDoc, found: Checked, at: number }} props */
export function Leftovers({ doc, found, at }) {
  const candidate = found.answer.candidates[at];
  const { value } = useAnswer('predict', candidate ? predictQuestion(doc, candidate.smiles) : null);
  const predicted = /** @type {import('../../types').Prediction | null} */ (value);
  if (!candidate) return null;
  const missed = candidate.findings.filter((finding) => !finding.readings.length);
  const told = new Set(candidate.assignment.map((pair) => pair.predicted));
  const unseen = !missed.length && predicted && doc.h1.length ? predicted.h1.map((_, i) => `h1:${i}`).filter((ref) => !told.has(ref)) : [];
  const paired = new Set(candidate.assignment.map((pair) => pair.reading));
  const stray = Object.keys(found.refs).filter((ref) => /^(h1|c13):/.test(ref) && !paired.has(ref));
  return html`${(missed.length > 0 || unseen.length > 0) && html`<${Section} title="Expected but not seen" id="unseen-head">
      <ul class="plain-list">${missed.map((finding, i) => html`<li key=${i}><span><${Words} text=${finding.text} /></span> <b>${signed(finding.weight_db)}</b></li>`)}
        ${unseen.map((ref) => html`<li key=${ref}>${predicted?.h1[Number(ref.slice(3))]?.n} H, ${expected(ref, predicted)}</li>`)}</ul><//>`}
    ${stray.length > 0 && html`<${Section} title="Seen but not explained" id="stray-head">
      <ul class="plain-list">${stray.map((ref) => html`<li key=${ref}><${Words} text=${readingLabel(doc, found, ref)} /></li>`)}</ul><//>`}`;
}
