import type { Conditions } from "../estimate/conditions.ts";
import { momentText } from "../estimate/finding-text.ts";
import { isOfStore, routeFinding } from "../estimate/findings.ts";
import type { Finding, RouteEstimate } from "../estimate/result.ts";
import { decidesArrival } from "./arrival-kept.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import { actingErrors } from "./error-spread.ts";
import type { ForecastError } from "./forecast-error.ts";

/** The probability with which a reserve has to hold, and the errors under which it is found. */
export interface ConfidenceAsked {
  /** Above 0 and below 1. */
  readonly confidence: number;
  readonly errors: readonly ForecastError[];
}

/**
 * What is found where a route's reserve holds with less than the probability asked for; `null` where it holds with that, where no error acts
 * on the craft, and where the route itself ends short or breaks its reserve, which says more.
 *
 * @param reserveHolds probability under the stated errors; `null` where it could not be worked out, which is as bad as too little
 */
export function unsureReserve(
  { arrival, reserve, findings }: Pick<RouteEstimate, "arrival" | "reserve" | "findings">,
  conditions: Pick<Conditions, "craft" | "fields">,
  reserveHolds: number | null,
  { confidence, errors }: ConfidenceAsked,
): Finding | null {
  const isBroken = findings.some(isOfStore);
  if (arrival === null || isBroken || actingErrors(conditions, errors).length === 0) return null;
  const asked = askedText(confidence);
  const what = reserve === 0 ? "the store lasts" : "the reserve holds";
  if (reserveHolds === null)
    return routeFinding(
      "reserve-unsure",
      `along the edge of its field or of what its pace can hold, the probability that ${what} is not known, and ${asked}`,
    );
  if (reserveHolds >= confidence) return null;
  return routeFinding(
    "reserve-unsure",
    `${what} with a probability of ${flooredText(reserveHolds)} under the stated forecast error, and ${asked}`,
  );
}

/**
 * What is found where a route arrives by the latest of the times asked for with less than the probability asked for; `null` where it does with
 * that, and where one moment is asked for.
 *
 * @param arrivalHolds probability under the stated errors; `null` where there is none, which {@link unsureReserve} tells
 */
export function unsureArrival(
  wanted: ArrivalWindow | null,
  arrivalHolds: number | null,
  confidence: number,
): Finding | null {
  if (!decidesArrival(wanted) || arrivalHolds === null || arrivalHolds >= confidence) return null;
  return routeFinding(
    "arrival-missed",
    `under the stated forecast error it arrives by ${momentText(wanted.notAfter)} with a probability of ${flooredText(arrivalHolds)}, and ${askedText(confidence)}`,
  );
}

function askedText(confidence: number): string {
  return `the plan asks for ${Number((100 * confidence).toPrecision(12))} %`;
}

/** Rounded down, so that what is too little is not told as enough. */
function flooredText(share: number): string {
  return share < 0.001 ? "less than 0.1 %" : `${Math.floor(1000 * share) / 10} %`;
}
