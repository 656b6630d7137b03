import { html } from 'htm/preact';
import { Caution, Section } from '../../components/parts.js';
import { address } from '../../state/route.js';
import { CarbonSection } from './carbon-section.js';
import { InfraredSection } from './infrared-section.js';
import { MassSection } from './mass-section.js';
import { OpenFile } from './open-file.js';
import { PhotoButton, Photos } from './photos.js';
import { ProtonSection } from './proton-section.js';
import { WetSection } from './wet-section.js';
import { CheckTrouble } from './check-trouble.js';

/** The first station: all that was measured, one section per kind. @param {{ doc: import('../../types').CaseDoc }} props */
export function Readings({ doc }) {
  return html`<div class="readings">
    ${doc.story && html`<p class="story">${doc.invented && html`<b>Invented example. </b>`}${doc.story}</p>`}
    ${doc.look && html`<a class="button" href=${address('case', doc.id, ...doc.look.to)}>${doc.look.words}</a>`}
    ${doc.cautions.map((line) => html`<${Caution} key=${line}>${line}<//>`)}
    <div class="ways-in">
      <a class="button" href=${address('case', doc.id, 'readings', 'paste')}>Paste a report line</a>
      <${OpenFile} doc=${doc} />
      <${PhotoButton} doc=${doc} />
    </div>
    <${CheckTrouble} />
    <${MassSection} doc=${doc} />
    <${InfraredSection} doc=${doc} />
    <${ProtonSection} doc=${doc} />
    <${CarbonSection} doc=${doc} />
    <${WetSection} doc=${doc} />
    ${doc.photos.length > 0 && html`<${Section} title="Printouts" aside=${`${doc.photos.length}`}><${Photos}
      doc=${doc} /><//>`}
    ${doc.invented && html`<${Caution}>The values of this case are made up to show the tool. Do not use them as references.<//>`}
  </div>`;
}
