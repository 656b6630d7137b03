import { html } from 'htm/preact';
import { takeBack, toast } from '../state/toast.js';

export function Toast() {
  const now = toast.value;
  return html`<div class="toast-place" role="status">
    ${now && html`<div class="toast"><span>${now.text}</span>
      ${now.undo && html`<button type="button" onClick=${takeBack}>Undo</button>`}</div>`}
  </div>`;
}
