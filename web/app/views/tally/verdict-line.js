import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { Sign } from '../../components/sign.js';
import { sentence } from '../../words/verdict.js';

/** The verdict as a sentence with its sign.
 * @param {{ doc: import('../../types').CaseDoc, found: import('../../state/check.js').Checked }} props */
export function VerdictLine({ doc, found }) {
  const { verdict, word, rest } = sentence(doc, found);
  return html`<p class="verdict" role="status"><${Sign} verdict=${verdict} size=${26} quiet />
    <span><b>${word}</b> <${Words} text=${rest} /></span></p>`;
}
