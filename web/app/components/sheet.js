import { html } from 'htm/preact';
import { useEffect, useRef } from 'preact/hooks';
import { Icon } from './icon.js';

/** A full-height sheet over a station: back, title, content, and what stays at the thumb.
 * @param {{ title: any, back: string, sign?: any, action?: any, children: any, foot?: any, class?: string }} props */
export function Sheet({ title, back, sign, action, children, foot, class: extra = '' }) {
  const heading = useRef(/** @type {HTMLElement | null} */ (null));
  // A reader starts at the title, unless a field of the sheet has already taken the focus.
  useEffect(() => {
    if (!document.activeElement?.closest('.sheet')) heading.current?.focus({ preventScroll: true });
  }, []);
  return html`<div class="sheet ${extra}">
    <header class="bar">
      <a class="bar-back" href=${back} aria-label="Back"><${Icon} name="back" size=${28} /></a>
      <h1 tabindex="-1" ref=${heading}>${title}</h1>
      ${action}
      <span class="bar-sign">${sign}</span>
    </header>
    <div class="sheet-body">${children}</div>
    ${foot && html`<footer class="sheet-foot">${foot}</footer>`}
  </div>`;
}
