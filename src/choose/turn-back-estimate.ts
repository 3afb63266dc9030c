import type { Pace } from "../craft/craft.ts";
import type { EstimateAnswer, EstimateInput } from "../estimate/estimate.ts";
import { fieldsInUse, type PreparedRoute } from "../estimate/prepare.ts";
import type { RouteEstimate } from "../estimate/result.ts";
import type { Alternate } from "./alternate.ts";
import { arrivalSpeed } from "./arrival-answer.ts";
import type { DecidedEstimate } from "./decided.ts";
import { speedRange } from "./speed-range.ts";
import { turnBack } from "./turn-back.ts";

/**
 * An estimate with turning back and off worked out for each of its routes, at the pace at which it was estimated.
 *
 * @param prepared by `prepareRoutes`, from the same input
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "constant", "rate": "1 kW" }, "store": { "capacity": "10 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 3)] }];
 * const input = { title: "East", departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [], routes, land: null };
 * const prepared = prepareRoutes(input);
 * withTurnBack(estimatePrepared(prepared, input), prepared, input, []).estimate.routes[0].turnBack.equalTime[0].place.lon.toFixed(6) // → "1.500000"
 */
export function withTurnBack(
  { estimate, profiles }: EstimateAnswer,
  prepared: readonly PreparedRoute[],
  input: EstimateInput,
  alternates: readonly Alternate[],
): EstimateAnswer & { readonly estimate: DecidedEstimate } {
  const { departure, craft, reserve, fields } = input;
  const common = { departure, craft, reserve, fields: fieldsInUse(craft, fields) };
  const routes = estimate.routes.map((route, index) => {
    const way = prepared[index];
    const pace = paceOf(route, input, index);
    if (way === undefined) throw new Error(`route ${index} was not prepared`);
    return { ...route, turnBack: turnBack(way, { ...common, pace }, alternates) };
  });
  return { estimate: { ...estimate, routes }, profiles };
}

/** A route that should arrive at some time was estimated at the speed found for that. */
function paceOf({ arrive }: RouteEstimate, { craft, pace, paces }: EstimateInput, index: number): Pace {
  if (arrive === undefined) return paces?.[index] ?? pace;
  return { hold: "through-speed", speed_m_s: arrivalSpeed(arrive) ?? speedRange(craft).max };
}
