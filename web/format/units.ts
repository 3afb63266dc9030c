import type { StoreUnit } from "../core.ts";
import type { UnitsPreset } from "../state/page-view.ts";

/** How a kind of quantity is shown: the number of SI units in one of the shown ones, its symbol, and decimals. */
export interface ShownUnit {
  readonly symbol: string;
  readonly si: number;
  readonly decimals: number;
}

export type ShownKind = "distance" | "speed" | "height";

const NAUTICAL_MILE: ShownUnit = { symbol: "NM", si: 1852, decimals: 1 };
const KNOT: ShownUnit = { symbol: "kn", si: 1852 / 3600, decimals: 1 };
const METRE: ShownUnit = { symbol: "m", si: 1, decimals: 0 };

const SHOWN: Record<UnitsPreset, Record<ShownKind, ShownUnit>> = {
  sea: { distance: NAUTICAL_MILE, speed: KNOT, height: METRE },
  air: { distance: NAUTICAL_MILE, speed: KNOT, height: { symbol: "ft", si: 0.3048, decimals: 0 } },
  metric: {
    distance: { symbol: "km", si: 1000, decimals: 1 },
    speed: { symbol: "m/s", si: 1, decimals: 1 },
    height: METRE,
  },
};

const STORE: Record<StoreUnit, ShownUnit> = {
  J: { symbol: "kWh", si: 3.6e6, decimals: 1 },
  kg: { symbol: "t", si: 1000, decimals: 2 },
  L: { symbol: "L", si: 1, decimals: 1 },
};

export function shownUnit(preset: UnitsPreset, kind: ShownKind): ShownUnit {
  return SHOWN[preset][kind];
}

/** The unit for amounts of a store, small enough that the largest of them shows three figures. */
export function storeUnit(unit: StoreUnit, largest: number): ShownUnit {
  if (unit === "J" && largest < 3.6e6) return { symbol: "Wh", si: 3600, decimals: largest < 360e3 ? 1 : 0 };
  if (unit === "kg" && largest < 5000) return { symbol: "kg", si: 1, decimals: largest < 100 ? 1 : 0 };
  return STORE[unit];
}

/** A number in a shown unit, without its symbol; a dash for what is not known. */
export function inUnit(value: number | null, unit: ShownUnit): string {
  return value === null ? "–" : number(value / unit.si, unit.decimals);
}

/** With its sign always, for differences. */
export function signedInUnit(value: number | null, unit: ShownUnit): string {
  return value === null ? "–" : signed(value / unit.si, unit.decimals);
}

/** A number with a true minus sign, and never a minus zero. */
export function number(value: number, decimals: number): string {
  const text = value.toFixed(decimals);
  if (Number(text) === 0) return text.replace("-", "");
  return text.replace("-", "−");
}

export function signed(value: number, decimals: number): string {
  const text = number(value, decimals);
  return text.startsWith("−") || Number(text) === 0 ? text : `+${text}`;
}
