import { html } from 'htm/preact';
import { engineState, engineTrouble } from '../../state/engine.js';
import { takeUpdate } from '../../state/offline.js';

/** Lines above everything: a new version waits, or the chemistry could not start. */
export function Notices() {
  return html`${takeUpdate.value && html`<div class="notice" role="status">
      <span>A new version is ready. What you typed is kept.</span>
      <button type="button" onClick=${() => takeUpdate.value?.()}>Update now</button>
    </div>`}
    ${engineState.value === 'failed' && html`<div class="loud" role="alert">
      <span><b>The chemistry did not start.</b> ${engineTrouble.value} You can go on typing: it is kept.</span>
      <button type="button" onClick=${() => location.reload()}>Start again</button>
    </div>`}`;
}
