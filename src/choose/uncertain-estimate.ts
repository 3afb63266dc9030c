import type { Pace } from "../craft/craft.ts";
import type { Conditions } from "../estimate/conditions.ts";
import type { EstimateAnswer, EstimateInput } from "../estimate/estimate.ts";
import { statusOf } from "../estimate/findings.ts";
import { fieldsInUse, type PreparedRoute } from "../estimate/prepare.ts";
import type { Finding, Profile, RouteEstimate } from "../estimate/result.ts";
import { arrivalSpeed } from "./arrival-answer.ts";
import { arrivalAsked, arrivalChance } from "./arrival-kept.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import { unsureArrival, unsureReserve } from "./confidence.ts";
import type { DecidedEstimate, DecidedRoute } from "./decided.ts";
import {
  type EnsembleMember,
  ensembleResult,
  type MemberRun,
  memberRun,
  membersInTime,
  memberVariants,
} from "./ensemble.ts";
import { type ErrorSpread, errorSpread } from "./error-spread.ts";
import type { ForecastError } from "./forecast-error.ts";
import type { SensitivityProfile } from "./sensitivity-profile.ts";
import { speedRange } from "./speed-range.ts";
import type { WhatIf } from "./what-if.ts";
import { isOfVariant, whatIfResults, whatIfsInTime, whatIfVariants, withWorst } from "./what-if-results.ts";

/** What is asked about how sure an estimate is. */
export interface UncertaintyAsked {
  readonly whatIfs: readonly WhatIf[];
  readonly errors: readonly ForecastError[];
  /** Every member of an ensemble with all of the plan's fields, ascending; empty for none. */
  readonly members: readonly EnsembleMember[];
  /** Probability, 0..1, with which the reserve has to hold under the stated errors; left out where none is asked for. */
  readonly confidence?: number | undefined;
}

export interface UncertainAnswer extends EstimateAnswer {
  readonly estimate: DecidedEstimate;
  /** Per route, where a wrong forecast would hurt most; `null` where there is no spread. */
  readonly sensitivities: readonly (SensitivityProfile | null)[];
}

/**
 * An estimate with what-ifs, the spread under the stated forecast error and every member of an ensemble worked out for each of
 * its routes, at the pace at which it was estimated. The worst what-if or member decides the status of a route that is better
 * itself; so does a reserve that holds with less than the probability asked for. Where a span of times to arrive in was asked for, a member
 * or what-if that arrives outside it at the speed found is a stop.
 *
 * @param prepared by `prepareRoutes`, from the same input
 * @throws InputError for a what-if that the pace or the craft does not allow
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
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const pace = { hold: "through-speed", speed_m_s: 10 };
 * const input = { title: "", departure: 0, craft, pace, reserve: null, fields: [wind(0)], routes, land: null };
 * const prepared = prepareRoutes(input);
 * const members = [0, 2].map((u, member) => ({ member, fields: [wind(u)] }));
 * const asked = { whatIfs: [], errors: [], members };
 * const answer = withUncertainty(estimatePrepared(prepared, input), prepared, input, asked);
 * answer.estimate.routes[0].ensemble.members // → [0, 1]
 */
export function withUncertainty(
  { estimate, profiles }: EstimateAnswer & { readonly estimate: DecidedEstimate },
  prepared: readonly PreparedRoute[],
  input: EstimateInput,
  { whatIfs, errors, members, confidence }: UncertaintyAsked,
): UncertainAnswer {
  const conditions = estimate.routes.map((route, index) => conditionsOf(route, input, index));
  const isFound = estimate.routes.map(({ arrive }) => arrive !== undefined);
  const results = whatIfResults(prepared, conditions, whatIfs, isFound);
  const spreads = estimate.routes.map((route, index) => {
    const run = { estimate: route, profile: profiles[index] as Profile };
    const given = conditions[index] as Conditions;
    return errors.length === 0 ? null : errorSpread(prepared[index] as PreparedRoute, given, run, errors);
  });
  const runs = conditions.map((given, index) => memberRuns(prepared[index] as PreparedRoute, given, members));
  const routes = estimate.routes.map((route, index): DecidedRoute => {
    const own = runs[index] ?? [];
    const wanted = arrivalAsked(route);
    const whatIf = whatIfsInTime(results[index] ?? [], wanted);
    const spread = toldSpread(route, spreads[index]?.spread ?? null, wanted, confidence);
    const told = {
      ...route,
      ...(errors.length === 0 ? {} : { spread }),
      ...(own.length === 0
        ? {}
        : { ensemble: { ...ensembleResult(own), ...(wanted === null ? {} : membersInTime(own, wanted)) } }),
      ...(whatIfs.length === 0 ? {} : { whatIf }),
    };
    const decided = withWorst(told, [...memberVariants(own, wanted), ...whatIfVariants(whatIf)]);
    if (confidence === undefined) return decided;
    const asked = { confidence, errors };
    return withUnsure(decided, [
      unsureReserve(route, conditions[index] as Conditions, spread?.reserveHolds ?? null, asked),
      route.arrive?.chosen === null ? null : unsureArrival(wanted, spread?.arrivalHolds ?? null, confidence),
    ]);
  });
  return {
    estimate: { ...estimate, routes },
    profiles,
    sensitivities: spreads.map((spread) => spread?.profile ?? null),
  };
}

/** A spread with what the plan asks of it. */
function toldSpread(
  { arrival }: RouteEstimate,
  spread: ErrorSpread | null,
  wanted: ArrivalWindow | null,
  confidence: number | undefined,
): ErrorSpread | null {
  if (spread === null || arrival === null) return spread;
  return {
    ...spread,
    ...(wanted === null
      ? {}
      : { arrivalHolds: arrivalChance(Date.parse(arrival), spread.arrival_s, wanted) }),
    ...(confidence === undefined ? {} : { confidence }),
  };
}

/** What is found under the stated error stands after what a member or what-if decides, and before the route's own. */
function withUnsure(route: DecidedRoute, found: readonly (Finding | null)[]): DecidedRoute {
  const unsure = found.filter((finding) => finding !== null);
  if (unsure.length === 0) return route;
  const variants = route.findings.filter(isOfVariant);
  const own = route.findings.filter((finding) => !isOfVariant(finding));
  const findings = [...variants, ...unsure, ...own];
  return { ...route, status: statusOf(findings), findings };
}

function memberRuns(
  prepared: PreparedRoute,
  given: Conditions,
  members: readonly EnsembleMember[],
): MemberRun[] {
  return members.map(({ member, fields }) =>
    memberRun(prepared, given, { member, fields: fieldsInUse(given.craft, fields) }),
  );
}

/** A route's conditions, at the pace at which it was estimated. */
export function conditionsOf(route: RouteEstimate, input: EstimateInput, index: number): Conditions {
  const { departure, craft, reserve, fields } = input;
  return { departure, craft, reserve, fields: fieldsInUse(craft, fields), pace: paceOf(route, input, index) };
}

/** A route that should arrive at some time was estimated at the speed found for that. */
function paceOf({ arrive }: RouteEstimate, { craft, pace, paces }: EstimateInput, index: number): Pace {
  if (arrive === undefined) return paces?.[index] ?? pace;
  return { hold: "through-speed", speed_m_s: arrivalSpeed(arrive) ?? speedRange(craft).max };
}
