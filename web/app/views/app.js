import { html } from 'htm/preact';
import { Guard } from '../components/guard.js';
import { Toast } from '../components/toast.js';
import { casesLoaded, storeTrouble } from '../state/cases.js';
import { current } from '../state/check.js';
import { caseId, path } from '../state/route.js';
import { CaseFrame } from './case/frame.js';
import { CaseList } from './cases/list.js';
import { Notices } from './cases/notices.js';
import { Amounts } from './amounts/amounts.js';
import { Record } from './record/record.js';

function Screen() {
  if (!casesLoaded.value) return html`<main class="page" aria-busy="true"></main>`;
  const doc = current.value;
  if (!caseId.value) return html`<${CaseList} />`;
  if (!doc) return html`<${Missing} />`;
  if (path.value[2] === 'amounts') return html`<${Amounts} doc=${doc} />`;
  return path.value[2] === 'record' ? html`<${Record} doc=${doc} />` : html`<${CaseFrame} doc=${doc} key=${doc.id} />`;
}

const Missing = () => html`<main class="page">
  <h1>This case is not on this device</h1>
  <p>It may have been deleted, or its address belongs to another phone. <a href="#/">All cases</a></p>
</main>`;

/** Hatching for what speaks against, used by every bar of the page. */
const Hatch = () => html`<svg class="hidden" width="0" height="0" aria-hidden="true"><defs>
  <pattern id="hatch" width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
    <path class="hatch-line" d="M1.2 0V6" /></pattern></defs></svg>`;

export function App() {
  return html`<${Hatch} /><${Notices} />
    ${storeTrouble.value && html`<p class="loud"
      role="alert">${storeTrouble.value} Export the case before closing this page.</p>`}
    <${Guard} at=${path.value.join('/')}><${Screen} /><//><${Toast} />`;
}
