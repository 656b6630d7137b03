import { html } from 'htm/preact';
import { Formula, Words } from '../../components/chem.js';
import { Icon } from '../../components/icon.js';
import { Section } from '../../components/parts.js';
import { address } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { nextStep, recent, runOf, said, stepsOf, textOf, toggleConditions, toggleReagent } from './runs.js';

/** @typedef {import('./types').Conditions} Conditions */

const PROPOSED = 6;

/** The reagents of the tables, and conditions met most often.
 * @returns {{ reagents: import('./types').Reagent[], usual: Conditions[] }} */
export function useReagents() {
  const { value } = useAnswer('reagents', {});
  return /** @type {any} */ (value) ?? { reagents: [], usual: [] };
}

/** A reagent's name with its figures lowered. @param {{ text: string }} props */
export const ReagentName = ({ text }) => html`<span>${/^[A-Z][A-Za-z0-9()[\]/.-]*$/.test(text) && /\d/.test(text)
  ? html`<${Formula} text=${text} />` : html`<${Words} text=${text} />`}</span>`;

/** What was added: the chosen reagents step by step, then conditions to take with one tap, those used last first.
 * @param {{ id: string }} props */
export function Added({ id }) {
  const { reagents, usual } = useReagents();
  const { steps } = runOf(id);
  const now = textOf(steps);
  const known = usual.map(({ reagents: text }) => textOf(stepsOf(text)));
  const texts = [...new Set([...recent.value, ...known])].filter((text) => text !== now).slice(0, PROPOSED);
  const label = (/** @type {string} */ text) => usual.find((entry) => textOf(stepsOf(entry.reagents)) === text)?.label ?? said(text);
  const search = html`<a class="link-button run-search" href=${address('case', id, 'structures', 'run', 'reagents')}>Search ${reagents.length || ''}</a>`;
  return html`<${Section} title="Added" aside=${search} class="run-added">
    <div class="chips chips-flow ${now ? 'run-line' : ''}" role="group" aria-label="Added so far, and conditions to take with one tap">
      ${now && html`<${Chosen} id=${id} steps=${steps} />`}
      ${texts.map((text) => html`<button type="button" class="chip" key=${text} onClick=${() => toggleConditions(id, text)}><${ReagentName} text=${label(text)} /></button>`)}</div><//>`;
}

/** The reagents chosen; a tap takes one out again. @param {{ id: string, steps: string[][] }} props */
export function Chosen({ id, steps }) {
  const open = steps.at(-1)?.length === 0;
  return html`${steps.map((step, i) => html`${i > 0 && html`<span class="run-then" key=${`then ${i}`}>then</span>`}
      ${step.map((name) => html`<button type="button" class="chip" key=${name} aria-pressed="true" aria-label="${name}: take it out" onClick=${() => toggleReagent(id, name)}>
        <${ReagentName} text=${name} /></button>`)}`)}
    ${open ? html`<a class="chip run-next" href=${address('case', id, 'structures', 'run', 'reagents')}>what?</a>`
      : html`<button type="button" class="chip run-next" aria-label="Then, in a step of its own" onClick=${() => nextStep(id)}><${Icon} name="plus" size=${18} />then</button>`}`;
}
