/** One 1H signal as typed; numbers stay text so that what was typed is never lost. */
export interface ProtonRow { id: string; shift: string; mult: string; j: string; h: string; note?: string; lines?: LineList }
/** The printed lines of one signal as typed; `tall` is a number, or low, mid, high. */
export interface LineList { unit: 'ppm' | 'hz'; heights: 'none' | 'rough' | 'numbers'; rows: { at: string; tall: string }[] }
/** One 13C line as typed. */
export interface CarbonRow { id: string; ppm: string; kind: string; n: string }
/** One IR band; `region` holds the strip region while the position is still empty. */
export interface BandRow { id: string; cm1: string; strength: string; shape: string; region: string }
/** A stretch of flat IR baseline, cm-1. */
export interface ClearRow { id: string; lo: number; hi: number }
export interface PeakRow { id: string; mz: string; rel: string }
export interface WetRow { id: string; test: string; result: 'positive' | 'negative' }
export interface AccurateMass { found: string; adduct: string; ppm: string }
/** A picture of a printout; the image itself lies in the photo store under the same id. */
export interface PhotoRef { id: string; name: string; taken: string }
/** A candidate of the case. `smiles`, `formula` and `svg` come from the engine when it is added. */
export interface Candidate { id: string; source: string; name: string; smiles: string; formula: string; svg: string }
/** What the case list shows without waking the chemistry. */
export interface Summary { verdict: Verdict; text: string; lead: string }

/** A look-alike the engine put up: how it was reached, a move each. Weight and verdict are null until it is weighed;
 * `near` when it stands near enough to take the verdict away. */
export interface Rival {
  smiles: string; how: string[]; distance: number; plausibility: number; formula: string;
  weight_db: number | null; verdict: Verdict | null; reason: string; near: boolean;
}

/** A compound put into a step: the start or its partner. */
export interface Compound { smiles: string; name: string }
/** What was run to make the sample. `steps` hold reagents by name, in the order they were added. */
export interface Ran { start: Compound | null; partner: Compound | null; steps: string[][] }

export type AmountKind = 'ratio' | 'conversion' | 'yield' | 'purity' | 'solvent';
/** A signal that stands for a portion: a 1H row, its integral where it differs from the row's, and the H of the portion in it. */
export interface PortionSignal { row: string; integral?: string; protons: string }
/** A species or weighed portion of a question about amounts; masses in mg, purity in per cent, molar mass in g/mol. */
export interface Portion {
  id: string; name: string; structure: string; formula: string; molar: string; signals: PortionSignal[];
  mass: string; u: string; purity: string;
}
/** Questions about amounts; `percent` is the standard uncertainty of integrals, `portions` by the part they play. */
export interface Amounts { kind: AmountKind; percent: string; stoichiometry: string; portions: Record<string, Portion[]> }

export interface CaseDoc {
  id: string;
  kind: 'hoodside-case';
  version: 1;
  title: string;
  created: string;
  changed: string;
  invented: boolean;
  demo: string;
  story: string;
  /** A view worth a look, named in the story; `to` are the steps of its address behind the case. */
  look?: { words: string; to: string[] };
  /** Hazards of what was run, shown with the readings. */
  cautions: string[];
  formula: string;
  solvent: string;
  mhz: string;
  raw: boolean;
  h1: ProtonRow[];
  c13: CarbonRow[];
  irMedium: string;
  ir: BandRow[];
  irClear: ClearRow[];
  ms: PeakRow[];
  hrms: AccurateMass;
  analysis: Record<string, string>;
  wet: WetRow[];
  structures: Candidate[];
  intended: string;
  photos: PhotoRef[];
  amounts?: Amounts;
  /** SMILES of look-alikes waved away. */
  dismissed?: string[];
  run?: Ran;
  last: Summary | null;
}

export type Verdict = 'fits' | 'clashes' | 'undecided' | 'none';

/** An error as the engine or the worker client gives it. */
export interface Fault { code?: string; message: string; hint: string; field: string; value?: string | null }

export interface Finding {
  kind: string; weight_db: number; text: string; readings: string[]; atoms: number[]; source: string;
}
export interface Assigned { reading: string; predicted: string; atoms: number[] }
/** A prediction without a reading, or a reading without a prediction; `name` is what it probably is. */
export interface Leftover { ref: string; text: string; name: string; atoms: number[] }
/** A candidate as weighed. `index` is its place among the candidates asked about, null for a rival; `how` says how
 * a rival was reached. */
export interface Weighed {
  smiles: string; origin: string; index: number | null; name: string; how: string[]; formula: string; ok_formula: boolean; verdict: Verdict;
  reason: string; sentence: string; weight_db: number; share: number; findings: Finding[]; assignment: Assigned[];
  missing: Leftover[]; unexplained: Leftover[]; expected: Omit<ProtonGroup, 'equivalence' | 'terms'>[];
}
/** `separates` holds pairs of places in the ranking. */
export interface Advice {
  measure: string; why: string; separates: number[][]; expected_db: number; cautions: string[]; effort: string;
  if_then: string[]; test?: string;
}
export interface CheckAnswer {
  id: string; formula: string; dbe: number | null; warnings: string[]; candidates: Weighed[]; next: Advice[];
}

export interface Term { label: string; value: number; source: string }
export interface ProtonGroup {
  ppm: number; sd: number; mult: string; j: number[]; n: number; atoms: number[]; exchangeable: boolean;
  equivalence: string; environment?: string; terms: Term[]; lo?: number | null; hi?: number | null;
}
export interface CarbonGroup {
  ppm: number; sd: number; kind: string; n: number; atoms: number[]; environment?: string; terms: Term[];
}
export interface IrExpectation {
  lo: number; hi: number; typical?: number; mode: string; group: string; strength: string; shape: string;
  absence_counts: boolean; atoms?: number[]; source?: string;
}
export interface MassExpectation { mz: number; label: string; weight: number; atoms: number[]; source: string }
export interface Prediction {
  smiles: string; formula: string; exact_mass: number; dbe: number;
  h1: ProtonGroup[]; c13: CarbonGroup[]; ir: IrExpectation[]; ms: { ions?: MassExpectation[] };
}

export interface IrRegion { id: string; lo: number; hi: number; name: string; holds: string[]; absence: string }
export interface FormulaFacts {
  formula: string; parts: [string, number][]; exact_mass: number; average_mass: number; dbe: number;
  isotope_pattern: { mz: number; rel: number }[]; warnings: string[];
}
export interface Description {
  source: string; smiles: string; formula: string; exact_mass: number; average_mass: number; dbe: number;
  charge: number; inchi: string; inchikey: string; svg: string; heavy_atoms: number;
  stereocentres: { atom: number; label: string }[]; warnings: string[];
}
export interface Parsed {
  readings: any;
  unread: { text: string; start: number; end: number; why: string }[];
  pieces: { text: string; start: number; end: number; means: string }[];
}
