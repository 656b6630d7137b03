import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { currentCheck } from '../../state/check.js';
import { address } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed, plural, signed } from '../../words/numbers.js';
import { predictQuestion } from '../structures/predicted.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('./row-data.js').TallyRow} TallyRow */

/** Decibans that fill the half of a bar, unless a reading of the same list weighs more. */
const FULL_DB = 20;
/** Rows lighter than this say nothing either way, decibans. */
const SILENT_DB = 0.5;

/** A bar that leans right for, left (hatched) against, as long as the weight.
 * @param {{ db: number, full: number }} props `full` decibans fill its half */
function Balance({ db, full }) {
  const long = Math.min(1, Math.abs(db) / full) * 46;
  return html`<svg class="balance" viewBox="0 0 100 24" preserveAspectRatio="none" aria-hidden="true">
    ${db >= 0 ? html`<rect class="bar-for" x="50" y="4" width=${long} height="16" />`
      : html`<rect class="bar-against" x=${50 - long} y="4" width=${long} height="16" />`}
    <path class="bar-middle" d="M50 0V24" /></svg>`;
}

/** What was expected where a reading was put. @param {string} ref such as "h1:2"
 * @param {import('../../types').Weighed} candidate @param {import('../../types').Prediction | null} predicted */
export function expected(ref, candidate, predicted) {
  const [kind, at] = ref.split(':');
  if (kind === 'h1') {
    const group = candidate.expected[Number(at)];
    if (!group) return '';
    if (group.exchangeable && group.lo != null && group.hi != null) return `exchangeable, ${fixed(group.lo, 1)} to ${fixed(group.hi, 1)}`;
    return `${group.environment ? `${group.environment}, ` : ''}expected ${fixed(group.ppm, 2)} ± ${fixed(group.sd, 2)}`;
  }
  if (!predicted) return '';
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
  const candidate = found?.answer.candidates[at];
  const { value } = useAnswer('predict', candidate ? predictQuestion(doc, candidate.smiles) : null);
  if (!candidate) return null;
  const predicted = /** @type {any} */ (value);
  const speaking = rows.filter((row) => Math.abs(row.weight) >= SILENT_DB);
  const silent = rows.filter((row) => Math.abs(row.weight) < SILENT_DB);
  const full = Math.max(FULL_DB, ...rows.map((row) => Math.abs(row.weight)));
  const line = (/** @type {TallyRow} */ row) => html`<${Row} key=${row.key} doc=${doc} row=${row} at=${at} full=${full}
    words=${row.predicted.map((ref) => expected(ref, candidate, predicted)).find(Boolean) ?? row.findings[0]?.text ?? ''} />`;
  return html`<ul class="tally-rows">${speaking.map(line)}</ul>
    ${silent.length > 0 && html`<details
      class="silent"><summary>${plural(silent.length, 'reading')} that ${silent.length === 1 ? 'says' : 'say'} nothing either way</summary>
      <ul class="tally-rows">${silent.map(line)}</ul></details>`}`;
}

/** @param {{ doc: CaseDoc, row: TallyRow, at: number, full: number, words: string }} props */
const Row = ({ doc, row, at, full, words }) => html`<li>
  <a class="tally-row" href=${address('case', doc.id, 'tally', 'reason', String(at), row.key)}>
    <span class="tally-words"><b><${Words} text=${row.label} /></b><span><${Words} text=${words} /></span></span>
    <span class="tally-weight"><span
      class="hidden">${row.weight >= 0 ? 'for' : 'against'}, decibans </span>${signed(row.weight)}</span>
    <${Balance} db=${row.weight} full=${full} />
  </a></li>`;
