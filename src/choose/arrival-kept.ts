import { missedArrivalText, missText } from "../estimate/finding-text.ts";
import { routeFinding } from "../estimate/findings.ts";
import { isoTime } from "../estimate/leg-result.ts";
import type { ArrivalAnswer, RouteStatus } from "../estimate/result.ts";
import { askedFor, wantedText } from "./arrival-answer.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import { normalProbability } from "./normal-distribution.ts";
import { type CellFinding, cellFinding } from "./window-cell.ts";

/** By how much an arrival may miss what was asked for and still keep it, s. */
const TOLERANCE = 1;

/** The arrival that a route's pace asked for; `null` where it says how fast. */
export function arrivalAsked({ arrive }: { readonly arrive?: ArrivalAnswer }): ArrivalWindow | null {
  if (arrive === undefined) return null;
  const { notBefore, notAfter } = arrive;
  return { notBefore: notBefore === null ? null : Date.parse(notBefore), notAfter: Date.parse(notAfter) };
}

/** Whether one moment is asked for. Two forecasts cannot both arrive then, so that the arrival is kept by being there by then. */
function isOneTime({ notBefore, notAfter }: ArrivalWindow): boolean {
  return notBefore === notAfter;
}

/**
 * Seconds by which an arrival misses what was asked for: positive too late, negative too early, 0 where it is kept, to within a second.
 *
 * @param arrival ms since 1970-01-01T00:00Z
 */
export function arrivalMiss(arrival: number, asked: ArrivalWindow): number {
  const late_s = (arrival - asked.notAfter) / 1000;
  if (late_s > TOLERANCE) return late_s;
  const early_s = asked.notBefore === null || isOneTime(asked) ? 0 : (asked.notBefore - arrival) / 1000;
  return early_s > TOLERANCE ? -early_s : 0;
}

/** What keeps an arrival: `by 2027-05-04 18:00 UTC`, `between … and …` */
export function keptText(asked: ArrivalWindow): string {
  const notBefore = asked.notBefore === null || isOneTime(asked) ? null : isoTime(asked.notBefore);
  return wantedText({ notBefore, notAfter: isoTime(asked.notAfter) });
}

/** What is judged: an estimate of a route under a member or what-if. */
interface Judged {
  readonly status: RouteStatus;
  readonly worst: CellFinding | null;
}

/**
 * An estimate at the speed found for an arrival, in which that speed arrives at another time: a stop where it is outside the times asked for.
 * What is a stop already stays as it is, and so does everything where one moment is asked for or none.
 *
 * @param arrival ms since 1970-01-01T00:00Z; `null` where it does not arrive
 */
export function heldToArrival<Kind extends Judged>(
  judged: Kind,
  arrival: number | null,
  asked: ArrivalWindow | null,
): Kind {
  if (asked === null || isOneTime(asked) || arrival === null || judged.status === "stop") return judged;
  const miss = arrivalMiss(arrival, asked);
  if (miss === 0) return judged;
  const off = Math.abs(miss);
  const message = `it arrives ${missedArrivalText(arrival, off)}, ${missText(off, miss > 0)}${askedFor(keptText(asked))}`;
  return { ...judged, status: "stop", worst: cellFinding(routeFinding("arrival-missed", message)) };
}

/**
 * Probability that a route arrives by the latest time asked for, with its arrival taken as normally distributed; 0..1.
 *
 * @param arrival ms since 1970-01-01T00:00Z
 * @param deviation_s standard deviation of the arrival
 */
export function arrivalChance(arrival: number, deviation_s: number, asked: ArrivalWindow): number {
  if (deviation_s === 0) return arrivalMiss(arrival, { ...asked, notBefore: null }) > 0 ? 0 : 1;
  return normalProbability((asked.notAfter - arrival) / 1000 / deviation_s);
}

/** The probability with which an arrival has to be kept is asked of a span of times: of one moment it would be a half at best. */
export function decidesArrival(asked: ArrivalWindow | null): asked is ArrivalWindow {
  return asked !== null && !isOneTime(asked);
}
