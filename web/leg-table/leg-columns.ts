import type { LegEstimate, RouteEstimate } from "../core.ts";
import { clockSince, durationText } from "../format/time-text.ts";
import { inUnit, number, type ShownUnit, shownUnit, signedInUnit, storeUnit } from "../format/units.ts";
import type { UnitsPreset } from "../state/page-view.ts";

/** A column of the leg table: its heading, its unit, and what it shows of a leg. */
export interface LegColumn {
  readonly key: string;
  readonly heading: string;
  readonly unit: string;
  readonly numeric: boolean;
  text(leg: LegEstimate): string;
}

/** The columns for a route in the user's units. Wind and current columns appear where the plan has such a field. */
export function legColumns(route: RouteEstimate, preset: UnitsPreset, zone: string): LegColumn[] {
  const distance = shownUnit(preset, "distance");
  const speed = shownUnit(preset, "speed");
  const amount = storeUnit(route.storeUnit, route.usable);
  const zoneName = zone === "UTC" ? "UTC" : "local";
  return [
    plain("leg", "Leg", "", ({ leg }) => String(leg)),
    { ...plain("to", "To", "", ({ to }) => to), numeric: false },
    plain("course", "Course", "°T", ({ initialCourse_deg }) => courseText(initialCourse_deg)),
    plain("magnetic", "Course", "°M", ({ magneticCourse_deg }) => courseText(magneticCourse_deg)),
    plain("distance", "Distance", distance.symbol, ({ distance_m }) => inUnit(distance_m, distance)),
    ...fieldColumns(route, "current", speed),
    ...fieldColumns(route, "wind", speed),
    plain("through", "Through", speed.symbol, (leg) => inUnit(leg.throughSpeed_m_s?.mean ?? null, speed)),
    plain("ground", "Ground", speed.symbol, (leg) => inUnit(leg.groundSpeed_m_s?.mean ?? null, speed)),
    plain("heading", "Heading", "°T", (leg) => courseText(leg.heading_deg?.mean ?? null)),
    plain("time", "Time", "", ({ time_s }) => durationText(time_s)),
    ...stayColumn(route),
    plain("eta", "ETA", zoneName, ({ arrival }) =>
      arrival === null ? "–" : clockSince(arrival, route.departure, zone),
    ),
    plain("use", "Use", amount.symbol, ({ use }) => inUnit(use, amount)),
    plain("left", "Left", amount.symbol, ({ remaining }) => inUnit(remaining, amount)),
  ];
}

function stayColumn(route: RouteEstimate): LegColumn[] {
  if (route.totals.stay_s === 0) return [];
  return [plain("stay", "Stay", "", ({ stay_s }) => (stay_s === 0 ? "" : durationText(stay_s)))];
}

function fieldColumns(route: RouteEstimate, role: "wind" | "current", speed: ShownUnit): LegColumn[] {
  if (!route.legs.some((leg) => leg[role] !== null)) return [];
  const name = role === "wind" ? "Wind" : "Current";
  return [
    plain(`${role}-along`, `${name} along`, speed.symbol, (leg) =>
      signedInUnit(leg[role]?.meanAlongTrack_m_s ?? null, speed),
    ),
    plain(`${role}-cross`, `${name} cross`, speed.symbol, (leg) =>
      signedInUnit(leg[role]?.meanCrossTrack_m_s ?? null, speed),
    ),
  ];
}

/** A course in whole degrees with three figures; 359.6 is 000. */
export function courseText(course: number | null): string {
  return course === null ? "–" : number(Math.round(course) % 360, 0).padStart(3, "0");
}

function plain(key: string, heading: string, unit: string, text: (leg: LegEstimate) => string): LegColumn {
  return { key, heading, unit, numeric: true, text };
}
