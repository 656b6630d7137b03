import { html } from 'htm/preact';
import { Formula, Words } from '../../components/chem.js';
import { Trouble } from '../../components/parts.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed, toNumber } from '../../words/numbers.js';
import { dashed } from '../../words/readings.js';

/** @typedef {import('../../types').Prediction} Prediction */

const IONS_SHOWN = 8;

/** The question for a structure's expectations at the case's own field and solvent.
 * @param {import('../../types').CaseDoc} doc @param {string} smiles */
export const predictQuestion = (doc, smiles) => ({ smiles, ...(doc.solvent && { solvent: doc.solvent }),
  ...(toNumber(doc.mhz) > 0 && { mhz: toNumber(doc.mhz) }), ...(doc.irMedium && { medium: doc.irMedium }) });

/** Expected values, a line each; a tap lights the atoms.
 * @param {{ doc: import('../../types').CaseDoc, structure: import('../../types').Candidate, onLight: (atoms: number[]) => void }} props */
export function Predicted({ doc, structure, onLight }) {
  const { value, fault } = useAnswer('predict', predictQuestion(doc, structure.smiles));
  const predicted = /** @type {Prediction | null} */ (value);
  if (fault) return html`<${Trouble} fault=${fault} />`;
  if (!predicted) return html`<p class="whisper">working it out</p>`;
  return html`<h3><sup>1</sup>H</h3><ul
    class="picks">${[...predicted.h1].sort((a, b) => b.ppm - a.ppm).map((group, i) => html`<li key=${i}>
      <button type="button" class="pick"
        onClick=${() => onLight(group.atoms)}><b>${fixed(group.ppm, 2)} ± ${fixed(group.sd, 2)}</b>
        <span>${group.mult}${group.j.length ? html` <i>J</i> ${group.j.map((j) => fixed(j, 1)).join(', ')}` : ''}</span>
        <span>${group.n} H${group.exchangeable ? ', exchanges' : ''}</span></button></li>`)}</ul>
    <h3><sup>13</sup>C</h3><ul
      class="picks">${[...predicted.c13].sort((a, b) => b.ppm - a.ppm).map((group, i) => html`<li key=${i}>
      <button type="button" class="pick"
        onClick=${() => onLight(group.atoms)}><b>${fixed(group.ppm, 1)} ± ${fixed(group.sd, 1)}</b>
        <span><${Formula} text=${group.kind} /></span><span>${group.n} C</span></button></li>`)}</ul>
    <h3>IR</h3><ul class="picks">${[...predicted.ir].sort((a, b) => b.hi - a.hi).map((band, i) => html`<li key=${i}>
      <button type="button" class="pick pick-wide"
        onClick=${() => onLight(band.atoms ?? [])}><b>${dashed(`${Math.round(band.hi)}-${Math.round(band.lo)}`)}</b>
        <span><${Words} text=${band.group} /><span class="source"><${Words}
          text=${band.mode} />, ${band.strength}${band.absence_counts ? ', must show' : ''}</span></span></button></li>`)}</ul>
    <${Ions} ions=${predicted.ms.ions ?? []} onLight=${onLight} />`;
}

/** Ions to look for, likeliest first. @param {{ ions: import('../../types').MassExpectation[], onLight: (atoms: number[]) => void }} props */
function Ions({ ions, onLight }) {
  if (!ions.length) return null;
  return html`<h3>Electron ionisation</h3><ul
    class="picks">${[...ions].sort((a, b) => b.weight - a.weight).slice(0, IONS_SHOWN).map((ion, i) => html`<li
      key=${i}>
    <button type="button" class="pick pick-wide"
      onClick=${() => onLight(ion.atoms)}><b>${fixed(ion.mz, 3)}</b><span><${Words}
        text=${ion.label} /></span></button></li>`)}</ul>`;
}
