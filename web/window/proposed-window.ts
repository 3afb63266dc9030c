import type { Estimate } from "../core.ts";
import type { PlanDocument, WindowDocument } from "../state/plan-document.ts";

const MINUTE = 60_000;
const HOUR = 60 * MINUTE;
/** About as many departures as a window proposes. */
const COUNT = 48;
const STEPS_MIN = [1, 2, 5, 10, 15, 30, 60, 120, 180, 360] as const;

/**
 * A window to begin from where the plan names none: from the first valid time of the fields or the departure, whichever is
 * later less half a day, to the last valid time; at most five days.
 */
export function proposedWindow(plan: PlanDocument, estimate: Estimate | null): WindowDocument {
  const departure = Date.parse(plan.departure);
  const begin = Number.isNaN(departure) ? 0 : departure;
  const valid = (estimate?.fields ?? []).filter(({ validFrom }) => validFrom !== null);
  const first = Math.max(...valid.map(({ validFrom }) => Date.parse(validFrom ?? "")), begin - 12 * HOUR);
  const last = Math.min(...valid.map(({ validTo }) => Date.parse(validTo ?? "")), begin + 5 * 24 * HOUR);
  const from = Math.ceil(Math.min(first, begin) / HOUR) * HOUR;
  const shortest = valid.length === 0 ? begin + 24 * HOUR : last;
  const to = Math.max(Math.floor(shortest / HOUR) * HOUR, from + HOUR);
  const wanted = (to - from) / MINUTE / COUNT;
  const step = STEPS_MIN.find((minutes) => minutes >= wanted) ?? 720;
  return { from: timeOf(from), to: timeOf(to), every: step < 60 ? `${step} min` : `${step / 60} h` };
}

function timeOf(instant: number): string {
  return new Date(instant).toISOString().replace(":00.000Z", "Z");
}
