import { PACE_CANNOT_HOLD, PACE_OK, type PaceStatus } from "../craft/pace-solution.ts";
import { integrateTimes } from "./collocation.ts";
import type { Flow } from "./flow.ts";
import {
  AT_END,
  BEYOND_NODES,
  FIRST_NODE,
  GAUSS_WEIGHT,
  KRONROD_WEIGHT,
  LAST_NODE,
  STATIONS,
} from "./gauss-kronrod.ts";
import { type Motion, move } from "./motion.ts";
import { project } from "./project.ts";
import { layStations, type Stations } from "./stations.ts";
import type { TrackCurve } from "./track-curve.ts";

/*
 * One step of the estimate: a stretch of track inside one cell and one interval of valid times, where the field is smooth. The time at each
 * station obeys t_i = t_0 + ∫ ds / g(s, t(s)); with g taken at the nine Kronrod nodes this is collocation (an implicit
 * Runge-Kutta method; Hairer, Nørsett & Wanner, Solving Ordinary Differential Equations I, 1993, section II.7), solved by Picard's iteration.
 */

/** Status of a step: that of the motion, or that the iteration did not settle. */
export type StepStatus = PaceStatus | typeof UNSETTLED;
export const UNSETTLED = 9;

/** Everything that a step needs and leaves behind; made once a route and reused. */
export interface Step {
  readonly stations: Stations;
  motion: Motion;
  /** The flow that the craft moves through, and the other one where it acts through windage. */
  medium: Flow | null;
  wind: Flow | null;
  /** Take the medium's cross-track component as zero. */
  alongOnly: boolean;

  /** Per station, from the solution: seconds since the step's start, and what holds there. */
  readonly elapsed: Float64Array;
  readonly along: Float64Array;
  readonly cross: Float64Array;
  readonly windAlong: Float64Array;
  readonly windCross: Float64Array;
  readonly groundSpeed: Float64Array;
  readonly slowness: Float64Array;
  readonly throughSpeed: Float64Array;
  /** Store units per second. */
  readonly rate: Float64Array;

  /** Time and use over the step, and the Gauss-Kronrod difference of each. */
  time: number;
  timeError: number;
  use: number;
  useError: number;
  /**
   * How much of an error in the start's time the step adds to it: at a held speed and a steady rate exp(-∫ ∂g/∂t / g² ds) - 1, since an error
   * obeys d' = F_t d with F = 1/g; at other paces a bound on its size, ∫ |∂g/∂t| / g² ds.
   */
  growth: number;
  /** Station at which the motion failed. */
  failedAt: number;
  /** Guess of ground speed for the first pass, m/s. */
  lastGroundSpeed: number;
}

export function makeStep(stations: Stations, motion: Motion): Step {
  const perStation = () => new Float64Array(STATIONS);
  return {
    stations,
    motion,
    medium: null,
    wind: null,
    alongOnly: false,
    elapsed: perStation(),
    along: perStation(),
    cross: perStation(),
    windAlong: perStation(),
    windCross: perStation(),
    groundSpeed: perStation(),
    slowness: perStation(),
    throughSpeed: perStation(),
    rate: perStation(),
    time: 0,
    timeError: 0,
    use: 0,
    useError: 0,
    growth: 0,
    failedAt: 0,
    lastGroundSpeed: 1,
  };
}

const MOST_PASSES = 24;
const MIDDLE = (STATIONS - 1) / 2;
/** The iteration ends when what it leaves open in the step's time is below this share of it. */
const SETTLED = 2e-14;

/** Solves the stretch from..to of piece p for the time at every station; `start` is seconds since departure. */
export function solveStep(
  step: Step,
  curve: TrackCurve,
  p: number,
  panel: number,
  polar: boolean,
  from: number,
  to: number,
  start: number,
): StepStatus {
  layStations(step.stations, curve, p, from, to);
  if (step.medium !== null) project(step.medium, panel, polar, step.stations);
  if (step.wind !== null && step.wind !== step.medium) project(step.wind, panel, polar, step.stations);
  return solveTimes(step, from, to, start);
}

function solveTimes(step: Step, from: number, to: number, start: number): StepStatus {
  const half = (to - from) / 2;
  const { elapsed } = step;
  guessTimes(step, from, to - from, start);
  const implicit = isImplicit(step);
  let before = 0;
  for (let pass = 0; pass < MOST_PASSES; pass += 1) {
    const status = slownesses(step, start);
    if (status !== PACE_OK) return status;
    const moved = integrateTimes(elapsed, step.slowness, half);
    // The next move is at most about moved²/before, and the figures at the new times are one more such factor better. (The first
    // move tells how good the guess was, not how fast the passes converge.)
    const open = moved * moved * moved;
    const settled = SETTLED * (elapsed[STATIONS - 1] as number) * before * before;
    if (!implicit || (pass > 0 && open <= settled)) return finish(step, start, half);
    before = moved;
  }
  return UNSETTLED;
}

/** First guess: the slowness quadratic through both ends and the middle where the speed through the medium is held, else constant. */
function guessTimes(step: Step, from: number, length: number, start: number): void {
  const { elapsed, stations } = step;
  elapsed[0] = 0;
  const first = slownessAt(step, 0, start);
  elapsed[MIDDLE] = (length / 2) * first;
  const middle = slownessAt(step, MIDDLE, start);
  elapsed[STATIONS - 1] = length * middle;
  const last = slownessAt(step, STATIONS - 1, start);
  const linear = (4 * middle - 3 * first - last) / 2;
  const square = (2 * (first + last - 2 * middle)) / 3;
  for (let i = FIRST_NODE; i < STATIONS; i += 1) {
    const distance = (stations.s[i] as number) - from;
    const share = distance / length;
    elapsed[i] = distance * (first + share * (linear + share * square));
  }
}

/** Slowness at a station for the first guess: that of the step before where it would have to be asked for. */
function slownessAt(step: Step, i: number, start: number): number {
  const { medium, elapsed, alongOnly, lastGroundSpeed } = step;
  const speed = step.motion.throughSpeed;
  if (speed === 0 || medium === null) return 1 / lastGroundSpeed;
  const share = (start - medium.from + (elapsed[i] as number)) * medium.perSecond;
  const a = (medium.along[i] as number) + share * (medium.alongChange[i] as number);
  const c = alongOnly ? 0 : (medium.cross[i] as number) + share * (medium.crossChange[i] as number);
  const g = a + Math.sqrt(Math.max((speed - c) * (speed + c), 0));
  return 1 / (g > 0 ? g : lastGroundSpeed);
}

/** Whether the ground speed depends on the time that is being solved for. */
function isImplicit(step: Step): boolean {
  if (step.motion.groundSpeedFixed) return false;
  const mediumMoves = step.medium !== null && step.medium.perSecond !== 0;
  return mediumMoves || (step.motion.windSetsSpeed && step.wind !== null && step.wind.perSecond !== 0);
}

/** Components at a range of stations at their present times. */
function readFlows(step: Step, start: number, first: number, last: number): void {
  const { medium, wind, elapsed } = step;
  if (medium !== null) readFlow(medium, elapsed, start, step.along, step.cross, first, last);
  if (step.alongOnly) step.cross.fill(0);
  // In the air the wind is the medium itself; apart from it, it acts through windage alone.
  if (wind !== null && wind !== medium) {
    readFlow(wind, elapsed, start, step.windAlong, step.windCross, first, last);
  }
}

function readFlow(
  flow: Flow,
  elapsed: Float64Array,
  start: number,
  along: Float64Array,
  cross: Float64Array,
  first: number,
  last: number,
): void {
  const sinceSlice = start - flow.from;
  for (let i = first; i <= last; i += 1) {
    const share = (sinceSlice + (elapsed[i] as number)) * flow.perSecond;
    along[i] = (flow.along[i] as number) + share * (flow.alongChange[i] as number);
    cross[i] = (flow.cross[i] as number) + share * (flow.crossChange[i] as number);
  }
}

/** Slownesses 1/g at the nodes at their present times, as the iteration needs them. */
function slownesses(step: Step, start: number): PaceStatus {
  const { medium, slowness, groundSpeed } = step;
  const speed = step.motion.throughSpeed;
  if (speed > 0 && medium !== null) return heldSlownesses(step, medium, speed, start);
  const status = moveStations(step, start, FIRST_NODE, LAST_NODE);
  if (status !== PACE_OK) return status;
  for (let i = FIRST_NODE; i <= LAST_NODE; i += 1) slowness[i] = 1 / (groundSpeed[i] as number);
  return PACE_OK;
}

/** The same at a held speed through the medium, in one pass over the nodes: most of an estimate's time is spent here. */
function heldSlownesses(step: Step, medium: Flow, speed: number, start: number): PaceStatus {
  const { elapsed, slowness, alongOnly } = step;
  const { along, alongChange, cross, crossChange, perSecond } = medium;
  const sinceSlice = start - medium.from;
  for (let i = FIRST_NODE; i <= LAST_NODE; i += 1) {
    const share = (sinceSlice + (elapsed[i] as number)) * perSecond;
    const a = (along[i] as number) + share * (alongChange[i] as number);
    const c = alongOnly ? 0 : (cross[i] as number) + share * (crossChange[i] as number);
    const square = (speed - c) * (speed + c);
    const g = square > 0 ? a + Math.sqrt(square) : 0;
    if (!(g > 0)) {
      step.along[i] = a;
      step.cross[i] = c;
      step.failedAt = i;
      step.motion.solution.throughSpeed = speed;
      return PACE_CANNOT_HOLD;
    }
    slowness[i] = 1 / g;
  }
  return PACE_OK;
}

/** g = a + sqrt(V² - c²) at a range of stations (methods: section 3). */
function heldSpeeds(step: Step, speed: number, first: number, last: number): PaceStatus {
  const { along, cross, groundSpeed } = step;
  for (let i = first; i <= last; i += 1) {
    const c = cross[i] as number;
    // The product form keeps its digits where |c| is near V.
    const square = (speed - c) * (speed + c);
    const g = square > 0 ? (along[i] as number) + Math.sqrt(square) : 0;
    if (!(g > 0)) {
      step.failedAt = i;
      step.motion.solution.throughSpeed = speed;
      return PACE_CANNOT_HOLD;
    }
    groundSpeed[i] = g;
  }
  return PACE_OK;
}

function moveStations(step: Step, start: number, first: number, last: number): PaceStatus {
  const { motion, along, cross, windAlong, windCross } = step;
  readFlows(step, start, first, last);
  if (motion.steadyRate >= 0) {
    step.throughSpeed.fill(motion.throughSpeed);
    step.rate.fill(motion.steadyRate);
    return heldSpeeds(step, motion.throughSpeed, first, last);
  }
  for (let i = first; i <= last; i += 1) {
    const status = move(
      motion,
      along[i] as number,
      cross[i] as number,
      windAlong[i] as number,
      windCross[i] as number,
    );
    if (status !== PACE_OK) {
      step.failedAt = i;
      return status;
    }
    step.groundSpeed[i] = motion.solution.groundSpeed;
    step.throughSpeed[i] = motion.solution.throughSpeed;
    step.rate[i] = motion.solution.rate;
  }
  return PACE_OK;
}

function finish(step: Step, start: number, half: number): StepStatus {
  // The nodes at their settled times, and both ends.
  const status = moveStations(step, start, 0, STATIONS - 1);
  if (status !== PACE_OK) return status;
  let time = 0;
  let timeGauss = 0;
  let use = 0;
  let useGauss = 0;
  let growth = 0;
  const { medium, groundSpeed, rate } = step;
  const moving = medium !== null && isImplicit(step);
  for (let i = FIRST_NODE; i <= LAST_NODE; i += 1) {
    const slowness = 1 / (groundSpeed[i] as number);
    const spending = (rate[i] as number) * slowness;
    const kronrod = KRONROD_WEIGHT[i] as number;
    const gauss = GAUSS_WEIGHT[i] as number;
    time += kronrod * slowness;
    timeGauss += gauss * slowness;
    use += kronrod * spending;
    useGauss += gauss * spending;
    if (moving) growth += kronrod * slowness * slowness * changePerSecond(step, medium, i);
  }
  step.time = half * time;
  step.timeError = half * Math.abs(time - timeGauss);
  step.use = half * use;
  step.useError = half * Math.abs(use - useGauss);
  step.growth = step.motion.steadyRate >= 0 ? Math.expm1(-half * growth) : half * growth;
  // A held speed at a steady rate has no kinks of its own inside a panel; every other pace may have.
  if (step.motion.steadyRate < 0) addEndErrors(step, half);
  step.lastGroundSpeed = groundSpeed[STATIONS - 1] as number;
  return PACE_OK;
}

/**
 * A pace may change its rule between the outermost node and the end of a step, where neither sum looks. What the nodes'
 * polynomial misses of the true value at each end, over that distance, joins the error.
 */
function addEndErrors(step: Step, half: number): void {
  const { groundSpeed, rate } = step;
  const last = STATIONS - 1;
  let startTime = -1 / (groundSpeed[0] as number);
  let endTime = -1 / (groundSpeed[last] as number);
  let startUse = startTime * (rate[0] as number);
  let endUse = endTime * (rate[last] as number);
  for (let j = FIRST_NODE; j <= LAST_NODE; j += 1) {
    const slowness = 1 / (groundSpeed[j] as number);
    const spending = slowness * (rate[j] as number);
    endTime += (AT_END[j] as number) * slowness;
    endUse += (AT_END[j] as number) * spending;
    startTime += (AT_END[last - j] as number) * slowness;
    startUse += (AT_END[last - j] as number) * spending;
  }
  step.timeError += half * BEYOND_NODES * (Math.abs(startTime) + Math.abs(endTime));
  step.useError += half * BEYOND_NODES * (Math.abs(startUse) + Math.abs(endUse));
}

/**
 * ∂g/∂t at a station, ∂a/∂t - ∂c/∂t c / sqrt(V² - c²); where the pace is not of a held speed at a steady rate, its parts' sizes together as a
 * bound.
 */
function changePerSecond(step: Step, medium: Flow, i: number): number {
  const cross = step.cross[i] as number;
  // sqrt(V² - c²) = g - a.
  const lever = cross / Math.max((step.groundSpeed[i] as number) - (step.along[i] as number), 1e-6);
  const byAlong = medium.alongChange[i] as number;
  const byCross = step.alongOnly ? 0 : lever * (medium.crossChange[i] as number);
  const change = step.motion.steadyRate >= 0 ? byAlong - byCross : Math.abs(byAlong) + Math.abs(byCross);
  return change * medium.perSecond;
}
