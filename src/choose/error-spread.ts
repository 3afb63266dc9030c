import type { Reserve } from "../craft/craft.ts";
import type { Conditions } from "../estimate/conditions.ts";
import type { RouteRun } from "../estimate/estimate-route.ts";
import { mediumRole, type PreparedRoute } from "../estimate/prepare.ts";
import type { RouteEstimate } from "../estimate/result.ts";
import type { Covariance, ErrorCovariance } from "./error-covariance.ts";
import { errorCovariance } from "./error-covariance.ts";
import type { ForecastError } from "./forecast-error.ts";
import { normalProbability } from "./normal-distribution.ts";
import { type DelayWeights, type Sensitivities, sensitivities } from "./sensitivity.ts";
import {
  type SensitivityProfile,
  sensitivityProfile,
  type WeakPlace,
  weakestPlace,
} from "./sensitivity-profile.ts";
import { trackCells } from "./track-cells.ts";

/** Standard deviations of a leg's figures under the forecast's stated error: s, and store units. */
export interface LegSpread {
  readonly leg: number;
  /** Of the time under way and of the use on the leg. */
  readonly time_s: number;
  readonly use: number;
  /** Of the arrival at its waypoint, and of what is left after it. */
  readonly arrival_s: number;
  readonly remaining: number;
}

/** Standard deviations of a route's figures under the forecast's stated error, to first order. */
export interface ErrorSpread {
  readonly errors: readonly ForecastError[];
  readonly time_s: number;
  readonly arrival_s: number;
  readonly use: number;
  readonly remaining: number;
  /** Of what is left above the reserve, which moves too where it is a time at the final leg's rate. */
  readonly margin: number;
  /** Probability that what is left is not below the reserve, with the margin taken as normally distributed; 0..1. */
  readonly reserveHolds: number;
  /** Where an error of the forecast adds most to the spread of the arrival, and of the use, per time spent there. */
  readonly weakest: { readonly time: WeakPlace; readonly use: WeakPlace };
  readonly legs: readonly LegSpread[];
}

export interface SpreadAnswer {
  readonly spread: ErrorSpread;
  readonly profile: SensitivityProfile;
}

/** Longest cell, in correlation lengths: halving it changes no standard deviation by more than 1 in 1000. */
const CELL = 0.1;
/** Cells of a route at most; beyond, they grow. */
const MOST_CELLS = 3000;

/**
 * The spread of a route that arrives under the stated error of its fields: first-order propagation, as
 * `sensitivity.ts` and `error-covariance.ts` derive it.
 *
 * @param run the route's estimate under these conditions
 * @param errors one a role at most; those of fields that do not act on the craft add nothing
 * @returns `null` where the route stops on the way, no error acts on it, or it runs along the edge of what its pace or field has
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Drone", "moves": "air", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * );
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const wind = (u) => {
 *   const slices = [Float64Array.of(u, 0, u, 0, u, 0, u, 0)];
 *   const axes = { lon: Float64Array.of(-1, 2), lat: Float64Array.of(-1, 1), height: null, times: null };
 *   const tile = { files: [], ...axes, slices, gusts: null, masks: [null], global: false, beyond: "stop" };
 *   return { role: "wind", tiles: [tile], outside: "stop" };
 * };
 * const conditions = { departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 10 }, reserve: null, fields: [wind(0)] };
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }, [wind(0)]);
 * const errors = [{ role: "wind", speed_m_s: 1, length_m: 100000, time_s: 21600 }];
 * errorSpread(prepared, conditions, estimateRoute(prepared, conditions), errors).spread.time_s // → 878.05
 */
export function errorSpread(
  prepared: PreparedRoute,
  conditions: Conditions,
  run: RouteRun,
  errors: readonly ForecastError[],
): SpreadAnswer | null {
  const { craft, fields } = conditions;
  const medium = mediumRole(craft);
  const acting = errors.filter(
    ({ role }) => fields.some((field) => field.role === role) && (role === medium || craft.windage !== null),
  );
  const { estimate, profile } = run;
  if (estimate.arrival === null || acting.length === 0) return null;
  const cells = trackCells(prepared, conditions, profile, cellSize(estimate, acting));
  if (cells === null) return null;
  const found = sensitivities(cells);
  const covariance = errorCovariance(found, acting, (role) => (role === medium ? 0 : 2));
  return {
    spread: spreadOf(estimate, found, covariance, acting, conditions.reserve),
    profile: sensitivityProfile(found, covariance),
  };
}

function cellSize({ totals }: RouteEstimate, errors: readonly ForecastError[]) {
  const length = CELL * Math.min(...errors.map(({ length_m }) => length_m));
  const time = CELL * Math.min(...errors.map(({ time_s }) => time_s));
  const wanted = totals.distance_m / length + ((totals.time_s ?? 0) + totals.stay_s) / time;
  const grown = Math.max(1, wanted / MOST_CELLS);
  return { length_m: length * grown, time_s: time * grown };
}

function spreadOf(
  estimate: RouteEstimate,
  found: Sensitivities,
  covariance: ErrorCovariance,
  errors: readonly ForecastError[],
  reserve: Reserve | null,
): ErrorSpread {
  const legs: LegSpread[] = [];
  const sum: Covariance = { tt: 0, tu: 0, uu: 0 };
  let before: DelayWeights = { time: 1, use: 0 };
  let margin = 0;
  for (const [index, { own, before: mixed }] of covariance.legs.entries()) {
    const end = found.delayAtLegEnd[index] as DelayWeights;
    const blocks: Blocks = { sum: { ...sum }, own, mixed };
    // What acts on the leg alone: the parts of the time and the use up to its end less those up to its start.
    const time = { bt: 1 / end.time - 1 / before.time, bu: 0, ot: 1 / end.time, ou: 0 };
    const use = { bt: before.use / before.time - end.use / end.time, bu: 0, ot: -end.use / end.time, ou: 1 };
    const arrival = { bt: 1 / end.time, bu: 0, ot: 1 / end.time, ou: 0 };
    const spent = { bt: -end.use / end.time, bu: 1, ot: -end.use / end.time, ou: 1 };
    legs.push({
      leg: index + 1,
      time_s: deviation(blocks, time),
      use: deviation(blocks, use),
      arrival_s: deviation(blocks, arrival),
      remaining: deviation(blocks, spent),
    });
    margin = deviation(blocks, marginWeights(estimate, reserve, time, use, spent));
    sum.tt += 2 * mixed.tt + own.tt;
    sum.uu += 2 * mixed.uu + own.uu;
    sum.tu += mixed.tu + mixed.ut + own.tu;
    before = end;
  }
  const last = legs[legs.length - 1] as LegSpread;
  const left = (estimate.totals.remaining as number) - (estimate.reserve as number);
  return {
    errors,
    time_s: last.arrival_s,
    arrival_s: last.arrival_s,
    use: last.remaining,
    remaining: last.remaining,
    margin,
    reserveHolds: probability(left, margin),
    weakest: weakestPlace(found.cells, covariance),
    legs,
  };
}

/** Probability that a margin is not below 0. */
function probability(margin: number, deviation: number): number {
  if (deviation === 0) return margin >= 0 ? 1 : 0;
  return normalProbability(margin / deviation);
}

/** Weights of time and use on the legs before (b) and on the leg itself (o). */
interface Weights {
  readonly bt: number;
  readonly bu: number;
  readonly ot: number;
  readonly ou: number;
}

interface Blocks {
  /** Among the legs before, between them and the leg, and within the leg. */
  readonly sum: Covariance;
  readonly mixed: ErrorCovariance["legs"][number]["before"];
  readonly own: Covariance;
}

/**
 * What is left above the reserve, on the last leg. A reserve of a time R at the leg's rate u/t moves by R (δu/t - u δt/t²); a
 * stay at the last waypoint counts with the leg here.
 */
function marginWeights(
  estimate: RouteEstimate,
  reserve: Reserve | null,
  time: Weights,
  use: Weights,
  spent: Weights,
): Weights {
  const last = estimate.legs[estimate.legs.length - 1];
  if (reserve?.kind !== "time" || !last?.time_s) return spent;
  const perUse = reserve.time_s / last.time_s;
  const perTime = -(estimate.reserve as number) / last.time_s;
  const weight = (key: keyof Weights) => spent[key] + perUse * use[key] + perTime * time[key];
  return { bt: weight("bt"), bu: weight("bu"), ot: weight("ot"), ou: weight("ou") };
}

/** Standard deviation of bt T + bu U over the legs before plus ot T + ou U on the leg. */
function deviation({ sum, mixed, own }: Blocks, { bt, bu, ot, ou }: Weights): number {
  const before = bt * bt * sum.tt + 2 * bt * bu * sum.tu + bu * bu * sum.uu;
  const between = bt * ot * mixed.tt + bt * ou * mixed.tu + bu * ot * mixed.ut + bu * ou * mixed.uu;
  const here = ot * ot * own.tt + 2 * ot * ou * own.tu + ou * ou * own.uu;
  // Rounding may leave a variance of nothing a hair below 0.
  return Math.sqrt(Math.max(0, before + 2 * between + here));
}
