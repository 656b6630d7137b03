import { useRef } from 'preact/hooks';
import { shifted, zoomed } from './view.js';

/** @typedef {import('./view.js').View} View */

/** A finger that moved no farther than this has tapped, CSS pixels. */
const TAP_PX = 9;

/** Drag to move, two fingers to zoom, tap to pick. Each has a button too.
 * @param {{ view: View, whole: View, setView: (view: View) => void, onTap: (ppm: number) => void }} given */
export function useGestures({ view, whole, setView, onTap }) {
  const fingers = useRef(/** @type {Map<number, number>} */ (new Map()));
  const moved = useRef(0);
  const box = (/** @type {any} */ event) => event.currentTarget.getBoundingClientRect();
  const ppmAt = (/** @type {any} */ event) => {
    const { left, width } = box(event);
    return view.hi - ((event.clientX - left) / width) * (view.hi - view.lo);
  };
  const down = (/** @type {any} */ event) => {
    if (!fingers.current.size) moved.current = 0;
    fingers.current.set(event.pointerId, event.clientX);
    event.currentTarget.setPointerCapture?.(event.pointerId);
  };
  const move = (/** @type {any} */ event) => {
    const before = fingers.current.get(event.pointerId);
    if (before === undefined) return;
    const by = event.clientX - before;
    moved.current += Math.abs(by);
    const other = [...fingers.current].find(([id]) => id !== event.pointerId)?.[1];
    fingers.current.set(event.pointerId, event.clientX);
    if (other === undefined) {
      if (moved.current > TAP_PX) setView(shifted(view, by / box(event).width, whole));
    } else pinch(event, before, other);
  };
  const pinch = (/** @type {any} */ event, /** @type {number} */ before, /** @type {number} */ other) => {
    const [was, is] = [Math.abs(before - other), Math.abs(event.clientX - other)];
    if (was < 20 || is < 20) return;
    const { left, width } = box(event);
    const middle = view.hi - (((event.clientX + other) / 2 - left) / width) * (view.hi - view.lo);
    setView(zoomed(view, is / was, whole, middle));
  };
  const up = (/** @type {any} */ event) => {
    const known = fingers.current.delete(event.pointerId);
    if (known && event.type === 'pointerup' && !fingers.current.size && moved.current <= TAP_PX) onTap(ppmAt(event));
  };
  return { onPointerDown: down, onPointerMove: move, onPointerUp: up, onPointerCancel: up };
}
