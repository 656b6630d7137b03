import { html } from 'htm/preact';
import { address } from '../../state/route.js';
import { Section } from '../../components/parts.js';
import { currentCheck } from '../../state/check.js';
import { CheckTrouble } from '../readings/check-trouble.js';
import { hasReadings } from '../rivals/proposals-sheet.js';
import { isLookAlike } from '../../words/structures.js';
import { RivalCard, StructureCard } from './card.js';

/** The second station: what it could be. @param {{ doc: import('../../types').CaseDoc }} props */
export function Structures({ doc }) {
  const { found } = currentCheck.value;
  const rivals = (found?.answer.candidates ?? []).map((candidate, at) => ({ candidate, at })).filter(({ candidate, at }) => !found?.order[at] && !(isLookAlike(candidate) && candidate.verdict === 'clashes'));
  return html`<div class="structures">
    ${doc.structures.length === 0 && html`<p
      class="empty">Put up the structure you mean to have made, and what else it could be.
      A structure that fits says little until its look-alikes are ruled out.</p>`}
    ${doc.structures.length === 0 && hasReadings(doc) && html`<a class="button"
      href=${address('case', doc.id, 'structures', 'proposals')}>What do the readings themselves say?</a>`}
    <ul class="grid">
      ${doc.structures.map((entry) => html`<${StructureCard} key=${entry.id} doc=${doc} structure=${entry} />`)}
      ${rivals.map(({ candidate, at }) => html`<${RivalCard} key=${candidate.smiles} doc=${doc} candidate=${candidate}
        at=${at} />`)}
    </ul>
    <${CheckTrouble} />
    ${doc.structures.length > 0 && html`<a class="button" href=${address('case', doc.id, 'structures', 'rivals')}>What else would fit?</a>`}
    <${Section} title="Add a structure">
      <div class="two-up">
        <a class="button primary" href=${address('case', doc.id, 'structures', 'grow')}>Grow one</a>
        <a class="button primary" href=${address('case', doc.id, 'structures', 'run')}>What did you run?</a>
        <a class="button" href=${address('case', doc.id, 'structures', 'paste')}>Paste SMILES or CTfile</a>
        <a class="button" href=${address('case', doc.id, 'structures', 'name')}>By name</a>
        <a class="button" href=${address('case', doc.id, 'structures', 'scan')}>Scan a QR code</a>
      </div>
      ${doc.structures.length > 0 && hasReadings(doc) && html`<a class="button"
        href=${address('case', doc.id, 'structures', 'proposals')}>What the readings themselves say</a>`}
    <//>
  </div>`;
}
