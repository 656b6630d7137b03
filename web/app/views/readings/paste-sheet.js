import { html } from 'htm/preact';
import { signal } from '@preact/signals';
import { Chips, Section, Trouble } from '../../components/parts.js';
import { Words } from '../../components/chem.js';
import { Sheet } from '../../components/sheet.js';
import { changeWithUndo } from '../../state/cases.js';
import { address, go } from '../../state/route.js';
import { canReadClipboard } from '../../state/screen.js';
import { useAnswer } from '../../state/use-answer.js';
import { plural } from '../../words/numbers.js';
import { collides, countOf, takeOver } from './take-over.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Parsed} Parsed */

/** What is being pasted, kept while the sheet is closed and opened again. */
export const pasted = signal('');
const how = signal('add');

/** A report line: typed or pasted, shown as it was understood, taken over only then. @param {{ doc: CaseDoc }} props */
export function PasteSheet({ doc }) {
  const text = pasted.value;
  const { value, fault, busy } = useAnswer('parse', text.trim() ? { text } : null, { delay: 300 });
  const parsed = /** @type {Parsed | null} */ (text.trim() ? value : null);
  const count = parsed ? countOf(parsed.readings) : 0;
  const take = () => {
    if (!parsed) return;
    changeWithUndo(doc.id, `${plural(count, 'reading')} taken over`, (draft) => takeOver(draft, parsed.readings, how.value === 'replace'));
    pasted.value = '';
    go('case', doc.id, 'readings');
  };
  const fromClipboard = async () => { pasted.value = await navigator.clipboard.readText(); };
  const foot = html`${parsed && collides(doc, parsed.readings) && html`<${Chips} label="With what is there"
    class="chips-2" optional=${false}
      value=${how.value} options=${[{ value: 'add', text: 'add to what is there' }, { value: 'replace', text: 'replace it' }]}
      onPick=${(/** @type {string} */ choice) => { how.value = choice; }} />`}
    <button type="button" class="button primary" disabled=${!count || busy} onClick=${take}>
      ${count ? `Take over ${plural(count, 'reading')}` : 'Take over'}</button>`;
  return html`<${Sheet} title="Paste a report line" back=${address('case', doc.id, 'readings')} foot=${foot}>
    <textarea class="paste-box" rows="5" aria-label="Report line" spellcheck=${false} value=${text} autocapitalize="off"
      placeholder="1H NMR (400 MHz, CDCl3) δ 7.90 (d, J = 8.4 Hz, 2H), …" onInput=${(/** @type {any} */ e) => { pasted.value = e.currentTarget.value; }}></textarea>
    <div class="two-up">
      ${canReadClipboard && html`<button type="button" class="button"
        onClick=${() => fromClipboard().catch(() => {})}>From the clipboard</button>`}
      <button type="button" class="button" disabled=${!text}
        onClick=${() => { pasted.value = ''; }}>Empty the box</button>
    </div>
    <${Trouble} fault=${fault} />
    <div aria-live="polite" aria-busy=${String(busy)}>
      ${parsed ? html`<${Understood} parsed=${parsed} />`
        : html`<p class="hint">Several lines at once are fine: ¹H, ¹³C, IR, HRMS, Anal. Nothing is taken over before you have seen what was understood.</p>`}
    </div>
  <//>`;
}

/** @param {{ parsed: Parsed }} props */
function Understood({ parsed }) {
  const warnings = /** @type {string[]} */ (parsed.readings?.warnings ?? []);
  return html`${parsed.unread.length > 0 && html`<${Section} title="Not understood" aside=${parsed.unread.length}
    class="unread">
      <ul class="pieces">${parsed.unread.slice(0, 50).map((piece) => html`<li class="piece piece-unread"
        key=${piece.start}>
        <q>${shorten(piece.text)}</q><span>${piece.why}</span></li>`)}</ul>
      ${parsed.unread.length > 50 && html`<p class="hint">and ${parsed.unread.length - 50} more</p>`}<//>`}
    ${warnings.map((warning) => html`<p class="hint" key=${warning}>${warning}</p>`)}
    <${Section} title="Understood" aside=${plural(parsed.pieces.length, 'piece')}>
      <ul class="pieces">${parsed.pieces.slice(0, 200).map((piece) => html`<li class="piece" key=${piece.start}>
        <q>${shorten(piece.text)}</q><span><${Words} text=${piece.means} /></span></li>`)}</ul>
    <//>`;
}

/** @param {string} text */
const shorten = (text) => (text.length > 160 ? `${text.slice(0, 150)} …` : text);
