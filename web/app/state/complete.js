import { effect } from '@preact/signals';
import { ask, asFault, engineState } from './engine.js';
import { cases, changeCase } from './cases.js';
import { caseId } from './route.js';
import { say } from './toast.js';

/** Structures asked for already, so that one the engine refuses is not asked for again and again. */
const asked = new Set();

/** @param {string} id of the case @param {import('../types').Candidate} structure */
async function complete(id, structure) {
  asked.add(id + structure.id);
  try {
    const described = await ask('describe', { structure: structure.source || structure.smiles });
    changeCase(id, (draft) => {
      const entry = draft.structures.find((other) => other.id === structure.id);
      if (entry) Object.assign(entry, { smiles: described.smiles, formula: described.formula, svg: described.svg });
    });
  } catch (error) {
    say(`${structure.name || structure.source}: ${asFault(error).message}`);
  }
}

/** Structures of imported and example cases come as plain text; once the chemistry is awake they get their
 * canonical form, formula and drawing. */
export const startCompleting = () => effect(() => {
  const doc = cases.value.find((entry) => entry.id === caseId.value);
  if (!doc || engineState.value !== 'ready') return;
  for (const structure of doc.structures) {
    if (!structure.svg && !asked.has(doc.id + structure.id)) complete(doc.id, structure);
  }
});
