import type { CraftDocument } from "../state/plan-document.ts";
import type { CraftPath, ModelName } from "./craft-fields.ts";

type Value = unknown;

/** The value at a path; `undefined` where there is none. */
function valueAt(craft: CraftDocument, path: CraftPath): Value {
  return path.reduce<Value>(
    (value, key) => (typeof value === "object" && value !== null ? Reflect.get(value, key) : undefined),
    craft,
  );
}

/** The text at a path as a form shows it; empty where there is none. */
export function textAt(craft: CraftDocument, path: CraftPath): string {
  const value = valueAt(craft, path);
  return typeof value === "string" || typeof value === "number" ? String(value) : "";
}

/** A craft with another value at a path; `undefined` takes the key away, and with it a group that it leaves empty. */
export function setAt(craft: CraftDocument, path: CraftPath, value: Value): CraftDocument {
  return (changed(craft, path, value) ?? {}) as CraftDocument;
}

function changed(whole: Value, [key, ...rest]: CraftPath, value: Value): Value {
  if (key === undefined) return value;
  const old = typeof whole === "object" && whole !== null ? whole : {};
  const part = changed(Reflect.get(old, key), rest, value);
  if (Array.isArray(old)) return old.map((item, at) => (at === key ? part : item));
  const { [key]: _old, ...others } = old as Record<string | number, Value>;
  if (part === undefined) return Object.keys(others).length === 0 ? undefined : others;
  // A key that was there keeps its place.
  return key in old ? { ...old, [key]: part } : { ...others, [key]: part };
}

/** A row of a power table as its file holds it. */
export interface RowDocument {
  readonly speed: string;
  readonly rate: string;
}

/** The rows of a power table, as far as they are rows. */
export function tableRows(craft: CraftDocument): readonly RowDocument[] {
  const rows = valueAt(craft, ["power", "rows"]);
  if (!Array.isArray(rows)) return [];
  return rows.map((_, at) => ({
    speed: textAt(craft, ["power", "rows", at, "speed"]),
    rate: textAt(craft, ["power", "rows", at, "rate"]),
  }));
}

export function setRows(craft: CraftDocument, rows: readonly RowDocument[]): CraftDocument {
  return setAt(craft, ["power", "rows"], rows);
}

/** What a model begins with, to be changed: figures of invented craft. */
const FIRST: Readonly<Record<ModelName, CraftDocument>> = {
  table: {
    model: "table",
    rows: [
      { speed: "0 kn", rate: "0.5 kW" },
      { speed: "5 kn", rate: "6 kW" },
      { speed: "10 kn", rate: "70 kW" },
    ],
  },
  cube: { model: "cube", reference: { speed: "10 kn", power: "60 kW" } },
  rotor: {
    model: "rotor",
    bladeProfilePower: "171 W",
    inducedPower: "536 W",
    tipSpeed: "110 m/s",
    hoverInducedSpeed: "5.84 m/s",
    fuselageDragRatio: 0.6,
    solidity: 0.07,
    discArea: "0.997 m2",
    efficiency: "80 %",
    mass: "8.5 kg",
  },
  wing: {
    model: "wing",
    mass: "6 kg",
    wingArea: "0.8 m2",
    zeroLiftDrag: 0.035,
    inducedFactor: 0.05,
    efficiency: "55 %",
  },
  constant: { model: "constant", rate: "20 kW" },
};

/** Takes another model with figures to begin with. A rotor and a wing move through air, where windage has no place. */
export function setModel(craft: CraftDocument, model: ModelName): CraftDocument {
  const next = setAt(craft, ["power"], FIRST[model]);
  return model === "rotor" || model === "wing" ? setMedium(next, "air") : next;
}

export function setMedium(craft: CraftDocument, moves: "water" | "air"): CraftDocument {
  const next = setAt(craft, ["moves"], moves);
  return moves === "air" ? setAt(next, ["windage"], undefined) : next;
}

/** A number's text and its unit, as far as a text has them. */
export function splitQuantity(text: string): { readonly number: string; readonly unit: string } {
  const number = /^\s*[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?/.exec(text)?.[0] ?? "";
  return { number: number.trim(), unit: text.slice(number.length).trim() };
}

/** What a typed text comes to: a bare number takes the unit shown beside it, anything else stands as it is typed. */
export function withUnit(typed: string, unit: string): string {
  const split = splitQuantity(typed);
  return split.number !== "" && split.unit === "" && unit !== "" ? `${split.number} ${unit}` : typed.trim();
}
