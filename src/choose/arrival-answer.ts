import { durationText, momentText, speedText } from "../estimate/finding-text.ts";
import type { ArrivalAnswer } from "../estimate/result.ts";

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

/** What a route without a solution says. */
export function missedText(answer: ArrivalAnswer): string {
  return `no through-speed arrives ${wantedText(answer)}: ${answer.reason ?? ""}`;
}

/** What a route at the speed found says. */
export function foundText(answer: ArrivalAnswer, departure: number): string {
  const solution = answer.solutions[answer.chosen ?? 0];
  if (solution === undefined) throw new Error("an arrival without a solution");
  const arrival = Date.parse(solution.arrival);
  const count = answer.solutions.length;
  const others = count > 1 ? `, the cheapest of ${count} solutions` : "";
  const passage = durationText((arrival - departure) / 1000);
  return `${speedText(solution.speed_m_s)} through the medium arrives ${momentText(arrival)}, after ${passage}${others}; asked for: ${wantedText(answer)}`;
}
