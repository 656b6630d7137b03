import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Section } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { address, go } from '../../state/route.js';
import { Chosen, ReagentName, useReagents } from './added.js';
import { runOf, toggleConditions, toggleReagent, textOf, stepsOf } from './runs.js';

/** All reagents the tables know, found by any of their names, or typed as one likes.
 * @param {{ doc: import('../../types').CaseDoc }} props */
export function ReagentsSheet({ doc }) {
  const [sought, setSought] = useState('');
  const { reagents, usual } = useReagents();
  const { steps } = runOf(doc.id);
  const plain = sought.trim().toLowerCase();
  const found = reagents.filter(({ names }) => names.some((name) => name.toLowerCase().includes(plain)));
  const whole = usual.filter(({ label, reagents: text }) => `${label} ${text}`.toLowerCase().includes(plain));
  const shelves = [...new Set(found.map(({ shelf }) => shelf))];
  const exact = found.some(({ names }) => names.some((name) => name.toLowerCase() === plain));
  const chosen = (/** @type {string[]} */ names) => names.find((name) => steps.some((step) => step.includes(name)));
  const add = () => {
    const typed = stepsOf(sought);
    if (typed.length > 1) toggleConditions(doc.id, sought);
    else typed.flat().filter((name) => !steps.flat().includes(name)).forEach((name) => toggleReagent(doc.id, name));
    setSought('');
  };
  const back = ['case', doc.id, 'structures', 'run'];
  return html`<${Sheet} title="What was added?" back=${address(...back)} class="run-reagents"
      foot=${html`${steps.flat().length > 0 && html`<div class="chips chips-flow" role="group" aria-label="Added so far"><${Chosen} id=${doc.id} steps=${steps} /></div>`}
        <button type="button" class="button primary" onClick=${() => go(...back)}>${steps.flat().length ? 'Done' : 'Back to the step'}</button>`}>
    <input class="text-field search" type="text" inputmode="search" aria-label="Reagents" placeholder="name, abbreviation, or a list of them" autocomplete="off" autocapitalize="off"
      spellcheck=${false} value=${sought} onInput=${(/** @type {any} */ e) => setSought(e.currentTarget.value)} onKeyDown=${(/** @type {any} */ e) => e.key === 'Enter' && plain && add()} />
    ${plain && !exact && html`<button type="button" class="button" onClick=${add}>Add “${sought.trim()}” as typed</button>`}
    ${whole.length > 0 && html`<${Section} title="Usual conditions"><div class="chips chips-flow">${whole.map(({ label, reagents: text, partner }) => html`<button type="button" class="chip" key=${label}
      aria-pressed=${String(textOf(steps) === textOf(stepsOf(text)))} onClick=${() => toggleConditions(doc.id, text)}><span><${ReagentName} text=${label} />${partner && html`<small> + ${partner}</small>`}</span></button>`)}</div><//>`}
    ${shelves.map((shelf) => html`<${Section} title=${shelf} key=${shelf}><div class="chips chips-flow">${found.filter((entry) => entry.shelf === shelf).map(({ names }) => {
      const name = chosen(names) ?? names.find((other) => plain && other.toLowerCase().includes(plain)) ?? names[0] ?? '';
      return html`<button type="button" class="chip" key=${names[0]} aria-pressed=${String(Boolean(chosen(names)))} onClick=${() => toggleReagent(doc.id, name)}><${ReagentName} text=${name} /></button>`;
    })}</div><//>`)}
  <//>`;
}
