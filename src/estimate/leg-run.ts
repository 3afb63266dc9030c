import { type PACE_CANNOT_HOLD, PACE_OK, PACE_OUTSIDE_TABLE } from "../craft/pace-solution.ts";
import type { FieldRole } from "../field/field.ts";
import { type Flow, resolve } from "./flow.ts";
import { STATIONS } from "./gauss-kronrod.ts";
import type { LegWatch } from "./leg-watch.ts";
import { addStations, addTimes, type LegSums } from "./leg-work.ts";
import type { Panels } from "./panels.ts";
import type { FindingCode } from "./result.ts";
import type { SmoothLeg } from "./smooth-leg.ts";
import { layMiddle } from "./stations.ts";
import { type Step, solveStep, UNSETTLED } from "./step.ts";
import type { TrackCurve } from "./track-curve.ts";

/*
 * The run along one leg: panel by panel in space, each cut again where a valid time falls inside it, and halved
 * where the Gauss-Kronrod difference is too large, the time does not settle or the track cannot be held. A place that
 * still fails at half a metre is where the route stops.
 */

/** Why and where a leg stops. */
export interface Stop {
  readonly code: FindingCode;
  /** Metres from the leg's start. */
  readonly at: number;
  readonly role: FieldRole | null;
  /** What held there: components of the medium and the speed through it, m/s. */
  readonly along: number;
  readonly cross: number;
  readonly throughSpeed: number;
}

/** The fixed parts of a run along one leg. */
export interface LegRun {
  readonly curve: TrackCurve;
  readonly panels: Panels;
  readonly flows: readonly Flow[];
  readonly step: Step;
  /** What goes over the smooth panels first; `null` where nothing can. */
  readonly smooth: SmoothLeg | null;
  /** Whether the step's figures are wanted at its stations, or time and use alone. */
  readonly stations: boolean;
  readonly clock: LegClock;
}

/** Time since the leg's start, and the last valid time met, s since departure: the clock may be a little short of it. */
interface LegClock {
  elapsed: number;
  met: number;
}

/** Called with every accepted step. */
export type Accepted = (from: number, to: number, start: number, panel: number) => void;

/** A step is halved while its Gauss-Kronrod difference is above this share of it. */
const STEP_TOLERANCE = 1e-11;
/** No step is halved below this, m: a stop is found to half a metre. */
const SHORTEST_STEP_M = 0.5;
/** A valid time is met when it is this near, s. */
const TIME_TOLERANCE_S = 1e-9;
const MOST_CUTS = 12;

/**
 * Runs along a leg from `start` seconds after the route's departure.
 *
 * @param accepted called after each step, while the step's figures stand in `run.step`
 * @returns where and why the leg stops, or `null` where it ends at its waypoint
 */
export function runLeg(run: LegRun, start: number, accepted: Accepted): Stop | null {
  for (let panel = 0; panel < run.panels.piece.length; panel += 1) {
    const place = crossSmoothly(run, panel, start, accepted);
    const stop = runPanel(run, panel, place, start, accepted);
    if (stop !== null) return stop;
  }
  return null;
}

/** Takes the smooth steps of a panel; returns how far they lead. */
function crossSmoothly(run: LegRun, panel: number, start: number, accepted: Accepted): number {
  const { smooth, panels, clock } = run;
  let place = panels.s[panel] as number;
  if (smooth === null) return place;
  const steps = smooth.cross(panel, start, clock.elapsed, clock.met);
  for (const { to, time, since } of steps) {
    const now = start + clock.elapsed;
    if (run.stations) fillStations(run, panel, place, to, Math.max(now, since), now);
    bookTime(run.step, time);
    accepted(place, to, now, panel);
    clock.elapsed += time;
    place = to;
  }
  clock.met = smooth.met;
  return place;
}

/** Puts a smooth step's own time and use in place of those from the stations, which tell how far off they may be. */
function bookTime(step: Step, time: number): void {
  const rate = step.motion.steadyRate;
  step.timeError += Math.abs(step.time - time);
  step.time = time;
  step.use = rate * time;
  step.useError = rate * step.timeError;
}

/** What holds at the stations of a smooth step. */
function fillStations(
  { curve, panels, flows, step }: LegRun,
  panel: number,
  from: number,
  to: number,
  moment: number,
  now: number,
): void {
  const piece = panels.piece[panel] as number;
  layMiddle(step.stations, curve, piece, panels.s[panel] as number, panels.s[panel + 1] as number);
  resolveAll(flows, panel, moment, step);
  const status = solveStep(step, curve, piece, panel, false, from, to, now);
  if (status !== PACE_OK) throw new Error(`a smooth step has no solution of its own: status ${status}`);
}

function runPanel(run: LegRun, panel: number, from: number, start: number, accepted: Accepted): Stop | null {
  const { panels, curve, flows, step, clock } = run;
  const piece = panels.piece[panel] as number;
  const end = panels.s[panel + 1] as number;
  const polar = panels.polar[panel] === 1;
  let place = from;
  if (place >= end) return null;
  let longest = end - place;
  layMiddle(step.stations, curve, piece, panels.s[panel] as number, end);
  while (place < end) {
    const now = start + clock.elapsed;
    const until = resolveAll(flows, panel, Math.max(now, clock.met), step);
    for (const flow of flows)
      if (flow.state !== "data" && flow.state !== "zero") return fieldStop(flow, place);
    if (until - now <= TIME_TOLERANCE_S) {
      clock.met = until;
      continue;
    }
    let to = Math.min(place + longest, end);
    let status = solveStep(step, curve, piece, panel, polar, place, to, now);
    let met = false;
    if (status === PACE_OK && now + step.time > until + TIME_TOLERANCE_S) {
      to = cutAtTime(run, piece, panel, polar, place, to, now, until);
      met = to > 0;
      status = met ? PACE_OK : UNSETTLED;
    }
    const length = met || status === PACE_OK ? to - place : longest;
    if (status !== PACE_OK || !isAccurate(step)) {
      if (length > SHORTEST_STEP_M) {
        longest = length / 2;
        continue;
      }
      if (status !== PACE_OK) return motionStop(step, status, place);
    }
    accepted(place, to, now, panel);
    clock.elapsed += step.time;
    if (met) clock.met = until;
    place = to;
    longest = met ? end - place : Math.min(2 * length, end - place);
  }
  return null;
}

function resolveAll(flows: readonly Flow[], panel: number, time: number, step: Step): number {
  let until = Number.POSITIVE_INFINITY;
  for (const flow of flows) {
    resolve(flow, panel, time, step.stations);
    if (flow.until < until) until = flow.until;
  }
  return until;
}

function isAccurate(step: Step): boolean {
  return step.timeError <= STEP_TOLERANCE * step.time && step.useError <= STEP_TOLERANCE * Math.abs(step.use);
}

/**
 * Shortens the step to end at a valid time: Newton on t(s) = until, whose slope is 1/g. The step is left solved up to
 * the place returned, -1 where it does not settle.
 */
function cutAtTime(
  run: LegRun,
  piece: number,
  panel: number,
  polar: boolean,
  from: number,
  to: number,
  now: number,
  until: number,
): number {
  const { step, curve } = run;
  const wanted = until - now;
  let place = placeAtTime(step, wanted, from, to);
  for (let cut = 0; cut < MOST_CUTS; cut += 1) {
    if (!(place > from)) return -1;
    if (solveStep(step, curve, piece, panel, polar, from, place, now) !== PACE_OK) return -1;
    const late = step.time - wanted;
    if (Math.abs(late) <= TIME_TOLERANCE_S) return place;
    const next = Math.min(place - late * (step.groundSpeed[STATIONS - 1] as number), to);
    if (next === place) return place;
    place = next;
  }
  return -1;
}

/** First guess of the place at a time since the step's start: linear between stations. */
function placeAtTime(step: Step, wanted: number, from: number, to: number): number {
  const { elapsed, stations } = step;
  for (let i = 1; i < STATIONS; i += 1) {
    const after = elapsed[i] as number;
    if (after >= wanted) {
      const before = i === 1 ? 0 : (elapsed[i - 1] as number);
      const a = stations.s[i - 1] as number;
      return a + (((stations.s[i] as number) - a) * (wanted - before)) / (after - before);
    }
  }
  return from + ((to - from) * wanted) / step.time;
}

function fieldStop(flow: Flow, at: number): Stop {
  const code = flow.state as "outside-area" | "outside-time" | "gap";
  return { code, at, role: flow.field.role, along: 0, cross: 0, throughSpeed: 0 };
}

function motionStop(
  step: Step,
  status: typeof PACE_CANNOT_HOLD | typeof PACE_OUTSIDE_TABLE | typeof UNSETTLED,
  at: number,
): Stop {
  const station = step.failedAt;
  return {
    code: status === PACE_OUTSIDE_TABLE ? "outside-power-table" : "cannot-hold-track",
    at,
    role: null,
    along: step.along[station] as number,
    cross: step.cross[station] as number,
    throughSpeed: step.motion.solution.throughSpeed,
  };
}

/** An `accepted` that adds up time and use and watches the leg, for its outcome alone. */
export function accountTimes(run: LegRun, sums: LegSums, watch: LegWatch): Accepted {
  const { step, flows, panels } = run;
  return (from, to, start, panel) => {
    addTimes(sums, step, to - from);
    watch.atStations(step, flows, start);
    watch.overSpan(flows, panels.polar[panel] === 1, from, to);
  };
}

/** An `accepted` that adds everything up for the leg's account. */
export function accountInto(run: LegRun, sums: LegSums, watch: LegWatch): Accepted {
  const { step, flows, panels } = run;
  return (from, to, start, panel) => {
    addTimes(sums, step, to - from);
    addStations(sums, step, to - from, flows, start);
    watch.atStations(step, flows, start);
    watch.overSpan(flows, panels.polar[panel] === 1, from, to);
  };
}
