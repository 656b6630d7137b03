import { html } from 'htm/preact';
import { addCase } from '../../state/cases.js';
import { mended, newId } from '../../state/document.js';
import { engineState } from '../../state/engine.js';
import { go } from '../../state/route.js';
import { say } from '../../state/toast.js';

/** Bring in a case file written by Record. @param {File | undefined} file */
export async function importCase(file) {
  if (!file) return;
  try {
    const doc = JSON.parse(await file.text());
    if (doc?.kind !== 'hoodside-case') throw new Error('it is no case file; export one from Record');
    go('case', addCase(mended({ ...doc, id: newId(), photos: [] })).id, 'readings');
  } catch (error) {
    say(`${file.name} was not taken in: ${error instanceof Error ? error.message : error}.`);
  }
}

/** @param {{ close: () => void }} props */
export function ListMenu({ close }) {
  const pick = (/** @type {any} */ event) => { importCase(event.currentTarget.files?.[0]); close(); };
  return html`<div class="menu">
    <label class="button file-button">Open a case file<input type="file" onChange=${pick} /></label>
    <p class="whisper">Verdicts are weights of evidence, not proof. Hazard notes are reminders: local rules, the supplier's
      safety sheet and licensed practice come first. ${engineState.value === 'ready' ? 'The chemistry is ready.' : ''}</p>
  </div>`;
}
