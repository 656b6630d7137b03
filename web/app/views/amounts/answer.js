import { html } from 'htm/preact';
import { Section } from '../../components/parts.js';
import { useAnswer } from '../../state/use-answer.js';
import { fixed } from '../../words/numbers.js';
import { kindOf } from './kinds.js';
import { amountsOf, amountsQuestion } from './question.js';

/** @typedef {import('./types').Figure} Figure */
/** @typedef {import('./types').AmountAnswer} AmountAnswer */

/** Inputs that bring less of the variance than this are not worth a line. */
const LEAST_SHARE = 0.02;
const MOST_DIGITS = 6;

/** Decimals that show an uncertainty to two figures. @param {number} u */
function digitsFor(u) {
  if (!(u > 0)) return 2;
  return Math.min(MOST_DIGITS, Math.max(0, 1 - Math.floor(Math.log10(u))));
}

/** "92.4 ± 1.3" @param {Figure} figure */
export const figureWords = ({ value, u }) => `${fixed(value, digitsFor(u))} ± ${fixed(u, digitsFor(u))}`;

/** One figure large, with its 95 % and what it rests on. @param {{ name: string, figure: Figure, unit: string }} props */
function Main({ name, figure, unit }) {
  const shares = Object.entries(figure.shares).filter(([, share]) => share >= LEAST_SHARE).sort((a, b) => b[1] - a[1]);
  return html`<div class="figure-main"><span>${name}</span><b>${figureWords(figure)} ${unit}</b>
    <p class="whisper">± is one standard uncertainty; within ${fixed(figure.expanded, digitsFor(figure.u))} in about 95 of 100.${shares.length > 0 && ` It comes from
      ${shares.map(([what, share]) => `${what} ${Math.round(100 * share)} %`).join(', ')}.`}</p></div>`;
}

/** More than there can be, beyond its own uncertainty. @param {Figure | undefined} figure */
const tooMuch = (figure) => figure && figure.value - figure.expanded > 100;

/** The single figures an answer may hold, what they are called and their unit. @type {['ratio' | 'conversion_percent' | 'yield_percent' | 'purity_percent', string, string][]} */
const SINGLE = [['ratio', 'ratio, first to second', ': 1'], ['conversion_percent', 'conversion', '%'], ['yield_percent', 'yield', '%'], ['purity_percent', 'purity by mass', '%']];

/** The answer as lines of plain text. @param {import('../../types').CaseDoc} doc @param {AmountAnswer} answer @returns {string[]} */
export function amountLines(doc, answer) {
  const each = (/** @type {string} */ what, /** @type {Record<string, Figure> | undefined} */ figures) =>
    Object.entries(figures ?? {}).map(([name, figure]) => `  ${name}: ${figureWords(figure)} ${what}`);
  return [`Amounts, ${kindOf(amountsOf(doc).kind).name.toLowerCase()} (one standard uncertainty):`,
    ...SINGLE.flatMap(([key, name, unit]) => { const figure = answer[key]; return figure ? [`  ${name}: ${figureWords(figure)} ${unit}`] : []; }),
    ...each('mole %', answer.mole_percent), ...each('mass %', answer.mass_percent),
    'This holds if:', ...answer.assumptions.map((line) => `  ${line}`)];
}

/** A figure for each species. @param {{ title: string, figures: Record<string, Figure> }} props */
const Each = ({ title, figures }) => html`<${Section} title=${title}><dl class="facts-table">${Object.entries(figures).map(([name, figure]) => html`<div key=${name}>
  <dt>${name}</dt><dd>${figureWords(figure)} %</dd></div>`)}</dl><//>`;

/** The figures of a case for its record; nothing while the question is not whole. @param {{ doc: import('../../types').CaseDoc }} props */
export function RecordedAmounts({ doc }) {
  const answer = useAmounts(doc);
  return answer && html`<${Section} title="Amounts: ${kindOf(amountsOf(doc).kind).name.toLowerCase()}"><${Answer} answer=${answer} /><//>`;
}

/** What the amounts of a case come to, null while the question is not whole. @param {import('../../types').CaseDoc} doc @returns {AmountAnswer | null} */
export function useAmounts(doc) {
  const { params } = doc.amounts ? amountsQuestion(doc) : { params: null };
  const { value } = useAnswer('amounts', params);
  return params ? /** @type {any} */ (value) : null;
}

/** The figures asked for, with uncertainty and assumptions. @param {{ answer: AmountAnswer }} props */
export const Answer = ({ answer }) => html`<div class="amount-answer" aria-live="polite">
  ${SINGLE.map(([key, name, unit]) => answer[key] && html`<${Main} key=${key} name=${name} figure=${answer[key]} unit=${unit} />`)}
  ${(tooMuch(answer.yield_percent) || tooMuch(answer.purity_percent)) && html`<p class="trouble" role="alert">More than 100 %.
    <span>A signal holds more than it was taken for, a number of H or a mass is wrong, or something else was weighed with it.</span></p>`}
  ${answer.mole_percent && html`<${Each} title="Mole per cent" figures=${answer.mole_percent} />`}
  ${answer.mass_percent && html`<${Each} title="Mass per cent" figures=${answer.mass_percent} />`}
  <${Section} title="This holds if"><ul class="assumptions">${answer.assumptions.map((line) => html`<li key=${line}>${line}</li>`)}</ul><//>
</div>`;
