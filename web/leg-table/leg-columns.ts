import type { Clock, LegEstimate, RouteEstimate, StoreUnit } from "../core.ts";
import { clockSince, durationText } from "../format/time-text.ts";
import {
  inUnit,
  number,
  type ShownUnit,
  shownUnit,
  signedInUnit,
  storeUnit,
  unitOf,
} from "../format/units.ts";
import type { LegUnits, UnitsPreset } from "../state/page-view.ts";

/** A column of the leg table: its heading, its unit, and what it shows of a leg. */
export interface LegColumn {
  readonly key: string;
  readonly heading: string;
  readonly unit: string;
  readonly numeric: boolean;
  text(leg: LegEstimate): string;
}

/** What the leg table is shown in. */
export interface LegShown {
  readonly preset: UnitsPreset;
  readonly zone: string;
  readonly clock: Clock;
  /** The table's own units, before the preset's. */
  readonly own?: LegUnits;
}

export interface TableUnits {
  readonly distance: ShownUnit;
  readonly speed: ShownUnit;
  readonly amount: ShownUnit;
}

/** Units that the table may be shown in, for a kind of store. */
export const AMOUNTS: Readonly<Record<StoreUnit, readonly string[]>> = {
  J: ["kWh", "Wh", "MJ"],
  kg: ["t", "kg"],
  L: ["L", "m3"],
};

/** The units of the table: its own where it has them, else the preset's. */
export function tableUnits(route: RouteEstimate, { preset, own = {} }: LegShown): TableUnits {
  const { distance, speed, amount } = own;
  const isAmount = amount !== undefined && AMOUNTS[route.storeUnit].includes(amount);
  return {
    distance:
      distance === undefined ? shownUnit(preset, "distance") : unitOf(distance, distance === "m" ? 0 : 1),
    speed: speed === undefined ? shownUnit(preset, "speed") : unitOf(speed, 1),
    amount: isAmount ? unitOf(amount, decimalsOf(amount)) : storeUnit(route.storeUnit, route.usable),
  };
}

function decimalsOf(amount: string): number {
  return amount === "t" || amount === "m3" ? 2 : 1;
}

/** All columns that a route can have, in order. Wind and current columns appear where the plan has such a field. */
export function legColumns(route: RouteEstimate, shown: LegShown): LegColumn[] {
  const { distance, speed, amount } = tableUnits(route, shown);
  const { zone, clock } = shown;
  const zoneName = zone === "UTC" ? "UTC" : "local";
  return [
    plain("leg", "Leg", "", ({ leg }) => String(leg)),
    { ...plain("from", "From", "", ({ from }) => from), numeric: false },
    { ...plain("to", "To", "", ({ to }) => to), numeric: false },
    plain("course", "Course", "°T", ({ initialCourse_deg }) => courseText(initialCourse_deg)),
    plain("final", "Ends", "°T", ({ finalCourse_deg }) => courseText(finalCourse_deg)),
    plain("magnetic", "Course", "°M", ({ magneticCourse_deg }) => courseText(magneticCourse_deg)),
    plain("distance", "Distance", distance.symbol, ({ distance_m }) => inUnit(distance_m, distance)),
    plain("time", "Time", "", ({ time_s }) => durationText(time_s, clock)),
    ...stayColumn(route, clock),
    plain("eta", "ETA", zoneName, ({ arrival }) =>
      arrival === null ? "–" : clockSince(arrival, route.departure, zone, clock),
    ),
    ...fieldColumns(route, "current", speed),
    ...fieldColumns(route, "wind", speed),
    plain("through", "Through", speed.symbol, (leg) => inUnit(leg.throughSpeed_m_s?.mean ?? null, speed)),
    plain("ground", "Ground", speed.symbol, (leg) => inUnit(leg.groundSpeed_m_s?.mean ?? null, speed)),
    plain("heading", "Heading", "°T", (leg) => courseText(leg.heading_deg?.mean ?? null)),
    plain("crab", "Crab", "°", (leg) => crabText(leg.crab_deg?.mean ?? null)),
    plain("still", "Still time", "", ({ still }) => durationText(still.time_s, clock)),
    plain("use", "Use", amount.symbol, ({ use }) => inUnit(use, amount)),
    plain("left", "Left", amount.symbol, ({ remaining }) => inUnit(remaining, amount)),
  ];
}

/** Columns without which a row says nothing. */
export const FIXED_COLUMNS: readonly string[] = ["leg", "to"];

/** The last columns, which stay in view where the others scroll. */
export const DECIDING_COLUMNS: readonly string[] = ["use", "left"];

/** The columns that the user wants of those that there are. */
export function chosenColumns(
  columns: readonly LegColumn[],
  hidden: readonly string[],
): readonly LegColumn[] {
  return columns.filter(({ key }) => FIXED_COLUMNS.includes(key) || !hidden.includes(key));
}

function stayColumn(route: RouteEstimate, clock: Clock): LegColumn[] {
  if (route.totals.stay_s === 0) return [];
  return [plain("stay", "Stay", "", ({ stay_s }) => (stay_s === 0 ? "" : durationText(stay_s, clock)))];
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

/** Crab with its side: to starboard or to port of the course. */
function crabText(crab: number | null): string {
  if (crab === null) return "–";
  const whole = Math.round(Math.abs(crab));
  return whole === 0 ? "0" : `${whole} ${crab > 0 ? "stbd" : "port"}`;
}

function plain(key: string, heading: string, unit: string, text: (leg: LegEstimate) => string): LegColumn {
  return { key, heading, unit, numeric: true, text };
}
