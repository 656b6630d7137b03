import { html } from 'htm/preact';
import { Sign } from '../../components/sign.js';
import { currentCheck } from '../../state/check.js';
import { verdictOf } from '../../words/verdict.js';

/** The verdict of the case as it stands; faint while a newer check runs.
 * @param {{ doc: import('../../types').CaseDoc, size?: number }} props */
export function CaseSign({ doc, size = 26 }) {
  const { found, fresh } = currentCheck.value;
  const verdict = found ? verdictOf(doc, found) : doc.structures.length ? doc.last?.verdict ?? 'none' : 'none';
  return html`<span class=${fresh || !found ? '' : 'stale'}><${Sign} verdict=${verdict} size=${size} /></span>`;
}
