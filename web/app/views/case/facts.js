import { html } from 'htm/preact';
import { Formula } from '../../components/chem.js';
import { useSeconds } from '../../components/use-seconds.js';
import { engineState } from '../../state/engine.js';
import { checkingSince, stopCheck } from '../../state/check.js';
import { offline } from '../../state/offline.js';
import { address } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed, plural } from '../../words/numbers.js';
import { Waking } from '../cases/whisper.js';

/** @typedef {import('../../types').FormulaFacts} FormulaFacts */

/** What is always true of the sample; a tap goes to what it is about. @param {{ doc: import('../../types').CaseDoc }} props */
export function FactsLine({ doc }) {
  const text = doc.formula.trim();
  const { value, fault } = useAnswer('formula', text ? { text } : null, { delay: 150 });
  const facts = /** @type {FormulaFacts | null} */ (value);
  return html`<div class="facts">
    <a class="facts-link" href=${address('case', doc.id, 'readings', 'formula')}>
      ${text ? html`<b><${Formula} text=${facts?.formula ?? text} /></b>` : html`<span>no formula yet</span>`}
      ${facts && html`<span>${fixed(facts.exact_mass, 3)}</span>
        <span>${plural(facts.dbe, 'unsaturation')}</span>`}
      ${fault && html`<span>cannot be read</span>`}
    </a>
    <span class="facts-state" role="status"><${State} /></span>
  </div>`;
}

function State() {
  if (engineState.value === 'waking') return html`<${Waking} />`;
  if (engineState.value === 'failed') return 'no chemistry';
  if (checkingSince.value) return html`<${Weighing} since=${checkingSince.value} />`;
  if (offline.value === 'fetching') return html`<b>not yet ready offline</b>`;
  return offline.value === 'ready' ? 'offline' : '';
}

/** @param {{ since: number }} props */
function Weighing({ since }) {
  const seconds = useSeconds(since);
  return html`<span class="weighing">weighing${seconds >= 1 ? `, ${seconds} s` : ''}</span>
    ${seconds >= 2 && html`<button type="button" class="link-button" onClick=${stopCheck}>stop</button>`}`;
}
