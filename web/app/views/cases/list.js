import { html } from 'htm/preact';
import { useState } from 'preact/hooks';
import { addCase, ownCases } from '../../state/cases.js';
import { go } from '../../state/route.js';
import { Icon } from '../../components/icon.js';
import { CaseRow, DemoRow } from './row.js';
import { DEMOS } from './demos.js';
import { ListMenu } from './menu.js';
import { OfflineLine } from './whisper.js';

/** The first screen: what it does, the cases of this device, the invented examples, a new case. */
export function CaseList() {
  const [menu, setMenu] = useState(false);
  const own = ownCases.value;
  const demos = DEMOS.filter((demo) => !own.some((doc) => doc.demo === demo.file));
  const start = () => go('case', addCase({ title: nextTitle() }).id, 'readings');
  return html`<main class="page list-page">
    <header class="list-head">
      <h1>Hoodside</h1>
      <button type="button" class="bar-menu" aria-label="Menu" aria-expanded=${String(menu)}
        onClick=${() => setMenu(!menu)}>
        <${Icon} name="menu" /></button>
    </header>
    ${menu && html`<${ListMenu} close=${() => setMenu(false)} />`}
    <p class="promise">Does it fit, what else would, what to measure next.</p>
    ${own.length === 0 && html`<p
      class="first-words">Type or paste what the instruments gave, put up the structures it could be,
      and see what speaks for and against each. It works with the network off.</p>`}
    ${own.length > 0 && html`<section aria-labelledby="own-head">
      <header class="list-section"><h2 id="own-head">On this device</h2><b>${own.length}</b></header>
      <ul class="rows">${own.map((doc) => html`<${CaseRow} key=${doc.id} doc=${doc} />`)}</ul>
    </section>`}
    ${demos.length > 0 && html`<section aria-labelledby="demo-head">
      <header class="list-section"><h2 id="demo-head">Invented examples</h2></header>
      <ul class="rows">${demos.map((demo) => html`<${DemoRow} key=${demo.file} demo=${demo} />`)}</ul>
    </section>`}
    <footer class="list-foot">
      <button type="button" class="button primary" onClick=${start}>New case</button>
      <${OfflineLine} />
    </footer>
  </main>`;
}

function nextTitle() {
  const taken = new Set(ownCases.value.map((doc) => doc.title));
  let n = 1;
  while (taken.has(`Sample ${n}`)) n += 1;
  return `Sample ${n}`;
}
