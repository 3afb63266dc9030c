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
