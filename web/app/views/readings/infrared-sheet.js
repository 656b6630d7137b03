import { html } from 'htm/preact';
import { useEffect, useState } from 'preact/hooks';
import { Chips, Section } from '../../components/parts.js';
import { NumberPad, PadField } from '../../components/pad.js';
import { Sheet } from '../../components/sheet.js';
import { Formula } from '../../components/chem.js';
import { caseById, changeCase, changeWithUndo, dropIfEmpty } from '../../state/cases.js';
import { address, go } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { toNumber } from '../../words/numbers.js';
import { dashed } from '../../words/readings.js';
import { RegionText, touchRegion, useRegions } from './infrared-section.js';
import { addBand, bandsIn, MEDIA } from './infrared.js';
import { CaseSign } from '../case/sign.js';
import { Printout } from './photos.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('../../types').BandRow} BandRow */

const STRENGTHS = ['weak', 'medium', 'strong'].map((value) => ({ value, text: value }));
const SHAPES = ['sharp', 'broad'].map((value) => ({ value, text: value }));

/** What was seen in one region: position, strength, shape. @param {{ doc: CaseDoc, regionId: string }} props */
export function InfraredSheet({ doc, regionId }) {
  const regions = useRegions();
  const region = regions.find((entry) => entry.id === regionId) ?? null;
  const bands = region ? bandsIn(doc, region) : [];
  const [picked, setPicked] = useState('');
  const band = bands.find((entry) => entry.id === picked) ?? bands[bands.length - 1] ?? null;
  const back = address('case', doc.id, 'readings');
  useEffect(() => () => caseById(doc.id)?.ir.forEach((entry) => dropIfEmpty(doc.id, 'ir', entry.id)), [regionId]);
  const leave = () => {
    const next = region && regions[regions.indexOf(region) + 1];
    if (next) touchRegion(doc, next.id);
    go('case', doc.id, 'readings');
  };
  const more = () => changeCase(doc.id, (draft) => { if (region) setPicked(addBand(draft, region).id); });
  if (!region) return html`<${Sheet} title="IR" back=${back}><p
    class="whisper">The sweep appears when the chemistry is awake.</p><//>`;
  return html`<${Sheet} title=${`IR, ${dashed(`${region.hi}-${region.lo}`)}`} back=${back} sign=${html`<${CaseSign}
    doc=${doc} />`}
      class="entry-sheet" foot=${html`<${NumberPad} done=${leave} next=${band?.cm1 ? 'done' : 'next'} />`}>
    <${Printout} doc=${doc} />
    ${bands.length > 1 && html`<${Chips} label="Bands of this region" class="chips-lines" optional=${false}
      value=${band?.id ?? ''}
      options=${bands.map((entry) => ({ value: entry.id, text: entry.cm1 || 'new' }))} onPick=${setPicked} />`}
    ${band ? html`<${BandFields} key=${band.id} doc=${doc} band=${band} more=${more} />`
      : html`<button type="button" class="button primary" onClick=${more}>A band is seen here</button>`}
    <${RegionText} region=${region} />
    <${Section} title="Sample as">
      <${Chips} label="Sample as" class="chips-flow" value=${doc.irMedium}
        options=${MEDIA.map((value) => ({ value, text: html`<${Formula} text=${value} />` }))}
        onPick=${(/** @type {string} */ value) => changeCase(doc.id, (draft) => { draft.irMedium = value; })} />
    <//>
  <//>`;
}

/** @param {{ doc: CaseDoc, band: BandRow, more: () => void }} props */
function BandFields({ doc, band, more }) {
  const set = (/** @type {Partial<BandRow>} */ given) => changeCase(doc.id, (draft) => {
    Object.assign(draft.ir.find((entry) => entry.id === band.id) ?? {}, given);
  });
  const remove = () => changeWithUndo(doc.id, `Band ${band.cm1} removed`, (draft) => {
    draft.ir = draft.ir.filter((entry) => entry.id !== band.id);
  });
  const wrong = band.cm1.trim() && Number.isNaN(toNumber(band.cm1)) ? `${band.cm1} is no wavenumber. Type 1715.` : '';
  return html`<div class="band-top">
      <${PadField} label="Position" name="cm1" value=${band.cm1} unit=${html`cm<sup>${'\u2212'}1</sup>`} first
        fault=${wrong}
        onInput=${(/** @type {string} */ cm1) => set({ cm1 })} />
      <${Suits} band=${band} />
    </div>
    <${Chips} label="Strength" class="chips-3" options=${STRENGTHS} value=${band.strength}
      onPick=${(/** @type {string} */ strength) => set({ strength })} />
    <${Chips} label="Shape" class="chips-2" options=${SHAPES} value=${band.shape}
      onPick=${(/** @type {string} */ shape) => set({ shape })} />
    <div class="two-up">
      <button type="button" class="button" onClick=${more}>Another band</button>
      <button type="button" class="button" onClick=${remove}>Remove band</button>
    </div>`;
}

/** What a band at this place suits best. @param {{ band: BandRow }} props */
function Suits({ band }) {
  const cm1 = toNumber(band.cm1);
  const wanted = cm1 >= 400 && cm1 <= 4000;
  const { value } = useAnswer('ir_lookup', wanted ? { cm1, ...(band.strength && { strength: band.strength }),
    ...(band.shape && { shape: band.shape }) } : null, { delay: 200 });
  const groups = /** @type {any} */ (value)?.groups ?? [];
  if (!groups.length) return null;
  return html`<p class="suits">suits ${groups.slice(0, 2).map((/** @type {any} */ entry) => entry.group).join('; ')}</p>`;
}
