import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Icon } from '../../components/icon.js';
import { changeCase } from '../../state/cases.js';
import { address } from '../../state/route.js';
import { CaseMenu } from './menu.js';
import { CaseSign } from './sign.js';

/** Back, name, verdict sign, menu. @param {{ doc: import('../../types').CaseDoc }} props */
export function CaseBar({ doc }) {
  const [menu, setMenu] = useState(false);
  const [naming, setNaming] = useState(false);
  const rename = (/** @type {any} */ event) => {
    const title = event.currentTarget.value;
    changeCase(doc.id, (draft) => { draft.title = title; });
  };
  return html`<header class="bar">
      <a class="bar-back" href="#/" aria-label="All cases"><${Icon} name="back" size=${28} /></a>
      ${naming
        ? html`<input class="bar-name text-field" aria-label="Name of the case" value=${doc.title} onInput=${rename}
            onBlur=${() => setNaming(false)} ref=${(/** @type {any} */ el) => el?.focus()}
            onKeyDown=${(/** @type {any} */ e) => e.key === 'Enter' && setNaming(false)} />`
        : html`<h1>${doc.title || 'Untitled'}</h1>`}
      <a class="bar-sign" href=${address('case', doc.id, 'tally')} aria-label="Verdict"><${CaseSign} doc=${doc} /></a>
      <button type="button" class="bar-menu" aria-label="Case menu" aria-expanded=${String(menu)}
        onClick=${() => setMenu(!menu)}>
        <${Icon} name="menu" /></button>
    </header>
    ${menu && html`<${CaseMenu}
      doc=${doc} close=${() => setMenu(false)} rename=${() => { setMenu(false); setNaming(true); }} />`}`;
}
