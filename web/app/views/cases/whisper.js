import { html } from 'htm/preact';
import { useSeconds } from '../../components/use-seconds.js';
import { engineState, wakingSince } from '../../state/engine.js';
import { offline, offlineProgress } from '../../state/offline.js';

export function Waking() {
  const seconds = useSeconds(wakingSince.value);
  return html`<span>chemistry is waking, ${seconds} s</span>`;
}

/** The last line of the case list: whether the app would open with the network gone. */
export function OfflineLine() {
  const waking = engineState.value === 'waking' ? html` <${Waking} />.` : '';
  if (offline.value === 'ready') return html`<p
    class="whisper">Ready offline. Nothing leaves this device.${waking}</p>`;
  if (offline.value === 'checking') return html`<p class="whisper">Nothing leaves this device.${waking}</p>`;
  const why = offline.value === 'never'
    ? 'This page cannot be kept for offline use: open it over HTTPS or on the device that serves it.'
    : `Stay on the network until this line changes. ${offlineProgress.value}`;
  return html`<p class="not-ready" role="status"><b>Not yet ready offline.</b> ${why}${waking}</p>`;
}
