import { InputError } from "../errors.ts";
import type { Conditions } from "../estimate/conditions.ts";
import { routeFinding, statusOf } from "../estimate/findings.ts";
import { isoTime } from "../estimate/leg-result.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { Finding, Reached, RouteEstimate, RouteStatus } from "../estimate/result.ts";
import { routeOutcome } from "../estimate/route-outcomes.ts";
import { arrivalMiss, heldToArrival } from "./arrival-kept.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import type { WhatIf } from "./what-if.ts";
import { underWhatIf, whatIfFields } from "./what-if-conditions.ts";
import { arrivalOf, cellFinding, cellOf, type WindowCell } from "./window-cell.ts";

/** What a route comes to under a what-if: a true estimate, with the figures of a window's cell. */
export interface WhatIfResult extends Omit<WindowCell, "route" | "speed_m_s"> {
  readonly name: string;
  /** How far it comes, where it stops on the way. */
  readonly reached: Reached | null;
  /**
   * Where the pace asks for an arrival: seconds by which it is missed at the speed found, positive too late, negative too early, 0 where it
   * is kept; `null` where the route does not arrive.
   */
  readonly arrivalMiss_s?: number | null;
}

/**
 * Estimates a prepared route under each what-if.
 *
 * @param prepared every route that the answer is about, so that changed fields serve them all
 * @param conditions one per route
 * @param isFound per route, whether its pace was found for an arrival: a change of the speed that the craft does not allow is then a stop of
 *   the what-if, since the plan does not name the speed that it changes
 * @returns per route, in the order of the what-ifs
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
 * const conditions = { departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 10 }, reserve: null, fields: [wind(0)] };
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }, [wind(0)]);
 * const whatIf = { name: "Headwind", wind: 1, current: 1, veer_deg: 0, speed_m_s: -1, consumption: 0, late_s: 0 };
 * whatIfResults([prepared], [conditions], [whatIf])[0][0].time_s // → 12368.83
 */
export function whatIfResults(
  prepared: readonly PreparedRoute[],
  conditions: readonly Conditions[],
  whatIfs: readonly WhatIf[],
  isFound: readonly boolean[] = [],
): WhatIfResult[][] {
  const results: WhatIfResult[][] = prepared.map(() => []);
  for (const whatIf of whatIfs) {
    const changed = whatIfFields(whatIf, conditions[0]?.fields ?? [], prepared);
    for (const [index, route] of changed.prepared.entries()) {
      const result = isFound[index] === true ? resultOrStop : whatIfResult;
      results[index]?.push(result(whatIf, route, conditions[index] as Conditions, changed.fields));
    }
  }
  return results;
}

function whatIfResult(
  whatIf: WhatIf,
  route: PreparedRoute,
  base: Conditions,
  fields: Conditions["fields"],
): WhatIfResult {
  const { prepared, conditions } = underWhatIf(whatIf, route, base, fields);
  const outcome = routeOutcome(prepared, conditions);
  const { route: _, speed_m_s: __, ...figures } = cellOf(prepared, conditions.departure, null, outcome);
  return { name: whatIf.name, ...figures, reached: outcome.reached };
}

function resultOrStop(...given: Parameters<typeof whatIfResult>): WhatIfResult {
  try {
    return whatIfResult(...given);
  } catch (fault) {
    if (!(fault instanceof InputError)) throw fault;
    const [{ name, late_s }, , { departure }] = given;
    const figures = {
      arrival: null,
      time_s: null,
      passage_s: null,
      use: null,
      remaining: null,
      reserve: null,
    };
    const worst = cellFinding(routeFinding("outside-power-table", fault.sentence));
    const left = isoTime(departure + 1000 * late_s);
    return { name, departure: left, ...figures, status: "stop", worst, reached: null };
  }
}

/** What-ifs held to the arrival that the route's pace asks for; as they are where it asks for none. */
export function whatIfsInTime(
  results: readonly WhatIfResult[],
  asked: ArrivalWindow | null,
): readonly WhatIfResult[] {
  if (asked === null) return results;
  return results.map((result) => {
    const arrival = arrivalOf(result);
    const arrivalMiss_s = arrival === null ? null : arrivalMiss(arrival, asked);
    return { ...heldToArrival(result, arrival, asked), arrivalMiss_s };
  });
}

const RANK: Readonly<Record<RouteStatus, number>> = { clear: 0, caution: 1, stop: 2 };

/** A variant of a route, for {@link withWorst}. */
export interface Variant {
  /** As a finding begins: `what if wind × 1.2`. */
  readonly label: string;
  readonly status: RouteStatus;
  readonly remaining: number | null;
  readonly worst: WindowCell["worst"];
}

/** Variants of a route under its what-ifs. */
export function whatIfVariants(results: readonly WhatIfResult[]): Variant[] {
  return results.map(({ name, status, remaining, worst }) => ({
    label: `what if ${name}`,
    status,
    remaining,
    worst,
  }));
}

/**
 * A route whose status is decided by the worst of its variants: where one is worse than the route itself, a finding of the
 * variant's own code, which says which variant it is, and how many others are as bad.
 */
export function withWorst<Route extends RouteEstimate>(route: Route, variants: readonly Variant[]): Route {
  const finding = worstVariant(route, variants);
  if (finding === null) return route;
  const findings = [finding, ...route.findings];
  return { ...route, status: statusOf(findings), findings };
}

/** Whether a finding is of a member, a what-if or the stated error, and not of the plain estimate. */
export function isOfVariant({ code, leg, message }: Pick<Finding, "code" | "leg" | "message">): boolean {
  return code === "reserve-unsure" || (leg === null && /^(what if|member|under the stated) /.test(message));
}

function worstVariant(route: RouteEstimate, variants: readonly Variant[]): Finding | null {
  const deciding = decidingVariant(route.status, variants);
  if (deciding === null || deciding.variant.worst === null) return null;
  return routeFinding(deciding.variant.worst.code, variantText(deciding));
}

/** The variant that decides, and how many others are as bad. */
export interface DecidingVariant<Kind extends Variant = Variant> {
  readonly variant: Kind;
  readonly others: number;
}

/** The worst of the variants that are worse than the status of the route itself; `null` where none is. */
export function decidingVariant<Kind extends Variant>(
  own: RouteStatus,
  variants: readonly Kind[],
): DecidingVariant<Kind> | null {
  const worse = variants.filter(({ status }) => RANK[status] > RANK[own]);
  const status = worse.reduce<RouteStatus>(
    (so, each) => (RANK[each.status] > RANK[so] ? each.status : so),
    "clear",
  );
  const worst = worse.filter((each) => each.status === status);
  // Of equals the one that does not arrive, or else arrives with the least.
  const left = ({ remaining }: Variant) => remaining ?? Number.NEGATIVE_INFINITY;
  const first = worst.reduce<Kind | null>(
    (so, each) => (so === null || left(each) < left(so) ? each : so),
    null,
  );
  return first === null ? null : { variant: first, others: worst.length - 1 };
}

/** `what if Gale (and 2 more): the store runs empty …` */
export function variantText({ variant, others }: DecidingVariant): string {
  return `${variant.label}${others === 0 ? "" : ` (and ${others} more)`}: ${variant.worst?.message ?? ""}`;
}
