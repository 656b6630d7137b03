import { changeCase, changeWithUndo } from '../../state/cases.js';
import { newId } from '../../state/document.js';
import { address } from '../../state/route.js';
import { emptyAmounts } from './question.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').Amounts} Amounts */
/** @typedef {import('../../types').Portion} Portion */

/** @param {CaseDoc} draft @returns {Amounts} */
const drafted = (draft) => { draft.amounts ??= emptyAmounts(); return draft.amounts; };

/** @param {string} id of the case @param {Partial<Amounts>} given */
export const setAmounts = (id, given) => changeCase(id, (draft) => { Object.assign(drafted(draft), given); });

/** @param {string} id of the case @param {string} role @param {string} portionId @param {(portion: Portion) => void} edit */
export const changePortion = (id, role, portionId, edit) => changeCase(id, (draft) => {
  const portion = drafted(draft).portions[role]?.find((entry) => entry.id === portionId);
  if (portion) edit(portion);
});

/** A portion put into a role. @param {string} id of the case @param {string} role @returns {string} its id */
export function addPortion(id, role) {
  const portion = { id: newId(), name: '', structure: '', formula: '', molar: '', signals: [], mass: '', u: '', purity: '' };
  changeCase(id, (draft) => { (drafted(draft).portions[role] ??= []).push(portion); });
  return portion.id;
}

/** @param {string} id of the case @param {string} role @param {Portion} portion @param {string} name */
export const removePortion = (id, role, portion, name) => changeWithUndo(id, `${name} removed`, (draft) => {
  const { portions } = drafted(draft);
  portions[role] = (portions[role] ?? []).filter((entry) => entry.id !== portion.id);
});

/** @param {CaseDoc} doc @param {...string} steps */
export const amountsAddress = (doc, ...steps) => address('case', doc.id, 'amounts', ...steps);
