import { html } from 'htm/preact';
import { NumberPad, PadField } from '../../components/pad.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase } from '../../state/cases.js';
import { address, go } from '../../state/route.js';
import { toNumber } from '../../words/numbers.js';
import { CaseSign } from '../case/sign.js';

const ELEMENTS = ['C', 'H', 'N', 'S'];

/** Combustion analysis, mass per cent found. @param {{ doc: import('../../types').CaseDoc }} props */
export function AnalysisSheet({ doc }) {
  const wrong = (/** @type {string} */ text) => (text?.trim() && !(toNumber(text) > 0 && toNumber(text) <= 100) ? `${text} is no per cent. Type 81.04.` : '');
  return html`<${Sheet} title="Combustion analysis" back=${address('case', doc.id, 'readings')} class="entry-sheet"
      sign=${html`<${CaseSign}
        doc=${doc} />`} foot=${html`<${NumberPad} done=${() => go('case', doc.id, 'readings')} />`}>
    <div class="fields-2">${ELEMENTS.map((element, i) => html`<${PadField} key=${element} label="${element} found"
      name="el-${element}" first=${i === 0}
      value=${doc.analysis[element] ?? ''} unit="%" fault=${wrong(doc.analysis[element] ?? '')}
      onInput=${(/** @type {string} */ text) => changeCase(doc.id, (draft) => { draft.analysis[element] = text; })} />`)}</div>
    <p class="hint">Within 0.4 of the calculated value is the usual demand on a pure sample.</p>
  <//>`;
}
