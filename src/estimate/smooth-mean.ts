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
/** Row t, column n + 1: the coefficient of x^(2t) in the even polynomial that is 1 at pair n, and 0 at the others and in the middle. */
const EVEN = lagrangeCoefficients([0, ...SQUARES]);
/** Row t, column n: that of x^(2t) in the even polynomial that is 1 at pair n and 0 at the others; an odd one is x times such. */
const ODD = lagrangeCoefficients(SQUARES);
/**
 * Most that the polynomial may miss, as a share of the speed (see {@link serves}). Of 28,000 random pairs of columns that served so, one in 400
 * was wrong by more than 1e-11 of the time, the worst by 9e-11.
 */
const MOST_MISSED = 5e-12;
/** Leading coefficients of the Chebyshev polynomials. */
const CHEBYSHEV = Array.from({ length: NODES }, (_, n) => 2 ** (n - 1));
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
    for (let n = 0; n < NODES; n += 1) {
      lanes.half[n] = length / 2;
      lanes.perSecond[n] = perSecond;
    }
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
    powers[0] = middle;
    for (let n = 0; n < HALF; n += 1) {
      const right = (speeds[n] as number) - middle;
      const left = (speeds[LAST - n] as number) - middle;
      speeds[n] = (right + left) / 2;
      speeds[LAST - n] = (right - left) / (2 * (NODE_X[n] as number));
    }
    for (let t = 0; t < HALF; t += 1) {
      let even = 0;
      let odd = 0;
      for (let n = 0; n < HALF; n += 1) {
        even += (EVEN[(t + 1) * (HALF + 1) + n + 1] as number) * (speeds[n] as number);
        odd += (ODD[t * HALF + n] as number) * (speeds[LAST - n] as number);
      }
      powers[2 * t + 1] = odd;
      powers[2 * t + 2] = even;
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

/**
 * Whether a polynomial misses little: by its next coefficient if they go on to fall as they did, and if the last two fall as those of a pole
 * where the ground speed ends, nearly by half its slope a degree. A stretch that is not alike everywhere has a little of that pole.
 */
function serves(powers: Float64Array): boolean {
  const speed = powers[0] as number;
  const last = chebyshev(powers, LAST) / speed;
  const before = chebyshev(powers, LAST - 1) / speed;
  const late = Math.max(last, before);
  const early = Math.max(chebyshev(powers, LAST - 2), chebyshev(powers, LAST - 3)) / speed;
  const fall = Math.abs(powers[1] as number) / (2 * speed);
  return (
    late <= ROUNDING ||
    (late * late <= MOST_MISSED * early && fall * Math.max(last, fall * before) <= MOST_MISSED)
  );
}

/** Size of a Chebyshev coefficient of high degree n: x^n = 2^(1-n) (T_n + n T_(n-2) + …). */
function chebyshev(powers: Float64Array, n: number): number {
  const two = n + 2 < NODES ? ((n + 2) * (powers[n + 2] as number)) / 4 : 0;
  return Math.abs((powers[n] as number) + two) / (CHEBYSHEV[n] as number);
}
