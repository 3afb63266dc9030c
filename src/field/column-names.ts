import type { FieldRole } from "./field.ts";

/** A quantity that a column of a field file may hold. */
export type Quantity =
  | "time"
  | "latitude"
  | "longitude"
  | "height"
  | "air_pressure"
  | "member"
  | "eastward"
  | "northward"
  | "speed"
  | "direction"
  | "gust";

const AXIS_NAMES: readonly (readonly [Quantity, readonly string[]])[] = [
  ["time", ["time"]],
  ["latitude", ["latitude", "lat"]],
  ["longitude", ["longitude", "lon"]],
  ["height", ["height"]],
  ["air_pressure", ["air_pressure"]],
  ["member", ["member"]],
];

const WIND_NAMES: readonly (readonly [Quantity, readonly string[]])[] = [
  ["eastward", ["eastward_wind", "u"]],
  ["northward", ["northward_wind", "v"]],
  ["speed", ["wind_speed", "speed"]],
  ["direction", ["wind_from_direction", "direction_from"]],
  ["gust", ["wind_speed_of_gust", "gust"]],
];

const CURRENT_NAMES: readonly (readonly [Quantity, readonly string[]])[] = [
  ["eastward", ["eastward_sea_water_velocity", "u"]],
  ["northward", ["northward_sea_water_velocity", "v"]],
  ["speed", ["sea_water_speed", "speed"]],
  ["direction", ["sea_water_velocity_to_direction", "direction_to"]],
];

/**
 * The headers of each quantity of a role: CF standard names (CF Standard Name Table) first, then the short name.
 * A current has no gusts.
 */
export function columnNames(role: FieldRole): ReadonlyMap<Quantity, readonly string[]> {
  return new Map([...AXIS_NAMES, ...(role === "wind" ? WIND_NAMES : CURRENT_NAMES)]);
}

/** The quantity that a name stands for in a role, whatever its letters' case; `undefined` for any other name. */
export function quantityOf(name: string, role: FieldRole): Quantity | undefined {
  const wanted = name.trim().toLowerCase();
  for (const [quantity, names] of columnNames(role)) {
    if (names.includes(wanted)) return quantity;
  }
  return undefined;
}

/** Whether a name belongs to a role and to no other, as `eastward_wind` does to the wind. */
export function isNameOfOnly(name: string, role: FieldRole): boolean {
  const other = role === "wind" ? "current" : "wind";
  return quantityOf(name, role) !== undefined && quantityOf(name, other) === undefined;
}

/** How a quantity is called in a message: its names in a role, as `eastward_wind or u`. */
export function namesText(quantity: Quantity, role: FieldRole): string {
  return (columnNames(role).get(quantity) ?? [quantity]).join(" or ");
}
