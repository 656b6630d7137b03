import { html } from 'htm/preact';
import { useEffect, useRef, useState } from 'preact/hooks';
import { Sheet } from '../../components/sheet.js';
import { address, go } from '../../state/route.js';
import { cameraTrouble, startCamera } from './camera.js';
import { pastedStructure } from './paste-sheet.js';
import { qrReader } from './qr-reader.js';

/** Milliseconds between looks at the picture of the camera. */
const LOOK_MS = 200;

/** A structure from a QR code that holds its SMILES: by the camera, or from a photograph. What was read goes where
 * pasted text goes, so that it is drawn before it is taken over. @param {{ doc: import('../../types').CaseDoc }} props */
export function ScanSheet({ doc }) {
  const [trouble, setTrouble] = useState('');
  const take = (/** @type {string} */ text) => {
    pastedStructure.value = text.trim();
    go('case', doc.id, 'structures', 'paste');
  };
  const fromPhoto = async (/** @type {any} */ event) => {
    const input = event.currentTarget;
    const file = /** @type {File | undefined} */ (input.files?.[0]);
    input.value = '';
    if (!file) return;
    try {
      const text = await (await qrReader()).photo(file);
      if (text) take(text);
      else setTrouble('No QR code was found in this picture. Take it again with the whole code in sight, flat and sharp.');
    } catch (error) {
      setTrouble(`${file.name} could not be read as a picture (${error}).`);
    }
  };
  return html`<${Sheet} title="Scan a QR code" back=${address('case', doc.id, 'structures')} class="scan-sheet"
      foot=${html`<label class="button file-button">From a photograph<input type="file" accept="image/*" onChange=${fromPhoto} /></label>`}>
    <p class="hint">Hold a code that holds a SMILES before the camera. The picture stays on this device.</p>
    <${Camera} onText=${take} onTrouble=${setTrouble} />
    ${trouble && html`<p class="trouble" role="alert">${trouble}</p>`}<//>`;
}

/** The picture of the camera, looked at again and again. It is off as soon as the sheet or the page is left.
 * @param {{ onText: (text: string) => void, onTrouble: (words: string) => void }} props */
function Camera({ onText, onTrouble }) {
  const video = useRef(/** @type {HTMLVideoElement | null} */ (null));
  const [on, setOn] = useState(true);
  const [running, setRunning] = useState(false);
  useEffect(() => {
    if (!on) return undefined;
    let left = false;
    let stop = () => {};
    const off = () => { left = true; stop(); setRunning(false); };
    const hide = () => { if (document.hidden) setOn(false); };
    const watch = async () => {
      const shown = /** @type {HTMLVideoElement} */ (video.current);
      const reader = await qrReader();
      stop = await startCamera(shown);
      if (left) { stop(); return; }
      setRunning(true);
      onTrouble('');
      while (!left) {
        const text = await reader.frame(shown);
        if (text && !left) { off(); onText(text); return; }
        await new Promise((resolve) => { setTimeout(resolve, LOOK_MS); });
      }
    };
    watch().catch((error) => { off(); setOn(false); onTrouble(cameraTrouble(error)); });
    document.addEventListener('visibilitychange', hide);
    return () => { document.removeEventListener('visibilitychange', hide); off(); };
  }, [on]);
  return html`<video class="scan-video" ref=${video} muted playsinline aria-label="Picture of the camera" hidden=${!running}></video>
    ${on && !running && html`<p class="whisper" role="status">starting the camera</p>`}
    ${!on && html`<button type="button" class="button primary" onClick=${() => setOn(true)}>Start the camera</button>`}`;
}
