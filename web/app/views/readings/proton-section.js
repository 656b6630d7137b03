import { html } from 'htm/preact';
import { Formula } from '../../components/chem.js';
import { Section } from '../../components/parts.js';
import { checkFault } from '../../state/check.js';
import { changeCase } from '../../state/cases.js';
import { newId } from '../../state/document.js';
import { protonFault } from '../../state/input.js';
import { address, go } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { plural } from '../../words/numbers.js';
import { dashed, highFirst, protonSum } from '../../words/readings.js';
import { useSolventName } from './solvent-lines.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').ProtonRow} ProtonRow */

/** @param {CaseDoc} doc */
export function addSignal(doc) {
  const id = newId();
  changeCase(doc.id, (draft) => { draft.h1.push({ id, shift: '', mult: '', j: '', h: '' }); });
  go('case', doc.id, 'readings', 'h1', id);
}

/** The conditions, "400 MHz, CDCl3". @param {{ doc: CaseDoc }} props */
export function Conditions({ doc }) {
  if (!doc.mhz && !doc.solvent) return html`field and solvent`;
  return html`${doc.mhz && `${doc.mhz} MHz`}${doc.mhz && doc.solvent && ', '}${doc.solvent && html`<${Formula}
    text=${doc.solvent} />`}`;
}

/** The running sum of H against the formula. @param {{ doc: CaseDoc }} props */
export function Sum({ doc }) {
  const { value } = useAnswer('formula', doc.formula.trim() ? { text: doc.formula.trim() } : null, { delay: 150 });
  const whole = /** @type {any} */ (value)?.parts?.find((/** @type {[string, number]} */ part) => part[0] === 'H')?.[1];
  const sum = Math.round(protonSum(doc) * 100) / 100;
  if (doc.raw) return html`steps sum to ${sum}`;
  return whole ? html`${sum} of ${whole} H` : html`${sum} H`;
}

/** @param {{ doc: CaseDoc }} props */
export function ProtonSection({ doc }) {
  const title = html`<sup>1</sup>H${doc.mhz || doc.solvent ? html`, <${Conditions} doc=${doc} />` : ''}`;
  const rows = highFirst(doc.h1, (row) => row.shift);
  const solvent = useSolventName(doc, 'h1');
  return html`<${Section} title=${title} id="h1-head" aside=${doc.h1.length ? html`<${Sum} doc=${doc} />` : null}>
    ${!doc.h1.length && html`<p
      class="hint">Begin with field and solvent, then take the signals from left to right.</p>`}
    <ul class="slips" aria-label=${plural(rows.length, 'signal')}>
      ${rows.map((row) => html`<${Slip} key=${row.id} doc=${doc} row=${row} named=${solvent(row)} />`)}
    </ul>
    <div class="two-up">
      <a class="button" href=${address('case', doc.id, 'readings', 'field')}><span><${Conditions}
        doc=${doc} /></span></a>
      <button type="button" class="button" onClick=${() => addSignal(doc)}>Add a signal</button>
    </div>
  <//>`;
}

/** What the engine said against a row at the last check. @param {string} id */
export const refusalOf = (id) => (checkFault.value?.row === id ? checkFault.value.message : '');

/** @param {{ doc: CaseDoc, row: ProtonRow, named: string }} props */
function Slip({ doc, row, named }) {
  const fault = protonFault(row) || refusalOf(row.id);
  return html`<li><a class="slip ${named ? 'slip-solvent' : ''} ${fault ? 'slip-wrong' : ''}"
      href=${address('case', doc.id, 'readings', 'h1', row.id)}>
    <b class="slip-shift ${row.shift.length > 5 ? 'slip-range' : ''}">${dashed(row.shift) || '?'}</b>
    <span class="slip-pattern">${row.mult} ${row.j && html`<i>J</i> ${row.j}`}
      ${named && html`<span class="slip-named"><${Formula} text=${named} /></span>`}
      ${fault && html`<span class="trouble">not counted: ${fault}</span>`}</span>
    <span class="slip-h">${row.h && `${row.h}${doc.raw ? '' : ' H'}`}</span>
  </a></li>`;
}
