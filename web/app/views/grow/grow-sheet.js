import { html } from 'htm/preact';
import { useEffect, useRef, useState } from 'preact/hooks';
import { Sheet } from '../../components/sheet.js';
import { address } from '../../state/route.js';
import { useAnswer } from '../../state/use-answer.js';
import { Corners } from './corners.js';
import { FormulaLine } from './formula-line.js';
import { begin, beginAnew, growingSince, growthOf, keepDrawing, recall, refusal, sameFrame, stepOf, take, touch } from './growth.js';
import { Groups } from './groups.js';
import { Joining } from './joining.js';
import { placeName } from './naming.js';
import { Offers } from './offers.js';
import { joinable } from './places.js';
import { Stage } from './stage.js';
import { Strip } from './strip.js';
import { Tiles } from './tiles.js';
import { Trouble } from '../../components/parts.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */
/** @typedef {import('./types').Canvas} Canvas */
/** @typedef {import('./types').Option} Option */
/** @typedef {import('./types').Place} Place */
/** @typedef {import('./types').Size} Size */

/** What the structure is grown for: its title, where back leads, what the button at the thumb does.
 * @typedef {{ title: string, back: string[], done: string, use: (doc: CaseDoc, drawn: Canvas) => void }} Purpose */

/** The drawing of the present state: at hand from the step that led to it, else asked for.
 * @param {string} key @param {Size | null} size @param {string} formula */
function useDrawing(key, size, formula) {
  const step = stepOf(key);
  const frame = size && { ...size, formula };
  const known = sameFrame(step.frame, frame);
  const { value, fault, busy } = useAnswer('canvas', step.source && frame && !known ? { structure: step.source, ...frame } : null);
  // While an answer is awaited, `value` is still that to the question before.
  useEffect(() => { if (value && frame && !busy) keepDrawing(key, /** @type {Canvas} */ (value), frame); }, [value, busy, known]);
  return { drawn: step.drawn, frame, fault };
}

/** What can be done at the touched place. Until it is known the last offers stay in sight, but do nothing: they
 * belong to another place. @param {Canvas | null} drawn @param {Place | null} touched @param {string} formula */
function useOffers(drawn, touched, formula) {
  const shown = useRef(/** @type {{ place: Place | null, options: Option[] }} */ ({ place: null, options: [] }));
  const { value, busy } = useAnswer('options', drawn && touched ? { structure: drawn.source, [touched.kind]: touched.at, formula } : null);
  const fresh = Boolean(touched && value && !busy);
  if (fresh || !touched) shown.current = { place: touched, options: fresh ? /** @type {any} */ (value).options : [] };
  return { ...shown.current, fresh };
}

/** A structure grown by touch. @param {{ doc: CaseDoc, name: string, purpose: Purpose }} props `name` keeps growths of different purposes apart */
export function GrowSheet({ doc, name, purpose }) {
  const key = `${doc.id} ${name}`;
  const [size, setSize] = useState(/** @type {Size | null} */ (null));
  useEffect(() => { recall(key); }, [key]);
  const { drawn, frame, fault } = useDrawing(key, size, doc.formula.trim());
  const { touched, source } = stepOf(key);
  const [joining, setJoining] = useState(/** @type {Option | null} */ (null));
  const [listing, setListing] = useState(false);
  const busy = growingSince.value > 0;
  const { place, options, fresh } = useOffers(drawn, touched, doc.formula.trim());
  const choice = drawn && joining ? joinable(drawn, joining.arguments.a) : null;
  useEffect(() => { setJoining(null); setListing(false); }, [source]);
  const onTake = (/** @type {Option} */ option) => {
    if (!fresh) return;
    if (option.needs_atom) setJoining(option);
    else if (frame) { setListing(false); take(key, option, frame); }
  };
  const onTouch = (/** @type {Place} */ place) => {
    if (joining && frame) { setJoining(null); take(key, joining, frame, place.at); } else touch(key, place);
  };
  const foot = html`<${Corners} id=${key} label=${purpose.done} onUse=${drawn && source && !busy ? () => purpose.use(doc, drawn) : null} />
    ${source && html`<div class="grow-panel" aria-busy=${String(busy || Boolean(touched && !fresh))}>${joining ? html`<${Joining} drawn=${drawn} choice=${choice ?? []} onPick=${onTouch} onCancel=${() => setJoining(null)} />`
      : place && options.length ? html`<${Offers} place=${place} options=${options} busy=${busy || !fresh} onTake=${onTake} onMore=${() => setListing(true)} />`
        : html`<p class="hint">${drawn ? 'Touch an atom or a bond: what can be done there comes up here.' : 'The chemistry is drawing.'}</p>`}</div>`}`;
  const anew = growthOf(key).at > 0 && source && !listing
    && html`<button type="button" class="bar-action" onClick=${() => beginAnew(key)}>Begin anew</button>`;
  if (!source) return html`<${Sheet} title=${purpose.title} back=${address(...purpose.back)} class="grow-sheet grow-choosing" foot=${growthOf(key).steps.length > 1 && foot}>
    <${Tiles} doc=${doc} onBegin=${(/** @type {string} */ smiles) => begin(key, smiles)} /><//>`;
  if (listing) return html`<${Sheet} title="Attach a group" back=${address(...purpose.back)} class="grow-sheet grow-listing" key="listing"
      foot=${html`<button type="button" class="button" onClick=${() => setListing(false)}>Back to the drawing</button>`}>
    <${Groups} options=${options} busy=${busy || !fresh} onTake=${onTake} /><//>`;
  return html`<${Sheet} title=${purpose.title} back=${address(...purpose.back)} class="grow-sheet" action=${anew} foot=${foot} key="drawing">
    <${FormulaLine} drawn=${drawn} />
    <${Stage} drawn=${drawn} size=${stepOf(key).frame} touched=${touched} choice=${choice} busy=${busy} onSize=${setSize} onTouch=${onTouch}
      label=${joining ? 'Touch the atom to join to' : 'Touch an atom or a bond, or go through them with the arrow keys'} />
    <${Trouble} fault=${fault ?? refusal.value} />
    <${Strip} drawn=${drawn} touched=${touched} name=${drawn && touched ? placeName(drawn, touched) : null} onTouch=${(/** @type {Place} */ place) => touch(key, place)} />
  <//>`;
}
