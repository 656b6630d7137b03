import { fixed, plural, signed } from '../../words/numbers.js';
import { dashed, highFirst } from '../../words/readings.js';
import { letterOf, structureName } from '../../words/structures.js';
import { sentence } from '../../words/verdict.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../state/check.js').Checked} Checked */

/** "4.12 (q, J = 7.1 Hz, 2H)"; the bare shift while nothing else is known.
 * @param {import('../../types').ProtonRow} row @param {boolean} raw */
function signal(row, raw) {
  const told = [row.mult, row.j && `J = ${row.j} Hz`, row.h && `${row.h}${raw ? ' steps' : 'H'}`].filter(Boolean).join(', ');
  return dashed(row.shift) + (told && ` (${told})`);
}

/** The readings as a chemist would print them, one line per kind. @param {CaseDoc} doc @returns {string[]} */
export function readingLines(doc) {
  const where = [doc.mhz && `${doc.mhz} MHz`, doc.solvent].filter(Boolean).join(', ');
  const lines = [];
  if (doc.formula) lines.push(`Formula: ${doc.formula}`);
  if (doc.hrms.found) lines.push(`HRMS: ${doc.hrms.adduct} found ${doc.hrms.found} (window ${doc.hrms.ppm} ppm)`);
  if (doc.ms.length) lines.push(`MS m/z: ${doc.ms.map((peak) => peak.mz + (peak.rel ? ` (${peak.rel})` : '')).join(', ')}`);
  const found = Object.entries(doc.analysis).filter(([, text]) => text.trim());
  if (found.length) lines.push(`Combustion, found: ${found.map(([element, text]) => `${element} ${text}`).join(', ')}`);
  if (doc.ir.length) lines.push(`IR${doc.irMedium ? ` (${doc.irMedium})` : ''}: ${highFirst(doc.ir, (band) => band.cm1).map((band) => `${band.cm1}${band.strength || band.shape ? ` (${[band.shape, band.strength].filter(Boolean).join(', ')})` : ''}`).join(', ')} cm-1`);
  if (doc.irClear.length) lines.push(`IR clear: ${doc.irClear.map((row) => dashed(`${row.hi}-${row.lo}`)).join(', ')} cm-1`);
  if (doc.h1.length) lines.push(`1H NMR${where ? ` (${where})` : ''}: ${highFirst(doc.h1, (row) => row.shift).map((row) => signal(row, doc.raw)).join(', ')}`);
  if (doc.c13.length) lines.push(`13C NMR${doc.solvent ? ` (${doc.solvent})` : ''}: ${highFirst(doc.c13, (row) => row.ppm).map((row) => row.ppm + (row.kind ? ` (${row.kind})` : '')).join(', ')}`);
  for (const row of doc.wet) lines.push(`${row.test}: ${row.result}`);
  return lines;
}

/** The whole account as plain text. @param {CaseDoc} doc @param {Checked | null} found @param {string[]} [amounts] lines about amounts */
export function accountText(doc, found, amounts = []) {
  const parts = [doc.title, doc.invented ? 'INVENTED EXAMPLE: values made up' : '', `last changed ${doc.changed.slice(0, 16).replace('T', ' ')} UTC`, '', ...readingLines(doc), ''];
  if (found) {
    const { word, rest } = sentence(doc, found);
    parts.push(`Verdict: ${word} ${rest}`, '', 'Weight of evidence, decibans (10 = ten times as likely):');
    found.answer.candidates.forEach((candidate, at) => {
      const id = found.order[at];
      const mark = id && id === doc.intended ? ', intended' : '';
      parts.push(`  ${signed(candidate.weight_db).padStart(5)}  ${candidate.verdict.padEnd(9)}  ${id ? `${letterOf(doc, id)}  ` : ''}${structureName(doc, found, at)}${mark}  ${candidate.smiles}`);
    });
    if (found.answer.next.length) parts.push('', 'Next:', ...found.answer.next.map((entry) => `  ${entry.measure}, about ${fixed(entry.expected_db, 0)} decibans: ${entry.why}`));
  } else parts.push(`${plural(doc.structures.length, 'structure')}: ${doc.structures.map((entry) => entry.smiles).join(', ')}`);
  parts.push('', ...amounts, '', 'Weights of evidence, not proof. Made with Hoodside.');
  return parts.join('\n').replace(/\n{3,}/g, '\n\n');
}
