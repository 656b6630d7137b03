import { html } from 'htm/preact';
import { Chips } from '../../components/parts.js';
import { Formula } from '../../components/chem.js';
import { NumberPad, PadField } from '../../components/pad.js';
import { useLeaveEmpty } from '../../components/leave-empty.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase, changeWithUndo } from '../../state/cases.js';
import { newId } from '../../state/document.js';
import { address, go, swap } from '../../state/route.js';
import { toNumber } from '../../words/numbers.js';
import { highFirst } from '../../words/readings.js';
import { CaseSign } from '../case/sign.js';
import { Printout } from './photos.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').CarbonRow} CarbonRow */

const KINDS = ['C', 'CH', 'CH2', 'CH3'].map((value) => ({ value, text: html`<${Formula}
  text=${value} />`, name: value }));
const COUNTS = ['1', '2', '3', '4'].map((value) => ({ value, text: value === '1' ? '1 C' : `${value} C` }));

/** One 13C line: shift, kind when known, how many carbons. @param {{ doc: CaseDoc, rowId: string }} props */
export function CarbonSheet({ doc, rowId }) {
  useLeaveEmpty(doc.id, 'c13', rowId);
  const rows = highFirst(doc.c13, (row) => row.ppm);
  const row = rows.find((entry) => entry.id === rowId) ?? null;
  const back = address('case', doc.id, 'readings');
  if (!row) return html`<${Sheet} title="Line" back=${back}><p class="hint">This line was removed.</p><//>`;
  const set = (/** @type {Partial<CarbonRow>} */ given) => changeCase(doc.id, (draft) => {
    Object.assign(draft.c13.find((entry) => entry.id === rowId) ?? {}, given);
  });
  const another = () => {
    const id = newId();
    changeCase(doc.id, (draft) => { draft.c13.push({ id, ppm: '', kind: '', n: '' }); });
    swap('case', doc.id, 'readings', 'c13', id);
  };
  const remove = () => {
    changeWithUndo(doc.id, `Line ${row.ppm} removed`, (draft) => { draft.c13 = draft.c13.filter((entry) => entry.id !== rowId); });
    go('case', doc.id, 'readings');
  };
  const wrong = row.ppm.trim() && Number.isNaN(toNumber(row.ppm)) ? `${row.ppm} is no shift. Type 128.4.` : '';
  return html`<${Sheet} title=${html`<sup>13</sup>C line ${rows.indexOf(row) + 1} of ${rows.length}`} back=${back}
    class="entry-sheet"
      sign=${html`<${CaseSign} doc=${doc} />`} action=${html`<button type="button" class="bar-action"
        onClick=${remove}>Remove</button>`}
      foot=${html`<${NumberPad} corner="±" done=${another} next=${row.ppm ? 'new' : 'next'} />`}>
    <${Printout} doc=${doc} />
    <${PadField} key=${rowId} label="Shift" name="ppm" value=${row.ppm} unit="ppm" first fault=${wrong}
      onInput=${(/** @type {string} */ ppm) => set({ ppm })} onEnter=${another} />
    <${Chips} label="Kind, where DEPT told it" heading class="chips-4" options=${KINDS} value=${row.kind}
      onPick=${(/** @type {string} */ kind) => set({ kind })} />
    <${Chips} label="Carbons in this line" heading class="chips-4" options=${COUNTS} value=${row.n}
      onPick=${(/** @type {string} */ n) => set({ n })} />
  <//>`;
}
