import { html } from 'htm/preact';

/** @typedef {import('../types').Verdict} Verdict */

/** @type {Record<Verdict, string>} */
export const VERDICT_WORDS = { fits: 'fits', clashes: 'clashes', undecided: 'undecided', none: 'not measured' };

/** @type {Record<Verdict, () => any>} */
const SHAPES = {
  fits: () => html`<circle cx="12" cy="12" r="10.5" class="sign-fill" />`,
  clashes: () => html`<circle cx="12" cy="12" r="9.5" class="sign-line" /><path d="M5.4 18.6 18.6 5.4"
    class="sign-line" />`,
  undecided: () => html`<circle cx="12" cy="12" r="9.8" class="sign-line" />
    <path d="M12 2.2a9.8 9.8 0 0 0 0 19.6Z" class="sign-fill" />`,
  none: () => html`<circle cx="12" cy="12" r="9.8" class="sign-dots" />`,
};

/** The mark of a verdict: filled disc, crossed ring, half-filled ring, dotted ring. Shape says it before hue does.
 * @param {{ verdict: Verdict, size?: number, quiet?: boolean }} props `quiet` where words beside it say the same */
export function Sign({ verdict, size = 24, quiet = false }) {
  const name = quiet ? { 'aria-hidden': 'true' } : { role: 'img', 'aria-label': VERDICT_WORDS[verdict] };
  return html`<svg class="sign sign-${verdict}" viewBox="0 0 24 24" width=${size} height=${size} ...${name}>
    ${SHAPES[verdict]()}
  </svg>`;
}
