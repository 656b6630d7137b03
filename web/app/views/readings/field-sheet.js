import { html } from 'htm/preact';
import { Formula } from '../../components/chem.js';
import { Chips, Section } from '../../components/parts.js';
import { NumberPad, PadField } from '../../components/pad.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase } from '../../state/cases.js';
import { address, go } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { toNumber } from '../../words/numbers.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

const FIELDS = ['60', '80', '90', '100', '300', '400', '500', '600'];
const COMMON = ['CDCl3', 'DMSO-d6', 'CD3OD', 'acetone-d6', 'D2O', 'C6D6', 'CD3CN', 'CD2Cl2'];

/** Field and solvent of the NMR readings, and how the H were counted. @param {{ doc: CaseDoc }} props */
export function FieldSheet({ doc }) {
  const { value } = useAnswer('solvents', {});
  const known = /** @type {string[]} */ ((/** @type {any} */ (value)?.solvents ?? []).map((/** @type {any} */ entry) => entry.name));
  const names = [...COMMON.filter((name) => !known.length || known.includes(name)), ...known.filter((name) => !COMMON.includes(name))];
  const set = (/** @type {Partial<CaseDoc>} */ given) => changeCase(doc.id, (draft) => { Object.assign(draft, given); });
  const back = address('case', doc.id, 'readings');
  const wrong = doc.mhz.trim() && !(toNumber(doc.mhz) > 0) ? `${doc.mhz} is no field. Type 400.` : '';
  return html`<${Sheet} title="Field and solvent" back=${back} class="entry-sheet"
      foot=${html`<${NumberPad} done=${() => go('case', doc.id, 'readings')} next="done" />`}>
    <${PadField} label=${html`<sup>1</sup>H frequency`} name="mhz" value=${doc.mhz} unit="MHz" fault=${wrong}
      onInput=${(/** @type {string} */ mhz) => set({ mhz })} />
    <${Chips} label="Field" class="chips-4" value=${doc.mhz} options=${FIELDS.map((text) => ({ value: text, text }))}
      onPick=${(/** @type {string} */ mhz) => set({ mhz })} />
    <${Section} title="Solvent">
      <${Chips} label="Solvent" class="chips-flow" value=${doc.solvent} onPick=${(/** @type {string} */ solvent) => set({ solvent })}
        options=${names.map((name) => ({ value: name, text: html`<${Formula} text=${name} />`, name }))} />
    <//>
    <${Section} title="Integrals are">
      <${Chips} label="Integrals" class="chips-2" optional=${false} value=${doc.raw ? 'raw' : 'h'}
        options=${[{ value: 'h', text: 'numbers of H' }, { value: 'raw', text: 'raw step heights' }]}
        onPick=${(/** @type {string} */ kind) => set({ raw: kind === 'raw' })} />
    <//>
  <//>`;
}
