import type { DecidedRoute } from "../choose/decided.ts";
import { isOfVariant } from "../choose/what-if-results.ts";
import { worstFinding } from "../choose/window-cell.ts";
import type { RouteStatus } from "../estimate/result.ts";
import { whatIfsArriveLines } from "./arrival-lines.ts";
import { type Column, laidOut, leastWidth, TABLE_WIDTH } from "./columns.ts";
import { placedText } from "./number-text.ts";
import { clipped, isolated, plainText } from "./plain-text.ts";
import { inLastPlace, leftInLastPlace } from "./rounding.ts";
import { STORE_WIDTH, type TableUnits } from "./table-units.ts";
import { clockSeconds, durationText, etaText } from "./time-text.ts";

interface Row {
  readonly name: string;
  readonly status: RouteStatus;
  readonly time_s: number | null;
  readonly arrival: string | null;
  readonly use: number | null;
  readonly remaining: number | null;
  /** Of the worst finding; empty where there is none. */
  readonly code: string;
}

/** The what-ifs of a route beside the route as planned; nothing where there are none. */
export function whatIfTable(route: DecidedRoute, units: TableUnits): string[] {
  const whatIfs = route.whatIf ?? [];
  if (whatIfs.length === 0) return [];
  const { time_s, use, remaining } = route.totals;
  const own = worstFinding(route.findings.filter((finding) => !isOfVariant(finding)));
  const planned: Row = {
    name: "(as planned)",
    status: own?.severity === "stop" ? "stop" : "clear",
    time_s,
    arrival: route.arrival,
    use,
    remaining,
    code: own?.code ?? "",
  };
  const rows: Row[] = [planned, ...whatIfs.map((each) => ({ ...each, code: each.worst?.code ?? "" }))];
  const columns = figureColumns(rows, units);
  const room = TABLE_WIDTH - leastWidth(columns);
  const names = rows.map(({ name }) => isolated(clipped(plainText(name), room)));
  const { head, rows: lines } = laidOut(
    [{ head: ["", "What if"], cells: names, align: "left" }, ...columns],
    0,
  );
  return ["What if (each an estimate of its own)", ...head, ...lines, ...whatIfsArriveLines(route)];
}

function figureColumns(rows: readonly Row[], units: TableUnits): Column[] {
  const { clock, store } = units;
  const seconds = clockSeconds(clock);
  const amount = (value: number | null, round: (value: number, decimals: number) => number) =>
    placedText(
      value === null ? null : round(value / store.size, store.decimals),
      store.decimals,
      STORE_WIDTH,
    );
  return [
    {
      head: ["Time", clock === "minute" ? "h:mm" : "h:mm:ss"],
      cells: rows.map(({ time_s }) =>
        durationText(time_s === null ? null : Math.round(time_s / seconds), clock, 7),
      ),
    },
    {
      head: ["ETA UTC", clock === "minute" ? "dd hh:mm" : "hh:mm:ss"],
      cells: rows.map(({ arrival }) => etaText(arrival, clock)),
    },
    { head: ["Use", store.symbol], cells: rows.map(({ use }) => amount(use, inLastPlace)) },
    { head: ["Left", store.symbol], cells: rows.map(({ remaining }) => amount(remaining, leftInLastPlace)) },
    {
      head: ["", "Worst finding"],
      cells: rows.map(({ status, code }) => (status === "stop" ? `STOP ${code}` : code)),
      align: "left",
    },
  ];
}
