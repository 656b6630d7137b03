import { html } from 'htm/preact';
import { Trouble } from '../../components/parts.js';
import { checkAgain, checkFault } from '../../state/check.js';

/** Why the readings could not be weighed, with the mend and another try. */
export function CheckTrouble() {
  const fault = checkFault.value;
  if (!fault) return null;
  return html`<div class="check-trouble"><${Trouble} fault=${fault} />
    <button type="button" class="button" onClick=${checkAgain}>Weigh again</button></div>`;
}
