import { lagrangeCoefficients } from "./lagrange.ts";
import { POINT, POINT_Z } from "./smooth-pair.ts";
import { COLUMN_X } from "./smooth-rule.ts";

/* Columns as polynomials, so that a part of a panel is read without going back to the grid. */

/** Coefficients of one component, ascending powers of ξ = -1..1. */
export const TERMS = 6;
const [, Z1, Z2, Z3, Z4] = POINT_Z as unknown as readonly [number, number, number, number, number];
type Row = readonly [number, number, number];
/**
 * The ends and the Gauss nodes, through which the polynomials of degree 5 are laid, lie in pairs about the middle, so that even and odd
 * powers are found apart. In the middle, where such a polynomial is likely to miss most, it is held against the data.
 */
const LAID_X = COLUMN_X.slice(0, 3) as unknown as Row;
const [X1, X2, X3] = LAID_X;
/** Row t, column n: the coefficient of ξ^(2t) in the even polynomial that is 1 at pair n and 0 at the others. */
const EVEN = lagrangeCoefficients(LAID_X.map((x) => x * x));
const [[E11, E12, E13], [E21, E22, E23], [E31, E32, E33]] = [0, 1, 2].map((t) =>
  EVEN.slice(3 * t, 3 * t + 3),
) as unknown as readonly [Row, Row, Row];
/** A polynomial that misses by more than this share of the reach does not serve. */
const POWERS_TOLERANCE = 1e-12;

/**
 * Lays the polynomial through the values of one component in a column.
 *
 * @returns whether it is within 1e-12 of the reach of the value in the middle
 */
export function fitPowers(columns: Float64Array, values: number, powers: number, reach: number): boolean {
  const l1 = columns[values] as number;
  const l2 = columns[values + 1] as number;
  const l3 = columns[values + 2] as number;
  const middle = columns[values + 3] as number;
  const r3 = columns[values + 4] as number;
  const r2 = columns[values + 5] as number;
  const r1 = columns[values + 6] as number;
  const even1 = (l1 + r1) / 2;
  const odd1 = (l1 - r1) / (2 * X1);
  const even2 = (l2 + r2) / 2;
  const odd2 = (l2 - r2) / (2 * X2);
  const even3 = (l3 + r3) / 2;
  const odd3 = (l3 - r3) / (2 * X3);
  columns[powers] = E11 * even1 + E12 * even2 + E13 * even3;
  columns[powers + 1] = E11 * odd1 + E12 * odd2 + E13 * odd3;
  columns[powers + 2] = E21 * even1 + E22 * even2 + E23 * even3;
  columns[powers + 3] = E21 * odd1 + E22 * odd2 + E23 * odd3;
  columns[powers + 4] = E31 * even1 + E32 * even2 + E33 * even3;
  columns[powers + 5] = E31 * odd1 + E32 * odd2 + E33 * odd3;
  return Math.abs((columns[powers] as number) - middle) <= POWERS_TOLERANCE * reach;
}

/**
 * Values and changes at the points of the part that starts at ξ = `from` and is 2 `half` long, by the coefficients of both components
 * that start at `p` in one column and at `q` in the next: Horner's rule at all five points side by side.
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
  const x0 = from;
  const x1 = from + half * Z1;
  const x2 = from + half * Z2;
  const x3 = from + half * Z3;
  const x4 = from + half * Z4;
  for (let n = 0, k = p, next = q; n < POINT; n += 2, k += TERMS, next += TERMS) {
    let a = columns[k] as number;
    let b = columns[k + 1] as number;
    let c = columns[k + 2] as number;
    let d = columns[k + 3] as number;
    let e = columns[k + 4] as number;
    let f = columns[k + 5] as number;
    const to = at + n;
    parts[to] = ((((f * x0 + e) * x0 + d) * x0 + c) * x0 + b) * x0 + a;
    parts[to + POINT] = ((((f * x1 + e) * x1 + d) * x1 + c) * x1 + b) * x1 + a;
    parts[to + 2 * POINT] = ((((f * x2 + e) * x2 + d) * x2 + c) * x2 + b) * x2 + a;
    parts[to + 3 * POINT] = ((((f * x3 + e) * x3 + d) * x3 + c) * x3 + b) * x3 + a;
    parts[to + 4 * POINT] = ((((f * x4 + e) * x4 + d) * x4 + c) * x4 + b) * x4 + a;
    a = (columns[next] as number) - a;
    b = (columns[next + 1] as number) - b;
    c = (columns[next + 2] as number) - c;
    d = (columns[next + 3] as number) - d;
    e = (columns[next + 4] as number) - e;
    f = (columns[next + 5] as number) - f;
    parts[to + 1] = ((((f * x0 + e) * x0 + d) * x0 + c) * x0 + b) * x0 + a;
    parts[to + POINT + 1] = ((((f * x1 + e) * x1 + d) * x1 + c) * x1 + b) * x1 + a;
    parts[to + 2 * POINT + 1] = ((((f * x2 + e) * x2 + d) * x2 + c) * x2 + b) * x2 + a;
    parts[to + 3 * POINT + 1] = ((((f * x3 + e) * x3 + d) * x3 + c) * x3 + b) * x3 + a;
    parts[to + 4 * POINT + 1] = ((((f * x4 + e) * x4 + d) * x4 + c) * x4 + b) * x4 + a;
  }
}
