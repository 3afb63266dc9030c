import type { StoreUnit } from "../craft/craft.ts";
import type { Estimate, RouteEstimate } from "../estimate/result.ts";
import type { Units } from "./input.ts";
import { decimalsThatFit } from "./number-text.ts";
import { type Clock, clockFor } from "./time-text.ts";

/** A unit of a column: printed figure = SI figure / size, with so many decimals. */
export interface ColumnUnit {
  readonly symbol: string;
  readonly size: number;
  readonly decimals: number;
}

/** An SI figure in a unit, with it: `8.0 kn` */
export function figureText(figure: number, { symbol, size, decimals }: ColumnUnit): string {
  return `${(figure / size).toFixed(decimals)} ${symbol}`;
}

/** The units of a whole report, chosen once so that every row of a column shares one. */
export interface TableUnits {
  readonly system: Units;
  readonly length: ColumnUnit;
  readonly speed: ColumnUnit;
  readonly height: ColumnUnit;
  readonly store: ColumnUnit;
  readonly clock: Clock;
  /** Clock of the ledger, whose parts are small. */
  readonly ledgerClock: Clock;
  /** Whether positions need another decimal because legs are short. */
  readonly finePositions: boolean;
}

/** Widest figures that the columns take. */
export const LENGTH_WIDTH = 6;
export const STORE_WIDTH = 7;

const LENGTH = { sea: ["NM", 1852], air: ["NM", 1852], metric: ["km", 1000] } as const;
const SPEED = { sea: ["kn", 1852 / 3600], air: ["kn", 1852 / 3600], metric: ["m/s", 1] } as const;
const HEIGHT = { sea: ["m", 1], air: ["ft", 0.3048], metric: ["m", 1] } as const;

/** From which amount on (in the store's own unit) the larger unit is used. */
const STORE: Record<
  StoreUnit,
  readonly { readonly symbol: string; readonly size: number; readonly from: number }[]
> = {
  J: [
    { symbol: "kWh", size: 3.6e6, from: 3.6e7 },
    { symbol: "Wh", size: 3600, from: 0 },
  ],
  kg: [
    { symbol: "t", size: 1000, from: 1e4 },
    { symbol: "kg", size: 1, from: 0 },
  ],
  L: [
    { symbol: "m3", size: 1000, from: 1e5 },
    { symbol: "L", size: 1, from: 0 },
  ],
};

/** Shortest leg, m, below which positions carry another decimal. */
const FINE_LEG = 5000;
/** Longest time, s, up to which the ledger prints seconds. */
const LEDGER_SECONDS_UP_TO = 99 * 3600;

function storeUnit(routes: readonly RouteEstimate[]): ColumnUnit {
  const amounts = routes.flatMap((route) => [route.usable, ...route.legs.map((leg) => leg.remaining ?? 0)]);
  const spent = routes.flatMap((route) => [route.totals.use ?? 0, route.totals.still.use]);
  return storeColumn(routes[0]?.storeUnit ?? "J", Math.max(0, ...amounts.map(Math.abs), ...spent));
}

/** Unit of a column of amounts of a store, the largest given in the store's own unit. */
export function storeColumn(unit: StoreUnit, largest: number): ColumnUnit {
  const choices = STORE[unit];
  const choice = choices.find((each) => largest >= each.from) ?? { symbol: "", size: 1 };
  const wanted = largest / choice.size < 10 ? 2 : 1;
  return { ...choice, decimals: decimalsThatFit(largest / choice.size, wanted, STORE_WIDTH) };
}

function lengthUnit(system: Units, longest: number): ColumnUnit {
  const [symbol, size] = LENGTH[system];
  const value = longest / size;
  const wanted = value < 10 ? 3 : value < 100 ? 2 : 1;
  return { symbol, size, decimals: decimalsThatFit(value, wanted, LENGTH_WIDTH + 1) };
}

/** Unit of speeds. */
export function speedColumn(system: Units): ColumnUnit {
  const [symbol, size] = SPEED[system];
  return { symbol, size, decimals: 1 };
}

/** Of the routes, s, stays included; in a still medium too, and of a route that stops on the way only there. */
function longestPassage(routes: readonly RouteEstimate[]): number {
  const passages = routes.map(({ totals: { time_s, still, stay_s } }) =>
    Math.max((time_s ?? still.time_s) + stay_s, still.time_s),
  );
  return Math.max(0, ...passages);
}

/** The clock in which the times of these routes are told. */
export function routesClock(routes: readonly RouteEstimate[]): Clock {
  return clockFor(longestPassage(routes));
}

/** Units for an estimate's tables. */
export function tableUnits(estimate: Estimate, system: Units): TableUnits {
  const { routes } = estimate;
  const [height, heightSize] = HEIGHT[system];
  const legs = routes.flatMap((route) => route.legs);
  const longest = Math.max(0, ...routes.map((route) => route.totals.distance_m));
  const lasts = longestPassage(routes);
  return {
    system,
    length: lengthUnit(system, longest),
    speed: speedColumn(system),
    height: { symbol: height, size: heightSize, decimals: 0 },
    store: storeUnit(routes),
    clock: clockFor(lasts),
    ledgerClock: lasts < LEDGER_SECONDS_UP_TO ? "second" : "minute",
    finePositions: legs.some((leg) => leg.distance_m < FINE_LEG),
  };
}
