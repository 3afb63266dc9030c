import type { TrackCell } from "./cell.ts";
import type { ErrorCovariance } from "./error-covariance.ts";
import { COMPONENTS } from "./local-sensitivity.ts";
import type { Sensitivities } from "./sensitivity.ts";

/**
 * Where a wrong forecast would hurt most: figures along a route for drawing, one entry a cell in order along it. On a stay
 * `from_m` and `to_m` are equal.
 */
export interface SensitivityProfile {
  readonly leg: Int32Array;
  /** Ends of the cell, metres from the route's start, and its middle in seconds since departure. */
  readonly from_m: Float64Array;
  readonly to_m: Float64Array;
  readonly time_s: Float64Array;
  /** What the route's time (s) and use (store units) change by where the medium runs 1 m/s more along, or across to starboard, over the cell. */
  readonly timePerAlong: Float64Array;
  readonly timePerCross: Float64Array;
  readonly usePerAlong: Float64Array;
  readonly usePerCross: Float64Array;
  /** The use's change with the wind on a craft in water; 0 elsewhere. */
  readonly usePerWindAlong: Float64Array;
  readonly usePerWindCross: Float64Array;
  /** The cell's part of the route's variance of time (s²) and use: they add up to it; below 0 where errors here make up for others. */
  readonly timeVariance: Float64Array;
  readonly useVariance: Float64Array;
}

/** A place on the route. */
export interface WeakPlace {
  readonly leg: number;
  readonly at_m: number;
  readonly lat: number;
  readonly lon: number;
}

export function sensitivityProfile(
  { cells, time, use }: Sensitivities,
  { timePart, usePart }: ErrorCovariance,
): SensitivityProfile {
  const component = (of: Float64Array, j: number) =>
    Float64Array.from(cells, (_, n) => of[n * COMPONENTS + j] as number);
  const starts = legStarts(cells);
  const from = (n: number) => starts[(cells[n] as TrackCell).leg - 1] as number;
  return {
    leg: Int32Array.from(cells, ({ leg }) => leg),
    from_m: Float64Array.from(cells, (cell, n) => from(n) + cell.from),
    to_m: Float64Array.from(cells, (cell, n) => from(n) + cell.to),
    time_s: Float64Array.from(cells, (cell) => cell.time),
    timePerAlong: component(time, 0),
    timePerCross: component(time, 1),
    usePerAlong: component(use, 0),
    usePerCross: component(use, 1),
    usePerWindAlong: component(use, 2),
    usePerWindCross: component(use, 3),
    timeVariance: timePart,
    useVariance: usePart,
  };
}

function legStarts(cells: readonly TrackCell[]): number[] {
  const lengths: number[] = [];
  for (const { leg, to } of cells) lengths[leg - 1] = to;
  return lengths.map((_, n) => lengths.slice(0, n).reduce((sum, length) => sum + length, 0));
}

/** Where an error adds most to the variances of time and of use, per time spent there; `null` where none does. */
export function weakestPlace(
  cells: readonly TrackCell[],
  { timePart, usePart }: ErrorCovariance,
): { readonly time: WeakPlace | null; readonly use: WeakPlace | null } {
  return { time: greatest(cells, timePart), use: greatest(cells, usePart) };
}

function greatest(cells: readonly TrackCell[], parts: Float64Array): WeakPlace | null {
  const density = (n: number) => (parts[n] as number) / (cells[n] as TrackCell).duration;
  const at = cells.reduce((best, _, n) => (density(n) > density(best) ? n : best), 0);
  if (!(density(at) > 0)) return null;
  const { leg, from, to, lat, lon } = cells[at] as TrackCell;
  return { leg, at_m: (from + to) / 2, lat, lon: lon - 360 * Math.round(lon / 360) };
}
