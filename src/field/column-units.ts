import { SPELLINGS } from "../unit-table.ts";
import { type Dimension, fromUnit, symbolsOf } from "../units.ts";
import type { Quantity } from "./column-names.ts";

/** Symbol of a unit → its size in the unit used inside. */
type Units = Readonly<Record<string, number>>;

/** In m/s; `m s-1` is how CF writes it. */
const SPEED: Units = { ...sizesOf("speed"), "m s-1": 1 };
/** In m. */
const LENGTH: Units = sizesOf("length");
/** In hPa. */
const PRESSURE: Units = { hPa: 1, Pa: 0.01 };
/** In degrees; the long forms are CF's. */
const ANGLE: Units = { ...sizesOf("angle"), degree: 1, degrees: 1 };
const LATITUDE: Units = { ...ANGLE, degrees_north: 1, degree_north: 1 };
const LONGITUDE: Units = { ...ANGLE, degrees_east: 1, degree_east: 1 };

function sizesOf(dimension: Dimension): Units {
  return Object.fromEntries(symbolsOf(dimension).map((symbol) => [symbol, fromUnit(1, symbol)]));
}

const UNITS: Readonly<Partial<Record<Quantity, Units>>> = {
  latitude: LATITUDE,
  longitude: LONGITUDE,
  height: LENGTH,
  air_pressure: PRESSURE,
  eastward: SPEED,
  northward: SPEED,
  speed: SPEED,
  direction: ANGLE,
  gust: SPEED,
};

/** A header split into its name and its unit in brackets: `wind_speed [kn]` → `wind_speed`, `kn`. */
export function splitHeader(header: string): { readonly name: string; readonly unit: string | null } {
  const match = /^([^[\]]*)\[([^[\]]*)\]$/.exec(header.trim());
  if (match === null) return { name: header.trim(), unit: null };
  return { name: (match[1] as string).trim(), unit: (match[2] as string).trim() };
}

/**
 * Size of a header's unit, in m/s, m, hPa or degrees by the quantity; 1 where the header has no unit.
 * `undefined` where the quantity does not take the unit.
 */
export function unitSize(quantity: Quantity, unit: string | null): number | undefined {
  if (unit === null) return 1;
  const units = UNITS[quantity];
  return units !== undefined && Object.hasOwn(units, unit) ? units[unit] : undefined;
}

/** Units that a quantity takes, as `m/s, km/h, kn or ft/min`; empty where it takes none. */
export function unitsText(quantity: Quantity): string {
  const symbols = Object.keys(UNITS[quantity] ?? {}).filter((symbol) => !/[ _]|^degree/.test(symbol));
  const last = symbols.pop() ?? "";
  return symbols.length === 0 ? last : `${symbols.join(", ")} or ${last}`;
}

/** The unit that another spelling stands for where the quantity takes it, as `kn` for `knots`. */
export function likelyUnit(quantity: Quantity, unit: string): string | undefined {
  const accepted = Object.keys(UNITS[quantity] ?? {});
  const lower = unit.toLowerCase();
  const byCase = accepted.find((symbol) => symbol.toLowerCase() === lower);
  const spelt = Object.keys(SPELLINGS).find((spelling) => spelling.toLowerCase() === lower);
  return byCase ?? accepted.find((symbol) => spelt !== undefined && symbol === SPELLINGS[spelt]);
}
