import { InputError } from "../errors.ts";

/*
 * Monotone piecewise cubic interpolation (PCHIP). Fritsch & Carlson, SIAM J. Numer. Anal. 17 (1980) 238-246, give the
 * condition for monotonicity; the slopes inside are the weighted harmonic mean of Fritsch & Butland, SIAM J. Sci. Stat.
 * Comput. 5 (1984) 300-304, eq. (5), in the weights of Brodlie:
 *
 *     d_k = (w₁ + w₂) / (w₁/m_{k-1} + w₂/m_k),   w₁ = 2 h_k + h_{k-1},   w₂ = h_k + 2 h_{k-1}
 *
 * (0 where the secants m differ in sign or one is 0), and those at the ends the one-sided three-point formula with the
 * limits of Moler, Numerical Computing with MATLAB (2004), section 3.6. It is the interpolant of SciPy's PchipInterpolator.
 */

/** A piecewise cubic through given points, with a continuous derivative. */
export class Pchip {
  /** Abscissae, strictly ascending. */
  readonly x: Float64Array;
  /** Per interval, c₀ c₁ c₂ c₃ of c₀ + t (c₁ + t (c₂ + t c₃)), t = x - x_k. */
  readonly #c: Float64Array;
  readonly #last: number;
  readonly #lastSlope: number;

  /**
   * @param x at least two finite numbers, strictly ascending
   * @param y as many finite numbers
   */
  constructor(x: readonly number[], y: readonly number[]) {
    checkPoints(x, y);
    const slopes = pchipSlopes(x, y);
    this.x = Float64Array.from(x);
    this.#c = cubics(x, y, slopes);
    this.#last = y[y.length - 1] as number;
    this.#lastSlope = slopes[slopes.length - 1] as number;
  }

  /** Value at x, which must lie within the abscissae. */
  value(x: number): number {
    const k = this.#interval(x);
    if (k < 0) return this.#last;
    const c = this.#c;
    const t = x - (this.x[k] as number);
    const i = 4 * k;
    return (
      (c[i] as number) + t * ((c[i + 1] as number) + t * ((c[i + 2] as number) + t * (c[i + 3] as number)))
    );
  }

  /** Derivative at x, which must lie within the abscissae. */
  derivative(x: number): number {
    const k = this.#interval(x);
    if (k < 0) return this.#lastSlope;
    const c = this.#c;
    const t = x - (this.x[k] as number);
    const i = 4 * k;
    return (c[i + 1] as number) + t * (2 * (c[i + 2] as number) + t * 3 * (c[i + 3] as number));
  }

  /** The interval with x_k <= x < x_{k+1}; -1 for the last abscissa, whose ordinate is kept exact. */
  #interval(x: number): number {
    const xs = this.x;
    let low = 0;
    let high = xs.length - 1;
    if (x >= (xs[high] as number)) return -1;
    while (high - low > 1) {
      const mid = (low + high) >> 1;
      if (x < (xs[mid] as number)) high = mid;
      else low = mid;
    }
    return low;
  }
}

function checkPoints(x: readonly number[], y: readonly number[]): void {
  if (x.length < 2 || x.length !== y.length)
    throw new InputError(
      `an interpolation takes at least two points, as many ordinates as abscissae; found ${x.length} and ${y.length}`,
    );
  x.forEach((value, k) => {
    if (!Number.isFinite(value) || !Number.isFinite(y[k]))
      throw new InputError(`an interpolation's points are finite; found (${value}, ${y[k]})`);
    const before = x[k - 1];
    if (before !== undefined && !(before < value))
      throw new InputError(`an interpolation's abscissae ascend; found ${value} after ${before}`);
  });
}

/** Slopes at the points; two points give the straight line. */
function pchipSlopes(x: readonly number[], y: readonly number[]): Float64Array {
  const n = x.length;
  const h = Float64Array.from({ length: n - 1 }, (_, k) => (x[k + 1] as number) - (x[k] as number));
  const m = Float64Array.from(h, (step, k) => ((y[k + 1] as number) - (y[k] as number)) / step);
  const d = new Float64Array(n);
  if (n === 2) return d.fill(m[0] as number);
  for (let k = 1; k < n - 1; k++)
    d[k] = innerSlope(h[k - 1] as number, h[k] as number, m[k - 1] as number, m[k] as number);
  d[0] = endSlope(h[0] as number, h[1] as number, m[0] as number, m[1] as number);
  d[n - 1] = endSlope(h[n - 2] as number, h[n - 3] as number, m[n - 2] as number, m[n - 3] as number);
  return d;
}

function innerSlope(hBefore: number, hAfter: number, mBefore: number, mAfter: number): number {
  if (mBefore === 0 || mAfter === 0 || mBefore > 0 !== mAfter > 0) return 0;
  const w1 = 2 * hAfter + hBefore;
  const w2 = hAfter + 2 * hBefore;
  return (w1 + w2) / (w1 / mBefore + w2 / mAfter);
}

function endSlope(h0: number, h1: number, m0: number, m1: number): number {
  const d = ((2 * h0 + h1) * m0 - h0 * m1) / (h0 + h1);
  if (Math.sign(d) !== Math.sign(m0)) return 0;
  if (Math.sign(m0) !== Math.sign(m1) && Math.abs(d) > 3 * Math.abs(m0)) return 3 * m0;
  return d;
}

function cubics(x: readonly number[], y: readonly number[], slopes: Float64Array): Float64Array {
  const c = new Float64Array(4 * (x.length - 1));
  for (let k = 0; k + 1 < x.length; k++) {
    const h = (x[k + 1] as number) - (x[k] as number);
    const m = ((y[k + 1] as number) - (y[k] as number)) / h;
    const d0 = slopes[k] as number;
    const d1 = slopes[k + 1] as number;
    c[4 * k] = y[k] as number;
    c[4 * k + 1] = d0;
    c[4 * k + 2] = (3 * m - 2 * d0 - d1) / h;
    c[4 * k + 3] = (d0 - 2 * m + d1) / (h * h);
  }
  return c;
}
