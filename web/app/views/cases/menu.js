import { html } from 'htm/preact';
import { addCase, ownCases } from '../../state/cases.js';
import { mended, newId } from '../../state/document.js';
import { engineState } from '../../state/engine.js';
import { go } from '../../state/route.js';
import { say } from '../../state/toast.js';
import { useAnswer } from '../../state/use-answer.js';
import { plural } from '../../words/numbers.js';
import { download } from '../record/send.js';

const ALL = 'hoodside-cases';

/** The cases in a file: one, or all that were exported together. @param {any} given @returns {any[]} */
function casesIn(given) {
  const found = given?.kind === ALL ? given.cases : [given];
  if (!Array.isArray(found) || !found.every((doc) => doc?.kind === 'hoodside-case')) {
    throw new Error('it is no case file; export one from Record');
  }
  return found;
}

/** Bring in a file of cases. Pictures stay on the device that took them. @param {File | undefined} file */
export async function importCase(file) {
  if (!file) return;
  try {
    const docs = casesIn(JSON.parse(await file.text())).map((doc) => addCase(mended({ ...doc, id: newId(), photos: [] })));
    if (docs.length === 1 && docs[0]) go('case', docs[0].id, 'readings');
    else say(`${plural(docs.length, 'case')} taken in.`);
  } catch (error) {
    say(`${file.name} was not taken in: ${error instanceof Error ? error.message : error}.`);
  }
}

const exportAll = () => download(`hoodside-cases-${new Date().toISOString().slice(0, 10)}.json`,
  JSON.stringify({ kind: ALL, cases: ownCases.value }, null, 1), 'application/json');

/** Only iPhones and iPads tell this, and only there does the system clear the storage of a mere tab. */
const inTabOfPhone = /** @type {any} */ (navigator).standalone === false;

/** @param {{ close: () => void }} props */
export function ListMenu({ close }) {
  const pick = (/** @type {any} */ event) => { importCase(event.currentTarget.files?.[0]); close(); };
  return html`<div class="menu">
    <label class="button file-button">Open a case file<input type="file" onChange=${pick} /></label>
    ${ownCases.value.length > 0 && html`<button type="button" class="button"
      onClick=${exportAll}>Export all cases</button>`}
    ${inTabOfPhone && html`<p>Share, then Add to Home Screen: otherwise the system may clear the cases after a week without use.</p>`}
    <p class="whisper">Verdicts are weights of evidence, not proof. Hazard notes are reminders: local rules, the supplier's
      safety sheet and licensed practice come first.</p>
    <${Versions} />
  </div>`;
}

function Versions() {
  const { value } = useAnswer('about', {});
  const about = /** @type {any} */ (value);
  if (engineState.value === 'waking') return html`<p class="whisper">The chemistry is waking.</p>`;
  return about && html`<p
    class="whisper">Engine ${about.version}, RDKit ${about.kernel_version}, Python ${about.python}.</p>`;
}
