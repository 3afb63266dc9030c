import { STATION_X } from "./gauss-kronrod.ts";
import { lagrangeCoefficients } from "./lagrange.ts";
import { BENDS, POINT, POINT_Z, POINTS } from "./smooth-pair.ts";

/* Columns as polynomials, so that a part of a panel is read without going back to the grid. */

/** Coefficients of one component, ascending powers of ξ = -1..1. */
export const TERMS = 6;
/** Stations through which the polynomials of degree 5 are laid: both ends and the Gauss nodes. */
const LAID_ON = [0, 2, 4, 6, 8, 10] as const;
/** Stations between them where they are held against the data. */
const CHECKED_ON = [1, 3, 5] as const;
/** A polynomial that misses by more than this share of the reach does not serve. */
const POWERS_TOLERANCE = 1e-12;
/** Row t, column n: the coefficient of ξ^t in the Lagrange polynomial of station LAID_ON[n]. */
const TO_POWERS = lagrangeCoefficients(LAID_ON.map((station) => STATION_X[station] as number));

/**
 * Lays the polynomial through the values of one component at the stations.
 *
 * @returns whether it is within 1e-12 of the reach of the values between
 */
export function fitPowers(columns: Float64Array, values: number, powers: number, reach: number): boolean {
  for (let term = 0; term < TERMS; term += 1) {
    let sum = 0;
    for (let n = 0; n < TERMS; n += 1)
      sum += (TO_POWERS[term * TERMS + n] as number) * (columns[values + (LAID_ON[n] as number)] as number);
    columns[powers + term] = sum;
  }
  return CHECKED_ON.every((station) => {
    const missed =
      powersAt(columns, powers, STATION_X[station] as number) - (columns[values + station] as number);
    return Math.abs(missed) <= POWERS_TOLERANCE * reach;
  });
}

/**
 * Values and changes at the points of the part that starts at ξ = `from` and is 2 `half` long, by the coefficients of both components
 * that start at `p` in one column and at `q` in the next: four times Horner's rule, side by side.
 */
export function cutPair(
  columns: Float64Array,
  p: number,
  q: number,
  from: number,
  half: number,
  parts: Float64Array,
  at: number,
): void {
  cutColumn(columns, p, from, half, parts, at);
  cutColumn(columns, q, from, half, parts, at + 1);
  for (let n = at; n < at + BENDS; n += 2) parts[n + 1] = (parts[n + 1] as number) - (parts[n] as number);
}

function cutColumn(
  columns: Float64Array,
  p: number,
  from: number,
  half: number,
  parts: Float64Array,
  at: number,
): void {
  const a0 = columns[p] as number;
  const a1 = columns[p + 1] as number;
  const a2 = columns[p + 2] as number;
  const a3 = columns[p + 3] as number;
  const a4 = columns[p + 4] as number;
  const a5 = columns[p + 5] as number;
  const c0 = columns[p + TERMS] as number;
  const c1 = columns[p + TERMS + 1] as number;
  const c2 = columns[p + TERMS + 2] as number;
  const c3 = columns[p + TERMS + 3] as number;
  const c4 = columns[p + TERMS + 4] as number;
  const c5 = columns[p + TERMS + 5] as number;
  for (let n = 0, to = at; n < POINTS; n += 1, to += POINT) {
    const x = from + half * (POINT_Z[n] as number);
    parts[to] = ((((a5 * x + a4) * x + a3) * x + a2) * x + a1) * x + a0;
    parts[to + 2] = ((((c5 * x + c4) * x + c3) * x + c2) * x + c1) * x + c0;
  }
}

function powersAt(columns: Float64Array, at: number, x: number): number {
  const a = columns[at] as number;
  const b = columns[at + 1] as number;
  const c = columns[at + 2] as number;
  const d = columns[at + 3] as number;
  const e = columns[at + 4] as number;
  return (((((columns[at + 5] as number) * x + e) * x + d) * x + c) * x + b) * x + a;
}
