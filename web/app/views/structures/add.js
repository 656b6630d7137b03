import { changeCase } from '../../state/cases.js';
import { newId } from '../../state/document.js';
import { go } from '../../state/route.js';
import { say } from '../../state/toast.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** Put a described structure into the case, unless it stands there already.
 * @param {CaseDoc} doc @param {import('../../types').Description} described @param {string} name */
export function addStructure(doc, described, name) {
  if (doc.structures.some((entry) => entry.smiles === described.smiles)) {
    say('This structure stands in the case already.');
  } else {
    changeCase(doc.id, (draft) => {
      const id = newId();
      draft.structures.push({ id, source: described.source, name, smiles: described.smiles, formula: described.formula, svg: described.svg });
      // The first one put up is nearly always the one meant; one tap changes it.
      if (draft.structures.length === 1) draft.intended = id;
    });
  }
  go('case', doc.id, 'structures');
}
