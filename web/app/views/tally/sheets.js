import { html } from 'htm/preact';
import { ReasonSheet } from './reason-sheet.js';
import { TableSheet } from './table.js';

/** @param {import('../../types').CaseDoc} doc @param {string[]} steps */
export function tallySheet(doc, [name = '', ...rest]) {
  if (name === 'reason') return html`<${ReasonSheet} doc=${doc} at=${Number(rest[0])} rowKey=${rest[1] ?? ''} />`;
  return name === 'table' ? html`<${TableSheet} doc=${doc} />` : null;
}
