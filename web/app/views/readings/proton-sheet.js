import { html } from 'htm/preact';
import { Chips } from '../../components/parts.js';
import { NumberPad, PadField } from '../../components/pad.js';
import { useLeaveEmpty } from '../../components/leave-empty.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase, changeWithUndo } from '../../state/cases.js';
import { protonFault } from '../../state/input.js';
import { address, go, swap } from '../../state/route.js';
import { newId } from '../../state/document.js';
import { toNumbers, toRange } from '../../words/numbers.js';
import { dashed, highFirst } from '../../words/readings.js';
import { CaseSign } from '../case/sign.js';
import { Printout } from './photos.js';
import { refusalOf, Sum } from './proton-section.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').ProtonRow} ProtonRow */

const PATTERNS = ['s', 'd', 't', 'q', 'quint', 'sept', 'dd', 'dt', 'td', 'ddd', 'm', 'br'];
const SPOKEN = /** @type {Record<string, string>} */ ({ s: 'singlet', d: 'doublet', t: 'triplet', q: 'quartet', quint: 'quintet',
  sept: 'septet', dd: 'doublet of doublets', dt: 'doublet of triplets', td: 'triplet of doublets', ddd: 'doublet of doublets of doublets',
  m: 'multiplet', br: 'broad' });
/** Patterns that have no J to read. */
const NO_J = ['', 's', 'm', 'br', 'br s'];
/** Two J agree when they differ by no more than this, Hz: the reading error of a printout. */
const SAME_J_HZ = 0.3;

/** One 1H signal: shift, pattern, J, H. @param {{ doc: CaseDoc, rowId: string }} props */
export function ProtonSheet({ doc, rowId }) {
  useLeaveEmpty(doc.id, 'h1', rowId);
  const rows = highFirst(doc.h1, (row) => row.shift);
  const row = rows.find((entry) => entry.id === rowId) ?? null;
  const back = address('case', doc.id, 'readings');
  if (!row) return html`<${Sheet} title="Signal" back=${back}><p class="hint">This signal was removed.</p><//>`;
  const set = (/** @type {Partial<ProtonRow>} */ given) => changeCase(doc.id, (draft) => {
    Object.assign(draft.h1.find((entry) => entry.id === rowId) ?? {}, given);
  });
  const another = () => {
    const id = newId();
    changeCase(doc.id, (draft) => { draft.h1.push({ id, shift: '', mult: '', j: '', h: '' }); });
    swap('case', doc.id, 'readings', 'h1', id);
  };
  const remove = () => {
    changeWithUndo(doc.id, `Signal ${row.shift} removed`, (draft) => { draft.h1 = draft.h1.filter((entry) => entry.id !== rowId); });
    go('case', doc.id, 'readings');
  };
  const needsJ = !NO_J.includes(row.mult);
  const full = Boolean(row.shift.trim() && row.h.trim() && (!needsJ || row.j.trim()));
  return html`<${Sheet} title=${html`<sup>1</sup>H signal ${rows.indexOf(row) + 1} of ${rows.length}`} back=${back}
      sign=${html`<${CaseSign} doc=${doc} />`} class="entry-sheet" action=${html`<button type="button"
        class="bar-action" onClick=${remove}>Remove</button>`}
      foot=${html`<${NumberPad}
        key=${rowId} done=${another} next=${full ? 'new' : 'next'} side="–" corner=${needsJ ? 'J' : '±'} />`}>
    <${Printout} doc=${doc} />
    <${Fields} key=${rowId} doc=${doc} row=${row} set=${set} needsJ=${needsJ} another=${another} />
    <p class="fields-foot"><span>${partners(doc, row)}</span><b><${Sum} doc=${doc} /></b></p>
  <//>`;
}

/** @param {{ doc: CaseDoc, row: ProtonRow, set: (given: Partial<ProtonRow>) => void, needsJ: boolean, another: () => void }} props */
function Fields({ doc, row, set, needsJ, another }) {
  const fault = protonFault(row);
  const about = (/** @type {RegExp} */ words) => (words.test(fault) ? fault : '');
  const refusal = fault ? '' : refusalOf(row.id);
  const broad = row.mult.startsWith('br');
  const pattern = broad ? row.mult.slice(3) || 'br' : row.mult;
  const pick = (/** @type {string} */ mult) => {
    set({ mult });
    if (!NO_J.includes(mult)) setTimeout(() => /** @type {any} */ (document.querySelector('input[name=j]'))?.focus());
    else if (mult && !row.h.trim()) /** @type {any} */ (document.querySelector('input[name=h]'))?.focus();
  };
  return html`<div class="fields-2">
      <${PadField} label="Shift, or a range" name="shift" value=${row.shift} unit="ppm" first fault=${about(/shift/) || refusal}
        onInput=${(/** @type {string} */ shift) => set({ shift })} onEnter=${another} />
      <${PadField} label=${doc.raw ? 'Step height' : 'Protons'} name="h" value=${row.h} unit=${doc.raw ? '' : 'H'}
        fault=${about(/number of H/)}
        onInput=${(/** @type {string} */ h) => set({ h })} onEnter=${another} />
    </div>
    <${Chips} label="Pattern" class="chips-patterns" value=${pattern} onPick=${pick}
      options=${PATTERNS.map((value) => ({ value, text: value, name: SPOKEN[value] }))} />
    ${needsJ && html`<${PadField} label=${html`<i>J</i>`} name="j" value=${row.j} unit="Hz" fault=${about(/list of J/)}
        onInput=${(/** @type {string} */ j) => set({ j })} onEnter=${another} />`}`;
}

/** Signals that share a coupling with this one. @param {CaseDoc} doc @param {ProtonRow} row */
function partners(doc, row) {
  const mine = toNumbers(row.j).filter((j) => j > 0);
  for (const other of doc.h1) {
    if (other.id === row.id || !toRange(other.shift)) continue;
    const shared = toNumbers(other.j).find((j) => mine.some((own) => Math.abs(own - j) <= SAME_J_HZ));
    if (shared) return `Shares ${shared} Hz with ${dashed(other.shift)} (${[other.mult, other.h && `${other.h} H`].filter(Boolean).join(', ')}).`;
  }
  return '';
}
