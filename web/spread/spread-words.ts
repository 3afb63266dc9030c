import { askedText, type DecidedRoute, type EnsembleResult, type ErrorSpread, percentText } from "../core.ts";
import { clockSince, durationText } from "../format/time-text.ts";
import { inUnit, shownUnit, storeUnit } from "../format/units.ts";
import type { PageView } from "../state/page-view.ts";

type Shown = Pick<PageView, "units" | "zone" | "clock">;

/** What the stated forecast error comes to on a route, in sentences. */
export function spreadWords(route: DecidedRoute, spread: ErrorSpread, view: Shown): string[] {
  const amount = storeUnit(route.storeUnit, route.usable);
  const what = route.reserve === 0 ? "The store lasts" : "The reserve holds";
  const asked = spread.confidence === undefined ? "" : `; the plan asks for ${askedText(spread.confidence)}`;
  return [
    `${what} with a probability of ${percentText(spread.reserveHolds)}${asked}.`,
    ...(route.arrive === undefined || spread.arrivalHolds === undefined
      ? []
      : [
          `Arrives by ${clockSince(route.arrive.notAfter, route.departure, view.zone.value, view.clock.value)} with a probability of ${percentText(spread.arrivalHolds)}.`,
        ]),
    `One standard deviation: arrival ${durationText(spread.arrival_s)}, use ${inUnit(spread.use, amount)} ${amount.symbol}, left ${inUnit(spread.remaining, amount)} ${amount.symbol}.`,
    ...weakWords(route, spread.weakest.use, "use", view),
    ...weakWords(route, spread.weakest.time, "arrival", view),
  ];
}

/** What an ensemble comes to on a route. */
export function ensembleWords(
  route: DecidedRoute,
  ensemble: EnsembleResult,
  { zone, clock }: Shown,
): string[] {
  const amount = storeUnit(route.storeUnit, route.usable);
  const { members, reserveHolds, breaksReserve, doesNotArrive, arrival, remaining } = ensemble;
  const what = route.reserve === 0 ? "The store lasts" : "The reserve holds";
  const held = Math.round(reserveHolds * members.length);
  const told = (time: string): string => clockSince(time, route.departure, zone.value, clock.value);
  return [
    `${what} in ${held} of ${members.length} members (${percentText(reserveHolds)}).`,
    ...(breaksReserve.length === 0 ? [] : [`Broken in ${memberWords(breaksReserve)}.`]),
    ...(doesNotArrive.length === 0 ? [] : [`Does not arrive in ${memberWords(doesNotArrive)}.`]),
    ...arriveWords(route, ensemble, told),
    ...(arrival === null
      ? []
      : [`Arrival 10 % ${told(arrival.p10)}, 50 % ${told(arrival.p50)}, 90 % ${told(arrival.p90)}.`]),
    ...(remaining === null
      ? []
      : [
          `Left 10 % ${inUnit(remaining.p10, amount)}, 50 % ${inUnit(remaining.p50, amount)}, 90 % ${inUnit(remaining.p90, amount)} ${amount.symbol}.`,
        ]),
  ];
}

/** In how many members a route arrives when its pace asks for it. */
function arriveWords(
  { arrive }: DecidedRoute,
  { members, arrivalHolds, arrivesEarly = [], arrivesLate = [] }: EnsembleResult,
  told: (time: string) => string,
): string[] {
  if (arrive === undefined || arrivalHolds === undefined) return [];
  const { notBefore, notAfter } = arrive;
  const span =
    notBefore === null || notBefore === notAfter
      ? `by ${told(notAfter)}`
      : `between ${told(notBefore)} and ${told(notAfter)}`;
  const kept = Math.round(arrivalHolds * members.length);
  return [
    `Arrives ${span} in ${kept} of ${members.length} members (${percentText(arrivalHolds)}).`,
    ...(arrivesEarly.length === 0 ? [] : [`Too early in ${memberWords(arrivesEarly)}.`]),
    ...(arrivesLate.length === 0 ? [] : [`Too late in ${memberWords(arrivesLate)}.`]),
  ];
}

/** ` (12 min late)` after an arrival that misses what was asked for; nothing after one that keeps it. */
export function missWords(miss_s: number | null | undefined): string {
  if (miss_s === undefined || miss_s === null || miss_s === 0) return "";
  return ` (${durationText(Math.abs(miss_s))} ${miss_s > 0 ? "late" : "early"})`;
}

function weakWords(
  route: DecidedRoute,
  place: ErrorSpread["weakest"]["use"],
  what: string,
  { units }: Shown,
): string[] {
  if (place === null) return [];
  const distance = shownUnit(units.value, "distance");
  const { leg, at_m } = place;
  const from = route.legs[leg - 1]?.from ?? "its start";
  return [
    `A wrong forecast hurts the ${what} most on leg ${leg}, ${inUnit(at_m, distance)} ${distance.symbol} after ${from}.`,
  ];
}

function memberWords(members: readonly number[]): string {
  return `${members.length === 1 ? "member" : "members"} ${members.join(", ")}`;
}
