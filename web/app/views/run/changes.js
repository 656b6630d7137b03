import { html } from 'htm/preact';

/** @param {{ doc: import('../../types').CaseDoc, start: string, product: string }} props */
export function Changes({ doc, start, product }) {
  return doc && start && product ? html`` : html``;
}
