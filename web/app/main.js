import { render } from 'preact';
import { html } from 'htm/preact';
import { loadCases } from './state/cases.js';
import { startChecking } from './state/check.js';
import { startCompleting } from './state/complete.js';
import { startEngine } from './state/engine.js';
import { startOffline } from './state/offline.js';
import { startScouting } from './state/scout.js';
import { App } from './views/app.js';

const root = /** @type {HTMLElement} */ (document.getElementById('app'));
loadCases().then(() => {
  root.replaceChildren();
  render(html`<${App} />`, root);
});
startEngine();
startCompleting();
startChecking();
startScouting();
startOffline();
