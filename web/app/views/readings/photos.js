import { html } from 'htm/preact';
import { signal } from '@preact/signals';
import { useEffect, useState } from 'preact/hooks';
import { readPhoto, writePhoto } from '../../../store/photos.js';
import { Icon } from '../../components/icon.js';
import { Sheet } from '../../components/sheet.js';
import { changeCase, changeWithUndo } from '../../state/cases.js';
import { newId } from '../../state/document.js';
import { address, go } from '../../state/route.js';
import { say } from '../../state/toast.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** Take or choose a picture of a printout; it stays on this device with the case. @param {{ doc: CaseDoc }} props */
export function PhotoButton({ doc }) {
  const keep = async (/** @type {any} */ event) => {
    const input = event.currentTarget;
    const blob = /** @type {File | undefined} */ (input.files?.[0]);
    input.value = '';
    if (!blob) return;
    if (!blob.type.startsWith('image/')) { say(`${blob.name} is no image.`); return; }
    const id = newId();
    try {
      await writePhoto({ id, caseId: doc.id, blob });
      changeCase(doc.id, (draft) => { draft.photos.push({ id, name: blob.name, taken: new Date().toISOString() }); });
    } catch (error) {
      say(`The picture was not kept (${error}).`);
    }
  };
  return html`<label class="button file-button">Photograph a printout<input
    type="file" accept="image/*" capture="environment" onChange=${keep} /></label>`;
}

/** @param {string} id */
function usePhoto(id) {
  const [url, setUrl] = useState('');
  useEffect(() => {
    let made = '';
    readPhoto(id).then((photo) => {
      if (!photo) return;
      made = URL.createObjectURL(photo.blob);
      setUrl(made);
    }).catch(() => setUrl(''));
    return () => URL.revokeObjectURL(made);
  }, [id]);
  return url;
}

/** @param {{ id: string, label: string, zoom?: number }} props */
function Picture({ id, label, zoom = 1 }) {
  const url = usePhoto(id);
  return url ? html`<img class="picture zoom-${zoom}" src=${url} alt=${label} />` : html`<span
    class="picture picture-none">picture not found on this device</span>`;
}

/** @param {{ doc: CaseDoc }} props */
export function Photos({ doc }) {
  return html`<ul class="photo-list">${doc.photos.map((photo, i) => html`<li key=${photo.id}>
    <a href=${address('case', doc.id, 'readings', 'photo', photo.id)}><${Picture} id=${photo.id}
      label="Printout ${i + 1}" /></a></li>`)}</ul>`;
}

/** @param {{ zoom: number, set: (zoom: number) => void }} props */
const Zoom = ({ zoom, set }) => html`<div class="zoom">
  <button type="button" class="step" aria-label="Smaller" disabled=${zoom <= 1} onClick=${() => set(zoom / 2)}><${Icon}
    name="minus" /></button>
  <button type="button" class="step" aria-label="Larger" disabled=${zoom >= 8} onClick=${() => set(zoom * 2)}><${Icon}
    name="plus" /></button>
</div>`;

/** @param {{ doc: CaseDoc, id: string }} props */
export function PhotoSheet({ doc, id }) {
  const [zoom, setZoom] = useState(1);
  const remove = () => {
    changeWithUndo(doc.id, 'Picture removed', (draft) => { draft.photos = draft.photos.filter((photo) => photo.id !== id); });
    go('case', doc.id, 'readings');
  };
  const foot = html`<div class="photo-foot"><${Zoom} zoom=${zoom} set=${setZoom} /><button type="button" class="button"
    onClick=${remove}>Remove</button></div>`;
  return html`<${Sheet} title="Printout" back=${address('case', doc.id, 'readings')} foot=${foot}>
    <div class="picture-pan" tabindex="0"><${Picture} id=${id} label="Printout" zoom=${zoom} /></div><//>`;
}

const beside = signal(false);

/** The newest picture above the pad, to read from while typing. @param {{ doc: CaseDoc }} props */
export function Printout({ doc }) {
  const [zoom, setZoom] = useState(2);
  const photo = doc.photos.at(-1);
  if (!photo) return null;
  if (!beside.value) return html`<button type="button" class="button printout-open"
    onClick=${() => { beside.value = true; }}><${Icon} name="photo" /> Show the printout</button>`;
  return html`<div class="printout"><div class="picture-pan" tabindex="0"><${Picture} id=${photo.id}
    label="Printout" zoom=${zoom} /></div>
    <${Zoom} zoom=${zoom} set=${setZoom} />
    <button type="button" class="button" onClick=${() => { beside.value = false; }}>Hide</button></div>`;
}
