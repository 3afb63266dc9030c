import { missedArrivalText, missText, speedText } from "../estimate/finding-text.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { ArrivalAnswer } from "../estimate/result.ts";
import { solutionAt } from "./arrival-solution.ts";
import type { Sample } from "./line-search.ts";
import type { SpeedTrials } from "./speed-trials.ts";
import { worstFinding } from "./window-cell.ts";

type Missed = Pick<ArrivalAnswer, "nearest" | "reason">;

/** The achievable arrival nearest to those asked for, and why none of them is. */
export function nearestTo(
  { legs }: PreparedRoute,
  trials: SpeedTrials,
  samples: readonly Sample[],
  earliest: number,
  latest: number,
  departure: number,
): Missed {
  const { min, max } = trials.range;
  const whole = `${speedText(min)} to ${speedText(max)}`;
  const missBy = (passage: number) => Math.max(earliest - passage, passage - latest);
  const complete = samples.filter((sample): sample is { x: number; value: number } => sample.value !== null);
  const best = complete.reduce<{ x: number; value: number } | null>(
    (so, each) => (so === null || missBy(each.value) < missBy(so.value) ? each : so),
    null,
  );
  const whyNot = (speed: number) => worstFinding(trials.at(speed).findings)?.message ?? "";
  if (best === null)
    return {
      nearest: null,
      reason: `no speed of the craft's range, ${whole}, completes the route; at the highest, ${whyNot(max)}`,
    };
  const nearest = solutionAt(trials, best.x, departure);
  const late = best.value > latest;
  const off = missBy(best.value);
  const arrives = `arrives ${missedArrivalText(Date.parse(nearest.arrival), off)}, ${missText(off, late)}`;
  if (legs.every(({ to }) => to.speed_m_s !== null))
    return { nearest, reason: `every leg names its own speed, and the route ${arrives}` };
  const beyond = samples.filter(({ x, value }) => value === null && (late ? x > best.x : x < best.x));
  const next = beyond[late ? 0 : beyond.length - 1];
  if (next === undefined) {
    const end = late ? "the highest" : "the lowest";
    return { nearest, reason: `${end} speed of the craft's range, ${speedText(best.x)}, ${arrives}` };
  }
  return {
    nearest,
    reason: `the nearest, at ${speedText(best.x)}, ${arrives}; ${late ? "above" : "below"} that speed the route is not completed: ${whyNot(next.x)}`,
  };
}
