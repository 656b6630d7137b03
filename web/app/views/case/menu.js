import { html } from 'htm/preact';
import { copyCase, deleteCase } from '../../state/cases.js';
import { address, go } from '../../state/route.js';

/** @param {{ doc: import('../../types').CaseDoc, close: () => void, rename: () => void }} props */
export function CaseMenu({ doc, close, rename }) {
  const copy = () => { close(); go('case', copyCase(doc).id, 'readings'); };
  const remove = () => { go(); deleteCase(doc); };
  return html`<div class="menu" role="group" aria-label="Case menu">
    <a class="button" href=${address('case', doc.id, 'amounts')}>Amounts: ratio, yield, purity</a>
    <a class="button" href=${address('case', doc.id, 'record')}>Record: print, share, export</a>
    <button type="button" class="button" onClick=${rename}>Rename</button>
    <button type="button" class="button" onClick=${copy}>Copy this case</button>
    <button type="button" class="button" onClick=${remove}>Delete this case</button>
  </div>`;
}
