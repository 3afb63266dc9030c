import { effect, type Signal } from "@preact/signals";
import type { LegUnits, PageView } from "../state/page-view.ts";

const KEY = "legwork.view";

/** A choice of the user's about how things are shown, that is kept between visits. */
interface Kept<T> {
  readonly signal: (view: PageView) => Signal<T>;
  /** The value that was kept, as far as it is one. */
  readonly read: (value: unknown) => T | undefined;
}

const KEPT = {
  units: kept((view) => view.units, oneOf(["sea", "air", "metric"])),
  unitsChosen: kept((view) => view.unitsChosen, flag),
  zone: kept(
    (view) => view.zone,
    (value) => (isZone(value) ? value : undefined),
  ),
  theme: kept((view) => view.theme, oneOf(["auto", "light", "dark"])),
  axis: kept((view) => view.axis, oneOf(["distance", "time"])),
  shading: kept((view) => view.shading, oneOf(["none", "wind", "current"])),
  tiles: kept(
    (view) => view.tiles,
    (value) => (typeof value === "string" ? value : undefined),
  ),
  routePart: kept((view) => view.routePart, oneOf(["table", "profile"])),
  hiddenColumns: kept((view) => view.hiddenColumns, texts),
  legUnits: kept((view) => view.legUnits, legUnits),
  hintSeen: kept((view) => view.hintSeen, flag),
};

/** Brings back what the device holds of how things are shown. */
export function restoreView(view: PageView, storage: Pick<Storage, "getItem"> | null): void {
  const held = readObject(storage);
  for (const [name, choice] of Object.entries(KEPT)) choice.restore(view, Reflect.get(held, name));
}

/** Keeps it from now on. */
export function keepView(view: PageView, storage: Pick<Storage, "setItem"> | null): () => void {
  return effect(() => {
    const held = Object.fromEntries(Object.entries(KEPT).map(([name, { value }]) => [name, value(view)]));
    try {
      storage?.setItem(KEY, JSON.stringify(held));
    } catch {
      // A full or closed storage loses nothing of the plan; the next visit begins with the page's own choices.
    }
  });
}

/** The browser's storage; `null` where it is denied. */
export function viewStorage(): Storage | null {
  try {
    return window.localStorage;
  } catch {
    return null;
  }
}

function kept<T>(signal: Kept<T>["signal"], read: Kept<T>["read"]) {
  return {
    restore(view: PageView, value: unknown): void {
      const found = read(value);
      if (found !== undefined) signal(view).value = found;
    },
    value: (view: PageView): T => signal(view).value,
  };
}

function readObject(storage: Pick<Storage, "getItem"> | null): object {
  try {
    const value: unknown = JSON.parse(storage?.getItem(KEY) ?? "{}");
    return typeof value === "object" && value !== null ? value : {};
  } catch {
    return {};
  }
}

function oneOf<T extends string>(choices: readonly T[]): (value: unknown) => T | undefined {
  return (value) => choices.find((choice) => choice === value);
}

function flag(value: unknown): boolean | undefined {
  return typeof value === "boolean" ? value : undefined;
}

function texts(value: unknown): readonly string[] | undefined {
  return Array.isArray(value) ? value.filter((item): item is string => typeof item === "string") : undefined;
}

const LEG_UNITS = {
  distance: ["NM", "km", "m"],
  speed: ["kn", "m/s", "km/h"],
  amount: ["kWh", "Wh", "MJ", "t", "kg", "L", "m3"],
};

function legUnits(value: unknown): LegUnits | undefined {
  if (typeof value !== "object" || value === null) return undefined;
  const known = Object.entries(LEG_UNITS).flatMap(([kind, symbols]) => {
    const symbol = symbols.find((candidate) => candidate === Reflect.get(value, kind));
    return symbol === undefined ? [] : [[kind, symbol]];
  });
  return Object.fromEntries(known);
}

function isZone(value: unknown): value is string {
  if (typeof value !== "string") return false;
  try {
    return new Intl.DateTimeFormat("en-GB", { timeZone: value }) !== undefined;
  } catch {
    return false;
  }
}
