import { html } from 'htm/preact';
import { signal } from '@preact/signals';
import { Formula, Words } from '../../components/chem.js';
import { Icon } from '../../components/icon.js';
import { Section } from '../../components/parts.js';
import { changeCase, changeWithUndo } from '../../state/cases.js';
import { go } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { dashed } from '../../words/readings.js';
import { addBand, bandsIn, markClear, markOpen, stateOf, sweepWords } from './infrared.js';
import { Strip } from './strip.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').IrRegion} IrRegion */

/** The region under the finger, per case. @type {import('@preact/signals').Signal<Record<string, string>>} */
const touched = signal({});

/** @param {CaseDoc} doc @param {string} id */
export const touchRegion = (doc, id) => { touched.value = { ...touched.value, [doc.id]: id }; };

/** All diagnostic regions, 4000 first; empty until the chemistry is awake. @returns {IrRegion[]} */
export function useRegions() {
  const { value } = useAnswer('ir_regions', {});
  return /** @type {any} */ (value)?.regions ?? [];
}

/** The IR sweep. @param {{ doc: CaseDoc }} props */
export function InfraredSection({ doc }) {
  const regions = useRegions();
  const at = regions.find((region) => region.id === touched.value[doc.id]) ?? null;
  const medium = doc.irMedium ? html`IR, <${Formula} text=${doc.irMedium} />` : 'IR';
  if (!regions.length) {
    return html`<${Section} title="IR" id="ir-head"><p
      class="whisper">The sweep appears when the chemistry is awake.</p><//>`;
  }
  return html`<${Section} title=${medium} id="ir-head" aside=${sweepWords(doc, regions)}>
    <${Strip} doc=${doc} regions=${regions} at=${at?.id ?? ''}
      onPick=${(/** @type {string} */ id) => touchRegion(doc, id)} />
    <${RegionSteps} doc=${doc} regions=${regions} at=${at} />
    ${at ? html`<${RegionMarks} doc=${doc} regions=${regions} region=${at} />`
      : html`<p class="hint">Touch the strip, or step through it from 4000 down. Mark what is there and what is not:
        an empty stretch is evidence too.</p>`}
    <ul class="hidden" aria-label="IR regions">${regions.map((region) => html`<li key=${region.id}>
      ${region.hi} to ${region.lo}, ${region.name}: ${RegionWords(doc, region)}</li>`)}</ul>
  <//>`;
}

/** @param {CaseDoc} doc @param {IrRegion} region */
function RegionWords(doc, region) {
  const state = stateOf(doc, region);
  if (state === 'seen') return `seen ${bandsIn(doc, region).map((band) => `${band.cm1} ${band.strength} ${band.shape}`).join('; ')}`;
  return state === 'clear' ? 'clear' : 'not looked at';
}

/** @param {{ doc: CaseDoc, regions: IrRegion[], at: IrRegion | null }} props */
function RegionSteps({ doc, regions, at }) {
  const index = at ? regions.indexOf(at) : -1;
  const step = (/** @type {number} */ by) => {
    const next = regions[Math.max(0, Math.min(regions.length - 1, index + by))];
    if (next) touchRegion(doc, next.id);
  };
  return html`<div class="steps">
    <button type="button" class="step" aria-label="Region before" disabled=${index <= 0}
      onClick=${() => step(-1)}><${Icon} name="left" /></button>
    <p aria-live="polite">${at ? html`<b>${dashed(`${at.hi}-${at.lo}`)}</b> ${at.name}` : 'no region touched'}</p>
    <button type="button" class="step" aria-label=${at ? 'Region after' : 'First region'}
      disabled=${index === regions.length - 1}
      onClick=${() => step(1)}><${Icon} name="right" /></button>
  </div>`;
}

/** @param {{ doc: CaseDoc, regions: IrRegion[], region: IrRegion }} props */
function RegionMarks({ doc, regions, region }) {
  const state = stateOf(doc, region);
  const bands = bandsIn(doc, region);
  const see = () => {
    if (!bands.length) changeCase(doc.id, (draft) => void addBand(draft, region));
    go('case', doc.id, 'readings', 'ir', region.id);
  };
  const clear = () => {
    if (state === 'clear') { changeCase(doc.id, (draft) => markOpen(draft, region)); return; }
    const edit = (/** @type {CaseDoc} */ draft) => markClear(draft, region);
    if (bands.length) changeWithUndo(doc.id, 'Band removed, region marked clear', edit);
    else changeCase(doc.id, edit);
    const next = regions[regions.indexOf(region) + 1];
    if (next) touchRegion(doc, next.id);
  };
  const said = bands.map((band) => `${band.cm1 || '?'} ${band.strength}`.trim()).join(', ');
  return html`<div class="two-up">
      <button type="button" class="toggle" aria-pressed=${String(state === 'seen')}
        onClick=${see}>${state === 'seen' ? `Seen ${said}` : 'Seen here'}</button>
      <button type="button" class="toggle" aria-pressed=${String(state === 'clear')}
        onClick=${clear}>Clear here</button>
    </div>
    <${RegionText} region=${region} />`;
}

/** What lives in a region and what its absence rules out. @param {{ region: IrRegion }} props */
export const RegionText = ({ region }) => html`<dl class="region-text">
  <div><dt>Lives here</dt><dd><${Words} text=${`${region.holds.join('. ')}.`} /></dd></div>
  <div><dt>A clear strip rules out</dt><dd><${Words} text=${region.absence} /></dd></div>
</dl>`;
