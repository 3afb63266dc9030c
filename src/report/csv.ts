import type { DecidedRoute } from "../choose/decided.ts";
import type { FieldAlong, LegEstimate, RouteEstimate, Spread } from "../estimate/result.ts";
import type { Route, Waypoint } from "../estimate/route.ts";
import { reduceTurn } from "../geodesy/angle.ts";
import type { ReportInput } from "./input.ts";
import { TURN_BACK_COLUMNS } from "./turn-back-columns.ts";
import { uncertaintyColumns } from "./uncertainty-columns.ts";

interface Row {
  readonly route: DecidedRoute;
  readonly leg: LegEstimate;
  readonly from: Waypoint;
  readonly to: Waypoint;
  readonly advisory: string;
}

/** Text, a number, or nothing where there is no figure. */
type Cell = string | number | null;
type CsvColumn = readonly [header: string, cell: (row: Row) => Cell];

function spreadColumns(name: string, unit: string, of: (leg: LegEstimate) => Spread | null): CsvColumn[] {
  return (["mean", "min", "max"] as const).map((part) => [
    `${part} ${name} [${unit}]`,
    ({ leg }) => of(leg)?.[part] ?? null,
  ]);
}

function fieldColumns(name: string, of: (leg: LegEstimate) => FieldAlong | null): CsvColumn[] {
  return [
    [`${name} along-track integral [m2/s]`, ({ leg }) => of(leg)?.alongTrackIntegral_m2_s ?? null],
    [`${name} mean along track [m/s]`, ({ leg }) => of(leg)?.meanAlongTrack_m_s ?? null],
    [`${name} mean cross track [m/s]`, ({ leg }) => of(leg)?.meanCrossTrack_m_s ?? null],
    [`${name} max speed [m/s]`, ({ leg }) => of(leg)?.maxSpeed_m_s ?? null],
    [`${name} covered [1]`, ({ leg }) => of(leg)?.covered ?? null],
  ];
}

const PLACE: readonly CsvColumn[] = [
  ["route", ({ route }) => route.name],
  ["status", ({ route }) => route.status],
  ["leg", ({ leg }) => leg.leg],
  ["from", ({ leg }) => leg.from],
  ["from latitude [deg]", ({ from }) => from.lat],
  ["from longitude [deg]", ({ from }) => reduceTurn(from.lon)],
  ["to", ({ leg }) => leg.to],
  ["to latitude [deg]", ({ to }) => to.lat],
  ["to longitude [deg]", ({ to }) => reduceTurn(to.lon)],
  ["to height [m]", ({ to }) => to.height_m],
  ["path", ({ leg }) => leg.path],
  ["distance [m]", ({ leg }) => leg.distance_m],
  ["initial true course [deg]", ({ leg }) => leg.initialCourse_deg],
  ["final true course [deg]", ({ leg }) => leg.finalCourse_deg],
  ["initial magnetic course [deg]", ({ leg }) => leg.magneticCourse_deg],
];

const MOTION: readonly CsvColumn[] = [
  ["departure [UTC]", ({ leg }) => leg.departure],
  ["arrival [UTC]", ({ leg }) => leg.arrival],
  ["time under way [s]", ({ leg }) => leg.time_s],
  ["stay [s]", ({ leg }) => leg.stay_s],
  ["distance through the medium [m]", ({ leg }) => leg.throughDistance_m],
  ...spreadColumns("speed through the medium", "m/s", (leg) => leg.throughSpeed_m_s),
  ...spreadColumns("ground speed", "m/s", (leg) => leg.groundSpeed_m_s),
  ...spreadColumns("true heading", "deg", (leg) => leg.heading_deg),
  ...spreadColumns("crab", "deg", (leg) => leg.crab_deg),
  ...fieldColumns("wind", (leg) => leg.wind),
  ...fieldColumns("current", (leg) => leg.current),
];

function accountColumns(unit: string): CsvColumn[] {
  return [
    [`use [${unit}]`, ({ leg }) => leg.use],
    [`left [${unit}]`, ({ leg }) => leg.remaining],
    ["still time [s]", ({ leg }) => leg.still.time_s],
    [`still use [${unit}]`, ({ leg }) => leg.still.use],
    ["penalty time [s]", ({ leg }) => leg.penalty?.time_s ?? null],
    ["along time [s]", ({ leg }) => leg.penalty?.alongTime_s ?? null],
    ["cross time [s]", ({ leg }) => leg.penalty?.crossTime_s ?? null],
    ["first-order time [s]", ({ leg }) => leg.penalty?.firstOrderTime_s ?? null],
    [`penalty use [${unit}]`, ({ leg }) => leg.penalty?.use ?? null],
    ["error bound of time [s]", ({ leg }) => leg.error?.time_s ?? null],
    [`error bound of use [${unit}]`, ({ leg }) => leg.error?.use ?? null],
    ["findings", ({ route, leg }) => findingCodes(route, leg)],
    ["advisory", ({ advisory }) => advisory],
  ];
}

const TURN_BACK: readonly CsvColumn[] = TURN_BACK_COLUMNS.map(([header, cell]) => [
  header,
  ({ route, leg }) => cell(route, leg.leg),
]);

/** Codes of the findings on a leg; those of the whole route stand on its first leg. */
function findingCodes(route: RouteEstimate, leg: LegEstimate): string {
  const here = route.findings.filter((finding) => (finding.leg ?? 1) === leg.leg);
  return [...new Set(here.map((finding) => finding.code))].join(" ");
}

/** Characters with which a spreadsheet begins a formula, their fullwidth forms, and the ones it skips on the way there. */
const FORMULA = /^[\s\p{Cc}]*[=+\-@\uFF0B\uFF0D\uFF1D\uFF20]|^[\t\r]/u;
const NEEDS_QUOTES = /[",;\t\r\n]|^\s|\s$/;

/** One cell by RFC 4180; text that a spreadsheet would read as a formula gets an apostrophe before it, a number never. */
export function csvCell(cell: Cell): string {
  if (cell === null) return "";
  if (typeof cell === "number") {
    if (!Number.isFinite(cell)) throw new Error(`a figure of the estimate is ${cell}`);
    return String(cell);
  }
  const safe = FORMULA.test(cell) ? `'${cell}` : cell;
  return NEEDS_QUOTES.test(safe) ? `"${safe.replaceAll('"', '""')}"` : safe;
}

function rowsOf(route: DecidedRoute, geometry: Route | undefined, advisory: string): Row[] {
  return route.legs.map((leg, index) => {
    const from = geometry?.waypoints[index];
    const to = geometry?.waypoints[index + 1];
    if (from === undefined || to === undefined) throw new Error(`leg ${leg.leg} of a route has no geometry`);
    return { route, leg, from, to, advisory };
  });
}

/**
 * The legs of every route as CSV (RFC 4180, CRLF, UTF-8 without BOM): one row a leg, SI units in the headers, full precision
 * (the shortest digits that read back to the same number), an empty cell where there is no figure. Where turning back was
 * asked for, columns at the end say where on the leg its points are.
 *
 * @example
 * writeCsv({ estimate: { format: "legwork-estimate/1", advisory: "", plan: { title: "Two marks" }, fields: [], routes: [] }, routes: [], craft: { name: "Tender", moves: "water" }, pace: { hold: "least-energy" } }).slice(0, 23) // → "route,status,leg,from,f"
 */
export function writeCsv({ estimate, routes }: ReportInput): string {
  const unit = estimate.routes[0]?.storeUnit ?? "J";
  const turns = estimate.routes.some(({ turnBack }) => turnBack !== undefined) ? TURN_BACK : [];
  const uncertain = uncertaintyColumns(estimate.routes, unit).map(
    ([header, cell]): CsvColumn => [header, ({ route, leg }) => cell(route, leg.leg)],
  );
  const columns = [...PLACE, ...MOTION, ...accountColumns(unit), ...turns, ...uncertain];
  const rows = estimate.routes.flatMap((route, index) => rowsOf(route, routes[index], estimate.advisory));
  const lines = [
    columns.map(([header]) => csvCell(header)),
    ...rows.map((row) => columns.map(([, cell]) => csvCell(cell(row)))),
  ];
  return lines.map((cells) => `${cells.join(",")}\r\n`).join("");
}
