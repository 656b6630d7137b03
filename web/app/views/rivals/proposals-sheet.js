import { html } from 'htm/preact';
import { Formula, Words } from '../../components/chem.js';
import { Drawing } from '../../components/drawing.js';
import { Section, Trouble } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { Sign } from '../../components/sign.js';
import { Working } from '../../components/working.js';
import { changeWithUndo } from '../../state/cases.js';
import { newId } from '../../state/document.js';
import { ask } from '../../state/engine.js';
import { checkInput } from '../../state/input.js';
import { useLongAnswer } from '../../state/long-answer.js';
import { address } from '../../state/route.js';
import { plural, signed } from '../../words/numbers.js';
import { readingLabel } from '../tally/row-data.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {{ fragment: string, times: number, weight_db: number, reason: string, readings: string[], source: string }} Fragment */
/** @typedef {{ smiles: string, weight_db: number, verdict: import('../../types').Verdict, reason: string }} Proposal */
/** @typedef {{ fragments: Fragment[], structures: Proposal[], complete: boolean, note: string }} Proposals */

const LIMIT = 12;
/** From here on a sign forces its fragment, decibans: ten times as likely with it as without. */
const FORCES_DB = 10;

/** Whether there is anything to ask about. @param {CaseDoc} doc */
export const hasReadings = (doc) => Object.keys(checkInput(doc).refs).length > 0;

/** What the readings say by themselves: fragments they force, and structures put together from them.
 * @param {{ doc: CaseDoc }} props */
export function ProposalsSheet({ doc }) {
  const { params, refs } = checkInput(doc);
  const asked = hasReadings(doc) ? { readings: params, limit: LIMIT } : null;
  const { value, fault, since, stopped, current, stop, again } = useLongAnswer('proposals', asked);
  const found = /** @type {Proposals | null} */ (current ? value : null);
  return html`<${Sheet} title="What do the readings say?" back=${address('case', doc.id, 'structures')} class="rivals-sheet">
    ${!asked && html`<p class="hint">Enter readings first: ¹H signals tell most, then ¹³C lines and IR bands.</p>
      <a class="button primary" href=${address('case', doc.id, 'readings')}>Enter readings</a>`}
    ${asked && html`<${Working} since=${since} words="putting structures together" stop=${stop} />`}
    <${Trouble} fault=${fault} />
    ${stopped && html`<button type="button" class="button" onClick=${again}>Stopped. Try again</button>`}
    ${found && html`<div class="rivals-found"><${Said} doc=${doc} refs=${refs} found=${found} /></div>`}
  <//>`;
}

/** @param {{ doc: CaseDoc, refs: Record<string, string>, found: Proposals }} props */
function Said({ doc, refs, found }) {
  const forced = found.fragments.filter((entry) => entry.weight_db >= FORCES_DB);
  const hinted = found.fragments.filter((entry) => entry.weight_db < FORCES_DB);
  const sources = [...new Set(found.fragments.flatMap(({ source }) => source.split('; ')).filter(Boolean))];
  const list = (/** @type {Fragment[]} */ entries) => html`<ul class="plain-list">${entries.map((entry, i) => html`<${FragmentRow}
    key=${i} doc=${doc} refs=${refs} entry=${entry} />`)}</ul>`;
  return html`<p class="lead" aria-live="polite">${lead(forced.length, found.structures)}</p>
    ${forced.length > 0 && html`<${Section} title="Forced by the readings" aside=${forced.length}>${list(forced)}<//>`}
    ${hinted.length > 0 && html`<${Section} title="Hints only" aside=${hinted.length}>${list(hinted)}<//>`}
    <${Structures} doc=${doc} found=${found} />
    ${!doc.formula.trim() && html`<a class="button" href=${address('case', doc.id, 'readings', 'formula')}>Give the formula</a>`}
    ${!found.structures.length && html`<a class="button" href=${address('case', doc.id, 'structures', 'grow')}>Grow a structure from here</a>`}
    ${sources.length > 0 && html`<${Section} title="Sources"><ul>${sources.map((source) => html`<li class="source" key=${source}>${source}</li>`)}</ul><//>`}`;
}

/** @param {number} forced @param {Proposal[]} structures */
function lead(forced, structures) {
  const fragments = forced ? `The readings force ${plural(forced, 'fragment')}.` : 'The readings force no fragment by themselves.';
  if (!structures.length) return `${fragments} No whole structure can be proposed.`;
  const stand = structures.filter(({ verdict }) => verdict !== 'clashes').length;
  if (!stand) return `${fragments} None of the structures put together from them suits the readings: one of the fragments or readings may mislead.`;
  return `${fragments} ${stand === 1 ? 'One whole structure suits' : `${stand} whole structures suit`} them.`;
}

/** A fragment with its weight, its reason and the readings it rests on.
 * @param {{ doc: CaseDoc, refs: Record<string, string>, entry: Fragment }} props */
function FragmentRow({ doc, refs, entry }) {
  const labels = entry.readings.map((ref) => readingLabel(doc, /** @type {any} */ ({ refs }), ref)).join('; ');
  return html`<li><span><b class="fragment"><${Words} text=${entry.times > 1 ? `${entry.times} × ${entry.fragment}` : entry.fragment} /></b>
      <span class="case-line"><${Words} text=${labels} /></span>
      <span class="source"><${Words} text=${entry.reason.replaceAll('cm-1', 'cm\u207b\u00b9')} /></span></span>
    <b><span class="hidden">decibans </span>${signed(entry.weight_db)}</b></li>`;
}

/** Whole structures, each taken over with one tap. @param {{ doc: CaseDoc, found: Proposals }} props */
function Structures({ doc, found }) {
  const known = new Set(doc.structures.map(({ source }) => source));
  const shown = found.structures.filter(({ smiles }) => !known.has(smiles));
  const take = async (/** @type {Proposal} */ { smiles }) => {
    const entry = await ask('describe', { structure: smiles });
    changeWithUndo(doc.id, 'Taken over as a structure', (draft) => {
      draft.structures.push({ id: newId(), source: smiles, name: '', smiles: entry.smiles, formula: entry.formula, svg: entry.svg });
    });
  };
  if (!shown.length) return found.note ? html`<p class="hint"><${Words} text=${found.note} /></p>` : null;
  return html`<${Section} title="Whole structures" aside=${shown.length}>
    <p class="hint"><${Words} text=${found.note} /> ${found.complete ? '' : 'The right one need not be among them.'}</p>
    <ul class="rival-list">${shown.map((proposal) => html`<li class="rival" key=${proposal.smiles}>
      <${Drawing} structure=${proposal.smiles} label="Proposed structure" width=${150} height=${100} class="drawing-rival" />
      <div class="rival-words"><b><${Sign} verdict=${proposal.verdict} size=${20} /> ${signed(proposal.weight_db)}</b>
        ${proposal.verdict !== 'fits' && html`<span class="rival-why"><${Words} text=${proposal.reason} /></span>`}</div>
      <button type="button" class="button rival-take" onClick=${() => take(proposal)}>Take over</button>
    </li>`)}</ul><//>`;
}
