import { html } from 'htm/preact';
import { Trouble } from '../../components/parts.js';
import { Working } from '../../components/working.js';
import { useLongAnswer } from '../../state/long-answer.js';
import { fixed, plural, toNumber } from '../../words/numbers.js';
import { dashed } from '../../words/readings.js';
import { linesInPpm } from '../readings/lines.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('./types').TypedSignal} TypedSignal */
/** @typedef {import('./types').Fitted} Fitted */
/** @typedef {import('./types').TracedGroup} TracedGroup */

/** Distance of the lines from the fitted ones up to which they count as met, Hz: the error of a printed position twice. */
const MET_HZ = 0.5;
/** Changes from the prediction that are more than its error: J, Hz, and shift, ppm. */
const FAR_J = 2.5;
const FAR_PPM = 0.4;

/** The signals of a case whose lines were typed, as far as they can be read. @param {CaseDoc} doc @returns {TypedSignal[]} */
export function typedSignals(doc) {
  const mhz = toNumber(doc.mhz);
  return doc.h1.flatMap((row) => {
    const lines = row.lines && (mhz > 0 || row.lines.unit === 'ppm') ? linesInPpm(row.lines, mhz) : [];
    return lines.length > 1 ? [{ id: row.id, shift: row.shift, n: toNumber(row.h), lines }] : [];
  });
}

/** @param {TypedSignal} signal */
const placeOf = ({ shift, lines }) => dashed(shift || `${Math.max(...lines.map(({ ppm }) => ppm)).toFixed(2)}-${Math.min(...lines.map(({ ppm }) => ppm)).toFixed(2)}`);

/** What to ask for a fit of one signal, null for none. @param {CaseDoc} doc @param {string} smiles @param {TypedSignal | null} signal */
const question = (doc, smiles, signal) => signal && {
  smiles, mhz: toNumber(doc.mhz), lines: signal.lines, ...(doc.solvent && { solvent: doc.solvent }), ...(Number.isInteger(signal.n) && signal.n > 0 && { n: signal.n }),
};

/** A fit of the structure's spin system to the typed lines of one signal. @param {CaseDoc} doc @param {string} smiles @param {TypedSignal | null} signal */
export const useFit = (doc, smiles, signal) => useLongAnswer('fit', question(doc, smiles, signal));

/** Offers the fit, and says what it gave.
 * @param {{ signals: TypedSignal[], chosen: TypedSignal | null, onChoose: (id: string) => void, answer: ReturnType<typeof useFit>,
 *   groups: TracedGroup[], onPick: (group: number) => void }} props */
export function FitToLines({ signals, chosen, onChoose, answer, groups, onPick }) {
  if (!signals.length) return null;
  const fitted = chosen && answer.current ? /** @type {Fitted | null} */ (answer.value) : null;
  return html`<section class="fit" aria-label="Fit to the lines typed">
    ${signals.map((signal) => html`<button type="button" key=${signal.id} class="button" aria-pressed=${String(signal === chosen)}
      onClick=${() => onChoose(signal === chosen ? '' : signal.id)}>${signal === chosen ? 'Leave the fit of' : 'Fit it to'} the ${plural(signal.lines.length, 'line')} at ${placeOf(signal)}</button>`)}
    <${Working} since=${answer.since} words="fitting shifts and J" stop=${answer.stop} />
    ${chosen && html`<${Trouble} fault=${answer.fault} />`}
    ${fitted && html`<${Result} fitted=${fitted} lines=${chosen?.lines.length ?? 0} groups=${groups} onPick=${onPick} />`}
  </section>`;
}

/** @param {{ fitted: Fitted, lines: number, groups: TracedGroup[], onPick: (group: number) => void }} props */
function Result({ fitted, lines, groups, onPick }) {
  const shiftOf = (/** @type {number} */ group) => fixed(fitted.shifts.find((entry) => entry.group === group)?.ppm ?? groups.find(({ at }) => at === group)?.ppm ?? 0, 2);
  const between = (/** @type {number[]} */ [a = -1, b = -1]) => (a === b ? `within ${shiftOf(a)}` : [a, b].filter((group) => group >= 0).map(shiftOf).join(', '));
  const { shifts, couplings } = fitted;
  return html`<div class="fit-result" aria-live="polite">
    <p class="lead">${verdictOf(fitted, lines)}</p>
    <table><thead><tr><th scope="col"></th><th scope="col">fitted</th><th scope="col">predicted</th></tr></thead><tbody>
      ${shifts.map(({ group, ppm, predicted_ppm }) => html`<tr key=${`s${group}`}><th scope="row"><button type="button" class="pick-shift" onClick=${() => onPick(group)}>${groups.find(({ at }) => at === group)?.n ?? ''} H</button></th>
        <td>${fixed(ppm, 3)} ppm</td><td>${fixed(predicted_ppm, 2)}</td></tr>`)}
      ${couplings.map(({ hz, predicted_hz, uncertain_hz }, i) => html`<tr key=${`j${i}`}><th scope="row"><i>J</i> <small>${between(couplings[i]?.groups ?? [])}</small></th>
        <td>${fixed(hz, 1)}${uncertain_hz === null ? '' : html` ± ${fixed(Math.max(uncertain_hz, 0.1), 1)}`} Hz</td><td>${fixed(predicted_hz, 1)}</td></tr>`)}
    </tbody></table>
    <p class="whisper">Dashed in the trace. Other J and the groups away from these lines are held as predicted.</p></div>`;
}

/** Whether the structure's spin system explains the lines, in words. @param {Fitted} fitted @param {number} lines */
function verdictOf({ rms_hz, shifts, couplings }, lines) {
  const within = `within ${fixed(rms_hz, 2)} Hz`;
  if (rms_hz > MET_HZ) return `The spin system of this structure does not meet the ${lines} lines: they are off by ${fixed(rms_hz, 1)} Hz.`;
  const j = couplings.find(({ hz, predicted_hz }) => Math.abs(hz - predicted_hz) > FAR_J);
  if (j) return `It meets the ${lines} lines ${within}, but only with J of ${fixed(j.hz, 1)} in place of ${fixed(j.predicted_hz, 1)} Hz.`;
  const shift = shifts.find(({ ppm, predicted_ppm }) => Math.abs(ppm - predicted_ppm) > FAR_PPM);
  if (shift) return `It meets the ${lines} lines ${within}, but only with a shift of ${fixed(shift.ppm, 2)} in place of ${fixed(shift.predicted_ppm, 2)} ppm.`;
  return `The spin system of this structure gives the ${lines} lines ${within}.`;
}
