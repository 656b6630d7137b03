import { html } from 'htm/preact';
import { Drawing } from '../../components/drawing.js';
import { Section } from '../../components/parts.js';
import { engineState } from '../../state/engine.js';
import { useAnswer } from '../../state/use-answer.js';
import { nameOf } from '../../words/structures.js';

/** What to begin from: the case's own structures, then common skeletons.
 * @param {{ doc: import('../../types').CaseDoc, onBegin: (smiles: string) => void }} props */
export function Tiles({ doc, onBegin }) {
  const { value } = useAnswer('tiles', {});
  const tiles = /** @type {{ name: string, smiles: string }[]} */ (/** @type {any} */ (value)?.tiles ?? []);
  const own = doc.structures.filter(({ smiles }) => smiles).map(({ id, smiles }) => ({ name: nameOf(doc, id), smiles }));
  return html`${own.length > 0 && html`<${Section} title="Begin from a structure of this case"><${Row} tiles=${own} onBegin=${onBegin} /><//>`}
    <${Section} title="Begin from">
      ${!tiles.length && html`<p class="hint">${engineState.value === 'failed' ? 'The chemistry did not start.' : 'The chemistry is waking.'}</p>`}
      <${Row} tiles=${tiles} onBegin=${onBegin} /><//>`;
}

/** @param {{ tiles: { name: string, smiles: string }[], onBegin: (smiles: string) => void }} props */
const Row = ({ tiles, onBegin }) => html`<div class="grow-tiles">${tiles.map(({ name, smiles }) => html`<button type="button" class="grow-tile" key=${name + smiles}
  onClick=${() => onBegin(smiles)}><${Drawing} structure=${smiles} label="" width=${104} height=${64} class="grow-thumb" /><span>${name}</span></button>`)}</div>`;
