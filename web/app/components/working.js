import { html } from 'htm/preact';
import { useEffect, useState } from 'preact/hooks';
import { useSeconds } from './use-seconds.js';

/** Work shorter than this is not worth a word, ms. */
const WHISPER_MS = 300;

/** Says that work is going on once it lasts, with a button that stops it.
 * @param {{ since: number, words: string, stop: () => void }} props `since` 0 when no work runs */
export function Working({ since, words, stop }) {
  const [late, setLate] = useState(false);
  useEffect(() => {
    setLate(false);
    if (!since) return undefined;
    const timer = setTimeout(() => setLate(true), WHISPER_MS);
    return () => clearTimeout(timer);
  }, [since]);
  const seconds = useSeconds(since);
  return html`<div class="working" role="status">${since > 0 && late && html`<span
    class="whisper">${words}${seconds >= 1 ? `, ${seconds} s` : ''}</span>
    <button type="button" class="button" onClick=${stop}>Stop</button>`}</div>`;
}
