import type { RouteEstimate } from "../estimate/result.ts";
import { type Column, laidOut, leastWidth, TABLE_WIDTH } from "./columns.ts";
import { placedText } from "./number-text.ts";
import { clipped, isolated, plainText } from "./plain-text.ts";
import type { RouteFigures } from "./route-figures.ts";
import { LENGTH_WIDTH, STORE_WIDTH, type TableUnits } from "./table-units.ts";
import { durationText, etaText } from "./time-text.ts";

const MARK = "*";

/** Which routes have the best figure, among those that do not stop; as printed, so equal print is equal rank. */
function best(
  figures: readonly (number | null)[],
  routes: readonly RouteEstimate[],
  sense: 1 | -1,
): boolean[] {
  const ranked = figures.map((figure, index) =>
    figure === null || routes[index]?.status === "stop" ? null : figure * sense,
  );
  const known = ranked.filter((figure) => figure !== null);
  const least = Math.min(...known);
  return ranked.map((figure) => known.length > 0 && figure === least);
}

function marked(texts: readonly string[], marks: readonly boolean[]): string[] {
  return texts.map((text, index) => text + (marks[index] ? MARK : " "));
}

function nameCells(routes: readonly RouteEstimate[], room: number): string[] {
  return routes.map((route) => isolated(clipped(plainText(route.name), room)));
}

/** All routes side by side, the best of each column marked; nothing for one route. */
export function comparisonTable(
  routes: readonly RouteEstimate[],
  figures: readonly RouteFigures[],
  units: TableUnits,
): string[] {
  if (routes.length < 2) return [];
  const { length, store, clock } = units;
  const distance = figures.map((each) => each.distance.total);
  const time = figures.map((each) => each.time.total);
  const use = figures.map((each) => each.use.total);
  const left = figures.map((each) => each.left.at(-1) ?? null);
  const arrivals = routes.map(({ arrival }) => (arrival === null ? null : Date.parse(arrival)));
  const amounts = (counts: readonly (number | null)[]) =>
    counts.map((count) => placedText(count, store.decimals, STORE_WIDTH));
  const columns: Column[] = [
    { head: ["", "Status"], cells: routes.map((route) => route.status), align: "left" },
    {
      head: ["Dist ", `${length.symbol} `],
      cells: marked(
        distance.map((count) => placedText(count, length.decimals, LENGTH_WIDTH)),
        best(distance, routes, 1),
      ),
    },
    {
      head: ["Time ", clock === "minute" ? "h:mm " : "h:mm:ss "],
      cells: marked(
        time.map((count) => durationText(count, clock, 7)),
        best(time, routes, 1),
      ),
    },
    {
      head: ["ETA UTC ", clock === "minute" ? "dd hh:mm " : "hh:mm:ss "],
      cells: marked(
        routes.map((route) => etaText(route.arrival, clock)),
        best(arrivals, routes, 1),
      ),
    },
    { head: ["Use ", `${store.symbol} `], cells: marked(amounts(use), best(use, routes, 1)) },
    { head: ["Left ", `${store.symbol} `], cells: marked(amounts(left), best(left, routes, -1)) },
  ];
  const names = nameCells(routes, TABLE_WIDTH - leastWidth(columns));
  const { head, rows } = laidOut([{ head: ["", "Route"], cells: names, align: "left" }, ...columns], 0);
  return ["Routes compared (* the best of those that do not stop)", ...head, ...rows];
}
