import { html } from 'htm/preact';
import { NumberPad, PadField } from '../../components/pad.js';
import { useLeaveEmpty } from '../../components/leave-empty.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase, changeWithUndo } from '../../state/cases.js';
import { newId } from '../../state/document.js';
import { address, swap } from '../../state/route.js';
import { toNumber } from '../../words/numbers.js';
import { CaseSign } from '../case/sign.js';
import { Printout } from './photos.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** Peaks of the mass spectrum. @param {{ doc: CaseDoc, rowId: string }} props */
export function MassesSheet({ doc, rowId }) {
  useLeaveEmpty(doc.id, 'ms', rowId);
  const row = doc.ms.find((entry) => entry.id === rowId) ?? null;
  const set = (/** @type {object} */ given) => changeCase(doc.id, (draft) => { Object.assign(draft.ms.find((entry) => entry.id === rowId) ?? {}, given); });
  const another = () => {
    const id = newId();
    changeCase(doc.id, (draft) => { draft.ms.push({ id, mz: '', rel: '' }); });
    swap('case', doc.id, 'readings', 'ms', id);
  };
  const remove = () => changeWithUndo(doc.id, `Peak ${row?.mz} removed`, (draft) => { draft.ms = draft.ms.filter((entry) => entry.id !== rowId); });
  const wrong = row?.mz.trim() && !(toNumber(row.mz) > 0) ? `${row.mz} is no m/z. Type 133.` : '';
  return html`<${Sheet} title="Mass peaks" back=${address('case', doc.id, 'readings')} class="entry-sheet"
    sign=${html`<${CaseSign} doc=${doc} />`}
      action=${row && html`<button type="button" class="bar-action" onClick=${remove}>Remove</button>`}
      foot=${row && html`<${NumberPad} key=${rowId} done=${another} next=${row.mz && row.rel ? 'new' : 'next'} />`}>
    <${Printout} doc=${doc} />
    <ul class="lines">${[...doc.ms].sort((a, b) => toNumber(b.mz) - toNumber(a.mz)).map((peak) => html`<li
      key=${peak.id}>
      <a class="line-chip" aria-current=${peak.id === rowId ? 'true' : undefined}
        href=${address('case', doc.id, 'readings', 'ms', peak.id)}>
        <b>${peak.mz || '?'}</b> <span>${peak.rel && `${peak.rel} %`}</span></a></li>`)}</ul>
    ${row ? html`<div class="fields-2" key=${rowId}>
        <${PadField} label=${html`<i>m/z</i>`} name="mz" value=${row.mz} first fault=${wrong}
          onInput=${(/** @type {string} */ mz) => set({ mz })} onEnter=${another} />
        <${PadField} label="Height" name="rel" value=${row.rel} unit="%"
          onInput=${(/** @type {string} */ rel) => set({ rel })} onEnter=${another} />
      </div>`
      : html`<p class="hint">The molecular ion, the base peak and the losses that stand out are enough.</p>
        <button type="button" class="button primary" onClick=${another}>Add a peak</button>`}
  <//>`;
}
