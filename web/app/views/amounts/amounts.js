import { html } from 'htm/preact';
import { Chips, Section, Trouble } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { address, go, path } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed } from '../../words/numbers.js';
import { LineLink } from '../readings/mass-section.js';
import { Answer } from './answer.js';
import { addPortion, amountsAddress, setAmounts } from './change.js';
import { KINDS, kindOf } from './kinds.js';
import { PortionSheet } from './portion-sheet.js';
import { amountsOf, amountsQuestion, integralOf, lacks, portionName, portionsOf } from './question.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('./types').Role} Role */

/** Standard uncertainty of an integral, per cent; '' leaves it to the engine's table. */
const ERRORS = [{ value: '', text: 'routine' }, { value: '1', text: '1 %' }, { value: '2', text: '2 %' }, { value: '5', text: '5 %' }];
const EQUIVALENTS = ['1', '2', '0.5'].map((value) => ({ value, text: value }));

/** Ratio, conversion, yield, purity, solvent left: opens from the case bar, kept with the case. @param {{ doc: CaseDoc }} props */
export function Amounts({ doc }) {
  const [role = '', portion = ''] = path.value.slice(3);
  return html`<div class="frame frame-sheet amounts">${portion ? html`<${PortionSheet} key=${portion} doc=${doc} roleKey=${role} id=${portion} />`
    : html`<${Overview} doc=${doc} />`}</div>`;
}

/** @param {{ doc: CaseDoc }} props */
function Overview({ doc }) {
  const amounts = amountsOf(doc);
  const { kind, says, roles } = kindOf(amounts.kind);
  const { params, lacking } = amountsQuestion(doc);
  const { value, fault } = useAnswer('amounts', params, { delay: 120 });
  const signals = roles.some((role) => role.signals);
  return html`<${Sheet} title="Amounts" back=${address('case', doc.id, 'tally')}>
    <${Chips} label="What is asked" class="chips-amounts" optional=${false} value=${kind} options=${KINDS.map((entry) => ({ value: entry.kind, text: entry.name }))}
      onPick=${(/** @type {any} */ chosen) => setAmounts(doc.id, { kind: chosen })} />
    <p class="hint">${says}</p>
    ${roles.map((role) => html`<${Portions} key=${role.key} doc=${doc} role=${role} />`)}
    ${kind === 'yield' && html`<${Chips} label="Product per limiting reagent, mol" heading class="chips-3" optional=${false} value=${amounts.stoichiometry || '1'} options=${EQUIVALENTS}
      onPick=${(/** @type {string} */ stoichiometry) => setAmounts(doc.id, { stoichiometry })} />`}
    ${signals && html`<${Chips} label="Integrals are good to" heading class="chips-4" optional=${false} value=${amounts.percent} options=${ERRORS}
      onPick=${(/** @type {string} */ percent) => setAmounts(doc.id, { percent })} />`}
    ${lacking ? html`<p class="lead lacking" role="status">${lacking}</p>` : html`<${Trouble} fault=${fault} />${value && !fault && html`<${Answer} answer=${/** @type {any} */ (value)} />`}`}
  <//>`;
}

/** Who plays a part. @param {{ doc: CaseDoc, role: Role }} props */
function Portions({ doc, role }) {
  const portions = portionsOf(doc, role.key);
  const add = () => go('case', doc.id, 'amounts', role.key, addPortion(doc.id, role.key));
  const title = role.several ? role.many : role.one.charAt(0).toUpperCase() + role.one.slice(1);
  return html`<${Section} title=${title}>
    ${portions.map((portion, i) => html`<${LineLink} key=${portion.id} href=${amountsAddress(doc, role.key, portion.id)}
      name=${portionName(portion, role, i)} says=${said(doc, portion, role)} empty=${Boolean(lacks(doc, portion, role))} />`)}
    ${(role.several || !portions.length) && html`<button type="button" class="button" onClick=${add}>${portions.length ? `Another ${role.one}` : `Say which ${role.one}`}</button>`}
  <//>`;
}

/** What is known of a portion, in few words. @param {CaseDoc} doc @param {import('../../types').Portion} portion @param {Role} role */
function said(doc, portion, role) {
  const missing = lacks(doc, portion, role);
  if (missing) return `needs ${missing}`;
  const integrals = portion.signals.map((signal) => Number(integralOf(doc, signal).replace(',', '.')));
  return [role.mass && `${portion.mass} mg`, role.signals && integrals.map((integral, i) => (role.solvent ? fixed(integral, 2) : `${fixed(integral, 2)} / ${portion.signals[i]?.protons} H`)).join(', ')].filter(Boolean).join('; ');
}
