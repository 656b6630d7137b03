import { changeWithUndo } from '../../state/cases.js';
import { newId } from '../../state/document.js';
import { ask } from '../../state/engine.js';
import { go } from '../../state/route.js';
import { say } from '../../state/toast.js';
import { plural } from '../../words/numbers.js';
import { noteUsed, textOf } from './runs.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Candidate} Candidate */
/** @typedef {import('./types').Outcome} Outcome */
/** @typedef {import('./types').Run} Run */

/** Names that say what each was, numbered where there are several. @param {Outcome[]} chosen @param {Run} run */
function namesFor(chosen, run) {
  return chosen.map(({ role }, i) => {
    if (role === 'no reaction') return run.start?.name || 'starting material';
    const alike = chosen.filter((other) => other.role === role).length > 1;
    return alike ? `${role} ${chosen.slice(0, i + 1).filter((other) => other.role === role).length}` : role;
  });
}

/** Put outcomes into the case as candidates, the first product as the intended one where none is yet, and keep the
 * cautions with the case. @param {CaseDoc} doc @param {Run} run @param {Outcome[]} chosen @param {import('./types').ReagentCaution[]} cautions */
export async function takeOver(doc, run, chosen, cautions) {
  const names = namesFor(chosen, run);
  const described = await Promise.all(chosen.map(({ smiles }) => ask('describe', { structure: smiles })));
  const known = new Set(doc.structures.map(({ smiles }) => smiles));
  /** @type {(Candidate & { role: string })[]} */
  const fresh = described.map(({ source, smiles, formula, svg }, i) => ({ id: newId(), source, name: names[i] ?? '', smiles, formula, svg, role: chosen[i]?.role ?? '' }))
    .filter(({ smiles }) => !known.has(smiles));
  const words = cautions.map(({ reagent, gravest }) => `${reagent}: ${gravest}.`);
  noteUsed(textOf(run.steps));
  if (!fresh.length) say('All of these stand in the case already.');
  else {
    changeWithUndo(doc.id, `${plural(fresh.length, 'structure')} taken over`, (draft) => {
      draft.structures.push(...fresh.map(({ role, ...candidate }) => candidate));
      draft.intended ||= fresh.find(({ role }) => role === 'product')?.id ?? '';
      draft.cautions = [...new Set([...draft.cautions, ...words])];
    });
  }
  go('case', doc.id, 'structures');
}
