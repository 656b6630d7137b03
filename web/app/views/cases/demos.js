import { addCase, cases } from '../../state/cases.js';
import { go } from '../../state/route.js';
import { mended, newId } from '../../state/document.js';
import { say } from '../../state/toast.js';

/** @typedef {{ file: string, title: string, kinds: string }} Demo */

/** The invented cases; their files lie beside the app so that they open with the network off. @type {Demo[]} */
export const DEMOS = [
  { file: 'ring-position.json', title: 'Which ring position?', kinds: 'formula, IR, \u00b9H' },
  { file: 'too-far.json', title: 'Did the oxidation go too far?', kinds: 'formula, IR, \u00b9H, wet tests' },
  { file: 'not-told-apart.json', title: 'Two that look alike', kinds: 'mass, IR, \u00b9H' },
  { file: 'low-field.json', title: 'Why does it look wrong?', kinds: 'formula, IR, \u00b9H at 60 MHz' },
];

/** Open a fresh copy of an example, or the copy already on this device. @param {string} file */
export async function openDemo(file) {
  const known = cases.value.find((doc) => doc.demo === file);
  if (known) { go('case', known.id, 'tally'); return; }
  try {
    const answer = await fetch(`./demo/${file}`);
    if (!answer.ok) throw new Error(`status ${answer.status}`);
    const now = new Date().toISOString();
    const doc = addCase(mended({ ...(await answer.json()), id: newId(), demo: file, created: now, changed: now }));
    go('case', doc.id, 'tally');
  } catch (error) {
    say(`The example could not be opened (${error}).`);
  }
}
