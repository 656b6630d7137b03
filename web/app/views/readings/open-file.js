import { html } from 'htm/preact';
import { changeWithUndo } from '../../state/cases.js';
import { newId } from '../../state/document.js';
import { go } from '../../state/route.js';
import { say } from '../../state/toast.js';
import { importCase } from '../cases/menu.js';
import { pastedStructure } from '../structures/paste-sheet.js';
import { lookAt } from './jcamp-sheet.js';
import { pasted } from './paste-sheet.js';
import { takeOver } from './take-over.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {'case' | 'structure' | 'jcamp' | 'report'} FileKind */

const MAX_BYTES = 4_000_000;

/** What a file is, by its content: names and types of files are not to be trusted on phones.
 * @param {string} text @returns {FileKind} */
export function sniff(text) {
  if (/^\s*[{[]/.test(text)) return 'case';
  if (/\bV[23]000\b/.test(text.slice(0, 2000)) && /M {2}END/.test(text)) return 'structure';
  if (/^\s*(\$\$.*\s+)*##(TITLE|JCAMP)/i.test(text)) return 'jcamp';
  return 'report';
}

const READING_KEYS = ['h1', 'c13', 'ir', 'ir_clear', 'ms', 'hrms', 'analysis', 'wet', 'formula', 'candidates'];

/** A JSON file: a whole case, or a check object as the command line reads it.
 * @param {CaseDoc} doc @param {File} file @param {string} text */
async function openJson(doc, file, text) {
  const given = JSON.parse(text);
  if (given?.kind === 'hoodside-case') { await importCase(file); return; }
  if (!READING_KEYS.some((key) => given?.[key])) throw new Error('it holds neither a case nor readings');
  changeWithUndo(doc.id, `${file.name} taken over`, (draft) => {
    takeOver(draft, given, false);
    for (const source of given.candidates ?? []) draft.structures.push({ id: newId(), source, name: '', smiles: '', formula: '', svg: '' });
  });
  if (given.text) { pasted.value = given.text; go('case', doc.id, 'readings', 'paste'); }
}

/** A file button: case, CTfile, report text or JCAMP-DX. @param {{ doc: CaseDoc }} props */
export function OpenFile({ doc }) {
  const open = async (/** @type {any} */ event) => {
    const input = event.currentTarget;
    const file = /** @type {File | undefined} */ (input.files?.[0]);
    input.value = '';
    if (!file) return;
    if (file.size > MAX_BYTES) { say(`${file.name} is larger than 4 MB and was not read. Take the part with the peak list.`); return; }
    const text = await file.text();
    const kind = sniff(text);
    if (kind === 'case') await openJson(doc, file, text).catch((error) => say(`${file.name} was not taken in: ${error.message}.`));
    else if (kind === 'structure') { pastedStructure.value = text; go('case', doc.id, 'structures', 'paste'); }
    else if (kind === 'jcamp') { lookAt(file.name, text); go('case', doc.id, 'readings', 'jcamp'); }
    else { pasted.value = text; go('case', doc.id, 'readings', 'paste'); }
  };
  return html`<label class="button file-button">Open a file<input type="file" onChange=${open} /></label>`;
}
