import { html } from 'htm/preact';
import { useEffect, useState } from 'preact/hooks';
import { Formula, Words } from '../../components/chem.js';
import { Drawing } from '../../components/drawing.js';
import { Chips, Section, Trouble } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { Sign } from '../../components/sign.js';
import { Working } from '../../components/working.js';
import { changeWithUndo } from '../../state/cases.js';
import { currentCheck } from '../../state/check.js';
import { newId } from '../../state/document.js';
import { ask } from '../../state/engine.js';
import { hunt, huntFurther, huntQuestion, hunts, stopHunt, wider } from '../../state/rivals.js';
import { address } from '../../state/route.js';
import { plural, signed } from '../../words/numbers.js';
import { nameOf } from '../../words/structures.js';
import { leadAt } from '../../words/verdict.js';
import { CaseSign } from '../case/sign.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Rival} Rival */
/** @typedef {import('../../state/rivals.js').Hunt} Hunt */
/** @typedef {import('../../state/rivals.js').Standing} Standing */

/** Decibans within which the engine calls a look-alike near: ten times as likely or unlikely. */
const NEAR_DB = 10;
const HOW = [{ value: 'allowed', text: 'the readings allow' }, { value: 'all', text: 'all look-alikes' }];

/** Look-alikes of the structure of the verdict: searched, weighed, kept or dismissed. Leaving the sheet stops the search;
 * coming back goes on with it. @param {{ doc: CaseDoc }} props */
export function RivalsSheet({ doc }) {
  const subject = subjectOf(doc);
  const smiles = subject?.smiles ?? '';
  const [which, setWhich] = useState('allowed');
  const question = smiles ? huntQuestion(doc, smiles, which === 'allowed') : null;
  const key = question ? JSON.stringify(question) : '';
  const found = hunts.value[doc.id];
  const current = found?.key === key ? found : null;
  const goOn = () => { if (question) hunt(doc.id, question); };
  useEffect(() => {
    const known = hunts.peek()[doc.id];
    if (key && (known?.key !== key || !(known.done || known.stopped || known.fault))) goOn();
    return () => stopHunt(doc.id, false);
  }, [key]);
  const name = subject ? nameOf(doc, subject.id) : '';
  return html`<${Sheet} title="What else would fit?" back=${address('case', doc.id, 'structures')} sign=${html`<${CaseSign} doc=${doc} />`} class="rivals-sheet">
    ${!subject && html`<p class="hint">Put up a structure first; its look-alikes are sought from there.</p>
      <a class="button" href=${address('case', doc.id, 'structures', 'proposals')}>What do the readings themselves say?</a>`}
    ${subject && html`<${Chips} label="Which to show" class="chips-2" optional=${false} value=${which} options=${HOW} onPick=${setWhich} />`}
    ${current && html`<${Working} since=${current.since} words=${progress(current)} stop=${() => stopHunt(doc.id, true)} />
      <${Trouble} fault=${current.fault} />
      ${!current.since && (current.stopped || current.fault) && html`<button type="button" class="button" onClick=${goOn}>${current.stopped ? `Stopped at ${current.weighed} weighed. Go on` : 'Try again'}</button>`}
      <div class="rivals-found" aria-busy=${String(current.since > 0)}><${Found} doc=${doc} name=${name} now=${current} /></div>
      ${wider(current) > 0 && question && html`<button type="button" class="button" onClick=${() => huntFurther(doc.id, question, wider(current))}>Look further, for the best ${wider(current)}</button>`}`}
  <//>`;
}

/** The structure whose look-alikes are sought. @param {CaseDoc} doc */
function subjectOf(doc) {
  const { found } = currentCheck.value;
  const lead = found ? found.order[leadAt(doc, found)] : '';
  return doc.structures.find(({ id }) => id === lead) ?? doc.structures.find(({ id }) => id === doc.intended) ?? doc.structures[0];
}

/** How far the search has come. @param {Hunt} now */
const progress = ({ weighed, limit, looked_at: looked }) => `${weighed} of up to ${limit} weighed, ${looked} looked at`;

/** @param {{ doc: CaseDoc, name: string, now: Hunt }} props */
function Found({ doc, name, now }) {
  const gone = new Set([...doc.structures.map(({ smiles }) => smiles), ...(doc.dismissed ?? [])]);
  const shown = now.rivals.filter(({ smiles }) => !gone.has(smiles));
  const own = now.structure;
  const near = shown.filter((rival) => rival.near).length;
  const dismissed = doc.dismissed?.length ?? 0;
  const recall = () => changeWithUndo(doc.id, 'Dismissed ones brought back', (draft) => { draft.dismissed = []; });
  if (!now.rivals.length) return now.done ? html`<p class="lead">The readings leave no look-alike of ${name} standing that a few moves reach.</p>` : null;
  return html`<p class="lead" aria-live=${now.since ? 'off' : 'polite'}>${own ? `${nearWords(near)} within ${NEAR_DB} decibans of ${name} (${signed(own.weight_db)}), or ahead.` : `${plural(shown.length, 'look-alike')} of ${name}.`}</p>
    ${now.note && html`<p class="hint">${now.note}</p>`}
    <${Section} title="Look-alikes" aside=${shown.length}>
      <ul class="rival-list">${shown.map((rival) => html`<${RivalRow} key=${rival.smiles} doc=${doc} rival=${rival} own=${own} />`)}</ul><//>
    ${dismissed > 0 && html`<button type="button" class="button" onClick=${recall}>Bring back ${plural(dismissed, 'dismissed one')}</button>`}`;
}

/** @param {number} near */
const nearWords = (near) => (near > 1 ? `${near} look-alikes stand` : near ? 'One look-alike stands' : 'No look-alike stands');

/** "7 behind" against the structure itself. @param {number} weight @param {Standing} own */
function distance(weight, own) {
  const by = Math.round(weight - own.weight_db);
  return by === 0 ? 'level with it' : `${Math.abs(by)} ${by > 0 ? 'ahead' : 'behind'}`;
}

/** One look-alike, dashed: how it was reached, how it stands and why, keep or dismiss.
 * @param {{ doc: CaseDoc, rival: Rival, own: Standing | null }} props */
function RivalRow({ doc, rival, own }) {
  const how = rival.how.join('; ');
  const { weight_db: weight, verdict, reason } = rival;
  const keep = async () => {
    const entry = await ask('describe', { structure: rival.smiles });
    changeWithUndo(doc.id, 'Kept as a structure', (draft) => {
      draft.structures.push({ id: newId(), source: rival.smiles, name: '', smiles: entry.smiles, formula: entry.formula, svg: entry.svg });
    });
  };
  const dismiss = () => changeWithUndo(doc.id, 'Dismissed', (draft) => { draft.dismissed = [...(draft.dismissed ?? []), rival.smiles]; });
  const other = doc.formula.trim() && rival.formula !== doc.formula.trim();
  return html`<li class="rival">
    <${Drawing} structure=${rival.smiles} label="Look-alike: ${how}" width=${150} height=${100} class="drawing-rival" />
    <div class="rival-words"><b>${weight === null ? 'not weighed' : html`<${Sign} verdict=${verdict} size=${20} /> ${signed(weight)}${own && `, ${distance(weight, own)}`}`}</b>
      <span><${Words} text=${how} /></span>${verdict === 'clashes' && html`<span class="rival-why"><${Words} text=${reason} /></span>`}${other && html`<span><${Formula} text=${rival.formula} /></span>`}</div>
    <div class="two-up"><button type="button" class="button" onClick=${keep}>Keep</button><button type="button" class="button quiet" onClick=${dismiss}>Dismiss</button></div>
  </li>`;
}
