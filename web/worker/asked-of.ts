import type { UncertaintyAsked } from "./choose.ts";
import type { PlanRead } from "./plan-reader.ts";

/** What a plan asks about how sure an estimate is. */
export function askedOf({ plan, members }: PlanRead): UncertaintyAsked {
  const { whatIfs = [], errors = [], confidence } = plan;
  return { whatIfs, errors, members, confidence };
}
