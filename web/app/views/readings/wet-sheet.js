import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { Caution, Section } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase } from '../../state/cases.js';
import { newId } from '../../state/document.js';
import { address } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { CaseSign } from '../case/sign.js';
import { WET_GROUPS } from './wet-tests.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** Bench tests: pick one, say how it came out. @param {{ doc: CaseDoc, test: string }} props */
export function WetSheet({ doc, test }) {
  const back = test ? address('case', doc.id, 'readings', 'wet') : address('case', doc.id, 'readings');
  if (test) return html`<${Sheet} title=${html`<${Words} text=${test} />`} back=${back} sign=${html`<${CaseSign}
    doc=${doc} />`}><${OneTest} doc=${doc} test=${test} /><//>`;
  return html`<${Sheet} title="Wet tests" back=${back} sign=${html`<${CaseSign} doc=${doc} />`}>
    <${Caution}>These use a few milligrams and still burn, stain or poison. Local rules and the supplier's safety sheet come first.<//>
    ${WET_GROUPS.map((group) => html`<${Section} title=${group.name} key=${group.name}>
      <div class="chips chips-flow">${group.tests.map((name) => {
        const known = doc.wet.find((row) => row.test === name);
        return html`<a class="chip" key=${name} href=${address('case', doc.id, 'readings', 'wet', name)}><${Words}
          text=${name} />${known ? html` <b>${known.result === 'positive' ? '+' : '\u2212'}</b>` : ''}</a>`;
      })}</div><//>`)}
  <//>`;
}

/** @param {{ doc: CaseDoc, test: string }} props */
function OneTest({ doc, test }) {
  const { value } = useAnswer('wet_tests', {});
  const facts = /** @type {any} */ (value)?.tests?.find((/** @type {any} */ entry) => entry.test === test);
  const known = doc.wet.find((row) => row.test === test);
  const mark = (/** @type {'positive' | 'negative'} */ result) => changeCase(doc.id, (draft) => {
    draft.wet = draft.wet.filter((row) => row.test !== test);
    if (known?.result !== result) draft.wet.push({ id: newId(), test, result });
  });
  return html`${facts && html`<p class="lead"><${Words} text=${facts.tells} /></p>
      <p class="hint">Positive looks like this: ${facts.observation}.</p>`}
    <div class="two-up">
      <button type="button" class="toggle tall" aria-pressed=${String(known?.result === 'positive')}
        onClick=${() => mark('positive')}>Positive</button>
      <button type="button" class="toggle tall" aria-pressed=${String(known?.result === 'negative')}
        onClick=${() => mark('negative')}>Negative</button>
    </div>
    ${facts && html`<${Caution}>${sentenceCase(facts.hazards)}. Local rules and the supplier's safety sheet come first.<//>
      <${Section} title="It can mislead"><p class="hint">${sentenceCase(facts.false_results)}.</p><p
        class="source">${facts.source}</p><//>`}`;
}

/** @param {string} text */
const sentenceCase = (text) => text.charAt(0).toUpperCase() + text.slice(1);
