import { html } from 'htm/preact';
import { growthOf, turnBack } from './growth.js';

/** Undo and redo at the two corners, and what the growing is for between them.
 * @param {{ id: string, label: string, onUse: (() => void) | null }} props */
export function Corners({ id, label, onUse }) {
  const { steps, at } = growthOf(id);
  return html`<div class="grow-corners">
    <button type="button" class="button" disabled=${at === 0} onClick=${() => turnBack(id, -1)}>Undo</button>
    <button type="button" class="button primary" disabled=${!onUse} onClick=${onUse}>${label}</button>
    <button type="button" class="button" disabled=${at >= steps.length - 1} onClick=${() => turnBack(id, 1)}>Redo</button>
  </div>`;
}
