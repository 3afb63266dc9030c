import { type EstimateAnswer, type EstimateInput, estimatePrepared } from "../estimate/estimate.ts";
import { speedText } from "../estimate/finding-text.ts";
import { routeFinding, statusOf } from "../estimate/findings.ts";
import { fieldsInUse, type PreparedRoute } from "../estimate/prepare.ts";
import type { ArrivalAnswer, RouteEstimate } from "../estimate/result.ts";
import { arrivalSpeed, cheapestLost, foundText, missedText } from "./arrival-answer.ts";
import { arrivalTestsAt } from "./arrival-trials.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import { type FoundArrival, findArrival } from "./held-arrival.ts";
import { speedRange } from "./speed-range.ts";
import type { UncertaintyAsked } from "./uncertain-estimate.ts";

/**
 * Estimates every route at the cheapest constant through-speed that arrives when it should, each at its own, and says so in a
 * note and under `arrive`. A route without such a speed is estimated at that of the nearest arrival (at the highest, where
 * none completes it) and is a `stop`.
 *
 * Where a span of times is asked for, it is the cheapest found that also holds in every member and what-if, arrives then in all of them, and
 * keeps reserve and arrival with the confidence asked for; where none is found, the cheapest by the plain estimate.
 *
 * @param prepared by `prepareRoutes`, from the same input
 * @param input its pace is not used
 * @param asked what a speed has to hold in; left out, the plain estimate decides alone
 * @throws InputError where the craft's speeds have no bound, the wanted window ends before it begins, or as `estimate` does
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const input = { title: "", departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [], routes, land: null };
 * const wanted = { notBefore: 36000000, notAfter: 36000000 };
 * estimateArriving(prepareRoutes(input), input, wanted).estimate.routes[0].arrival // → "1970-01-01T10:00:00.000Z"
 */
export function estimateArriving(
  prepared: readonly PreparedRoute[],
  input: EstimateInput,
  wanted: ArrivalWindow,
  asked: UncertaintyAsked | null = null,
): EstimateAnswer {
  const { departure, craft, reserve } = input;
  const conditions = { departure, craft, reserve, fields: fieldsInUse(craft, input.fields) };
  const { max } = speedRange(craft);
  const pace = { hold: "through-speed", speed_m_s: max } as const;
  const sweep = { prepared, conditions: { ...conditions, pace }, arrive: wanted };
  const testsAt = asked && arrivalTestsAt(sweep, asked);
  const answers = prepared.map((route) => withReason(findArrival(route, conditions, wanted, testsAt)));
  const paces = answers.map(
    (answer) => ({ hold: "through-speed", speed_m_s: arrivalSpeed(answer) ?? max }) as const,
  );
  const { estimate, profiles } = estimatePrepared(prepared, { ...input, paces });
  const routes = estimate.routes.map((route, index) =>
    withArrival(route, answers[index] as ArrivalAnswer, departure),
  );
  return { estimate: { ...estimate, routes }, profiles };
}

/** With what stops the cheapest by the plain estimate, where it does not hold, or why no other does. */
function withReason({ answer, tests, shut }: FoundArrival): ArrivalAnswer {
  const lost = cheapestLost(answer);
  if (lost === null || tests === null) return answer;
  const stops = (speed: number): string => tests.stoppedBy(speed)?.message ?? "";
  if (shut === null) return { ...answer, reason: stops(lost.speed_m_s) };
  const what = shut.isInTime ? "the slowest that is in time in all of it" : "the fastest that arrives then";
  return { ...answer, reason: `${what}, ${speedText(shut.speed)}, does not: ${stops(shut.speed)}` };
}

function withArrival(route: RouteEstimate, arrive: ArrivalAnswer, departure: number): RouteEstimate {
  const finding =
    arrive.chosen === null
      ? routeFinding("arrival-missed", missedText(arrive))
      : routeFinding("pace-found", foundText(arrive, departure));
  const findings = [finding, ...route.findings];
  return { ...route, status: statusOf(findings), arrive, findings };
}
