import { html } from 'htm/preact';
import { useMemo, useState } from 'preact/hooks';
import { Words } from '../../components/chem.js';
import { Drawing } from '../../components/drawing.js';
import { Icon } from '../../components/icon.js';
import { Chips, Trouble } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { Working } from '../../components/working.js';
import { currentCheck } from '../../state/check.js';
import { useLongAnswer } from '../../state/long-answer.js';
import { address, swap } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed, toNumber } from '../../words/numbers.js';
import { nameOf, structureName } from '../../words/structures.js';
import { CaseSign } from '../case/sign.js';
import { predictQuestion } from '../structures/predicted.js';
import { measured } from '../tally/axis.js';
import { touchedAt } from '../tally/touched.js';
import { FitToLines, typedSignals, useFit } from './fit.js';
import { groupAt, groupsOf, groupWords, isFirstOrder, orderWords, summary } from './groups.js';
import { Plot } from './plot.js';
import { Tree } from './tree.js';
import { zoomed } from './view.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('./types').Trace} Trace */
/** @typedef {import('./types').TracedGroup} TracedGroup */

/** Fields people have: permanent magnets on the bench, and superconducting ones, MHz. */
const FIELDS = ['43', '60', '80', '100', '300', '400', '500', '600'];
const USUAL_MHZ = '400';
/** A touched group fills this part of the view when one goes to it. */
const FILLS = 3;
/** How much taller a trace can be drawn, so that small lines come up beside a singlet. */
const GAINS = [1, 4, 16];

/** Which structure is traced: the touched one of the tally, else the intended one. @param {CaseDoc} doc */
function subject(doc) {
  const { found } = currentCheck.value;
  const at = found ? touchedAt(doc, found) : -1;
  const candidate = found?.answer.candidates[at];
  if (found && candidate) return { smiles: candidate.smiles, name: structureName(doc, found, at) };
  const own = doc.structures.find(({ id }) => id === doc.intended) ?? doc.structures[0];
  return { smiles: own?.smiles ?? '', name: own ? nameOf(doc, own.id) : '' };
}

/** What a structure would look like at any field, under what was measured. @param {{ doc: CaseDoc, mhz: string }} props */
export function TraceSheet({ doc, mhz }) {
  const { smiles, name } = subject(doc);
  const own = toNumber(doc.mhz) > 0 ? String(toNumber(doc.mhz)) : '';
  const field = toNumber(mhz) > 0 ? mhz : own || USUAL_MHZ;
  const asked = smiles ? { smiles, ...(doc.solvent && { solvent: doc.solvent }), mhz: toNumber(field) } : null;
  const { value, fault, since, stopped, current, stop, again } = useLongAnswer('trace', asked);
  const back = address('case', doc.id, 'tally');
  const fields = [...new Set([...FIELDS, own].filter(Boolean))].sort((a, b) => Number(a) - Number(b));
  return html`<${Sheet} title="Trace of ${name || 'a structure'}" back=${back} class="trace-sheet" sign=${html`<${CaseSign} doc=${doc} />`}>
    <${Chips} label="What would it look like at, MHz" heading class="chips-fields" optional=${false} value=${field}
      onPick=${(/** @type {string} */ chosen) => swap('case', doc.id, 'tally', 'trace', chosen)}
      options=${fields.map((text) => ({ value: text, text, name: `${text} MHz${text === own ? ', the field of this case' : ''}` }))} />
    <${Working} since=${since} words="working out ${field} MHz" stop=${stop} />
    <${Trouble} fault=${fault} />
    ${stopped && html`<button type="button" class="button" onClick=${again}>Work it out after all</button>`}
    ${!smiles && html`<p class="hint">Put up a structure first; its trace is drawn here.</p>`}
    ${value && html`<${Traced} key=${smiles} doc=${doc} smiles=${smiles} name=${name} trace=${/** @type {Trace} */ (value)} fresh=${current} />`}
  <//>`;
}

/** @param {{ doc: CaseDoc, smiles: string, name: string, trace: Trace, fresh: boolean }} props */
function Traced({ doc, smiles, name, trace, fresh }) {
  const { found } = currentCheck.value;
  const { value } = useAnswer('predict', { ...predictQuestion(doc, smiles), mhz: trace.mhz });
  const groups = useMemo(() => groupsOf(trace, /** @type {any} */ (value)?.h1 ?? []), [trace, value]);
  const sticks = found ? measured(doc, found) : [];
  const whole = wholeOf(trace, sticks);
  const [asked, setView] = useState(/** @type {import('./view.js').View | null} */ (null));
  const [at, setAt] = useState(-1);
  const [gain, setGain] = useState(1);
  const [signalId, setSignal] = useState('');
  const typed = trace.mhz === toNumber(doc.mhz) ? typedSignals(doc) : [];
  const signal = typed.find(({ id }) => id === signalId) ?? null;
  const fit = useFit(doc, smiles, signal);
  const fitted = signal && fit.current ? /** @type {import('./types').Fitted} */ (fit.value) : null;
  const choose = (/** @type {string} */ id) => {
    setSignal(id);
    const lines = typed.find((entry) => entry.id === id)?.lines.map(({ ppm }) => ppm);
    if (lines) setView(zoomed({ hi: Math.max(...lines) + 0.02, lo: Math.min(...lines) - 0.02 }, 1 / FILLS, whole));
  };
  const view = asked ?? whole;
  const group = groups.find((entry) => entry.at === at) ?? null;
  const step = (/** @type {number} */ by) => {
    const next = groups[group ? groups.indexOf(group) + by : 0];
    if (next) { setAt(next.at); if (asked) setView(closeTo(next, whole)); }
  };
  return html`<div class="traced ${fresh ? '' : 'stale'}" aria-busy=${String(!fresh)}>
    <${Plot} trace=${trace} sticks=${sticks} typed=${typed} fitted=${fitted} gain=${gain} group=${group} view=${view} whole=${whole} setView=${setView}
      words=${summary(trace, groups)} onTap=${(/** @type {number} */ ppm) => setAt(groupAt(groups, ppm)?.at ?? -1)} />
    <div class="steps">
      <button type="button" class="step" aria-label="Group before" disabled=${!group || groups.indexOf(group) === 0} onClick=${() => step(-1)}><${Icon} name="left" /></button>
      <p aria-live="polite">${group ? html`<b>${fixed(group.ppm, 2)}</b> group ${groups.indexOf(group) + 1} of ${groups.length}` : 'tap lines, or step through the groups'}</p>
      <button type="button" class="step" aria-label=${group ? 'Group after' : 'First group'} disabled=${group === groups.at(-1)} onClick=${() => step(1)}><${Icon} name="right" /></button>
    </div>
    <div class="trace-looks">
      ${group && html`<button type="button" class="button" onClick=${() => setView(closeTo(group, whole))}>Look at it closely</button>`}
      <button type="button" class="button" onClick=${() => setGain(GAINS[(GAINS.indexOf(gain) + 1) % GAINS.length] ?? 1)}>${gain === GAINS.at(-1) ? 'As tall as before' : 'Draw it taller'}</button>
    </div>
    <${FitToLines} signals=${typed} chosen=${signal} onChoose=${choose} answer=${fit} groups=${groups} onPick=${setAt} />
    <div class="traced-words">
      <${Drawing} structure=${smiles} atoms=${group?.atoms ?? []} label="Drawing of ${name}${group ? ', atoms of the group lit' : ''}" width=${354} height=${200} class="drawing-traced" />
      ${group && html`<${GroupWords} group=${group} mhz=${trace.mhz} />`}
    </div>
    <${Doubt} trace=${trace} />
  </div>`;
}

/** Pattern and J, and the tree where first-order rules hold. @param {{ group: TracedGroup, mhz: number }} props */
function GroupWords({ group, mhz }) {
  const order = orderWords(group, mhz);
  return html`<div class="group-words">
    <p class="lead"><${Words} text=${groupWords(group)} /></p>
    ${order && html`<p class="hint">${order}</p>`}
    ${isFirstOrder(group) && html`<${Tree} mult=${group.mult} j=${group.j} />`}</div>`;
}

/** What the simulation leaves open. @param {{ trace: Trace }} props */
function Doubt({ trace }) {
  const clustered = trace.systems.filter(({ method }) => method !== 'exact');
  const worst = Math.max(0, ...clustered.map((system) => system.error_hz));
  return html`<p class="whisper">Shifts and J are predictions; their spread is in the words of each group. Line width 1 Hz, exchanging H 12 Hz; the tallest
    line in view fills the height. ${clustered.length ? `Large spin systems are worked out in clusters: a line may be off by ${fixed(worst, worst < 0.1 ? 2 : 1)} Hz.` : 'All spin systems are worked out exactly.'}</p>`;
}

/** All of the trace and of what was measured. @param {Trace} trace @param {import('../tally/axis.js').Stick[]} sticks */
function wholeOf(trace, sticks) {
  const to = trace.from_ppm + trace.step_ppm * (trace.heights.length - 1);
  return { lo: Math.min(trace.from_ppm, ...sticks.map(({ lo }) => lo - 0.2)), hi: Math.max(to, ...sticks.map(({ hi }) => hi + 0.2)) };
}

/** A view that one group fills. @param {TracedGroup} group @param {import('./view.js').View} whole */
const closeTo = (group, whole) => zoomed({ hi: group.hi + 0.02, lo: group.lo - 0.02 }, 1 / FILLS, whole);
