/** A structure laid out for touching, as `canvas` and `edit` answer it. Coordinates in pixels of the drawing. */
export interface Canvas {
  source: string; smiles: string; svg: string; coords: [number, number][];
  atoms: { symbol: string; hydrogens: number }[]; bonds: [number, number, number][];
  labels: { atoms: Record<string, string>; bonds: Record<string, string> };
  formula: string; exact_mass: number; dbe: number | null; against: Against | null;
}
/** What is missing and what is too many against the sample's formula; both "" when it is met. */
export interface Against { formula: string; needs: string; over: string; dbe: number | null }
export interface Option {
  label: string; name: string; step: string; arguments: Record<string, any>; needs_atom: boolean;
  family: string; fit: '' | 'completes' | 'fits' | 'exceeds';
}
/** What is touched: an atom or a bond by its number. */
export interface Place { kind: 'atom' | 'bond'; at: number }
export interface Size { width: number; height: number }
/** One state of the drawing. `source` is "" where a structure to begin from is still to be chosen;
 * `drawn` is the drawing as far as it is known, made for `frame`. */
export interface Step { source: string; touched: Place | null; drawn: Canvas | null; frame: Frame | null }
export interface Growth { steps: Step[]; at: number }
/** The question behind a drawing: size of the stage and formula of the sample. */
export interface Frame extends Size { formula: string }
