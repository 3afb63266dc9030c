import { lagrangeAt } from "./lagrange.ts";
import { BENDS } from "./smooth-pair.ts";
import { NODE_TO_END, NODE_WEIGHTS, NODE_X } from "./smooth-rule.ts";

/*
 * The smooth step: time over a stretch inside one cell and one interval of valid times, at a held speed through the medium, by one
 * step of Newton's method on dt/ds = F(s, t), F = 1/g (Kantorovich's form for equations in functions; Deuflhard, Newton Methods for
 * Nonlinear Problems, 2004, chapter 7).
 *
 * A first guess T(s), whose slope is a parabola, comes from F at the start and at the third node and from how the medium bends.
 * What it leaves open, R = F(s, T) - T', obeys the linear equation d' = F_t d + R, so that the time at the end is
 * T + ∫ R(s) exp(∫ F_t from s to the end) ds. All integrals are 4-point Gauss sums on values and rates at the same four nodes. The
 * error is of second order in d, and that of a rule of degree 7 in s; the step is refused where either could be felt.
 *
 * It is taken for several departures side by side, in two passes of short chains of arithmetic, which a processor overlaps.
 */

/** Departures that take the same step: index n is the departure's. */
export interface Lanes {
  /** Half the step's length, m. */
  readonly half: Float64Array;
  /** Share of the way from slice to slice at the step's start, 0..1, and its change in a second. */
  readonly share: Float64Array;
  readonly perSecond: Float64Array;
  /** The guess: at z half lengths from the start the slowness is start + slope z + bend z², s/m. */
  readonly start: Float64Array;
  readonly slope: Float64Array;
  readonly bend: Float64Array;
  /** The answer, s; {@link NOT_SMOOTH} where the step's error could be above 1e-11 of it. */
  readonly time: Float64Array;
  /** Slowness at the step's end, s/m. */
  readonly end: Float64Array;
}

export function makeLanes(count: number): Lanes {
  const each = () => new Float64Array(count);
  return {
    half: each(),
    share: each(),
    perSecond: each(),
    start: each(),
    slope: each(),
    bend: each(),
    time: each(),
    end: each(),
  };
}

/** Answer of a step that is not smooth enough. */
export const NOT_SMOOTH = -1;

/*
 * What a step may miss, as shares of the slowness at its start. Of 150,000 random pairs of columns, with media up to nine tenths of the speed
 * that turn about within the step, one step in 300 that passed was wrong by more than 1e-11 of itself, one in 5,000 by more than 1e-10, the
 * worst by 1e-8; on grids of white noise at cells of 0.1° to 2.5° one in 900, the worst by 6e-11. Columns made on purpose can hide 2e-7
 * from all five. What a step was wrong by is in the bound of a full estimate, which solves it anew on nine nodes.
 */
/** Most that the guess may miss at the nodes together: Newton's step leaves about a hundredth of its square. */
const MOST_MISSED = 5e-4;
/** Largest third and fourth Legendre coefficient and bend: the rule's own error goes with the square of the fourth. */
const MOST_TWIST = 1e-4;
const MOST_FOURTH = 4e-6;
const MOST_BEND = 5e-3;
/** Largest product of what is missed with the growth over the step: Newton's step leaves less than a fifth of it, squared. */
const MOST_COUPLED = 1e-5;

type Row = readonly [number, number, number, number];
const [[B11, B12, B13, B14], [B21, B22, B23, B24], [B31, B32, B33, B34], [B41, B42, B43, B44]] =
  NODE_TO_END as unknown as readonly [Row, Row, Row, Row];
const [W1, W2] = NODE_WEIGHTS as unknown as Row;
/** Distances of the nodes from the start, in half lengths. */
const [Z1, Z2, Z3, Z4] = NODE_X.map((x) => 1 + x) as unknown as Row;
/** Z²/2 and Z³/3: the integrals of z and z² up to them. */
const [Y1, Y2, Y3, Y4] = NODE_X.map((x) => (1 + x) ** 2 / 2) as unknown as Row;
const [X1, X2, X3, X4] = NODE_X.map((x) => (1 + x) ** 3 / 3) as unknown as Row;
/** 7/2 times weight and third Legendre polynomial of the last two nodes. */
const [, , T3, T4] = NODE_X.map(
  (x, n) => (7 / 2) * (NODE_WEIGHTS[n] as number) * ((5 * x ** 3 - 3 * x) / 2),
) as unknown as Row;
const PER_Z3 = 1 / Z3;
/** 8/35 times the fourth divided difference of what is zero at the start: the fourth Legendre coefficient. */
const [Q1, Q2, Q3, Q4] = NODE_X.map(
  (x, n) => 8 / 35 / NODE_X.reduce((product, other, j) => (j === n ? product : product * (x - other)), 1 + x),
) as unknown as Row;

/** What is zero at the start and known at the nodes, at the step's end: the quartic through all five. */
const [N1, N2, N3, N4] = NODE_X.map((_, n) => lagrangeAt([-1, ...NODE_X], n + 1, 1)) as unknown as Row;

/**
 * Times of a step for the departures `first` to `last - 1` of the lanes; they stand in `lanes.time`.
 *
 * @param pairs of columns of the medium along the step: that of lane n at `at + n * stride`
 * @param stride 0 where all lanes share one pair
 * @param speed held through the medium, m/s
 */
export function smoothTimes(
  pairs: Float64Array,
  at: number,
  stride: number,
  speed: number,
  lanes: Lanes,
  first: number,
  last: number,
): void {
  guessSlowness(pairs, at, stride, speed, lanes, first, last);
  correct(pairs, at, stride, speed, lanes, first, last);
}

/** The first guess alone: the parabola through F at the start and, at the time that this gives, at the third node. */
export function guessSlowness(
  pairs: Float64Array,
  at: number,
  stride: number,
  speed: number,
  { half, share, perSecond, start, slope, bend }: Lanes,
  first: number,
  last: number,
): void {
  const perSpeed = 1 / speed;
  for (let n = first; n < last; ) {
    const p = at + n * stride;
    const end = stride === 0 ? last : n + 1;
    const a0 = pairs[p] as number;
    const da0 = pairs[p + 1] as number;
    const c0 = pairs[p + 2] as number;
    const dc0 = pairs[p + 3] as number;
    const a3 = pairs[p + 12] as number;
    const da3 = pairs[p + 13] as number;
    const c3 = pairs[p + 14] as number;
    const dc3 = pairs[p + 15] as number;
    const aBend = pairs[p + BENDS] as number;
    const daBend = pairs[p + BENDS + 1] as number;
    const cBend = pairs[p + BENDS + 2] as number;
    const dcBend = pairs[p + BENDS + 3] as number;
    const aTwist = (da3 - da0) * PER_Z3;
    const cTwist = (dc3 - dc0) * PER_Z3;
    for (; n < end; n += 1) {
      const now = share[n] as number;
      const scale = (half[n] as number) * (perSecond[n] as number);
      const cStart = c0 + now * dc0;
      const f0 = 1 / (a0 + now * da0 + Math.sqrt((speed - cStart) * (speed + cStart)));
      const then = now + scale * Z3 * f0;
      const c = c3 + then * dc3;
      const g = a3 + then * da3 + Math.sqrt((speed - c) * (speed + c));
      const f = 1 / g;
      const rise = (f - f0) * PER_Z3;
      const cRise = (c - cStart) * PER_Z3;
      const turn = scale * f;
      // g'' / 2 of g = a + sqrt(V² - c²), to first order in c/V, along the way: the medium bends with the place, turns with the
      // time, and the time bends too; then F'' / 2 = F'²/F - F² g''/2.
      const cSquare = 0.5 * cRise * cRise + c * (cBend + now * dcBend + turn * cTwist);
      const turnBend = 0.5 * scale * rise * (da3 - c * dc3 * perSpeed);
      const gBend = aBend + now * daBend + turn * aTwist + turnBend - cSquare * perSpeed;
      const square = rise * rise * g - gBend * f * f;
      start[n] = f0;
      slope[n] = rise - square * Z3;
      bend[n] = square;
    }
  }
}

/** Newton's step from the guess. */
function correct(
  pairs: Float64Array,
  at: number,
  stride: number,
  speed: number,
  { half, share, perSecond, start, slope, bend, time, end: ends }: Lanes,
  first: number,
  last: number,
): void {
  for (let n = first; n < last; ) {
    const p = at + n * stride;
    const end = stride === 0 ? last : n + 1;
    const a1 = pairs[p + 4] as number;
    const da1 = pairs[p + 5] as number;
    const b1 = pairs[p + 6] as number;
    const db1 = pairs[p + 7] as number;
    const a2 = pairs[p + 8] as number;
    const da2 = pairs[p + 9] as number;
    const b2 = pairs[p + 10] as number;
    const db2 = pairs[p + 11] as number;
    const a3 = pairs[p + 12] as number;
    const da3 = pairs[p + 13] as number;
    const b3 = pairs[p + 14] as number;
    const db3 = pairs[p + 15] as number;
    const a4 = pairs[p + 16] as number;
    const da4 = pairs[p + 17] as number;
    const b4 = pairs[p + 18] as number;
    const db4 = pairs[p + 19] as number;
    for (; n < end; n += 1) {
      const now = share[n] as number;
      const length = half[n] as number;
      const scale = length * (perSecond[n] as number);
      const f0 = start[n] as number;
      const s1 = slope[n] as number;
      const s2 = bend[n] as number;
      const k0 = scale * f0;
      const k1 = scale * s1;
      const k2 = scale * s2;
      const h1 = now + Z1 * k0 + Y1 * k1 + X1 * k2;
      const c1 = b1 + h1 * db1;
      const r1 = Math.sqrt((speed - c1) * (speed + c1));
      const g1 = a1 + h1 * da1 + r1;
      const i1 = 1 / (r1 * g1);
      const f1 = r1 * i1;
      const d1 = scale * (c1 * g1 * i1 * db1 - da1) * f1 * f1;
      const m1 = f1 - (f0 + Z1 * (s1 + Z1 * s2));
      const h2 = now + Z2 * k0 + Y2 * k1 + X2 * k2;
      const c2 = b2 + h2 * db2;
      const r2 = Math.sqrt((speed - c2) * (speed + c2));
      const g2 = a2 + h2 * da2 + r2;
      const i2 = 1 / (r2 * g2);
      const f2 = r2 * i2;
      const d2 = scale * (c2 * g2 * i2 * db2 - da2) * f2 * f2;
      const m2 = f2 - (f0 + Z2 * (s1 + Z2 * s2));
      const h3 = now + Z3 * k0 + Y3 * k1 + X3 * k2;
      const c3 = b3 + h3 * db3;
      const r3 = Math.sqrt((speed - c3) * (speed + c3));
      const g3 = a3 + h3 * da3 + r3;
      const i3 = 1 / (r3 * g3);
      const f3 = r3 * i3;
      const d3 = scale * (c3 * g3 * i3 * db3 - da3) * f3 * f3;
      const m3 = f3 - (f0 + Z3 * (s1 + Z3 * s2));
      const h4 = now + Z4 * k0 + Y4 * k1 + X4 * k2;
      const c4 = b4 + h4 * db4;
      const r4 = Math.sqrt((speed - c4) * (speed + c4));
      const g4 = a4 + h4 * da4 + r4;
      const i4 = 1 / (r4 * g4);
      const f4 = r4 * i4;
      const d4 = scale * (c4 * g4 * i4 * db4 - da4) * f4 * f4;
      const m4 = f4 - (f0 + Z4 * (s1 + Z4 * s2));
      const e1 = B11 * d1 + B12 * d2 + B13 * d3 + B14 * d4;
      const e2 = B21 * d1 + B22 * d2 + B23 * d3 + B24 * d4;
      const e3 = B31 * d1 + B32 * d2 + B33 * d3 + B34 * d4;
      const e4 = B41 * d1 + B42 * d2 + B43 * d3 + B44 * d4;
      const open = W1 * (m1 * exp(e1) + m4 * exp(e4)) + W2 * (m2 * exp(e2) + m3 * exp(e3));
      ends[n] = f0 + 2 * (s1 + 2 * s2) + (N1 * m1 + N2 * m2 + N3 * m3 + N4 * m4) + d4 * open;
      const took = length * (2 * (f0 + s1) + (8 / 3) * s2 + open);
      time[n] = isSmooth(f0, s2, e1, m1, m2, m3, m4) ? took : NOT_SMOOTH;
    }
  }
}

/** Whether a step is, by its slowness at the start, the guess's bend, the growth over it and what the guess missed at the nodes. */
function isSmooth(
  f0: number,
  s2: number,
  e1: number,
  m1: number,
  m2: number,
  m3: number,
  m4: number,
): boolean {
  const missed = Math.abs(m1) + Math.abs(m2) + Math.abs(m3) + Math.abs(m4);
  const twist = T4 * (m4 - m1) + T3 * (m3 - m2);
  const fourth = Q1 * m1 + Q2 * m2 + Q3 * m3 + Q4 * m4;
  return (
    Math.abs(s2) <= MOST_BEND * f0 &&
    missed <= MOST_MISSED * f0 &&
    Math.abs(twist) <= MOST_TWIST * f0 &&
    Math.abs(fourth) <= MOST_FOURTH * f0 &&
    missed * Math.abs(e1) <= MOST_COUPLED * f0
  );
}

/** e^x for the small growth over one step. */
function exp(x: number): number {
  return 1 + x * (1 + x * (0.5 + x * (1 / 6)));
}

/**
 * Distance from the step's start, m, that a lane has come to after `wanted` of the step's seconds, nearly: by Newton's method on the
 * guess, to which what it missed of the step's time is added as the cube of the way, since it misses most near the end.
 */
export function guessDistance(lanes: Lanes, n: number, wanted: number): number {
  const length = lanes.half[n] as number;
  const f0 = lanes.start[n] as number;
  const s1 = lanes.slope[n] as number;
  const s2 = lanes.bend[n] as number;
  const missed = (lanes.time[n] as number) / length - (2 * (f0 + s1) + (8 / 3) * s2);
  const cube = s2 / 3 + missed / 8;
  let z = (2 * wanted) / (lanes.time[n] as number);
  for (let step = 0; step < 3; step += 1) {
    const late = z * (f0 + z * (s1 / 2 + z * cube)) - wanted / length;
    z -= late / (f0 + z * (s1 + z * s2));
  }
  return length * z;
}

/**
 * How far before its end a step was `late` seconds before, m: by the slowness there and how it rises in the guess, so that a
 * small share's cube is left open.
 */
export function lateDistance(lanes: Lanes, n: number, late: number): number {
  const slowness = lanes.end[n] as number;
  const rise = ((lanes.slope[n] as number) + 4 * (lanes.bend[n] as number)) / (lanes.half[n] as number);
  const straight = late / slowness;
  return straight * (1 + (0.5 * rise * straight) / slowness);
}
