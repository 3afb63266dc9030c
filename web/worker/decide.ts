import type { DecidedEstimate, SensitivityProfile } from "../core.ts";
import { askedOf } from "./asked-of.ts";
import { CellTrials, withTurnBack, withUncertainty } from "./choose.ts";
import type { EstimateAnswer } from "./core.ts";
import type { PlanRead } from "./plan-reader.ts";

/** An estimate with what the plan wants decided on top of it. */
export interface DecidedAnswer extends EstimateAnswer {
  readonly estimate: DecidedEstimate;
  /** Per route; empty where the plan asks nothing about how sure it is. */
  readonly sensitivities: readonly (SensitivityProfile | null)[];
}

/** @param turnBack whether turning back is wanted though the plan names no alternates */
export function decide(read: PlanRead, answer: EstimateAnswer, turnBack: boolean): DecidedAnswer {
  const { plan, input, prepared } = read;
  const { alternates = [] } = plan;
  const asked = askedOf(read);
  const turned =
    alternates.length > 0 || turnBack ? withTurnBack(answer, prepared, input, alternates) : answer;
  if (!CellTrials.has(asked)) return { ...turned, sensitivities: [] };
  return withUncertainty(turned, prepared, input, asked);
}
