import { html } from 'htm/preact';
import { Scrolled } from '../../components/scrolled.js';
import { path } from '../../state/route.js';
import { wide } from '../../state/screen.js';
import { NextStation } from '../next/next.js';
import { Readings } from '../readings/readings.js';
import { readingSheet } from '../readings/sheets.js';
import { Structures } from '../structures/structures.js';
import { structureSheet } from '../structures/sheets.js';
import { Tally } from '../tally/tally.js';
import { tallySheet } from '../tally/sheets.js';
import { CaseBar } from './bar.js';
import { FactsLine } from './facts.js';
import { Stations } from './stations.js';

/** @typedef {import('../../types').CaseDoc} CaseDoc */

/** @type {Record<string, (props: { doc: CaseDoc }) => any>} */
const VIEWS = { readings: Readings, structures: Structures, tally: Tally, next: NextStation };
/** @type {Record<string, (doc: CaseDoc, steps: string[]) => any>} */
const SHEETS = { readings: readingSheet, structures: structureSheet, tally: tallySheet, next: () => null };
const LEFT = ['readings', 'structures'];

/** Which station each side shows; the side not addressed keeps what it showed last. */
const shown = { left: 'readings', right: 'tally' };

/** @param {string} station */
function remember(station) {
  if (LEFT.includes(station)) shown.left = station;
  else shown.right = station;
}

/** @param {{ doc: CaseDoc }} props */
export function CaseFrame({ doc }) {
  const station = path.value[2] && VIEWS[path.value[2]] ? path.value[2] : 'readings';
  const steps = path.value.slice(3);
  remember(station);
  const sheet = steps.length ? SHEETS[station]?.(doc, steps) : null;
  return wide.value ? html`<${TwoPanes} doc=${doc} station=${station} sheet=${sheet} />`
    : html`<${OnePane} doc=${doc} station=${station} sheet=${sheet} />`;
}

/** @param {{ doc: CaseDoc, station: string, sheet: any }} props */
function OnePane({ doc, station, sheet }) {
  if (sheet) return html`<div class="frame frame-sheet">${sheet}</div>`;
  const View = /** @type {any} */ (VIEWS[station]);
  return html`<div class="frame">
    <${CaseBar} doc=${doc} /><${FactsLine} doc=${doc} />
    <${Scrolled} key=${station} name=${`${doc.id} ${station}`} main><${View} doc=${doc} /><//>
    <${Stations} doc=${doc} active=${[station]} />
  </div>`;
}

/** @param {{ doc: CaseDoc, station: string, sheet: any }} props */
function TwoPanes({ doc, station, sheet }) {
  const Left = /** @type {any} */ (VIEWS[shown.left]);
  const Right = /** @type {any} */ (VIEWS[shown.right]);
  const onLeft = LEFT.includes(station);
  return html`<div class="frame frame-wide">
    <${CaseBar} doc=${doc} /><${FactsLine} doc=${doc} />
    <div class="panes">
      ${onLeft && sheet ? html`<main class="station" key="left-sheet">${sheet}</main>`
        : html`<${Scrolled} key=${shown.left} name=${`${doc.id} ${shown.left}`} main><${Left} doc=${doc} /><//>`}
      ${!onLeft && sheet ? html`<section class="station" key="right-sheet">${sheet}</section>`
        : html`<${Scrolled} key=${shown.right} name=${`${doc.id} ${shown.right}`}><${Right} doc=${doc} /><//>`}
    </div>
    <${Stations} doc=${doc} active=${[shown.left, shown.right]} />
  </div>`;
}
