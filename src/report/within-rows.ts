import type { Medium } from "../craft/craft.ts";
import type { FieldAlong, LegEstimate, RouteEstimate, Spread } from "../estimate/result.ts";
import { type Column, laidOut } from "./columns.ts";
import { speedHeads, speedText } from "./leg-rows.ts";
import { courseText, NO_FIGURE, placedText } from "./number-text.ts";
import { inLastPlace } from "./rounding.ts";
import type { TableUnits } from "./table-units.ts";

function headingRange(spread: Spread | null): string {
  return spread === null ? NO_FIGURE : `${courseText(spread.min)}-${courseText(spread.max)}`;
}

function crabText(spread: Spread | null): string {
  return placedText(spread === null ? null : inLastPlace(spread.mean, 0), 0, 4, true);
}

function fieldColumns(
  name: string,
  along: (leg: LegEstimate) => FieldAlong | null,
  route: RouteEstimate,
  units: TableUnits,
): Column[] {
  const { legs } = route;
  if (legs.every((leg) => along(leg) === null)) return [];
  const unit = units.speed.symbol;
  const column = (head: string, of: (field: FieldAlong) => number, signed: boolean): Column => ({
    head: [name, head, unit],
    cells: legs.map((leg) => {
      const field = along(leg);
      return speedText(field === null ? null : of(field), units, signed);
    }),
  });
  return [
    column("along", (field) => field.meanAlongTrack_m_s, true),
    column("cross", (field) => field.meanCrossTrack_m_s, true),
    column("max", (field) => field.maxSpeed_m_s, false),
  ];
}

/** What the means of the leg table hide: range of heading, crab, slowest and fastest over the ground, and both fields. */
export function withinTable(route: RouteEstimate, moves: Medium, units: TableUnits): string[] {
  const { legs } = route;
  const unit = units.speed.symbol;
  const ground = speedHeads(moves)[1];
  const speeds = (word: string, of: (leg: LegEstimate) => number | undefined): Column => ({
    head: [ground, word, unit],
    cells: legs.map((leg) => speedText(of(leg), units)),
  });
  const { head, rows } = laidOut(
    [
      { head: ["", "", "Leg"], cells: legs.map((leg) => String(leg.leg)) },
      { head: ["Heading", "range", "T"], cells: legs.map((leg) => headingRange(leg.heading_deg)) },
      { head: ["Crab", "mean", "deg"], cells: legs.map((leg) => crabText(leg.crab_deg)) },
      speeds("min", (leg) => leg.groundSpeed_m_s?.min),
      speeds("max", (leg) => leg.groundSpeed_m_s?.max),
      ...fieldColumns("Current", (leg) => leg.current, route, units),
      ...fieldColumns("Wind", (leg) => leg.wind, route, units),
    ],
    0,
  );
  return ["Within the legs", ...head, ...rows];
}
