import type { FieldRole } from "../field/field.ts";
import { addDirection, type DirectionRange, makeDirectionRange, startDirection } from "./direction-range.ts";
import type { Flow } from "./flow.ts";
import { FIRST_NODE, KRONROD_WEIGHT, LAST_NODE, STATIONS } from "./gauss-kronrod.ts";
import type { Step } from "./step.ts";

/** What the accepted steps of a leg add up to for one field. */
export interface FlowSums {
  /** ∫ w·T ds and ∫ w·N ds, m²/s. */
  along: number;
  cross: number;
  maxSpeed: number;
  /** Distance with real data, m. */
  covered: number;
}

/** What the accepted steps of a leg add up to. */
export interface LegSums {
  distance: number;
  time: number;
  timeBound: number;
  use: number;
  useBound: number;
  /** Product of the steps' amplifications of an error in the leg's departure time, less one. */
  growth: number;
  throughDistance: number;
  minThroughSpeed: number;
  maxThroughSpeed: number;
  minGroundSpeed: number;
  maxGroundSpeed: number;
  readonly heading: DirectionRange;
  readonly crab: DirectionRange;
  readonly flows: Record<FieldRole, FlowSums>;
}

export function makeLegSums(courseSin: number, courseCos: number): LegSums {
  const heading = makeDirectionRange();
  startDirection(heading, courseSin, courseCos);
  const flow = (): FlowSums => ({ along: 0, cross: 0, maxSpeed: 0, covered: 0 });
  return {
    distance: 0,
    time: 0,
    timeBound: 0,
    use: 0,
    useBound: 0,
    growth: 0,
    throughDistance: 0,
    minThroughSpeed: Number.POSITIVE_INFINITY,
    maxThroughSpeed: 0,
    minGroundSpeed: Number.POSITIVE_INFINITY,
    maxGroundSpeed: 0,
    heading,
    crab: makeDirectionRange(),
    flows: { wind: flow(), current: flow() },
  };
}

/** Rounding of sums and the 2e-12° to which the positions are fitted, as a share of a step. */
const ROUNDING = 2e-13;

/** Adds an accepted step's time and use with their bounds. */
export function addTimes(sums: LegSums, step: Step, length: number): void {
  sums.distance += length;
  sums.time += step.time;
  sums.use += step.use;
  const amplified = 1 + step.growth;
  sums.useBound += step.useError + ROUNDING * Math.abs(step.use);
  sums.useBound += sums.timeBound * Math.abs(step.growth * (step.use / step.time));
  sums.timeBound = sums.timeBound * amplified + step.timeError + ROUNDING * step.time;
  sums.growth = (1 + sums.growth) * amplified - 1;
}

/** Adds everything else that an accepted step tells: speeds, directions, the fields along it. */
export function addStations(
  sums: LegSums,
  step: Step,
  length: number,
  flows: readonly Flow[],
  start: number,
): void {
  const half = length / 2;
  const { throughSpeed, groundSpeed, along, cross, stations } = step;
  for (let i = 0; i < STATIONS; i += 1) {
    const v = throughSpeed[i] as number;
    const g = groundSpeed[i] as number;
    if (v < sums.minThroughSpeed) sums.minThroughSpeed = v;
    if (v > sums.maxThroughSpeed) sums.maxThroughSpeed = v;
    if (g < sums.minGroundSpeed) sums.minGroundSpeed = g;
    if (g > sums.maxGroundSpeed) sums.maxGroundSpeed = g;
    const weight = half * (KRONROD_WEIGHT[i] as number);
    const sin = stations.sin[i] as number;
    const cos = stations.cos[i] as number;
    // Drifting (V = 0) the craft has no heading of its own; its course stands in.
    const ahead = v > 0 ? (g - (along[i] as number)) / v : 1;
    const aside = v > 0 ? -(cross[i] as number) / v : 0;
    addDirection(sums.heading, ahead * sin + aside * cos, ahead * cos - aside * sin, weight);
    addDirection(sums.crab, aside, ahead, weight);
    if (i >= FIRST_NODE && i <= LAST_NODE) sums.throughDistance += (weight * v) / g;
  }
  for (const flow of flows) addFlow(sums.flows[flow.field.role], flow, step, length, start);
}

function addFlow(sums: FlowSums, flow: Flow, step: Step, length: number, start: number): void {
  const half = length / 2;
  for (let i = 0; i < STATIONS; i += 1) {
    const share = (start - flow.from + (step.elapsed[i] as number)) * flow.perSecond;
    const along = (flow.along[i] as number) + share * (flow.alongChange[i] as number);
    const cross = (flow.cross[i] as number) + share * (flow.crossChange[i] as number);
    const weight = half * (KRONROD_WEIGHT[i] as number);
    sums.along += weight * along;
    sums.cross += weight * cross;
    const speed = Math.sqrt(along * along + cross * cross);
    if (speed > sums.maxSpeed) sums.maxSpeed = speed;
  }
  if (flow.state === "data" && !flow.held && !flow.filled) sums.covered += length;
}
