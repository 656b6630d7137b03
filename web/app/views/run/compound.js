import { html } from 'htm/preact';
import { Drawing } from '../../components/drawing.js';

/** The start or its partner: drawn and named, a tap changes it.
 * @param {{ compound: import('./types').Compound, what: string, href: string, action?: any }} props */
export function CompoundRow({ compound, what, href, action }) {
  return html`<div class="run-compound"><a class="run-change" href=${href} aria-label="${compound.name || what}: tap to change">
      <${Drawing} structure=${compound.smiles} label="Drawing of ${compound.name || what}" width=${132} height=${92} class="run-drawing" />
      <span><b>${compound.name || what}</b><span class="case-line">${compound.name ? `${what}, tap to change` : 'tap to change'}</span></span></a>${action}</div>`;
}
