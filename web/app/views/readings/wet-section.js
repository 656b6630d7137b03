import { html } from 'htm/preact';
import { Section } from '../../components/parts.js';
import { Words } from '../../components/chem.js';
import { address } from '../../state/route.js';

/** @param {{ doc: import('../../types').CaseDoc }} props */
export function WetSection({ doc }) {
  return html`<${Section} title="Wet tests" id="wet-head" aside=${doc.wet.length || null}>
    ${doc.wet.map((row) => html`<a class="line-link" key=${row.id}
      href=${address('case', doc.id, 'readings', 'wet', row.test)}>
      <span><${Words} text=${row.test} /></span><b>${row.result}</b></a>`)}
    <a class="button" href=${address('case', doc.id, 'readings', 'wet')}>Add a wet test</a>
  <//>`;
}
