import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { Formula } from '../../components/chem.js';
import { StructureDrawing } from '../../components/structure-drawing.js';
import { Icon } from '../../components/icon.js';
import { Sign } from '../../components/sign.js';
import { changeWithUndo, copyCase, deleteCase } from '../../state/cases.js';
import { address } from '../../state/route.js';
import { kindsPresent } from '../../words/readings.js';
import { openDemo } from './demos.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** @param {{ doc: CaseDoc }} props */
function Line({ doc }) {
  const says = doc.last?.text || kindsPresent(doc) || 'no readings yet';
  const formula = doc.formula || lead(doc)?.formula;
  return html`${formula && html`<${Formula} text=${formula} /> · `}${says}${doc.invented && html` · <i>invented</i>`}`;
}

/** @param {CaseDoc} doc */
const lead = (doc) => doc.structures.find((entry) => entry.id === (doc.last?.lead || doc.intended)) ?? doc.structures[0];

/** @param {{ doc: CaseDoc }} props */
export function CaseRow({ doc }) {
  const [open, setOpen] = useState(false);
  const drawn = lead(doc);
  const verdict = doc.last?.verdict ?? 'none';
  return html`<li class="case-row">
    <a class="case-link" href=${address('case', doc.id, doc.last ? 'tally' : 'readings')}>
      <span class="thumb">${drawn && html`<${StructureDrawing} structure=${drawn} label="" size="thumb" />`}</span>
      <span class="case-words"><b>${doc.title || 'Untitled'}</b><span class="case-line"><${Line}
        doc=${doc} /></span></span>
      <${Sign} verdict=${verdict} size=${24} />
    </a>
    <button type="button" class="row-menu" aria-label="More for ${doc.title}" aria-expanded=${String(open)}
      onClick=${() => setOpen(!open)}><${Icon} name="menu" /></button>
    ${open && html`<${RowActions} doc=${doc} done=${() => setOpen(false)} />`}
  </li>`;
}

/** @param {{ doc: CaseDoc, done: () => void }} props */
function RowActions({ doc, done }) {
  const [renaming, setRenaming] = useState(false);
  const rename = (/** @type {any} */ event) => {
    event.preventDefault();
    const title = new FormData(event.currentTarget).get('title');
    changeWithUndo(doc.id, 'Renamed', (draft) => { draft.title = String(title).trim(); });
    done();
  };
  if (renaming) {
    return html`<form class="row-actions" onSubmit=${rename}>
      <input class="text-field" name="title" aria-label="Name of the case" value=${doc.title} autocomplete="off" />
      <button class="button">Keep this name</button>
    </form>`;
  }
  return html`<div class="row-actions">
    <button type="button" class="button" onClick=${() => setRenaming(true)}>Rename</button>
    <button type="button" class="button" onClick=${() => { copyCase(doc); done(); }}>Copy</button>
    <button type="button" class="button" onClick=${() => deleteCase(doc)}>Delete</button>
  </div>`;
}

/** @param {{ demo: import('./demos.js').Demo }} props */
export function DemoRow({ demo }) {
  return html`<li class="case-row">
    <button type="button" class="case-link" onClick=${() => openDemo(demo.file)}>
      <span class="thumb"><img src="./demo/${demo.file.replace('.json', '.svg')}" alt="" /></span>
      <span class="case-words"><b>${demo.title}</b><span class="case-line">${demo.kinds}</span></span>
      <${Sign} verdict="none" size=${24} />
    </button>
  </li>`;
}
