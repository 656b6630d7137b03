import { html } from 'htm/preact';
import { useLayoutEffect, useRef } from 'preact/hooks';

/** Where each place was scrolled to when it was left. @type {Map<string, number>} */
const left = new Map();

/** A part of the screen that scrolls, and comes back to where it was.
 * @param {{ name: string, main?: boolean, children?: any }} props `name` tells the places apart */
export function Scrolled({ name, main = false, children }) {
  const place = useRef(/** @type {HTMLElement | null} */ (null));
  useLayoutEffect(() => {
    if (place.current) place.current.scrollTop = left.get(name) ?? 0;
  }, [name]);
  const onScroll = (/** @type {any} */ event) => left.set(name, event.currentTarget.scrollTop);
  return html`<${main ? 'main' : 'section'} class="station" ref=${place} onScroll=${onScroll}>${children}<//>`;
}
