import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Formula } from '../../components/chem.js';
import { Section, Trouble } from '../../components/parts.js';
import { FormulaPad, PadField } from '../../components/pad.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase } from '../../state/cases.js';
import { address, go } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed, plural } from '../../words/numbers.js';
import { CaseSign } from '../case/sign.js';
import { LineLink } from './mass-section.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').FormulaFacts} FormulaFacts */

/** The molecular formula, with mass, unsaturations and isotope pattern as it is typed. @param {{ doc: CaseDoc }} props */
export function FormulaSheet({ doc }) {
  const [letters, setLetters] = useState(false);
  const text = doc.formula.trim();
  const { value, fault } = useAnswer('formula', text ? { text } : null, { delay: 120 });
  const facts = /** @type {FormulaFacts | null} */ (fault ? null : value);
  const leave = () => go('case', doc.id, 'readings');
  return html`<${Sheet} title="Formula" back=${address('case', doc.id, 'readings')} class="entry-sheet"
      sign=${html`<${CaseSign} doc=${doc} />`} foot=${html`<${FormulaPad} done=${leave}
        onLetters=${() => setLetters(!letters)} />`}>
    <${PadField} key=${String(letters)} label="Molecular formula" name="formula"
      value=${doc.formula} first letters=${letters} onEnter=${leave}
      onInput=${(/** @type {string} */ formula) => changeCase(doc.id, (draft) => { draft.formula = formula; })} />
    <${Trouble} fault=${fault} />
    ${text && facts ? html`<${FactTable} facts=${facts} />`
      : !text && html`<p class="hint">Type it with the pad, or take it from an accurate mass.</p>`}
    <${LineLink} href=${address('case', doc.id, 'readings', 'hrms')}
      name="From an accurate mass" says=${doc.hrms.found || ''} />
  <//>`;
}

/** @param {{ facts: FormulaFacts }} props */
function FactTable({ facts }) {
  return html`<dl class="facts-table">
      <div><dt>reads as</dt><dd><${Formula} text=${facts.formula} /></dd></div>
      <div><dt>unsaturations</dt><dd>${facts.dbe}</dd></div>
      <div><dt>exact mass</dt><dd>${fixed(facts.exact_mass, 4)}</dd></div>
      <div><dt>molar mass</dt><dd>${fixed(facts.average_mass, 2)} g/mol</dd></div>
    </dl>
    ${facts.warnings.map((warning) => html`<p class="hint" key=${warning}>${warning}</p>`)}
    <${Isotopes} facts=${facts} />`;
}

/** @param {{ facts: FormulaFacts }} props */
function Isotopes({ facts }) {
  const top = facts.isotope_pattern.filter((line) => line.rel >= 0.5).slice(0, 6);
  if (top.length < 2) return null;
  return html`<${Section} title="Isotope pattern" aside=${plural(top.length, 'line')}>
    <table class="plain-table"><tbody>${top.map((line) => html`<tr key=${line.mz}><td>${fixed(line.mz, 4)}</td>
      <td><svg class="rel-bar" viewBox="0 0 100 8" preserveAspectRatio="none" aria-hidden="true"><path
        d="M0 4H${line.rel}" /></svg></td><td>${fixed(line.rel, 1)} %</td></tr>`)}</tbody></table>
  <//>`;
}
