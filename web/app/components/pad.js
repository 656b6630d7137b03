import { html } from 'htm/preact';
import { Icon } from './icon.js';

/** The pad types into the field that had the focus last, so a gloved thumb never has to hit both. */
/** @type {HTMLInputElement | null} */
let target = null;

const fields = () => /** @type {HTMLInputElement[]} */ ([...document.querySelectorAll('input[data-pad]')]);

function field() {
  if (!target?.isConnected) target = fields()[0] ?? null;
  return target;
}

/** @param {HTMLInputElement} input */
const announce = (input) => input.dispatchEvent(new Event('input', { bubbles: true }));

/** @param {string} text */
function type(text) {
  const input = field();
  if (!input) return;
  const at = input.selectionStart ?? input.value.length;
  input.setRangeText(text, at, input.selectionEnd ?? at, 'end');
  announce(input);
}

function erase() {
  const input = field();
  if (!input) return;
  const end = input.selectionEnd ?? input.value.length;
  const start = input.selectionStart ?? end;
  input.setRangeText('', start === end ? Math.max(0, start - 1) : start, end, 'end');
  announce(input);
}

function flipSign() {
  const input = field();
  if (!input) return;
  input.value = input.value.startsWith('-') ? input.value.slice(1) : `-${input.value}`;
  announce(input);
}

/** To the next empty field; when none is left, `done`. @param {(() => void) | undefined} done */
export function nextField(done) {
  const all = fields();
  const from = Math.max(0, all.indexOf(/** @type {HTMLInputElement} */ (target)));
  const empty = [...all.slice(from + 1), ...all.slice(0, from)].find((input) => !input.value.trim());
  if (empty) empty.focus();
  else done?.();
}

/** @param {string} key @param {(() => void) | undefined} done */
function press(key, done) {
  if (key === 'erase') erase();
  else if (key === '±') flipSign();
  else if (key === 'next') nextField(done);
  else type(key === '–' ? '-' : key === 'J' ? ', ' : key);
}

/** @type {Record<string, string>} */
const SPOKEN = { erase: 'erase', '±': 'change the sign', '–': 'to, for a range', '.': 'decimal point', J: 'another J' };

/** @param {{ name: string, done?: () => void, text?: any, extra?: string }} props */
function Key({ name, done, text, extra = '' }) {
  return html`<button type="button" class="key ${extra}" aria-label=${SPOKEN[name]}
    onPointerDown=${(/** @type {Event} */ event) => event.preventDefault()} onClick=${() => press(name, done)}>
    ${text ?? name}</button>`;
}

/** The number pad. `side` is the key above *next*, `corner` the one right of the point; '' leaves it out.
 * @param {{ done: () => void, next?: string, side?: string, corner?: string }} props */
export function NumberPad({ done, next = 'next', side = '', corner = '' }) {
  const digits = ['7', '8', '9', '4', '5', '6', '1', '2', '3', '0', '.'];
  return html`<div class="pad" role="group" aria-label="Number pad">
    <div class="pad-digits">
      ${digits.map((name) => html`<${Key} key=${name}
        name=${name} extra=${name === '0' && !corner ? 'key-wide' : ''} />`)}
      ${corner && html`<${Key} name=${corner} text=${corner === 'J' ? '+ J' : undefined} />`}
    </div>
    <div class="pad-side ${side ? '' : 'pad-side-two'}">
      <${Key} name="erase" text=${html`<${Icon} name="erase" size=${28} />`} />
      ${side && html`<${Key} name=${side} text=${side === 'J' ? '+ J' : undefined} />`}
      <${Key} name="next" text=${next} done=${done} extra="key-next" />
    </div>
  </div>`;
}

/** The pad for formulas: elements and figures. @param {{ done: () => void, onLetters: () => void }} props */
export function FormulaPad({ done, onLetters }) {
  const keys = ['C', 'H', 'N', 'O', 'S', '7', '8', '9', 'F', 'Cl', '4', '5', '6', 'Br', 'I', '1', '2', '3', 'P', 'Si', '0'];
  return html`<div class="pad pad-formula" role="group" aria-label="Formula pad">
    ${keys.map((name) => html`<${Key} key=${name} name=${name} extra=${/\d/.test(name) ? '' : 'key-letter'} />`)}
    <button type="button" class="key key-letter" onPointerDown=${(/** @type {Event} */ e) => e.preventDefault()}
      onClick=${onLetters}>abc</button>
    <${Key} name="erase" text=${html`<${Icon} name="erase" size=${28} />`} />
    <${Key} name="next" text="done" done=${done} extra="key-next key-wide" />
  </div>`;
}

/** A field the pad types into. `inputmode` none keeps the system keyboard away; a real keyboard still works.
 * @param {{ label: any, name: string, value: string, unit?: any, onInput: (text: string) => void, big?: boolean,
 *   first?: boolean, fault?: string, letters?: boolean, onEnter?: () => void }} props */
export function PadField({ label, name, value, unit, onInput, big = true, first, fault, letters, onEnter }) {
  const onKeyDown = (/** @type {KeyboardEvent} */ event) => {
    if (event.key === 'Enter') { event.preventDefault(); nextField(onEnter); }
  };
  return html`<label class="pad-field ${big ? '' : 'pad-field-small'} ${fault ? 'pad-field-wrong' : ''}">
    <span class="pad-label">${label}</span>
    <span class="pad-value">
      <input data-pad name=${name} type="text" inputmode=${letters ? 'text' : 'none'} autocomplete="off"
        autocapitalize="off" spellcheck=${false} value=${value} size="1" aria-invalid=${fault ? 'true' : undefined}
        ref=${(/** @type {HTMLInputElement | null} */ el) => { if (el && first && !el.dataset.met) { el.dataset.met = '1'; el.focus(); } }}
        onFocus=${(/** @type {any} */ event) => { target = event.currentTarget; }}
        onInput=${(/** @type {any} */ event) => onInput(event.currentTarget.value)} onKeyDown=${onKeyDown} />
      ${unit && html`<span class="pad-unit">${unit}</span>`}
    </span>
    ${fault && html`<span class="trouble" role="alert">${fault}</span>`}
  </label>`;
}
