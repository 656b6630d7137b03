import { html } from 'htm/preact';
import { Section } from '../../components/parts.js';
import { changeCase } from '../../state/cases.js';
import { newId } from '../../state/document.js';
import { address, go } from '../../state/route.js';
import { plural } from '../../words/numbers.js';
import { highFirst } from '../../words/readings.js';
import { useSolventName } from './solvent-lines.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** @param {CaseDoc} doc */
export function addLine(doc) {
  const id = newId();
  changeCase(doc.id, (draft) => { draft.c13.push({ id, ppm: '', kind: '', n: '' }); });
  go('case', doc.id, 'readings', 'c13', id);
}

/** @param {{ doc: CaseDoc }} props */
export function CarbonSection({ doc }) {
  const rows = highFirst(doc.c13, (row) => row.ppm);
  const solvent = useSolventName(doc, 'c13');
  return html`<${Section}
    title=${html`<sup>13</sup>C`} id="c13-head" aside=${rows.length ? plural(rows.length, 'line') : null}>
    <ul class="lines">${rows.map((row) => html`<li key=${row.id}>
      <a class="line-chip ${solvent(row) ? 'slip-solvent' : ''}"
        href=${address('case', doc.id, 'readings', 'c13', row.id)}>
        <b>${row.ppm || '?'}</b> <span>${solvent(row) ? 'solvent' : html`${row.kind}${Number(row.n) > 1 ? ` ×${row.n}` : ''}`}</span></a></li>`)}</ul>
    <button type="button" class="button" onClick=${() => addLine(doc)}>Add a line</button>
  <//>`;
}
