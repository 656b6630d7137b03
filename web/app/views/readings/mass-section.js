import { html } from 'htm/preact';
import { Formula } from '../../components/chem.js';
import { Section } from '../../components/parts.js';
import { Icon } from '../../components/icon.js';
import { address } from '../../state/route.js';

/** @typedef {{ href: string, name: any, says: any, empty?: boolean }} LinkProps */

/** @param {LinkProps} props */
export function LineLink({ href, name, says, empty = false }) {
  return html`<a class="line-link ${empty ? 'line-empty' : ''}" href=${href}>
    <span>${name}</span><b>${says}</b><${Icon} name="right" size=${20} /></a>`;
}

/** @param {LinkProps} props */
const Tile = ({ href, name, says, empty = false }) => html`<a class="tile ${empty ? 'tile-empty' : ''}"
  href=${href}><span>${name}</span><b>${says}</b></a>`;

/** Formula, masses and combustion, a tile each. @param {{ doc: import('../../types').CaseDoc }} props */
export function MassSection({ doc }) {
  const to = (/** @type {string} */ sheet) => address('case', doc.id, 'readings', sheet);
  const found = Object.entries(doc.analysis).filter(([, text]) => text.trim());
  return html`<${Section} title="Formula and mass" id="mass-head"><div class="tiles">
    <${Tile} href=${to('formula')} name="Formula" empty=${!doc.formula}
      says=${doc.formula ? html`<${Formula} text=${doc.formula} />` : 'add'} />
    <${Tile} href=${to('hrms')} name="Accurate mass" empty=${!doc.hrms.found}
      says=${doc.hrms.found ? `${doc.hrms.found} ${doc.hrms.adduct}` : 'add'} />
    <${Tile} href=${to('ms')} name="Mass peaks" empty=${!doc.ms.length}
      says=${doc.ms.length ? doc.ms.slice(0, 5).map((peak) => peak.mz).join(', ') + (doc.ms.length > 5 ? ' …' : '') : 'add'} />
    <${Tile} href=${to('analysis')} name="Combustion" empty=${!found.length}
      says=${found.length ? found.map(([element, text]) => `${element} ${text}`).join(', ') : 'add'} />
  </div><//>`;
}
