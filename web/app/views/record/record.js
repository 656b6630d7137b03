import { html } from 'htm/preact';
import { Formula, Words } from '../../components/chem.js';
import { StructureDrawing } from '../../components/structure-drawing.js';
import { Caution, Section } from '../../components/parts.js';
import { Sheet } from '../../components/sheet.js';
import { Sign } from '../../components/sign.js';
import { currentCheck } from '../../state/check.js';
import { address } from '../../state/route.js';
import { say } from '../../state/toast.js';
import { signed } from '../../words/numbers.js';
import { letterOf, structureName } from '../../words/structures.js';
import { amountLines, RecordedAmounts, useAmounts } from '../amounts/answer.js';
import { VerdictLine } from '../tally/verdict-line.js';
import { Rows } from '../tally/rows.js';
import { rowsOf } from '../tally/row-data.js';
import { touchedAt } from '../tally/touched.js';
import { accountText, readingLines } from './account.js';
import { copyText, download, shareText } from './send.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** The account of a case: to read, print, share, keep. @param {{ doc: CaseDoc }} props */
export function Record({ doc }) {
  const { found } = currentCheck.value;
  const amounts = useAmounts(doc);
  const text = () => accountText(doc, found, amounts ? amountLines(doc, amounts) : []);
  const file = () => download(`${doc.title || 'case'}.json`, JSON.stringify(doc, null, 1), 'application/json');
  const foot = html`<div class="record-foot">
    <button type="button" class="button" onClick=${() => window.print()}>Print</button>
    <button type="button" class="button"
      onClick=${() => shareText(doc.title, text()).catch(() => say('Nothing was shared.'))}>Share</button>
    <button type="button" class="button"
      onClick=${() => copyText(text()).then(() => say('Copied as text'), () => say('This browser refused to copy.'))}>Copy</button>
    <button type="button" class="button" onClick=${file}>Export</button></div>`;
  return html`<div class="frame frame-sheet record"><${Sheet} title="Record" back=${address('case', doc.id, 'tally')}
    foot=${foot}>
    <h2 class="record-title">${doc.title}</h2>
    <p class="whisper">last changed ${new Date(doc.changed).toLocaleString()}</p>
    ${doc.invented && html`<${Caution}>Invented example: the values are made up.<//>`}
    ${found && html`<${VerdictLine} doc=${doc} found=${found} />`}
    <${Section} title="Readings"><ul class="plain-list">${readingLines(doc).map((line) => html`<li
      key=${line}><span><${Words} text=${line} /></span></li>`)}</ul><//>
    <${Section} title="Structures"><ul class="record-structures">${doc.structures.map((entry) => {
      const at = found ? found.order.indexOf(entry.id) : -1;
      const candidate = found?.answer.candidates[at];
      return html`<li key=${entry.id}><${StructureDrawing} structure=${entry} label=${entry.name} size="card" />
        <p><b>${letterOf(doc, entry.id)}${entry.name && `, ${entry.name}`}${entry.id === doc.intended ? ', intended' : ''}</b> <${Formula} text=${entry.formula} />
          ${candidate && html` <${Sign} verdict=${candidate.verdict}
            size=${18} /> ${signed(candidate.weight_db)} decibans`}</p></li>`;
    })}</ul><//>
    ${found && html`<${Section} title="For and against ${structureName(doc, found, touchedAt(doc, found))}">
      <${Rows} doc=${doc} rows=${rowsOf(doc, found, touchedAt(doc, found))} at=${touchedAt(doc, found)} /><//>`}
    <${RecordedAmounts} doc=${doc} />
    <p class="whisper">Weights of evidence, not proof. Each 10 decibans is ten times as likely.</p>
  <//></div>`;
}
