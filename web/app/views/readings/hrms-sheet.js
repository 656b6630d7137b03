import { html } from 'htm/preact';
import { Formula, Ion } from '../../components/chem.js';
import { Chips, Section, Trouble } from '../../components/parts.js';
import { NumberPad, PadField } from '../../components/pad.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase, changeWithUndo } from '../../state/cases.js';
import { address, go } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { plural, signedFixed, toNumber } from '../../words/numbers.js';
import { CaseSign } from '../case/sign.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

const ADDUCTS = ['[M+H]+', '[M+Na]+', '[M+NH4]+', '[M+K]+', '[M]+.', '[M-H]-'];
const TOLERANCES = ['2', '5', '10', '20'];
const SHOWN = 12;

/** An accurate mass, and the formulas it allows. @param {{ doc: CaseDoc }} props */
export function HrmsSheet({ doc }) {
  const { found, adduct, ppm } = doc.hrms;
  const set = (/** @type {Partial<CaseDoc['hrms']>} */ given) => changeCase(doc.id, (draft) => { Object.assign(draft.hrms, given); });
  const wrong = found.trim() && !(toNumber(found) > 0) ? `${found} is no m/z. Type 149.0961.` : '';
  return html`<${Sheet} title="Accurate mass" back=${address('case', doc.id, 'readings')} class="entry-sheet"
      sign=${html`<${CaseSign}
        doc=${doc} />`} foot=${html`<${NumberPad} done=${() => go('case', doc.id, 'readings')} next="done" />`}>
    <${PadField} label=${html`<i>m/z</i> found`} name="found" value=${found} first fault=${wrong}
      onInput=${(/** @type {string} */ text) => set({ found: text })} />
    <${Chips} label="Ion" class="chips-3" optional=${false} value=${adduct}
      onPick=${(/** @type {string} */ value) => set({ adduct: value })}
      options=${ADDUCTS.map((value) => ({ value, text: html`<${Ion} text=${value} />`, name: value }))} />
    <${Chips} label="Right within, ppm" heading class="chips-4" optional=${false} value=${ppm}
      onPick=${(/** @type {string} */ value) => set({ ppm: value })}
      options=${TOLERANCES.map((value) => ({ value, text: value }))} />
    <${Formulas} doc=${doc} />
  <//>`;
}

/** @param {{ doc: CaseDoc }} props */
function Formulas({ doc }) {
  const mz = toNumber(doc.hrms.found);
  const { value, fault, busy } = useAnswer('formulas', mz > 0 ? { mz, adduct: doc.hrms.adduct, ppm: toNumber(doc.hrms.ppm) || 5 } : null, { delay: 250 });
  if (!(mz > 0)) return html`<p
    class="hint">Type all decimals the instrument gave: they decide which formulas are left.</p>`;
  if (fault) return html`<${Trouble} fault=${fault} />`;
  const all = /** @type {any[]} */ (/** @type {any} */ (value)?.candidates ?? []);
  const take = (/** @type {string} */ formula) => changeWithUndo(doc.id, `${formula} taken over`, (draft) => { draft.formula = formula; });
  return html`<${Section}
    title="Formulas it allows" aside=${busy ? 'looking' : plural(all.length, 'formula', 'formulas')}>
    ${!busy && !all.length && html`<p
      class="hint">None within ${doc.hrms.ppm} ppm. Is the ion right? Try a wider window.</p>`}
    <ul class="picks">${all.slice(0, SHOWN).map((entry) => html`<li key=${entry.formula}>
      <button type="button" class="pick" aria-pressed=${String(entry.formula === doc.formula)}
        onClick=${() => take(entry.formula)}>
        <b><${Formula} text=${entry.formula} /></b>
        <span>${plural(entry.dbe, 'unsaturation')}</span><span>${signedFixed(entry.error_ppm, 1)} ppm</span></button></li>`)}</ul>
    ${all.length > SHOWN && html`<p
      class="hint">${all.length - SHOWN} more. A narrower window, or a formula typed by hand, cuts the list.</p>`}
  <//>`;
}
