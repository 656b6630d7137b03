import { html } from 'htm/preact';

/** A formula with its figures lowered: C10H12O. Also takes charges and solvents such as CDCl3.
 * @param {{ text: string }} props */
export function Formula({ text }) {
  const parts = text.split(/(\d+)/).map((part, i) => (i % 2 ? html`<sub>${part}</sub>` : part));
  return html`<span class="formula">${parts}</span>`;
}

/** Running text in which nuclei stand raised (1H, 13C) and formulas of a few known shapes lowered.
 * @param {{ text: string }} props */
export function Words({ text }) {
  const parts = String(text ?? '').split(/(\b(?:1H|13C|19F|31P)\b|\b[A-Z][A-Za-z0-9()]*\d[A-Za-z0-9()]*\b)/);
  return html`${parts.map((part, i) => (i % 2 ? typeset(part) : part))}`;
}

/** @param {string} part */
function typeset(part) {
  const nucleus = part.match(/^(1|13|19|31)(H|C|F|P)$/);
  if (nucleus) return html`<sup>${nucleus[1]}</sup>${nucleus[2]}`;
  return /^([A-Z][a-z]?\d*|[()]\d*)+$/.test(part) ? html`<${Formula} text=${part} />` : part;
}

/** An ion such as [M+NH4]+ with its charge raised. @param {{ text: string }} props */
export function Ion({ text }) {
  const parts = text.match(/^(\[.*\])(.*)$/);
  if (!parts) return html`<span>${text}</span>`;
  return html`<span class="formula"><${Formula}
    text=${parts[1]?.replace('-', '\u2212') ?? ''} /><sup>${parts[2]?.replace('-', '\u2212').replace('.', '\u2022')}</sup></span>`;
}
