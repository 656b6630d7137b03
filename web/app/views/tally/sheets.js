import { html } from 'htm/preact';
import { ReasonSheet } from './reason-sheet.js';
import { TableSheet } from './table.js';
import { TraceSheet } from '../trace/trace-sheet.js';

/** @param {import('../../types').CaseDoc} doc @param {string[]} steps */
export function tallySheet(doc, [name = '', ...rest]) {
  if (name === 'reason') return html`<${ReasonSheet} doc=${doc} at=${Number(rest[0])} rowKey=${rest[1] ?? ''} />`;
  if (name === 'trace') return html`<${TraceSheet} doc=${doc} mhz=${rest[0] ?? ''} />`;
  return name === 'table' ? html`<${TableSheet} doc=${doc} />` : null;
}
