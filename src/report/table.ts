import type { DecidedRoute } from "../choose/decided.ts";
import type { RouteEstimate, RouteStatus } from "../estimate/result.ts";
import type { Route } from "../estimate/route.ts";
import { rule, TABLE_WIDTH } from "./columns.ts";
import { comparisonTable } from "./comparison.ts";
import { ensembleTable } from "./ensemble-rows.ts";
import { findingLines } from "./findings-text.ts";
import type { ReportInput, Units } from "./input.ts";
import { ledgerTable } from "./ledger-rows.ts";
import { legTable, stayText } from "./leg-rows.ts";
import { NO_FIGURE } from "./number-text.ts";
import { clipped, displayWidth, isolated, plainText, wrapped } from "./plain-text.ts";
import { type RouteFigures, routeFigures } from "./route-figures.ts";
import { spreadTable } from "./spread-rows.ts";
import { amountText, tableHead } from "./table-head.ts";
import { type TableUnits, tableUnits } from "./table-units.ts";
import { durationText, instantText } from "./time-text.ts";
import { turnBackTable } from "./turn-back-rows.ts";
import { whatIfTable } from "./what-if-rows.ts";
import { withinTable } from "./within-rows.ts";

const STATUS: Record<RouteStatus, string> = { clear: "clear", caution: "with cautions", stop: "STOP" };

function banner(route: RouteEstimate): string {
  const right = ` ${STATUS[route.status]} ==`;
  const name = isolated(clipped(plainText(route.name), TABLE_WIDTH - right.length - 6));
  const left = `== ${name} `;
  return left + "=".repeat(Math.max(0, TABLE_WIDTH - displayWidth(left) - right.length)) + right;
}

function reachedText(route: RouteEstimate, units: TableUnits): string {
  const { reached } = route;
  if (reached === undefined) return "Does not arrive.";
  const to = route.legs[reached.leg - 1]?.to ?? "";
  const { size, decimals, symbol } = units.length;
  const at = `${(reached.at_m / size).toFixed(Math.max(1, decimals))} ${symbol}`;
  const time = durationText(Math.round(reached.time_s), "second");
  return (
    `Ends on leg ${reached.leg} to ${isolated(plainText(to))}, ${at} along it, ${time} after departure: ` +
    `${amountText(reached.use, units)} used, ${amountText(route.usable - reached.use, units)} left.`
  );
}

function storeText(route: RouteEstimate, units: TableUnits): string {
  const { remaining } = route.totals;
  const { reserve } = route;
  if (reserve === null) return `Reserve ${NO_FIGURE}: a time at the rate of a leg that was not reached.`;
  if (reserve === 0) return "No reserve is named.";
  const amount = amountText(reserve, units);
  if (remaining === null) return `Reserve ${amount}.`;
  const margin = remaining - reserve;
  return `Reserve ${amount}: ${amountText(Math.abs(margin), units)} ${margin < 0 ? "SHORT of it" : "above it"} on arrival.`;
}

function outcome(route: RouteEstimate, units: TableUnits): string[] {
  const { totals } = route;
  const arrives =
    route.arrival === null
      ? reachedText(route, units)
      : `Arrives ${instantText(route.arrival, units.clock)}.`;
  const bound =
    totals.error === null
      ? ""
      : ` Numerical error of the time at most ${totals.error.time_s.toExponential(0)} s (not that of the forecast).`;
  const stays = totals.stay_s > 0 ? ` Time is under way; stays take ${stayText(totals.stay_s)} besides.` : "";
  return wrapped(`${arrives} ${storeText(route, units)}${stays}${bound}`, TABLE_WIDTH);
}

function routeBlock(
  route: DecidedRoute,
  geometry: Route,
  figures: RouteFigures,
  { craft }: ReportInput,
  units: TableUnits,
): string[] {
  return [
    "",
    banner(route),
    ...legTable(route, geometry, figures, craft.moves, units),
    ...outcome(route, units),
    "",
    ...ledgerTable(route, figures, units),
    "",
    ...withinTable(route, craft.moves, units),
    "",
    ...(route.spread === undefined ? [] : [...spreadTable(route, units), ""]),
    ...(route.ensemble === undefined ? [] : [...ensembleTable(route, units), ""]),
    ...(route.whatIf === undefined ? [] : [...whatIfTable(route, units), ""]),
    ...(route.turnBack === undefined ? [] : [...turnBackTable(route, units), ""]),
    ...findingLines(route),
  ];
}

function legend({ craft }: ReportInput): string[] {
  const medium = craft.moves === "water" ? "current" : "wind";
  const letters =
    craft.moves === "water"
      ? "STW speed through the water, SOG speed over the ground"
      : "TAS true airspeed, GS ground speed";
  return wrapped(
    `Crs course at the start of a leg, Hdg mean heading to steer, T true, M magnetic. Along and Cross: the ${medium}, ` +
      `+ with the craft, + toward starboard. ${letters}. All times UTC. 1st order: the line-integral estimate ` +
      "of along + cross. Rows are rounded so that they add up to the totals.",
    TABLE_WIDTH,
  );
}

/**
 * The leg table as text, at most 80 columns wide, with a final line end: head, then per route the legs, the ledger, what varies within
 * the legs and the findings; a comparison where there are several routes; the advisory.
 *
 * @example
 * writeTable({ estimate: { format: "legwork-estimate/1", advisory: "", plan: { title: "Two marks" }, fields: [], routes: [] }, routes: [], craft: { name: "Tender", moves: "water" }, pace: { hold: "least-energy" } }, "sea").split("\n")[1] // → "Craft:     Tender, holds the speed of least energy per distance"
 */
export function writeTable(input: ReportInput, system: Units): string {
  const { estimate } = input;
  const units = tableUnits(estimate, system);
  const figures = estimate.routes.map((route) => routeFigures(route, units));
  const blocks = estimate.routes.flatMap((route, index) => {
    const geometry = input.routes[index];
    const printed = figures[index];
    if (geometry === undefined || printed === undefined) throw new Error(`route ${index} has no geometry`);
    return routeBlock(route, geometry, printed, input, units);
  });
  const comparison = comparisonTable(estimate.routes, figures, units);
  return [
    ...tableHead(input, units),
    ...blocks,
    ...(comparison.length > 0 ? ["", rule("="), ...comparison] : []),
    "",
    rule("="),
    ...legend(input),
    ...wrapped(estimate.advisory, TABLE_WIDTH),
    "",
  ].join("\n");
}
