import { html } from 'htm/preact';
import { useLayoutEffect, useRef, useState } from 'preact/hooks';
import { Svg } from '../../components/drawing.js';
import { beside, near, places, samePlace } from './places.js';

/** @typedef {import('./types').Canvas} Canvas */
/** @typedef {import('./types').Place} Place */
/** @typedef {import('./types').Size} Size */

const RING = 22;
const SMALL_RING = 15;
/** A second touch this near the first, CSS pixels, means the place behind the first one. */
const SAME_SPOT = 18;

/** Where an event is in pixels of a drawing that fills `box` as far as its shape allows.
 * @param {MouseEvent} event @param {DOMRect} box @param {Size} size @returns {[number, number]} */
function inDrawing(event, box, { width, height }) {
  const scale = Math.min(box.width / width, box.height / height);
  return [(event.clientX - box.left - box.width / 2) / scale + width / 2, (event.clientY - box.top - box.height / 2) / scale + height / 2];
}

/** The size of an element in whole pixels, followed as it changes. @param {{ current: HTMLElement | null }} ref @returns {Size | null} */
export function useSize(ref) {
  const [size, setSize] = useState(/** @type {Size | null} */ (null));
  useLayoutEffect(() => {
    const element = ref.current;
    if (!element) return undefined;
    const watch = new ResizeObserver(() => {
      const { clientWidth: width, clientHeight: height } = element;
      setSize((old) => (width < 16 || height < 16 || (old?.width === width && old.height === height) ? old : { width, height }));
    });
    watch.observe(element);
    return () => watch.disconnect();
  }, []);
  return size;
}

/** The drawing, big; a touch means the nearest atom or bond, a second one at the same spot the next nearest.
 * @param {{ drawn: Canvas | null, size: Size | null, touched: Place | null, choice: Place[] | null, label: string, busy: boolean,
 *   onSize: (size: Size) => void, onTouch: (place: Place) => void }} props `size`: for which it was drawn; `choice` limits what can be touched */
export function Stage({ drawn, size, touched, choice, label, busy, onSize, onTouch }) {
  const holder = useRef(/** @type {HTMLElement | null} */ (null));
  const last = useRef({ x: -99, y: -99 });
  const place = useSize(holder);
  useLayoutEffect(() => { if (place) onSize(place); }, [place]);
  useLayoutEffect(() => { last.current = { x: -99, y: -99 }; }, [drawn?.source]);
  const all = drawn ? choice ?? places(drawn) : [];
  const touch = (/** @type {MouseEvent} */ event) => {
    if (!drawn || !size || !holder.current) return;
    const [x, y] = inDrawing(event, holder.current.getBoundingClientRect(), size);
    const found = near(drawn, x, y, all);
    const again = Math.hypot(x - last.current.x, y - last.current.y) < SAME_SPOT && found.findIndex((place) => samePlace(place, touched));
    last.current = { x, y };
    const next = typeof again === 'number' && again >= 0 && !choice ? found[(again + 1) % Math.min(found.length, 3)] : found[0];
    if (next) onTouch(next);
  };
  const onKeyDown = (/** @type {KeyboardEvent} */ event) => {
    const by = /** @type {Record<string, -1 | 1>} */ ({ ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1 })[event.key];
    const next = by && beside(all, touched, by);
    if (next && !choice) { event.preventDefault(); onTouch(next); }
  };
  return html`<div class="grow-stage ${busy ? 'grow-busy' : ''}" ref=${holder} role="group" aria-label=${label} aria-busy=${String(busy)} tabindex="0"
      onClick=${touch} onKeyDown=${onKeyDown}>
    ${drawn && html`<${Svg} svg=${drawn.svg} label="Drawing of ${drawn.smiles}" class="grow-drawing" />
      ${size && html`<svg class="grow-marks" viewBox="0 0 ${size.width} ${size.height}" aria-hidden="true">
        ${choice?.map((place) => html`<${Mark} key=${place.at} drawn=${drawn} place=${place} small />`)}
        ${touched && html`<${Mark} drawn=${drawn} place=${touched} />`}</svg>`}`}
  </div>`;
}

/** A ring about an atom, a long one about a bond. @param {{ drawn: Canvas, place: Place, small?: boolean }} props */
function Mark({ drawn, place, small = false }) {
  if (place.kind === 'atom') {
    const [x, y] = drawn.coords[place.at] ?? [0, 0];
    return html`<circle class=${small ? 'grow-may' : 'grow-ring'} cx=${x} cy=${y} r=${small ? SMALL_RING : RING} />`;
  }
  const [a = 0, b = 0] = drawn.bonds[place.at] ?? [];
  const [[x, y], [u, v]] = [drawn.coords[a] ?? [0, 0], drawn.coords[b] ?? [0, 0]];
  const [length, turn] = [Math.hypot(u - x, v - y) + RING / 2, Math.atan2(v - y, u - x) * 180 / Math.PI];
  return html`<rect class="grow-ring" x=${(x + u - length) / 2} y=${(y + v) / 2 - SMALL_RING} width=${length} height=${2 * SMALL_RING} rx=${SMALL_RING}
    transform="rotate(${turn} ${(x + u) / 2} ${(y + v) / 2})" />`;
}
