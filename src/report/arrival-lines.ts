import { arrivalAsked, decidesArrival, keptText } from "../choose/arrival-kept.ts";
import type { DecidedRoute } from "../choose/decided.ts";
import type { EnsembleResult } from "../choose/ensemble.ts";
import type { ErrorSpread } from "../choose/error-spread.ts";
import { missText } from "../estimate/finding-text.ts";
import { TABLE_WIDTH } from "./columns.ts";
import { askedText, percentText } from "./percent-text.ts";
import { clipped, isolated, plainText, wrapped } from "./plain-text.ts";

/*
 * What becomes of an arrival that the pace asks for, in sentences; nothing where it asks for none.
 */

const NAME_WIDTH = 24;

/** ` It arrives by … in 3 of 5 members (60 %). Too late in members 3, 4.` */
export function membersArriveText(route: DecidedRoute, ensemble: EnsembleResult): string {
  const asked = arrivalAsked(route);
  const { members, arrivalHolds, arrivesEarly = [], arrivesLate = [] } = ensemble;
  if (asked === null || arrivalHolds === undefined) return "";
  const kept = Math.round(arrivalHolds * members.length);
  const early = arrivesEarly.length === 0 ? "" : ` Too early in ${memberText(arrivesEarly)}.`;
  const late = arrivesLate.length === 0 ? "" : ` Too late in ${memberText(arrivesLate)}.`;
  return ` It arrives ${keptText(asked)} in ${kept} of ${members.length} members (${percentText(arrivalHolds)}).${early}${late}`;
}

/** `member 3`, `members 3, 4` */
export function memberText(members: readonly number[]): string {
  return `${members.length === 1 ? "member" : "members"} ${members.join(", ")}`;
}

/** ` It arrives by … with a probability of 71 %; the plan asks for 90 %.` */
export function chanceToArriveText(route: DecidedRoute, { arrivalHolds, confidence }: ErrorSpread): string {
  const wanted = arrivalAsked(route);
  if (wanted === null || arrivalHolds === undefined) return "";
  const asked =
    confidence !== undefined && decidesArrival(wanted) ? `; the plan asks for ${askedText(confidence)}` : "";
  const by = keptText({ ...wanted, notBefore: null });
  return ` It arrives ${by} with a probability of ${percentText(arrivalHolds)}${asked}.`;
}

/** In which what-ifs of a route the arrival is kept, and by how much the others miss it. */
export function whatIfsArriveLines(route: DecidedRoute): string[] {
  const asked = arrivalAsked(route);
  const whatIfs = route.whatIf ?? [];
  if (asked === null || whatIfs.length === 0) return [];
  const kept = whatIfs.filter(({ arrivalMiss_s }) => arrivalMiss_s === 0).length;
  const missed = whatIfs.flatMap(({ name, arrivalMiss_s = 0 }) => {
    if (arrivalMiss_s === 0 || arrivalMiss_s === null) return [];
    const by = missText(Math.abs(arrivalMiss_s), arrivalMiss_s > 0);
    return [`${by} in ${isolated(clipped(plainText(name), NAME_WIDTH))}`];
  });
  const of = `${kept} of ${whatIfs.length} what-if${whatIfs.length === 1 ? "" : "s"}`;
  const text = [`It arrives ${keptText(asked)} in ${of}`, ...missed].join("; ");
  return wrapped(`${text}.`, TABLE_WIDTH);
}
