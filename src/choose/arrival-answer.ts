import { durationText, minuteText, momentText, speedText } from "../estimate/finding-text.ts";
import type { ArrivalAnswer, ArrivalSolution } from "../estimate/result.ts";

/** The speed to estimate at: the chosen one, else that of the nearest arrival, m/s; `null` where no speed completes the route. */
export function arrivalSpeed({ solutions, chosen, nearest }: ArrivalAnswer): number | null {
  const solution = chosen === null ? nearest : solutions[chosen];
  return solution?.speed_m_s ?? null;
}

/** `at 2027-05-04 18:00 UTC`, `between … and …`, `by …` */
export function wantedText({ notBefore, notAfter }: Pick<ArrivalAnswer, "notBefore" | "notAfter">): string {
  const end = momentText(Date.parse(notAfter));
  if (notBefore === null) return `by ${end}`;
  if (notBefore === notAfter) return `at ${end}`;
  return `between ${momentText(Date.parse(notBefore))} and ${end}`;
}

/** How a missed arrival ends: `; asked for: by 2027-05-04 18:00 UTC` */
export function askedFor(wanted: string): string {
  return `; asked for: ${wanted}`;
}

/** What a route without a solution says. */
export function missedText(answer: ArrivalAnswer): string {
  return `no through-speed arrives ${wantedText(answer)}: ${answer.reason ?? ""}`;
}

/** The solution that is the cheapest by the plain estimate, where it does not hold in everything that the plan names; else `null`. */
export function cheapestLost({ solutions, chosen, cheapest, holds }: ArrivalAnswer): ArrivalSolution | null {
  const isLost = holds === false || (cheapest !== undefined && cheapest !== chosen);
  return isLost ? (solutions[cheapest ?? -1] ?? null) : null;
}

/** What a route at the speed found says. */
export function foundText(answer: ArrivalAnswer, departure: number): string {
  const solution = answer.solutions[answer.chosen ?? 0];
  if (solution === undefined) throw new Error("an arrival without a solution");
  const arrival = Date.parse(solution.arrival);
  const passage = durationText((arrival - departure) / 1000);
  const found = `${speedText(solution.speed_m_s)} through the medium arrives ${minuteText(arrival)}, after ${passage}`;
  const wanted = wantedText(answer);
  const choice = choiceText(answer);
  // Said once: an arrival that is missed ends with it.
  const rest = choice.endsWith(askedFor(wanted)) ? choice.slice(0, -askedFor(wanted).length) : choice;
  return `${found} (asked for: ${wanted})${rest}`;
}

const ALL = "in all that the plan names";

/** Why this solution and no other. */
function choiceText(answer: ArrivalAnswer): string {
  const { solutions, holds, reason } = answer;
  const lost = cheapestLost(answer);
  const among = solutions.length > 1 ? `, the cheapest of ${solutions.length} solutions` : "";
  if (lost === null) return holds === true ? `${among}, and holds ${ALL}` : among;
  if (holds === false)
    return `${among}; no speed was found that arrives then and holds ${ALL}: ${reason ?? ""}`;
  return `, the cheapest found that holds ${ALL}; the cheapest by the plain estimate, ${speedText(lost.speed_m_s)}, does not: ${reason ?? ""}`;
}
