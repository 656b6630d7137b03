import { dashed, protonLabel } from '../../words/readings.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Finding} Finding */
/** @typedef {import('../../state/check.js').Checked} Checked */
/** @typedef {{ key: string, refs: string[], label: string, kind: string, weight: number, findings: Finding[], predicted: string[],
 *   atoms: number[] }} TallyRow */

const ORDER = ['formula', 'hrms', 'analysis', 'ms', 'ir', 'ir_clear', 'h1', 'c13', 'wet', ''];
/** @type {Record<string, string>} */
const PLAIN = { formula: 'Formula', hrms: 'Accurate mass', analysis: 'Combustion' };

/** What a reading is called in the tally. @param {CaseDoc} doc @param {Checked} found @param {string} ref */
export function readingLabel(doc, found, ref) {
  const kind = ref.split(':')[0] ?? '';
  const id = found.refs[ref];
  const row = /** @type {any} */ (/** @type {any[]} */ ({ h1: doc.h1, c13: doc.c13, ir: doc.ir, ir_clear: doc.irClear, ms: doc.ms, wet: doc.wet }[kind] ?? [])
    .find((/** @type {any} */ entry) => entry.id === id));
  if (kind === 'formula') return `Formula ${doc.formula}`;
  if (kind === 'hrms') return `${doc.hrms.adduct} ${doc.hrms.found}`;
  if (!row) return PLAIN[kind] ?? ref;
  switch (kind) {
    case 'h1': return protonLabel(row);
    case 'c13': return `${row.ppm}${row.kind ? ` ${row.kind}` : ''}, 13C`;
    case 'ir': return `${row.cm1} ${[row.strength, row.shape].filter(Boolean).join(' ')}`.trim() + ', IR';
    case 'ir_clear': return `${dashed(`${row.hi}-${row.lo}`)} clear, IR`;
    case 'ms': return `m/z ${row.mz}`;
    case 'wet': return `${row.test}, ${row.result}`;
    default: return ref;
  }
}

/** @param {string} ref */
const kindOf = (ref) => ref.split(':')[0] ?? '';
/** @param {string} ref */
const placeOf = (ref) => Number(ref.split(':')[1] ?? 0);

/** Findings of one structure, a row per reading. Findings about several readings of a kind at once
 * (a 13C line count, the sum of H) keep a row of their own. @param {CaseDoc} doc @param {Checked} found @param {number} at
 * @returns {TallyRow[]} */
export function rowsOf(doc, found, at) {
  const candidate = found.answer.candidates[at];
  /** @type {Map<string, TallyRow>} */
  const rows = new Map();
  for (const finding of candidate?.findings ?? []) {
    if (!finding.readings.length) continue;
    const key = finding.readings.length === 1 ? /** @type {string} */ (finding.readings[0]) : finding.readings.join('+');
    const row = rows.get(key) ?? { key, refs: finding.readings, label: labelOf(doc, found, finding.readings),
      kind: kindOf(finding.readings[0] ?? ''), weight: 0, findings: [], predicted: predictedFor(candidate, finding.readings), atoms: [] };
    row.findings.push(finding);
    row.weight += finding.weight_db;
    row.atoms = [...new Set([...row.atoms, ...finding.atoms])];
    rows.set(key, row);
  }
  return [...rows.values()].sort((a, b) => ORDER.indexOf(a.kind) - ORDER.indexOf(b.kind) || placeOf(a.refs[0] ?? '') - placeOf(b.refs[0] ?? ''));
}

/** @param {import('../../types').Weighed | undefined} candidate @param {string[]} refs */
const predictedFor = (candidate, refs) => (candidate?.assignment ?? []).filter((pair) => refs.includes(pair.reading)).map((pair) => pair.predicted);

/** @param {CaseDoc} doc @param {Checked} found @param {string[]} refs */
function labelOf(doc, found, refs) {
  if (refs.length <= 2) return refs.map((ref) => readingLabel(doc, found, ref)).join(' + ');
  const kind = kindOf(refs[0] ?? '');
  const names = /** @type {Record<string, string>} */ ({ h1: '1H signals', c13: '13C lines', ir: 'IR bands', ms: 'mass peaks' });
  return `${refs.length} ${names[kind] ?? 'readings'} together`;
}
