import type { DecidedRoute } from "../choose/decided.ts";
import type { ErrorSpread } from "../choose/error-spread.ts";
import type { WeakPlace } from "../choose/sensitivity-profile.ts";
import type { RouteEstimate } from "../estimate/result.ts";
import { chanceToArriveText } from "./arrival-lines.ts";
import { laidOut, TABLE_WIDTH } from "./columns.ts";
import { placedText } from "./number-text.ts";
import { askedText, percentText } from "./percent-text.ts";
import { clipped, isolated, plainText, wrapped } from "./plain-text.ts";
import { inLastPlace } from "./rounding.ts";
import { amountText } from "./table-head.ts";
import { STORE_WIDTH, type TableUnits } from "./table-units.ts";
import { durationText } from "./time-text.ts";

const NAME_WIDTH = 24;

/** The spread of a route under the stated forecast error; nothing where the plan states none. */
export function spreadTable(route: DecidedRoute, units: TableUnits): string[] {
  const { spread } = route;
  if (spread === undefined) return [];
  if (spread === null)
    return wrapped(
      "Spread under the forecast error: none, since the route ends short, no error acts on it, or it runs along the edge of its field.",
      TABLE_WIDTH,
    );
  return [
    "Spread under the forecast error (one standard deviation, to first order)",
    ...legRows(route, spread, units),
    ...wrapped(
      `${chanceText(route, spread, units)}${chanceToArriveText(route, spread)} ${weakText(route, spread, units)}`.trimEnd(),
      TABLE_WIDTH,
    ),
  ];
}

function legRows(route: RouteEstimate, spread: ErrorSpread, units: TableUnits): string[] {
  const { store } = units;
  const time = (seconds: number) => durationText(Math.round(seconds), "second", 9);
  const amount = (value: number) =>
    placedText(inLastPlace(value / store.size, store.decimals), store.decimals, STORE_WIDTH);
  const legs = [...spread.legs, { ...spread, leg: "All" }];
  const names = [...route.legs.map(({ to }) => isolated(clipped(plainText(to), NAME_WIDTH))), ""];
  const { head, rows } = laidOut(
    [
      { head: ["", "Leg"], cells: legs.map(({ leg }) => String(leg)) },
      { head: ["", "to"], cells: names, align: "left" },
      { head: ["Time ±", "h:mm:ss"], cells: legs.map(({ time_s }) => time(time_s)) },
      { head: ["ETA ±", "h:mm:ss"], cells: legs.map(({ arrival_s }) => time(arrival_s)) },
      { head: ["Use ±", store.symbol], cells: legs.map(({ use }) => amount(use)) },
      { head: ["Left ±", store.symbol], cells: legs.map(({ remaining }) => amount(remaining)) },
    ],
    0,
  );
  return [...head, ...rows];
}

function chanceText(
  route: RouteEstimate,
  { reserveHolds, confidence, margin }: ErrorSpread,
  units: TableUnits,
): string {
  const what = route.reserve === 0 ? "The store lasts" : "The reserve holds";
  const asked = confidence === undefined ? "" : `; the plan asks for ${askedText(confidence)}`;
  return `${what} with a probability of ${percentText(reserveHolds)} (what is left above it ± ${amountText(margin, units)}, taken as normal)${asked}.`;
}

function weakText(route: RouteEstimate, { weakest }: ErrorSpread, units: TableUnits): string {
  const time = weakest.time && placeText(route, weakest.time, units);
  const use = weakest.use && placeText(route, weakest.use, units);
  if (time === use) return time === null ? "" : `A wrong forecast hurts most ${time}.`;
  const hurts = [time && `the arrival most ${time}`, use && `the use most ${use}`];
  return `A wrong forecast hurts ${hurts.filter((part) => part !== null).join(", ")}.`;
}

function placeText(route: RouteEstimate, { leg, at_m }: WeakPlace, { length }: TableUnits): string {
  const from = isolated(plainText(route.legs[leg - 1]?.from ?? ""));
  return `on leg ${leg}, ${(at_m / length.size).toFixed(Math.min(1, length.decimals))} ${length.symbol} after ${from}`;
}
