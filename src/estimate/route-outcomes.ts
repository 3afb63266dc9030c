import type { Conditions } from "./conditions.ts";
import { checkFields, closing, runRoute } from "./estimate-route.ts";
import { statusOf } from "./findings.ts";
import type { PreparedRoute } from "./prepare.ts";
import type { RouteOutcome } from "./route-outcome.ts";
import { sweepRoute } from "./route-sweep.ts";

/**
 * The outcome alone of what `estimateRoute` works out, in less than half its time: no means, extremes, line
 * integrals, ledger parts or magnetic courses. Its figures and findings are the same to the last bit, but for the note
 * on dates without a magnetic model.
 *
 * @throws as `estimateRoute` does
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Boat", "moves": "water", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * );
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const route = { name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] };
 * const prepared = prepareRoute(route, []);
 * const conditions = { departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [] };
 * const { status, use } = routeOutcome(prepared, conditions);
 * [status, use] // → ["clear", 22263898.2]
 */
export function routeOutcome(prepared: PreparedRoute, conditions: Conditions): RouteOutcome {
  return routeOutcomes(prepared, conditions, [conditions.departure])[0] as RouteOutcome;
}

/**
 * The outcomes of a route at several departures: each that of {@link routeOutcome} to the last bit, in a small part of the time where
 * the craft holds a speed at a steady rate through one field.
 *
 * @param departures ms since 1970-01-01T00:00Z, in place of that of the conditions
 * @throws as `estimateRoute` does
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Boat", "moves": "water", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * );
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }, []);
 * const conditions = { departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [] };
 * routeOutcomes(prepared, conditions, [0, 3600000]).map(({ use }) => use) // → [22263898.2, 22263898.2]
 */
export function routeOutcomes(
  prepared: PreparedRoute,
  conditions: Conditions,
  departures: readonly number[],
): RouteOutcome[] {
  checkFields(prepared, conditions.fields);
  return sweepRoute(prepared, conditions, departures).map(
    (outcome, n) => outcome ?? outcomeAlone(prepared, { ...conditions, departure: departures[n] as number }),
  );
}

function outcomeAlone(prepared: PreparedRoute, conditions: Conditions): RouteOutcome {
  const work = runRoute(prepared, conditions, false);
  const { findings, reserve } = closing(work, prepared, conditions);
  const complete = work.reached === null;
  return {
    status: statusOf(findings),
    arrival: complete ? conditions.departure + 1000 * work.arrived : null,
    time_s: complete ? work.underWay : null,
    use: complete ? work.used : null,
    remaining: complete ? conditions.craft.store.usable - work.used : null,
    reserve,
    reached: work.reached,
    findings,
  };
}
