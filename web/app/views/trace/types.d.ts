export interface TraceLine { ppm: number; hz: number; intensity: number }
/** A spin system of the trace; `groups` are places in `h1`. */
export interface TraceSystem { groups: number[]; broad: boolean; method: string; error_hz: number; lines: TraceLine[] }
export interface Trace {
  mhz: number; from_ppm: number; step_ppm: number; heights: number[]; systems: TraceSystem[];
  h1: { ppm: number; n: number; atoms: number[] }[];
}
/** A group of the trace with what first-order rules would say of it, and where its lines lie. */
export interface TracedGroup {
  at: number; ppm: number; n: number; atoms: number[]; mult: string; j: number[]; exchangeable: boolean; sd: number;
  lo: number; hi: number; lines: TraceLine[];
  /** Distance to the nearest group of its spin system, in Hz and in its own largest J; null where there is none. */
  nearest: { hz: number; times: number } | null;
}
/** A signal with the lines typed from the printout. */
export interface TypedSignal { id: string; shift: string; n: number; lines: { ppm: number; height: number }[] }
/** What a fit of a structure's spin system to lines gave. */
export interface Fitted {
  mhz: number; rms_hz: number; groups: number[]; lines: TraceLine[];
  shifts: { group: number; atoms: number[]; predicted_ppm: number; ppm: number; uncertain_hz: number | null }[];
  couplings: { groups: number[]; predicted_hz: number; hz: number; uncertain_hz: number | null }[];
}
