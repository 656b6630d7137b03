import { html } from 'htm/preact';
import { NumberPad, PadField } from '../../components/pad.js';
import { Chips, Section } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { go } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed, toNumber } from '../../words/numbers.js';
import { highFirst, protonLabel } from '../../words/readings.js';
import { nameOf } from '../../words/structures.js';
import { changePortion, amountsAddress, removePortion } from './change.js';
import { kindOf } from './kinds.js';
import { amountsOf, integralOf, portionName, portionsOf } from './question.js';
import { TableChips, useTables } from './table-chips.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Portion} Portion */
/** @typedef {import('./types').Role} Role */
/** @typedef {(edit: (portion: Portion) => void) => void} Change */

/** One species or weighed portion: what it is, its signals, its mass. @param {{ doc: CaseDoc, roleKey: string, id: string }} props */
export function PortionSheet({ doc, roleKey, id }) {
  const role = kindOf(amountsOf(doc).kind).roles.find((entry) => entry.key === roleKey);
  const all = portionsOf(doc, roleKey);
  const portion = all.find((entry) => entry.id === id);
  const back = amountsAddress(doc);
  if (!role || !portion) return html`<${Sheet} title="Amounts" back=${back}><p class="hint">This was removed.</p><//>`;
  const name = portionName(portion, role, all.indexOf(portion));
  /** @type {Change} */
  const change = (edit) => changePortion(doc.id, roleKey, id, edit);
  const leave = () => go('case', doc.id, 'amounts');
  const remove = () => { removePortion(doc.id, roleKey, portion, name); leave(); };
  return html`<${Sheet} title=${name} back=${back} class="entry-sheet" action=${html`<button type="button" class="bar-action" onClick=${remove}>Remove</button>`}
    foot=${html`<${NumberPad} done=${leave} next="next" />`}>
    ${role.solvent ? html`<${WhichSolvent} doc=${doc} portion=${portion} change=${change} />` : html`<${Who} doc=${doc} portion=${portion} role=${role} change=${change} />`}
    ${role.signals && html`<${Signals} doc=${doc} portion=${portion} role=${role} change=${change} />`}
    ${!role.solvent && html`<${Named} portion=${portion} change=${change} />`}
    ${role.mass && html`<${Mass} portion=${portion} role=${role} change=${change} />`}
  <//>`;
}

/** What may be left in it, with its signals in the solvent of the case.
 * @param {{ doc: CaseDoc, portion: Portion, change: Change }} props */
function WhichSolvent({ doc, portion, change }) {
  const entries = useTables(doc).residues.map(({ name, signals }) => ({ name, lines: signals.map(({ ppm }) => ppm) }));
  return html`<${TableChips} label="Solvent" entries=${entries} value=${portion.name} optional=${false}
    onPick=${(/** @type {string} */ name) => change((draft) => { draft.name = name; })} />`;
}

/** What the portion is: a structure of the case, or a usual standard.
 * @param {{ doc: CaseDoc, portion: Portion, role: Role, change: Change }} props */
function Who({ doc, portion, role, change }) {
  const pickStructure = (/** @type {string} */ id) => change((draft) => {
    Object.assign(draft, { structure: id, name: id ? nameOf(doc, id) : '', formula: doc.structures.find((entry) => entry.id === id)?.formula ?? '', molar: '' });
  });
  if (role.key === 'standard') return html`<${WhichStandard} doc=${doc} portion=${portion} change=${change} />`;
  return doc.structures.length > 0 && html`<${Chips} label="Which structure" heading class="chips-flow" value=${portion.structure}
    options=${doc.structures.map(({ id }) => ({ value: id, text: nameOf(doc, id) }))} onPick=${pickStructure} />`;
}

/** A standard brings its molar mass; where it shows and what it does not go with stands below.
 * @param {{ doc: CaseDoc, portion: Portion, change: Change }} props */
function WhichStandard({ doc, portion, change }) {
  const { standards } = useTables(doc);
  const chosen = standards.find(({ name }) => name === portion.name);
  const pick = (/** @type {string} */ name) => change((draft) => {
    const found = standards.find((entry) => entry.name === name);
    Object.assign(draft, { name, structure: '', formula: '', molar: found ? String(found.molar_mass) : '' });
  });
  return html`<${TableChips} label="Which standard" entries=${standards.map(({ name, signals }) => ({ name, lines: signals.map(({ ppm }) => ppm) }))}
      value=${portion.name} onPick=${pick} />
    ${chosen && html`<p class="whisper">δ ${chosen.signals.map(({ ppm, protons }) => `${fixed(ppm, 2)} (${protons}H)`).join(', ')}. ${chosen.notes}.
      <span class="source">${chosen.source}</span></p>`}`;
}

/** Its name, and its molar mass where no formula tells it. @param {{ portion: Portion, change: Change }} props */
function Named({ portion, change }) {
  const { value } = useAnswer('formula', portion.formula ? { text: portion.formula } : null);
  const known = portion.formula && value ? fixed(/** @type {any} */ (value).average_mass, 2) : '';
  return html`<label class="text-label">Call it<input class="text-field" autocomplete="off" value=${portion.name}
      onInput=${(/** @type {any} */ event) => { const name = event.currentTarget.value; change((draft) => { draft.name = name; }); }} /></label>
    <${PadField} label=${known ? `Molar mass, ${known} by the formula unless typed` : 'Molar mass'} name="molar" value=${portion.molar} unit="g/mol" big=${false}
      fault=${wrong(portion.molar, 'molar mass')} onInput=${(/** @type {string} */ molar) => change((draft) => { draft.molar = molar; })} />`;
}

/** @param {string} text @param {string} what */
const wrong = (text, what) => (text.trim() && !(toNumber(text) > 0) ? `${text} is no ${what}. Type a number above 0.` : '');

/** Signals that stand for the portion: tap them, then say how many H of it each holds.
 * @param {{ doc: CaseDoc, portion: Portion, role: Role, change: Change }} props */
function Signals({ doc, portion, role, change }) {
  const rows = highFirst(doc.h1, (row) => row.shift);
  const flip = (/** @type {import('../../types').ProtonRow} */ row) => change((draft) => {
    const has = draft.signals.some((signal) => signal.row === row.id);
    const fresh = { row: row.id, protons: '' };
    if (has) draft.signals = draft.signals.filter((signal) => signal.row !== row.id);
    else draft.signals = role.solvent ? [fresh] : [...draft.signals, fresh];
  });
  const set = (/** @type {number} */ at, /** @type {object} */ given) => change((draft) => { Object.assign(draft.signals[at] ?? {}, given); });
  if (!rows.length) return html`<p class="hint">This case has no 1H signals yet; enter them under Readings, with integrals.</p>`;
  return html`<${Section} title=${role.solvent ? 'Its signal' : 'Signals that stand for it'}>
    <div class="chips chips-flow">${rows.map((row) => html`<button type="button" class="chip" key=${row.id} aria-pressed=${String(portion.signals.some((signal) => signal.row === row.id))}
      onClick=${() => flip(row)}>${protonLabel(row)}</button>`)}</div>
    ${portion.signals.map((signal, i) => html`<div class="fields-2" key=${signal.row}>
      <${PadField} label="Integral of ${rows.find(({ id }) => id === signal.row)?.shift ?? 'the signal'}" name="integral-${i}" value=${integralOf(doc, signal)} fault=${wrong(integralOf(doc, signal), 'integral')}
        onInput=${(/** @type {string} */ integral) => set(i, { integral })} />
      ${!role.solvent && html`<${PadField} label="H of it in there" name="protons-${i}" value=${signal.protons} unit="H" fault=${wrong(signal.protons, 'number of H')}
        onInput=${(/** @type {string} */ protons) => set(i, { protons })} />`}</div>`)}
  <//>`;
}

/** Mass with its uncertainty, and purity. @param {{ portion: Portion, role: Role, change: Change }} props */
function Mass({ portion, role, change }) {
  const field = (/** @type {'mass' | 'u' | 'purity'} */ key, /** @type {string} */ label, /** @type {string} */ unit) => html`<${PadField} label=${label} name=${key} value=${portion[key]} unit=${unit}
    fault=${wrong(portion[key], 'number')} onInput=${(/** @type {string} */ text) => change((draft) => { draft[key] = text; })} />`;
  return html`<div class="fields-2">${field('mass', 'Mass', 'mg')}${field('u', 'Balance good to ±', 'mg')}
    ${role.key !== 'analyte' && field('purity', 'Its purity, 100 unless typed', '%')}</div>`;
}
