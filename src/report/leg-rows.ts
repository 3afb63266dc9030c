import type { Medium } from "../craft/craft.ts";
import type { FieldAlong, LegEstimate, RouteEstimate } from "../estimate/result.ts";
import type { Route, Waypoint } from "../estimate/route.ts";
import { type Column, laidOut, rule, TABLE_WIDTH } from "./columns.ts";
import { courseText, NO_FIGURE, placedText } from "./number-text.ts";
import { clipped, displayWidth, isolated, leftAligned, plainText, rightAligned } from "./plain-text.ts";
import { positionText } from "./position-text.ts";
import { inLastPlace } from "./rounding.ts";
import type { RouteFigures } from "./route-figures.ts";
import { LENGTH_WIDTH, STORE_WIDTH, type TableUnits } from "./table-units.ts";
import { durationText, etaText } from "./time-text.ts";

/** Space before the figures of a leg, under its name. */
const INDENT = 3;
const SPEED_WIDTH = 5;
const TIME_WIDTH = 7;

/** The field that the craft moves through: the current of a craft in water, the wind of one in the air. */
function mediumAlong(part: Pick<LegEstimate, "wind" | "current">, moves: Medium): FieldAlong | null {
  return moves === "water" ? part.current : part.wind;
}

/** Speed through the medium and over the ground, by their usual letters. */
export function speedHeads(moves: Medium): readonly [string, string] {
  return moves === "water" ? ["STW", "SOG"] : ["TAS", "GS"];
}

/** A speed in m/s for a column of speeds. */
export function speedText(value: number | null | undefined, units: TableUnits, signed = false): string {
  if (value === null || value === undefined) return NO_FIGURE;
  const { size, decimals } = units.speed;
  const width = SPEED_WIDTH + (signed ? 1 : 0);
  const count = inLastPlace(value / size, decimals);
  const text = placedText(count, decimals, width, signed);
  return text.includes("e") ? placedText(inLastPlace(value / size, 0), 0, width, signed) : text;
}

function legColumns(route: RouteEstimate, figures: RouteFigures, moves: Medium, units: TableUnits): Column[] {
  const { legs, totals } = route;
  const { length, speed, store } = units;
  const [through, ground] = speedHeads(moves);
  const timeHead = units.clock === "minute" ? "h:mm" : "h:mm:ss";
  const speeds = (of: (leg: LegEstimate) => number | undefined, total: string, signed = false) => [
    ...legs.map((leg) => speedText(of(leg), units, signed)),
    total,
  ];
  const medium = (leg: LegEstimate) => mediumAlong(leg, moves);
  const whole = mediumAlong(totals, moves);
  const counted = (column: RouteFigures["use"], decimals: number, width: number) =>
    [...column.rows, column.total].map((count) => placedText(count, decimals, width));
  const mean = (distance: number | null) =>
    distance === null || totals.time_s === null || totals.time_s === 0
      ? NO_FIGURE
      : speedText(distance / totals.time_s, units);
  return [
    { head: ["Crs", "T"], cells: [...legs.map((leg) => courseText(leg.initialCourse_deg)), ""] },
    { head: ["Crs", "M"], cells: [...legs.map((leg) => courseText(leg.magneticCourse_deg)), ""] },
    { head: ["Dist", length.symbol], cells: counted(figures.distance, length.decimals, LENGTH_WIDTH) },
    {
      head: ["Along", speed.symbol],
      cells: speeds(
        (leg) => medium(leg)?.meanAlongTrack_m_s,
        speedText(whole?.meanAlongTrack_m_s, units, true),
        true,
      ),
    },
    {
      head: ["Cross", speed.symbol],
      cells: speeds(
        (leg) => medium(leg)?.meanCrossTrack_m_s,
        speedText(whole?.meanCrossTrack_m_s, units, true),
        true,
      ),
    },
    {
      head: [through, speed.symbol],
      cells: speeds((leg) => leg.throughSpeed_m_s?.mean, mean(totals.throughDistance_m)),
    },
    {
      head: [ground, speed.symbol],
      cells: speeds((leg) => leg.groundSpeed_m_s?.mean, mean(totals.distance_m)),
    },
    { head: ["Hdg", "T"], cells: [...legs.map((leg) => courseText(leg.heading_deg?.mean ?? null)), ""] },
    {
      head: ["Time", timeHead],
      cells: [...figures.time.rows, figures.time.total].map((count) =>
        durationText(count, units.clock, TIME_WIDTH),
      ),
    },
    {
      head: ["ETA UTC", units.clock === "minute" ? "dd hh:mm" : "hh:mm:ss"],
      cells: [...legs.map((leg) => leg.arrival), route.arrival].map((eta) => etaText(eta, units.clock)),
    },
    { head: ["Use", store.symbol], cells: counted(figures.use, store.decimals, STORE_WIDTH) },
    {
      head: ["Left", store.symbol],
      cells: [...figures.left, figures.left.at(-1) ?? null].map((count) =>
        placedText(count, store.decimals, STORE_WIDTH),
      ),
    },
  ];
}

/** Least room for a name, below which the notes go on a line of their own. */
const NAME_ROOM = 12;

function waypointLines(
  start: string,
  waypoint: Waypoint,
  notes: readonly string[],
  units: TableUnits,
): string[] {
  const position = positionText(waypoint.lat, waypoint.lon, units.system, units.finePositions);
  const right = [...notes, position].join("  ");
  const room = TABLE_WIDTH - start.length - displayWidth(right) - 2;
  if (room < NAME_ROOM && notes.length > 0) {
    return [...waypointLines(start, waypoint, [], units), rightAligned(notes.join("  "), TABLE_WIDTH)];
  }
  return [`${start}${leftAligned(isolated(clipped(plainText(waypoint.name), room)), room)}  ${right}`];
}

function heightNote(waypoint: Waypoint, units: TableUnits): string[] {
  if (waypoint.height_m === null) return [];
  const { size, symbol } = units.height;
  return [`${placedText(inLastPlace(waypoint.height_m / size, 0), 0, 7)} ${symbol}`];
}

function legNotes(leg: LegEstimate, waypoint: Waypoint, units: TableUnits): string[] {
  const ends = courseText(leg.finalCourse_deg);
  const turns = ends !== courseText(leg.initialCourse_deg) ? [`ends ${ends}`] : [];
  const rhumb = leg.path === "rhumb" ? ["rhumb"] : [];
  const stay = leg.stay_s > 0 ? [`stay ${stayText(leg.stay_s)}`] : [];
  return [...rhumb, ...turns, ...stay, ...heightNote(waypoint, units)];
}

/** A stay in h:mm, with seconds where it has them. */
export function stayText(stay: number): string {
  const seconds = Math.round(stay);
  return seconds % 60 === 0 ? durationText(seconds / 60, "minute") : durationText(seconds, "second");
}

/** The leg table of one route: the departure, then two lines a leg (where to, then its figures), then the totals. */
export function legTable(
  route: RouteEstimate,
  geometry: Route,
  figures: RouteFigures,
  moves: Medium,
  units: TableUnits,
): string[] {
  const { head, rows } = laidOut(legColumns(route, figures, moves, units), INDENT);
  const digits = String(route.legs.length).length;
  const start = geometry.waypoints[0];
  const lines = [...head, rule()];
  if (start !== undefined) {
    const stay = start.stay_s > 0 ? [`stay ${stayText(start.stay_s)}`] : [];
    lines.push(
      ...waypointLines(`${" ".repeat(digits)} from `, start, [...stay, ...heightNote(start, units)], units),
    );
  }
  for (const [index, leg] of route.legs.entries()) {
    const waypoint = geometry.waypoints[index + 1];
    const number = String(leg.leg).padStart(digits);
    if (waypoint !== undefined) {
      lines.push(...waypointLines(`${number} to `, waypoint, legNotes(leg, waypoint, units), units));
    }
    lines.push(rows[index] ?? "");
  }
  const total = rows.at(-1) ?? "";
  // The two course columns of the totals row are empty: the word stands there.
  return [...lines, rule(), `All${total.slice(3)}`];
}
