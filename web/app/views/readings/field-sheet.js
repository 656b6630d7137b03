import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Formula } from '../../components/chem.js';
import { Chips } from '../../components/parts.js';
import { NumberPad, PadField } from '../../components/pad.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase } from '../../state/cases.js';
import { address, go } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { toNumber } from '../../words/numbers.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

const FIELDS = ['60', '80', '90', '300', '400', '500', '600'];
const COMMON = ['CDCl3', 'DMSO-d6', 'CD3OD', 'acetone-d6', 'D2O', 'C6D6', 'CD3CN', 'CD2Cl2'];

/** Field and solvent of the NMR readings, and how the H were counted. @param {{ doc: CaseDoc }} props */
export function FieldSheet({ doc }) {
  const [other, setOther] = useState(Boolean(doc.mhz) && !FIELDS.includes(doc.mhz));
  const { value } = useAnswer('solvents', {});
  const known = /** @type {string[]} */ ((/** @type {any} */ (value)?.solvents ?? []).map((/** @type {any} */ entry) => entry.name));
  const names = [...COMMON.filter((name) => !known.length || known.includes(name)), ...known.filter((name) => !COMMON.includes(name))];
  const set = (/** @type {Partial<CaseDoc>} */ given) => changeCase(doc.id, (draft) => { Object.assign(draft, given); });
  const pick = (/** @type {string} */ mhz) => { setOther(mhz === 'other'); if (mhz !== 'other') set({ mhz }); };
  const wrong = doc.mhz.trim() && !(toNumber(doc.mhz) > 0) ? `${doc.mhz} is no field. Type 400.` : '';
  const leave = () => go('case', doc.id, 'readings');
  return html`<${Sheet} title="Field and solvent" back=${address('case', doc.id, 'readings')}
    class=${other ? 'entry-sheet' : ''}
      foot=${other ? html`<${NumberPad} done=${leave} next="done" />` : html`<button type="button"
        class="button primary" onClick=${leave}>Done</button>`}>
    <${Chips} label=${'\u00b9H frequency, MHz'} heading class="chips-4" value=${other ? 'other' : doc.mhz}
      onPick=${pick}
      options=${[...FIELDS, 'other'].map((text) => ({ value: text, text }))} />
    ${other && html`<${PadField} label="Another field" name="mhz" value=${doc.mhz} unit="MHz" first fault=${wrong}
      onInput=${(/** @type {string} */ mhz) => set({ mhz })} />`}
    <${Chips} label="Solvent" heading class="chips-flow" value=${doc.solvent}
      onPick=${(/** @type {string} */ solvent) => set({ solvent })}
      options=${names.map((name) => ({ value: name, text: html`<${Formula} text=${name} />`, name }))} />
    <${Chips} label="Integrals are" heading class="chips-2" optional=${false} value=${doc.raw ? 'raw' : 'h'}
      options=${[{ value: 'h', text: 'numbers of H' }, { value: 'raw', text: 'raw step heights' }]}
      onPick=${(/** @type {string} */ kind) => set({ raw: kind === 'raw' })} />
  <//>`;
}
