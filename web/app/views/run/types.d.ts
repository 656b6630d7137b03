import type { Ran } from '../../types';

export type { Compound } from '../../types';
/** What was run, and in `ticks` what is to be taken over, by SMILES, where it differs from what is proposed. */
export interface Run extends Ran { ticks: Record<string, boolean> }
export interface Outcome {
  smiles: string; role: 'product' | 'by-product' | 'over-reaction' | 'no reaction'; rule: string; name: string;
  note: string; stereo: string; cautions: string[]; source: string; formula: string;
}
export interface ReagentCaution {
  reagent: string; grave: boolean; gravest: string; words: string; incompatibilities: string; quench: string; source: string;
}
export interface Outcomes {
  outcomes: Outcome[]; understood: string[]; unknown: string[]; no_step: string; cautions: ReagentCaution[]; no_caution: string[];
}
export interface Reagent { name: string; names: string[]; shelf: string }
/** Whole conditions, taken with one tap. `partner` says what organic partner they want, "" for none. */
export interface Conditions { label: string; reagents: string; partner: string }
/** One thing to look for between start and product. `where`: shift or wavenumbers with the unit. */
export interface Change {
  kind: 'IR' | '1H' | '13C' | 'mass'; way: 'comes' | 'goes' | 'moves' | 'stays'; where: string; text: string;
  telling: number; source: string;
}
