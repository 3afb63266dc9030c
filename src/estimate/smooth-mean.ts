import { lagrangeCoefficients } from "./lagrange.ts";
import { makeLanes, NOT_SMOOTH, smoothTimes } from "./smooth-step.ts";

/*
 * Between two valid times the mean ground speed over a stretch is a smooth function of the moment at which one enters it, and nearly a
 * straight line. It is laid as a polynomial, for all who come by, through smooth steps that begin at Chebyshev's nodes, where
 * interpolation is nearly the best there is (Trefethen, Approximation Theory and Approximation Practice, 2013, chapters 8 and 15).
 */

const NODES = 7;
const LAST = NODES - 1;
/** Chebyshev's nodes of the first kind: x = -1..1 is 2 share - 1. */
const NODE_X = Float64Array.from({ length: NODES }, (_, n) => Math.cos((Math.PI * (n + 0.5)) / NODES));
/** The nodes lie in pairs about the one in the middle, so that even and odd powers are found apart, each from three squares. */
const HALF = LAST / 2;
const SQUARES = NODE_X.slice(0, HALF).map((x) => x * x);
/** Row t, column n: the coefficient of x^(2t) in the even Lagrange polynomial of pair n that is 0 in the middle, and of any such, t from 1. */
const EVEN = lagrangeCoefficients([0, ...SQUARES]);
const ODD = lagrangeCoefficients(SQUARES);
/**
 * Most that the polynomial may miss, as a share of the speed: by the next Chebyshev coefficient, if the coefficients go on to fall as they
 * did. Of 12,000 random pairs of columns one in a hundred that served so was wrong by more than 1e-11 of the time, the worst by 1e-10.
 */
const MOST_MISSED = 5e-12;
/** A coefficient below this share is of rounding alone. */
const ROUNDING = 1e-14;

/** Mean ground speed over one stretch by the moment of entering it. */
export class SmoothMean {
  /** Coefficients of the powers of x, m/s. */
  readonly #powers = new Float64Array(NODES);
  readonly #speeds = new Float64Array(NODES);
  readonly #lanes = makeLanes(NODES);
  #length = 0;

  constructor() {
    this.#lanes.share.set(NODE_X.map((x) => (1 + x) / 2));
  }

  /**
   * Lays the polynomial for a stretch.
   *
   * @param pairs of columns of the medium: that of the stretch at `at`
   * @param speed held through the medium, m/s
   * @param length m
   * @param perSecond share of the way from slice to slice that passes in a second
   * @returns whether there is one: not where a step is too rough, or the polynomial misses too much
   */
  lay(pairs: Float64Array, at: number, speed: number, length: number, perSecond: number): boolean {
    const lanes = this.#lanes;
    const speeds = this.#speeds;
    this.#length = length;
    lanes.half.fill(length / 2);
    lanes.perSecond.fill(perSecond);
    smoothTimes(pairs, at, 0, speed, lanes, 0, NODES);
    for (let n = 0; n < NODES; n += 1) {
      const time = lanes.time[n] as number;
      if (time === NOT_SMOOTH) return false;
      speeds[n] = length / time;
    }
    this.#fit();
    return serves(this.#powers);
  }

  #fit(): void {
    const speeds = this.#speeds;
    const powers = this.#powers;
    const middle = speeds[HALF] as number;
    powers.fill(0);
    powers[0] = middle;
    for (let n = 0; n < HALF; n += 1) {
      const right = (speeds[n] as number) - middle;
      const left = (speeds[LAST - n] as number) - middle;
      const even = (right + left) / 2;
      const odd = (right - left) / (2 * (NODE_X[n] as number));
      for (let t = 0; t < HALF; t += 1) {
        powers[2 * t + 1] = (powers[2 * t + 1] as number) + (ODD[t * HALF + n] as number) * odd;
        powers[2 * t + 2] =
          (powers[2 * t + 2] as number) + (EVEN[(t + 1) * (HALF + 1) + n + 1] as number) * even;
      }
    }
  }

  /** Seconds over the stretch for one who enters it at a share, 0..1, of the way from slice to slice. */
  time(share: number): number {
    const powers = this.#powers;
    const x = 2 * share - 1;
    const square = x * x;
    // Short chains of arithmetic, which a processor overlaps.
    const low = (powers[0] as number) + (powers[1] as number) * x;
    const middle = (powers[2] as number) + (powers[3] as number) * x;
    const high = (powers[4] as number) + (powers[5] as number) * x + square * (powers[6] as number);
    return this.#length / (low + square * (middle + square * high));
  }
}

/** Whether a polynomial misses little. */
function serves(powers: Float64Array): boolean {
  const speed = powers[0] as number;
  const late = Math.max(chebyshev(powers, LAST), chebyshev(powers, LAST - 1)) / speed;
  const early = Math.max(chebyshev(powers, LAST - 2), chebyshev(powers, LAST - 3)) / speed;
  return late <= ROUNDING || late * late <= MOST_MISSED * early;
}

/** Size of a Chebyshev coefficient of high degree n: x^n = 2^(1-n) (T_n + n T_(n-2) + …). */
function chebyshev(powers: Float64Array, n: number): number {
  const two = n + 2 < NODES ? ((n + 2) * (powers[n + 2] as number)) / 4 : 0;
  return Math.abs((powers[n] as number) + two) * 2 ** (1 - n);
}
