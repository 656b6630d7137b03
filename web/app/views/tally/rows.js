import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { currentCheck } from '../../state/check.js';
import { address } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed, signed } from '../../words/numbers.js';
import { predictQuestion } from '../structures/predicted.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('./row-data.js').TallyRow} TallyRow */

/** Decibans that fill the half of a bar. */
const FULL_DB = 20;

/** A bar that leans right for, left (hatched) against, as long as the weight. @param {{ db: number }} props */
export function Balance({ db }) {
  const long = Math.min(1, Math.abs(db) / FULL_DB) * 46;
  return html`<svg class="balance" viewBox="0 0 100 24" preserveAspectRatio="none" aria-hidden="true">
    ${db >= 0 ? html`<rect class="bar-for" x="50" y="4" width=${long} height="16" />`
      : html`<rect class="bar-against" x=${50 - long} y="4" width=${long} height="16" />`}
    <path class="bar-middle" d="M50 0V24" /></svg>`;
}

/** @param {string} ref @param {import('../../types').Prediction | null} predicted */
export function expected(ref, predicted) {
  const [kind, at] = ref.split(':');
  if (!predicted) return '';
  if (kind === 'h1') {
    const group = predicted.h1[Number(at)];
    if (!group) return '';
    if (group.exchangeable && group.lo != null && group.hi != null) return `exchangeable, ${fixed(group.lo, 1)} to ${fixed(group.hi, 1)}`;
    return `${group.environment ? `${group.environment}, ` : ''}expected ${fixed(group.ppm, 2)} ± ${fixed(group.sd, 2)}`;
  }
  if (kind === 'c13') {
    const group = predicted.c13[Number(at)];
    return group ? `expected ${fixed(group.ppm, 1)} ± ${fixed(group.sd, 1)}` : '';
  }
  const band = kind === 'ir' ? predicted.ir[Number(at)] : null;
  return band ? `${band.mode}, ${band.group}` : '';
}

/** One row per reading. @param {{ doc: CaseDoc, rows: TallyRow[], at: number }} props */
export function Rows({ doc, rows, at }) {
  const { found } = currentCheck.value;
  const smiles = found?.answer.candidates[at]?.smiles ?? '';
  const { value } = useAnswer('predict', smiles ? predictQuestion(doc, smiles) : null);
  const predicted = /** @type {any} */ (value);
  return html`<ul class="tally-rows">${rows.map((row) => html`<li key=${row.key}>
    <a class="tally-row" href=${address('case', doc.id, 'tally', 'reason', String(at), row.key)}>
      <span class="tally-words"><b><${Words} text=${row.label} /></b>
        <span>${row.predicted.map((ref) => expected(ref, predicted)).filter(Boolean).slice(0, 1)[0] || html`<${Words} text=${row.findings[0]?.text ?? ''} />`}</span></span>
      <span class="tally-weight"><span class="hidden">${row.weight >= 0 ? 'for' : 'against'}, decibans </span>${signed(row.weight)}</span>
      <${Balance} db=${row.weight} />
    </a></li>`)}</ul>`;
}
