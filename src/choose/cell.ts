/** Points at which the integrals of a cell are taken, as shares of it; both weigh one half: Gauss's rule, exact for cubics. */
export const NODE_SHARES: readonly number[] = [0.5 - Math.sqrt(1 / 12), 0.5 + Math.sqrt(1 / 12)];

/** What holds at one point of a cell. Under way per metre, on a stay per second. */
export interface CellNode {
  /** -(1/g²) ∂g/∂w of each component: time per metre and m/s; 0 on a stay. */
  readonly timeBy: Float64Array;
  /** ∂(r/g)/∂w: store units per metre and m/s. On a stay ∂r/∂w. */
  readonly useBy: Float64Array;
  /** (1/g²) ∂g/∂t and ∂(r/g)/∂t through the fields' own change in time; 0 on a stay. */
  readonly delay: number;
  readonly useDelay: number;
  /** True course, degrees. */
  readonly course: number;
}

/** A stretch of the track, or a part of a stay, in which the fields are smooth. */
export interface TrackCell {
  readonly leg: number;
  /** Metres from the leg's start; equal on a stay. */
  readonly from: number;
  readonly to: number;
  /** Middle, s since departure, and how long the craft is in it. */
  readonly time: number;
  readonly duration: number;
  /** Middle, degrees. */
  readonly lat: number;
  readonly lon: number;
  readonly nodes: readonly CellNode[];
  /** On the first cell of a stay: by how much the rate at its end exceeds that at its start, store units per s; else 0. */
  readonly later: number;
}

/** How long a cell may be: by the finest correlation among the errors, m and s. */
export interface CellSize {
  readonly length_m: number;
  readonly time_s: number;
}
