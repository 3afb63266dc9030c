import type { Field } from "../field/field.ts";
import type { Conditions } from "./conditions.ts";
import { inOrder } from "./finding-book.ts";
import { statusOf } from "./findings.ts";
import { isoTime } from "./leg-result.ts";
import type { PreparedRoute } from "./prepare.ts";
import type { Finding, Profile, RouteEstimate } from "./result.ts";
import { routeTotals } from "./route-totals.ts";
import { RouteWork } from "./route-work.ts";
import { reserveAmount, storeFindings } from "./store-findings.ts";

/** A route's estimate with its figures along the way. */
export interface RouteRun {
  readonly estimate: RouteEstimate;
  readonly profile: Profile;
}

/**
 * Estimates a prepared route: the second half, run for every departure, pace, craft or set of values.
 *
 * Time is the integral of ds / g(s, t(s)) with g = a + sqrt(V² - c²), use that of its rate over g, and the fields' figures
 * are line integrals along the track at the times when the craft is there.
 *
 * @throws InputError where the pace has no speed even with every field at zero
 * @throws Error where the fields are not those that the route was prepared for
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Boat", "moves": "water", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * );
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const route = { name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] };
 * const conditions = { departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [] };
 * estimateRoute(prepareRoute(route, []), conditions).estimate.arrival // → "1970-01-01T06:11:03.898Z"
 */
export function estimateRoute(prepared: PreparedRoute, conditions: Conditions): RouteRun {
  const work = runRoute(prepared, conditions, true);
  const { craft, departure } = conditions;
  const { legs } = prepared;
  const close = closing(work, prepared, conditions);
  const legStarts = legs.map((_, n) => legs.slice(0, n).reduce((sum, { track }) => sum + track.length, 0));
  const estimate: RouteEstimate = {
    name: prepared.route.name,
    status: statusOf(close.findings),
    departure: isoTime(departure),
    arrival: work.reached === null ? isoTime(departure + 1000 * work.arrived) : null,
    storeUnit: craft.store.unit,
    usable: craft.store.usable,
    reserve: close.reserve,
    ...(work.reached === null ? {} : { reached: work.reached }),
    totals: routeTotals(work.legs, work.reached === null, work.timeBound, craft.store.usable - work.used),
    legs: work.legs,
    findings: close.findings,
  };
  return { estimate, profile: work.samples.profile(legStarts, craft.store.usable) };
}

/** Runs all legs of a route. @param full whether everything is worked out, or the outcome alone */
export function runRoute(prepared: PreparedRoute, conditions: Conditions, full: boolean): RouteWork {
  checkFields(prepared, conditions.fields);
  const work = new RouteWork(prepared, conditions, full);
  for (const [index, leg] of prepared.legs.entries()) work.addLeg({ number: index + 1, prepared: leg });
  return work;
}

/** @throws Error where the fields are not those that the route was prepared for */
export function checkFields({ roles, legs }: PreparedRoute, fields: readonly Field[]): void {
  const fits =
    roles.length === fields.length &&
    fields.every(({ role, tiles }, n) => role === roles[n] && tiles.length === legs[0]?.cells[n]?.length);
  if (!fits) throw new Error("the fields are not those that the route was prepared for");
}

/** The reserve and all findings, once the legs are run. */
export function closing(
  work: RouteWork,
  { legs }: PreparedRoute,
  { craft, reserve }: Conditions,
): { readonly reserve: number | null; readonly findings: readonly Finding[] } {
  const complete = work.reached === null;
  const kept = reserveAmount(reserve, craft, complete ? work.lastLegRate : null);
  const numbered = legs.map((prepared, index) => ({ number: index + 1, prepared }));
  const left = complete ? craft.store.usable - work.used : null;
  return {
    reserve: kept,
    findings: inOrder([...work.book.findings, ...storeFindings(work.samples, numbered, craft, kept, left)]),
  };
}
