import { html } from 'htm/preact';
import { useLayoutEffect, useRef } from 'preact/hooks';
import { useAnswer } from '../state/use-answer.js';

/** @type {Map<string, Element>} */
const parsed = new Map();
const KEEP = 200;

/** SVG text as an element that takes the size of its place. @param {string} text */
function toElement(text) {
  const known = parsed.get(text);
  if (known) return known;
  const svg = new DOMParser().parseFromString(text, 'image/svg+xml').documentElement;
  svg.removeAttribute('width');
  svg.removeAttribute('height');
  if (parsed.size > KEEP) parsed.clear();
  parsed.set(text, svg);
  return svg;
}

/** A drawing already at hand. @param {{ svg: string, label: string, class?: string }} props */
export function Svg({ svg, label, class: extra = '' }) {
  const holder = useRef(/** @type {HTMLElement | null} */ (null));
  useLayoutEffect(() => {
    holder.current?.replaceChildren(document.importNode(toElement(svg), true));
  }, [svg]);
  return html`<span class="drawing ${extra}" ...${spoken(label)} ref=${holder}></span>`;
}

/** @param {string} label */
const spoken = (label) => (label ? { role: 'img', 'aria-label': label } : { 'aria-hidden': 'true' });

/** A drawing asked of the engine, with atoms lit where `atoms` names them.
 * `meanwhile` is shown until the engine has drawn it at this size.
 * @param {{ structure: string, label: string, width?: number, height?: number, atoms?: number[], class?: string, meanwhile?: string }} props */
export function Drawing({ structure, label, width = 320, height = 240, atoms, class: extra = '', meanwhile = '' }) {
  const { value } = useAnswer('draw', structure ? { structure, width, height, ...(atoms?.length && { atoms }) } : null);
  const svg = /** @type {any} */ (value)?.svg ?? meanwhile;
  if (!svg) return html`<span class="drawing ${extra}" ...${spoken(label)}></span>`;
  return html`<${Svg} svg=${svg} label=${label} class=${extra} />`;
}
