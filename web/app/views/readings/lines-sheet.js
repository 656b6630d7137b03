import { html } from 'htm/preact';
import { Chips, Trouble } from '../../components/parts.js';
import { useLeaveEmpty } from '../../components/leave-empty.js';
import { NumberPad, PadField } from '../../components/pad.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase, changeWithUndo } from '../../state/cases.js';
import { address, go } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed, toNumber } from '../../words/numbers.js';
import { CaseSign } from '../case/sign.js';
import { Tree } from '../trace/tree.js';
import { emptyLines, lineFault, linesInPpm, linesQuestion, nextRough } from './lines.js';
import { Printout } from './photos.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').LineList} LineList */
/** @typedef {{ pattern: string, j: number[], partners: number[], centre_ppm: number, centre_hz: number, rms_hz: number, shifts_ppm: number[] }} Reading */
/** @typedef {{ readings: Reading[], warnings: string[], spacings_hz: number[] }} Analysis */

const UNITS = [{ value: 'ppm', text: 'ppm' }, { value: 'hz', text: 'Hz' }];
const HEIGHTS = [{ value: 'none', text: 'no heights' }, { value: 'rough', text: 'low to high' }, { value: 'numbers', text: 'numbers' }];
/** Decimals a position is kept with after it is read from lines, ppm. */
const DIGITS = 3;
/** The field the engine takes when none is given, MHz. */
const USUAL_MHZ = 400;
/** Readings offered above the pad. */
const AT_HAND = 2;

/** The lines of one signal, and the pattern and J they make. @param {{ doc: CaseDoc, rowId: string }} props */
export function LinesSheet({ doc, rowId }) {
  useLeaveEmpty(doc.id, 'h1', rowId);
  const row = doc.h1.find((entry) => entry.id === rowId);
  const back = address('case', doc.id, 'readings', 'h1', rowId);
  const lines = row?.lines ?? emptyLines();
  const { value, fault } = useAnswer('multiplet', linesQuestion(lines, doc.mhz), { delay: 120 });
  if (!row) return html`<${Sheet} title="Lines" back=${address('case', doc.id, 'readings')}><p class="hint">This signal was removed.</p><//>`;
  const set = (/** @type {Partial<LineList>} */ given) => changeCase(doc.id, (draft) => {
    const entry = draft.h1.find(({ id }) => id === rowId);
    if (entry) entry.lines = { ...lines, ...given };
  });
  const setRow = (/** @type {number} */ at, /** @type {object} */ given) => set({ rows: lines.rows.map((entry, i) => (i === at ? { ...entry, ...given } : entry)) });
  const another = () => {
    set({ rows: [...lines.rows, { at: '', tall: '' }] });
    setTimeout(() => /** @type {any} */ ([...document.querySelectorAll('input[name^=line-]')].at(-1))?.focus());
  };
  const found = linesQuestion(lines, doc.mhz) ? /** @type {Analysis | null} */ (value) : null;
  const take = (/** @type {Reading} */ reading) => takeOver(doc.id, rowId, reading, lines, doc.mhz);
  return html`<${Sheet} title="From its lines" back=${back} class="entry-sheet" sign=${html`<${CaseSign} doc=${doc} />`}
      action=${html`<button type="button" class="bar-action" onClick=${() => set({ rows: emptyLines().rows })}>Empty</button>`}
      foot=${html`<${AtHand} found=${found} fault=${fault} take=${take} /><${NumberPad} done=${another} next="next" corner="±" />`}>
    <${Printout} doc=${doc} />
    <${Chips} label="Lines in" class="chips-2" optional=${false} value=${lines.unit} options=${UNITS}
      onPick=${(/** @type {any} */ unit) => set({ unit })} />
    <div class="line-entries">${lines.rows.map((entry, i) => html`<${Entry} key=${i} at=${i} entry=${entry} lines=${lines}
      set=${(/** @type {object} */ given) => setRow(i, given)} another=${another} />`)}</div>
    <${Chips} label="Heights" heading class="chips-3" optional=${false} value=${lines.heights} options=${HEIGHTS}
      onPick=${(/** @type {any} */ heights) => set({ heights })} />
    ${found && !fault && html`<${Found} found=${found} take=${take} />`}
    ${found && doc.structures.length > 0 && toNumber(doc.mhz) > 0 && html`<a class="button" href=${address('case', doc.id, 'tally', 'trace', String(toNumber(doc.mhz)))}>Fit a structure to these lines</a>`}
    ${lines.unit === 'ppm' && !doc.mhz && html`<p class="hint">No field is given, so 400 MHz is taken. <a href=${address('case', doc.id, 'readings', 'field')}>Give the field</a></p>`}
    ${lines.unit === 'hz' && html`<p class="hint">Hz counted from the reference line (TMS), as printouts have it.</p>`}
  <//>`;
}

/** One line: where, and how tall by eye or by number.
 * @param {{ at: number, entry: { at: string, tall: string }, lines: LineList, set: (given: object) => void, another: () => void }} props */
function Entry({ at, entry, lines, set, another }) {
  const bare = lines.heights === 'none';
  const cycle = () => set({ tall: nextRough(entry.tall) });
  return html`<div class="line-entry ${bare ? 'line-entry-bare' : ''}"><b aria-hidden="true">${at + 1}</b>
    <${PadField} label="Line ${at + 1}" name="line-${at}" value=${entry.at} unit=${lines.unit === 'hz' ? 'Hz' : 'ppm'} first=${at === 0}
      fault=${lineFault(entry.at, lines.unit)} onInput=${(/** @type {string} */ text) => set({ at: text })} onEnter=${another} />
    ${lines.heights === 'rough' && html`<button type="button" class="toggle" aria-label="Height of line ${at + 1}: ${entry.tall || 'not given'}"
      aria-pressed=${String(Boolean(entry.tall))} onClick=${cycle}>${entry.tall || 'height'}</button>`}
    ${lines.heights === 'numbers' && html`<${PadField} label="Height of line ${at + 1}" name="tall-${at}" value=${/\d/.test(entry.tall) ? entry.tall : ''}
      onInput=${(/** @type {string} */ tall) => set({ tall })} onEnter=${another} />`}</div>`;
}

/** "J 16.0, 8.0 Hz" @param {{ reading: Reading }} props */
const Couplings = ({ reading }) => (reading.j.length ? html`<i>J</i> ${reading.j.map((hz) => fixed(hz, 1)).join(', ')} Hz` : 'one line');

/** The best readings above the pad, where the thumb is. The place is kept while there are none, so that nothing jumps.
 * @param {{ found: Analysis | null, fault: import('../../types').Fault | null, take: (reading: Reading) => void }} props */
function AtHand({ found, fault, take }) {
  const readings = found?.readings.slice(0, AT_HAND) ?? [];
  return html`<div class="lines-at-hand" aria-live="polite">
    ${fault ? html`<${Trouble} fault=${fault} />` : !found ? html`<p class="hint">Type each line; pattern and <i>J</i> come up here. Heights make them surer.</p>`
      : !readings.length ? html`<p class="hint">${found.warnings[0]}</p>`
      : readings.map((reading, i) => html`<button type="button" key=${reading.pattern + reading.j.join()} class="line-reading ${i ? 'line-reading-other' : ''}"
          onClick=${() => take(reading)}><b>${reading.pattern}</b><em>${i ? 'or take' : 'take'}</em><span><${Couplings} reading=${reading} /></span></button>`)}
  </div>`;
}

/** All readings with what speaks for them, and what to beware of. @param {{ found: Analysis, take: (reading: Reading) => void }} props */
function Found({ found, take }) {
  return html`<div class="lines-found">
    ${found.warnings.map((line) => html`<p class="lines-warning" key=${line}>${line}</p>`)}
    ${found.readings.map((reading, i) => html`<button type="button" key=${reading.pattern + reading.j.join()} class="line-reading line-reading-other" onClick=${() => take(reading)}>
      <b>${reading.pattern}</b><span><${Couplings} reading=${reading} /></span><em>take</em>
      <span class="source">${i ? 'or so' : 'best reading'}; ${placeWords(reading)}, lines within ${fixed(reading.rms_hz, 2)} Hz</span></button>`)}
    ${found.readings[0] && html`<${Tree} mult=${found.readings[0].pattern} j=${found.readings[0].j} />`}
    <p class="whisper">Spacings ${found.spacings_hz.map((hz) => fixed(hz, 1)).join(', ')} Hz</p>
  </div>`;
}

/** @param {Reading} reading */
const placeWords = ({ shifts_ppm, centre_ppm }) => (shifts_ppm.length ? `AB quartet, two strongly coupled H at ${shifts_ppm.map((ppm) => fixed(ppm, DIGITS)).join(' and ')} ppm`
  : `centre ${fixed(centre_ppm, DIGITS)} ppm`);

/** Pattern, J and place of a reading into its signal: an AB quartet takes the range of its lines.
 * @param {string} caseId @param {string} rowId @param {Reading} reading @param {LineList} lines @param {string} mhz */
function takeOver(caseId, rowId, reading, lines, mhz) {
  const places = linesInPpm(lines, toNumber(mhz) || USUAL_MHZ).map(({ ppm }) => ppm);
  const shift = reading.shifts_ppm.length ? `${Math.max(...places).toFixed(2)}-${Math.min(...places).toFixed(2)}` : reading.centre_ppm.toFixed(DIGITS).replace(/0$/, '');
  changeWithUndo(caseId, `${reading.pattern} taken over`, (draft) => {
    const entry = draft.h1.find(({ id }) => id === rowId);
    if (entry) Object.assign(entry, { mult: reading.pattern, j: reading.j.map((hz) => hz.toFixed(1)).join(', '), shift });
  });
  go('case', caseId, 'readings', 'h1', rowId);
}
