import { html } from 'htm/preact';
import { AnalysisSheet } from './analysis-sheet.js';
import { CarbonSheet } from './carbon-sheet.js';
import { FieldSheet } from './field-sheet.js';
import { FormulaSheet } from './formula-sheet.js';
import { HrmsSheet } from './hrms-sheet.js';
import { InfraredSheet } from './infrared-sheet.js';
import { JcampSheet } from './jcamp-sheet.js';
import { LinesSheet } from './lines-sheet.js';
import { MassesSheet } from './masses-sheet.js';
import { PasteSheet } from './paste-sheet.js';
import { PhotoSheet } from './photos.js';
import { ProtonSheet } from './proton-sheet.js';
import { WetSheet } from './wet-sheet.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** @type {Record<string, (doc: CaseDoc, arg: string) => any>} */
const SHEETS = {
  paste: (doc) => html`<${PasteSheet} doc=${doc} />`,
  jcamp: (doc) => html`<${JcampSheet} doc=${doc} />`,
  formula: (doc) => html`<${FormulaSheet} doc=${doc} />`,
  hrms: (doc) => html`<${HrmsSheet} doc=${doc} />`,
  ms: (doc, arg) => html`<${MassesSheet} doc=${doc} rowId=${arg} />`,
  analysis: (doc) => html`<${AnalysisSheet} doc=${doc} />`,
  ir: (doc, arg) => html`<${InfraredSheet} doc=${doc} regionId=${arg} />`,
  h1: (doc, arg) => html`<${ProtonSheet} doc=${doc} rowId=${arg} />`,
  lines: (doc, arg) => html`<${LinesSheet} doc=${doc} rowId=${arg} />`,
  field: (doc) => html`<${FieldSheet} doc=${doc} />`,
  c13: (doc, arg) => html`<${CarbonSheet} doc=${doc} rowId=${arg} />`,
  wet: (doc, arg) => html`<${WetSheet} doc=${doc} test=${arg} />`,
  photo: (doc, arg) => html`<${PhotoSheet} doc=${doc} id=${arg} />`,
};

/** The sheet an address names, null when it names none. @param {CaseDoc} doc @param {string[]} steps */
export const readingSheet = (doc, [name = '', arg = '']) => SHEETS[name]?.(doc, arg) ?? null;
