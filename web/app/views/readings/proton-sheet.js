import { html } from 'htm/preact';
import { Chips } from '../../components/parts.js';
import { NumberPad, PadField } from '../../components/pad.js';
import { useLeaveEmpty } from '../../components/leave-empty.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase, changeWithUndo } from '../../state/cases.js';
import { protonFault } from '../../state/input.js';
import { address, go, swap } from '../../state/route.js';
import { newId } from '../../state/document.js';
import { highFirst } from '../../words/readings.js';
import { CaseSign } from '../case/sign.js';
import { PartnerNote } from './partners.js';
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
    <p class="fields-foot"><span></span><b><${Sum} doc=${doc} /></b></p>
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
  const options = pattern && !PATTERNS.includes(pattern) ? [...PATTERNS, pattern] : PATTERNS;
  return html`<div class="fields-2">
      <${PadField} label="Shift, or a range" name="shift" value=${row.shift} unit="ppm" first fault=${about(/shift/) || refusal}
        onInput=${(/** @type {string} */ shift) => set({ shift })} onEnter=${another} />
      <${PadField} label=${doc.raw ? 'Step height' : 'Protons'} name="h" value=${row.h} unit=${doc.raw ? '' : 'H'}
        fault=${about(/number of H/)}
        onInput=${(/** @type {string} */ h) => set({ h })} onEnter=${another} />
    </div>
    <${Chips} label="Pattern" class="chips-patterns" value=${pattern} onPick=${pick}
      options=${options.map((value) => ({ value, text: value, name: SPOKEN[value] }))} />
    ${needsJ && html`<${PadField} label=${html`<i>J</i>`} name="j" value=${row.j} unit="Hz" fault=${about(/list of J/)}
        onInput=${(/** @type {string} */ j) => set({ j })} onEnter=${another} />
      <${PartnerNote} doc=${doc} row=${row} />`}
    <a class="button" href=${address('case', doc.id, 'readings', 'lines', row.id)}>Pattern and <i>J</i> from its lines</a>`;
}
