import { html } from 'htm/preact';
import { address, STATIONS } from '../../state/route.js';
import { currentCheck } from '../../state/check.js';

const NAMES = { readings: 'Readings', structures: 'Structures', tally: 'Tally', next: 'Next' };

/** The four stations at the thumb; a dot where something waits.
 * @param {{ doc: import('../../types').CaseDoc, active: string[] }} props */
export function Stations({ doc, active }) {
  const waits = currentCheck.value.found?.answer.next.length ?? 0;
  return html`<nav class="stations" aria-label="Stations">
    ${STATIONS.map((name) => html`<a key=${name} href=${address('case', doc.id, name)}
      aria-current=${active.includes(name) ? 'page' : undefined}>${NAMES[name]}
      ${name === 'next' && waits > 0 && html`<i class="dot"></i><span
        class="hidden">, ${waits} ${waits === 1 ? 'suggestion' : 'suggestions'}</span>`}</a>`)}
  </nav>`;
}
