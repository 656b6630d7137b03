import { html } from 'htm/preact';
import { Words } from '../../components/chem.js';
import { Sign } from '../../components/sign.js';
import { weighedFor } from '../../state/scout.js';
import { plural } from '../../words/numbers.js';
import { isLookAlike } from '../../words/structures.js';
import { sentence } from '../../words/verdict.js';

/** What the engine says of a structure put up alone. */
const ALONE = /^It stands alone\b.*?(\.|$)/;

/** The verdict as a sentence with its sign.
 * @param {{ doc: import('../../types').CaseDoc, found: import('../../state/check.js').Checked }} props */
export function VerdictLine({ doc, found }) {
  const { verdict, word, rest: said } = sentence(doc, found);
  const rest = verdict === 'fits' ? withLookAlikes(said, found.answer.candidates.some(isLookAlike) ? 0 : weighedFor(doc)) : said;
  return html`<p class="verdict" role="status"><${Sign} verdict=${verdict} size=${26} quiet />
    <span><b>${word}</b> <${Words} text=${rest} /></span></p>`;
}

/** Look-alikes are weighed on another call than the check, so its sentence does not know of them.
 * @param {string} said @param {number} weighed */
function withLookAlikes(said, weighed) {
  if (!weighed) return said;
  const none = `None of ${plural(weighed, 'look-alike')} weighed beside it comes near.`;
  return ALONE.test(said) ? said.replace(ALONE, none) : `${said} ${none}`;
}
