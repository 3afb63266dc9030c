import { fromUnit, type StoreUnit, storeColumn } from "../core.ts";
import type { UnitsPreset } from "../state/page-view.ts";

/** How a kind of quantity is shown: the number of SI units in one of the shown ones, its symbol, and decimals. */
export interface ShownUnit {
  readonly symbol: string;
  readonly si: number;
  readonly decimals: number;
}

export type ShownKind = "distance" | "speed" | "height";

const SHOWN: Record<UnitsPreset, Record<ShownKind, ShownUnit>> = {
  sea: { distance: unitOf("NM", 1), speed: unitOf("kn", 1), height: unitOf("m", 0) },
  air: { distance: unitOf("NM", 1), speed: unitOf("kn", 1), height: unitOf("ft", 0) },
  metric: { distance: unitOf("km", 1), speed: unitOf("m/s", 1), height: unitOf("m", 0) },
};

/** A unit of the core's by its symbol, with so many decimals. */
export function unitOf(symbol: string, decimals: number): ShownUnit {
  return { symbol, si: fromUnit(1, symbol), decimals };
}

export function shownUnit(preset: UnitsPreset, kind: ShownKind): ShownUnit {
  return SHOWN[preset][kind];
}

/** The unit for amounts of a store up to the largest, as the command line's tables choose it. */
export function storeUnit(unit: StoreUnit, largest: number): ShownUnit {
  const { symbol, decimals } = storeColumn(unit, largest);
  return unitOf(symbol, decimals);
}

/** The unit for rates of a store up to the largest, in the store's unit per second. */
export function rateUnit(unit: StoreUnit, largest: number): ShownUnit {
  if (unit === "kg") return unitOf("kg/h", 1);
  if (unit === "L") return unitOf("L/h", 1);
  return largest < fromUnit(2, "kW") ? unitOf("W", 0) : unitOf("kW", 1);
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
