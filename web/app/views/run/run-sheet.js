import { html } from 'htm/preact';
import { useEffect, useState } from 'preact/hooks';
import { Words } from '../../components/chem.js';
import { Icon } from '../../components/icon.js';
import { Section, Trouble } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { asFault } from '../../state/engine.js';
import { address } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { plural } from '../../words/numbers.js';
import { Added } from './added.js';
import { Changes } from './changes.js';
import { Cautions } from './cautions.js';
import { CompoundRow } from './compound.js';
import { OutcomeRow, proposed } from './outcomes.js';
import { changeRun, recallRun, runOf, textOf } from './runs.js';
import { takeOver } from './take-over.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('./types').Outcomes} Outcomes */
/** @typedef {import('./types').Run} Run */

/** What the step may have given, null until there is something to ask. @param {Run} run */
function useOutcomes({ start, partner, steps }) {
  const reagents = textOf(steps);
  const asked = start && reagents ? { structure: start.smiles, reagents, ...(partner && { partner: partner.smiles }) } : null;
  const { value, fault, busy } = useAnswer('outcomes', asked, { delay: 60 });
  return { found: /** @type {Outcomes | null} */ (asked && !fault ? value : null), fault, busy };
}

/** From what went in to what may have come out. @param {{ doc: CaseDoc }} props */
export function RunSheet({ doc }) {
  useEffect(() => { recallRun(doc.id); }, [doc.id]);
  const run = runOf(doc.id);
  const { found, fault, busy } = useOutcomes(run);
  const [refused, setRefused] = useState(/** @type {import('../../types').Fault | null} */ (null));
  const outcomes = found?.outcomes ?? [];
  const ticked = outcomes.map(({ smiles }, i) => run.ticks[smiles] ?? proposed(outcomes, i));
  const chosen = outcomes.filter((_, i) => ticked[i]);
  const take = () => takeOver(doc, run, chosen, found?.cautions ?? []).catch((error) => setRefused(asFault(error)));
  const foot = html`<button type="button" class="button primary" disabled=${!chosen.length || busy} onClick=${take}>
    ${chosen.length ? `Take ${chosen.length} as ${chosen.length === 1 ? 'a structure' : 'structures'}` : 'Nothing to take yet'}</button>`;
  return html`<${Sheet} title="What did you run?" back=${address('case', doc.id, 'structures')} class="run-sheet" foot=${foot}>
    <div class="run-asked"><${Asked} doc=${doc} run=${run} />
      ${found && html`<${Unread} found=${found} /><${Cautions} cautions=${found.cautions} without=${found.no_caution} />`}</div>
    <div class="run-found ${busy ? 'stale' : ''}" aria-busy=${String(busy)} aria-live="polite">
      <${Trouble} fault=${fault ?? refused} />
      ${found ? html`<${Section} title="What may be in the flask" aside=${outcomes.length > 1 ? plural(outcomes.length, 'compound') : ''}>
        ${found.no_step && html`<p class="trouble run-none" role="note"><${Words} text=${firstSentence(found.no_step)} />
          <span> <${Words} text=${found.no_step.slice(firstSentence(found.no_step).length)} /> A partner or a reagent may be missing.</span></p>`}
        <${List} doc=${doc} run=${run} outcomes=${outcomes} ticked=${ticked} /><//>
        <${TenSeconds} doc=${doc} run=${run} outcomes=${outcomes} />`
        : html`<p class="hint">${busy ? 'working it out' : run.start ? 'Tap what was added, and what may be in the flask comes up here.' : 'Choose what you started from, then what was added.'}</p>`}</div>
  <//>`;
}

/** @param {string} text */
const firstSentence = (text) => text.match(/^.*?\.(?= [A-Z]|$)/)?.[0] ?? text;

/** Start, partner, reagents. @param {{ doc: CaseDoc, run: Run }} props */
function Asked({ doc, run }) {
  const to = (/** @type {string} */ part) => address('case', doc.id, 'structures', 'run', part);
  const partner = html`<a class="run-partner" href=${to('partner')} aria-label="Add an organic partner"><${Icon} name="plus" size=${20} />partner</a>`;
  const start = run.start ? html`<${CompoundRow} compound=${run.start} what="start" href=${to('start')} action=${!run.partner && partner} />`
    : html`<a class="button primary" href=${to('start')}>What did you start from?</a>`;
  return html`${run.partner ? html`<div class="run-pair">${start}<${Icon} name="plus" size=${22} />
      <${CompoundRow} compound=${run.partner} what="partner" href=${to('partner')} /></div>` : start}
    <${Added} id=${doc.id} />`;
}

/** Pieces of the reagents no table knows. @param {{ found: Outcomes }} props */
const Unread = ({ found }) => found.unknown.length > 0 && html`<p class="trouble run-unread" role="alert">Not understood: ${found.unknown.join(', ')}.
  <span> The outcomes leave it out. Search for its name, or put it in as the partner.</span></p>`;

/** What to look for first, for the likeliest product. @param {{ doc: CaseDoc, run: Run, outcomes: import('./types').Outcome[] }} props */
function TenSeconds({ doc, run, outcomes }) {
  const [first] = outcomes;
  if (!first || first.role !== 'product' || !run.start) return null;
  return html`<${Section} title="Ten-second check" aside="start to product"><${Changes} doc=${doc} start=${run.start.smiles} product=${first.smiles} /><//>`;
}

/** @param {{ doc: CaseDoc, run: Run, outcomes: import('./types').Outcome[], ticked: boolean[] }} props */
function List({ doc, run, outcomes, ticked }) {
  const text = doc.formula.trim();
  const { value } = useAnswer('formula', text ? { text } : null);
  const formula = text ? /** @type {any} */ (value)?.formula ?? '' : '';
  return html`<ul class="run-outcomes">${outcomes.map((outcome, i) => html`<${OutcomeRow} key=${outcome.smiles} doc=${doc} start=${run.start?.smiles ?? ''} outcome=${outcome} formula=${formula}
    ticked=${Boolean(ticked[i])} onTick=${() => changeRun(doc.id, { ticks: { ...run.ticks, [outcome.smiles]: !ticked[i] } })} />`)}</ul>`;
}
