import { html } from 'htm/preact';
import { signal } from '@preact/signals';
import { Words } from '../../components/chem.js';
import { Chips, Section, Trouble } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { Working } from '../../components/working.js';
import { changeWithUndo } from '../../state/cases.js';
import { emptyCase } from '../../state/document.js';
import { useLongAnswer } from '../../state/long-answer.js';
import { address, go } from '../../state/route.js';
import { plural } from '../../words/numbers.js';
import { dashed, protonLabel } from '../../words/readings.js';
import { Curve } from './curve.js';
import { collides, countOf, takeOver } from './take-over.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('./curve.js').Spectrum} Spectrum */
/** @typedef {{ readings: any, warnings: string[], spectra: Spectrum[] }} Read */

/** The JCAMP-DX file being looked at. */
export const opened = signal({ name: '', text: '' });
const how = signal('add');

/** Kinds of which single rows can be left out. */
const KINDS = /** @type {const} */ (['h1', 'c13', 'ir', 'ir_clear', 'ms']);
/** @type {Record<string, string>} */
const NAMES = { h1: '1H signals', c13: '13C lines', ir: 'IR bands', ir_clear: 'Clear in the IR', ms: 'Mass peaks' };

/** Words of one reading as the case would hold it. @param {string} kind @param {any} row @param {boolean} raw integrals are step heights */
function wordsOf(kind, row, raw) {
  const draft = emptyCase();
  takeOver(draft, { [kind]: [row] }, true);
  if (draft.irClear[0]) return dashed(`${draft.irClear[0].hi}-${draft.irClear[0].lo}`);
  const [h1, c13, ir, ms] = [draft.h1[0], draft.c13[0], draft.ir[0], draft.ms[0]];
  if (h1 && raw) return `${protonLabel({ ...h1, h: '' })}${h1.h ? `, step ${Math.round(Number(h1.h))}` : ''}`;
  if (h1) return protonLabel(h1);
  if (c13) return `${c13.ppm} ${c13.kind}`.trim();
  if (ir) return [ir.cm1, ir.shape, ir.strength].filter(Boolean).join(' ');
  return ms ? `${ms.mz}${ms.rel ? ` (${Math.round(Number(ms.rel))})` : ''}` : '';
}

/** Without the rows that were tapped away. @param {any} readings @param {Set<string>} left */
const picked = (readings, left) => ({ ...readings, ...Object.fromEntries(KINDS.filter((kind) => readings[kind]).map((kind) =>
  [kind, readings[kind].filter((/** @type {any} */ _, /** @type {number} */ i) => !left.has(`${kind}:${i}`))])) });

/** Rows tapped away, of the file being looked at. */
const leftOut = signal(/** @type {Set<string>} */ (new Set()));

/** Look at another file. @param {string} name @param {string} text */
export function lookAt(name, text) {
  opened.value = { name, text };
  leftOut.value = new Set();
  how.value = 'add';
}

/** A JCAMP-DX file: the curve, and what was picked from it, taken over only when wanted. @param {{ doc: CaseDoc }} props */
export function JcampSheet({ doc }) {
  const { name, text } = opened.value;
  const { value, fault, since, stop } = useLongAnswer('jcamp', text ? { text } : null);
  const read = /** @type {Read | null} */ (fault ? null : value);
  const readings = read ? picked(read.readings, leftOut.value) : {};
  const count = read ? countOf(readings) : 0;
  const take = () => {
    changeWithUndo(doc.id, `${plural(count, 'reading')} taken over`, (draft) => takeOver(draft, readings, how.value === 'replace'));
    go('case', doc.id, 'readings');
  };
  const foot = html`${read && collides(doc, readings) && html`<${Chips} label="With what is there" class="chips-2" optional=${false} value=${how.value}
      options=${[{ value: 'add', text: 'add to what is there' }, { value: 'replace', text: 'replace it' }]}
      onPick=${(/** @type {string} */ choice) => { how.value = choice; }} />`}
    <button type="button" class="button primary" disabled=${!count} onClick=${take}>${count ? `Take over ${plural(count, 'reading')}` : 'Nothing to take over'}</button>`;
  return html`<${Sheet} title=${name || 'JCAMP-DX file'} back=${address('case', doc.id, 'readings')} foot=${foot}>
    <${Working} since=${since} words="reading the file" stop=${stop} />
    <${Trouble} fault=${fault} />
    ${!text && html`<p class="hint">The file is no longer at hand. Open it once more.</p>`}
    ${read && html`${read.spectra.map((spectrum, i) => html`<${OneSpectrum} key=${i} spectrum=${spectrum} />`)}
      ${read.warnings.map((line) => html`<p class="hint" key=${line}>${line}</p>`)}
      <${Conditions} readings=${read.readings} />
      ${KINDS.filter((kind) => read.readings[kind]?.length).map((kind) => html`<${Rows} key=${kind} kind=${kind} rows=${read.readings[kind]} raw=${Boolean(read.readings.raw_integrals)} />`)}`}
  <//>`;
}

/** @param {{ spectrum: Spectrum }} props */
const OneSpectrum = ({ spectrum }) => html`<${Section} title=${spectrum.title || 'Spectrum'}
  aside=${[spectrum.nucleus, spectrum.mhz && `${Number(spectrum.mhz.toFixed(1))} MHz`, plural(spectrum.points, 'point')].filter(Boolean).join(', ')}>
  <${Curve} spectrum=${spectrum} /><//>`;

/** What the file says of the conditions. @param {{ readings: any }} props */
function Conditions({ readings }) {
  const said = [readings.formula, readings.mhz && `${readings.mhz} MHz`, readings.solvent, readings.ir_medium].filter(Boolean);
  return said.length ? html`<p class="lead"><${Words} text=${said.join(', ')} /></p>` : null;
}

/** Readings of one kind; a tap leaves one out or takes it in again. @param {{ kind: string, rows: any[], raw: boolean }} props */
function Rows({ kind, rows, raw }) {
  const out = leftOut.value;
  const flip = (/** @type {string} */ key) => {
    const next = new Set(out);
    if (!next.delete(key)) next.add(key);
    leftOut.value = next;
  };
  const taken = rows.filter((_, i) => !out.has(`${kind}:${i}`)).length;
  return html`<${Section} title=${html`<${Words} text=${NAMES[kind] ?? kind} />`} aside="${taken} of ${rows.length} taken">
    <div class="chips chips-flow">${rows.map((row, i) => html`<button type="button" class="chip" key=${i} aria-pressed=${String(!out.has(`${kind}:${i}`))}
      onClick=${() => flip(`${kind}:${i}`)}>${wordsOf(kind, row, raw)}</button>`)}</div>
    <p class="whisper">Tap one to leave it out.</p><//>`;
}
