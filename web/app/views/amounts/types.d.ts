import type { AmountKind } from '../../types';

/** What part a portion plays in a question: its words, whether there may be several, and what is asked of it. */
export interface Role { key: string; one: string; many: string; several: boolean; signals: boolean; mass: boolean; solvent: boolean }
export interface Kind { kind: AmountKind; name: string; says: string; roles: Role[] }
/** What the engine's tables hold: standards, and what may be left in a product. Shifts in ppm, molar mass in g/mol. */
export interface AmountTables {
  standards: { name: string; molar_mass: number; signals: { ppm: number; protons: number }[]; notes: string; source: string }[];
  residues: { name: string; signals: { ppm: number; protons: number; mult: string }[] }[];
}
export interface Figure { value: number; u: number; expanded: number; shares: Record<string, number> }
/** The engine's answer; which figures it holds depends on the kind. */
export interface AmountAnswer {
  ratio?: Figure; mole_percent?: Record<string, Figure>; mass_percent?: Record<string, Figure>;
  conversion_percent?: Figure; yield_percent?: Figure; purity_percent?: Figure; assumptions: string[];
}
