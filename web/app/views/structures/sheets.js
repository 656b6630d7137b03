import { html } from 'htm/preact';
import { Grow } from '../grow/grow.js';
import { ProposalsSheet } from '../rivals/proposals-sheet.js';
import { RivalsSheet } from '../rivals/rivals-sheet.js';
import { Run } from '../run/run.js';
import { NameSheet } from './name-sheet.js';
import { OneStructure } from './one-sheet.js';
import { PasteStructure } from './paste-sheet.js';
import { ScanSheet } from './scan-sheet.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** @type {Record<string, (doc: CaseDoc, arg: string) => any>} */
const SHEETS = {
  grow: (doc) => html`<${Grow} doc=${doc} />`,
  run: (doc, arg) => html`<${Run} doc=${doc} sheet=${arg} />`,
  rivals: (doc) => html`<${RivalsSheet} doc=${doc} />`,
  proposals: (doc) => html`<${ProposalsSheet} doc=${doc} />`,
  paste: (doc) => html`<${PasteStructure} doc=${doc} />`,
  scan: (doc) => html`<${ScanSheet} doc=${doc} />`,
  name: (doc) => html`<${NameSheet} doc=${doc} />`,
  one: (doc, arg) => html`<${OneStructure} doc=${doc} id=${arg} />`,
};

/** @param {CaseDoc} doc @param {string[]} steps */
export const structureSheet = (doc, [name = '', arg = '']) => SHEETS[name]?.(doc, arg) ?? null;
