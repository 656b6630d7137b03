import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { Sign } from '../../components/sign.js';
import { weighedFor } from '../../state/scout.js';
import { plural } from '../../words/numbers.js';
import { sentence } from '../../words/verdict.js';

/** What the engine says of a structure put up alone. */
const ALONE = /^It stands alone\b.*?(\.|$)/;

/** The verdict as a sentence with its sign.
 * @param {{ doc: import('../../types').CaseDoc, found: import('../../state/check.js').Checked }} props */
export function VerdictLine({ doc, found }) {
  const { verdict, word, rest: said } = sentence(doc, found);
  const weighed = weighedFor(doc);
  // Its look-alikes were weighed on another call than the check.
  const rest = weighed ? said.replace(ALONE, `None of ${plural(weighed, 'look-alike')} weighed beside it comes near.`) : said;
  return html`<p class="verdict" role="status"><${Sign} verdict=${verdict} size=${26} quiet />
    <span><b>${word}</b> <${Words} text=${rest} /></span></p>`;
}
