import type { Reserve } from "../craft/craft.ts";
import type { Conditions } from "../estimate/conditions.ts";
import type { RouteRun } from "../estimate/estimate-route.ts";
import { mediumRole, type PreparedRoute } from "../estimate/prepare.ts";
import type { RouteEstimate } from "../estimate/result.ts";
import { type ErrorCovariance, errorCovariance } from "./error-covariance.ts";
import type { ForecastError } from "./forecast-error.ts";
import { type LegSpread, legSpreads } from "./leg-spreads.ts";
import { normalProbability } from "./normal-distribution.ts";
import { type Sensitivities, sensitivities } from "./sensitivity.ts";
import {
  type SensitivityProfile,
  sensitivityProfile,
  type WeakPlace,
  weakestPlace,
} from "./sensitivity-profile.ts";
import { trackCells } from "./track-cells.ts";

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
  /** Probability of arriving by the latest time that the pace asks for, with the arrival taken as normally distributed, where it does; 0..1. */
  readonly arrivalHolds?: number;
  /** The probability that the plan asks for, where it does. */
  readonly confidence?: number;
  /**
   * Where an error of the forecast adds most to the spread of the arrival, and of the use, per time spent there; `null` where
   * there is no spread.
   */
  readonly weakest: { readonly time: WeakPlace | null; readonly use: WeakPlace | null };
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
  const medium = mediumRole(conditions.craft);
  const acting = actingErrors(conditions, errors);
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

/** The errors that act on the craft: of its medium, and of the wind where it has windage. */
export function actingErrors(
  { craft, fields }: Pick<Conditions, "craft" | "fields">,
  errors: readonly ForecastError[],
): ForecastError[] {
  const medium = mediumRole(craft);
  return errors.filter(
    ({ role }) => fields.some((field) => field.role === role) && (role === medium || craft.windage !== null),
  );
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
  const { legs, margin } = legSpreads(estimate, found, covariance, reserve);
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
