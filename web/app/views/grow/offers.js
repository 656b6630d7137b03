import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Formula } from '../../components/chem.js';
import { Icon } from '../../components/icon.js';
import { wide } from '../../state/screen.js';

/** @typedef {import('./types').Option} Option */
/** @typedef {import('./types').Place} Place */
/** @typedef {(option: Option) => void} Take */

/** Groups shown before "more", by the room there is. */
const AT_ONCE = { narrow: 8, wide: 20 };

/** Tabs of either kind of place: name, and the steps offered under it. @type {Record<Place['kind'], [string, string[]][]>} */
const TABS = {
  atom: [['Attach', ['set_stereo', 'attach']], ['Element', ['change_element']]],
  bond: [['Order', ['set_order', 'set_double_bond']], ['Between', ['insert']], ['Ring', ['fuse_ring']]],
};
/** Steps that stand on a button of their own. @type {Record<string, string>} */
const DIRECT = { join: 'Join', remove: 'Remove', cut: 'Cut' };

/** Pieces of a condensed formula between which a line may break: "CH2", "CH", "(CH3)2". */
const PIECES = /\([^)]*\)\d*|[^(A-Z]*[A-Z][a-z]?[^(A-Z]*|.+/g;

/** What a group would do to the formula, for those who do not see the chip. */
const FITS = { completes: ', completes the formula', exceeds: ', more than the formula holds', fits: '', '': '' };

/** A chip's words: groups and elements as formulas, the rest as said. @param {{ option: Option }} props */
export function OptionText({ option: { label, step } }) {
  if (step !== 'attach' && step !== 'insert') return label;
  return html`${label.match(PIECES)?.map((piece, i) => html`<span class="grow-piece" key=${i}><${Formula} text=${piece} /></span>`)}`;
}

/** @param {{ option: Option, onTake: Take, busy: boolean }} props */
export function OptionChip({ option, onTake, busy }) {
  const completes = option.fit === 'completes';
  return html`<button type="button" class="chip grow-chip ${option.fit === 'exceeds' ? 'grow-exceeds' : ''}" aria-disabled=${String(busy)}
    aria-label="${option.step === 'attach' ? `attach ${option.name}` : option.name}${FITS[option.fit]}" onClick=${() => onTake(option)}>
    <span><${OptionText} option=${option} /></span>${completes && html`<${Icon} name="check" size=${18} />`}</button>`;
}

/** What can be done at the touched place: tabs, and under the open one its chips, most likely first.
 * @param {{ place: Place, options: Option[], busy: boolean, onTake: Take, onMore: () => void }} props */
export function Offers({ place, options, busy, onTake, onMore }) {
  const [wanted, setWanted] = useState('');
  const tabs = TABS[place.kind].map(([name, steps]) => ({ name, held: options.filter(({ step }) => steps.includes(step)) }));
  const open = tabs.find(({ name, held }) => name === wanted && held.length) ?? tabs.find(({ held }) => held.length);
  const direct = options.filter(({ step }) => step in DIRECT);
  return html`<div class="grow-tabs">
      ${tabs.map(({ name, held }) => html`<button type="button" class="chip grow-tab" key=${name} aria-pressed=${String(open?.name === name)} disabled=${!held.length}
        onClick=${() => setWanted(name)}>${name}</button>`)}
      ${direct.map((option) => html`<button type="button" class="button grow-direct" key=${option.step} aria-label=${option.name} aria-disabled=${String(busy)}
        onClick=${() => onTake(option)}>${DIRECT[option.step]}</button>`)}
    </div>
    <div class="grow-chips" key=${`${place.kind} ${place.at} ${open?.name}`}>${open && html`<${Held} held=${open.held} busy=${busy} onTake=${onTake} onMore=${onMore} />`}</div>`;
}

/** @param {{ held: Option[], busy: boolean, onTake: Take, onMore: () => void }} props */
function Held({ held, busy, onTake, onMore }) {
  const groups = held.filter(({ step }) => step === 'attach');
  const room = wide.value ? AT_ONCE.wide : AT_ONCE.narrow;
  const rest = held.filter(({ step }) => step !== 'attach');
  const chip = (/** @type {Option} */ option) => html`<${OptionChip} key=${option.step + option.label} option=${option} busy=${busy} onTake=${onTake} />`;
  return html`${rest.length > 0 && html`<div class="chips ${rest.length > 6 ? 'chips-4' : 'chips-3'}">${rest.map(chip)}</div>`}
    ${groups.length > 0 && html`<div class="chips chips-3">${groups.slice(0, room).map(chip)}
      ${groups.length > room && html`<button type="button" class="chip grow-chip" onClick=${onMore}>more</button>`}</div>`}`;
}
