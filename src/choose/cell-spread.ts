import type { Conditions } from "../estimate/conditions.ts";
import { estimateRoute } from "../estimate/estimate-route.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import { arrivalChance } from "./arrival-kept.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import { unsureArrival, unsureReserve } from "./confidence.ts";
import { errorSpread } from "./error-spread.ts";
import type { UncertaintyAsked } from "./uncertain-estimate.ts";
import { type CellFinding, cellFinding } from "./window-cell.ts";

/** What the stated error comes to for a route at one departure. */
export interface CellSpread {
  /** Probability that the reserve holds; `null` where no error is stated or acts, or the route ends short. */
  readonly reserveHolds: number | null;
  /** Standard deviation of the arrival, s; `null` likewise. */
  readonly arrival_s: number | null;
  /** Where the reserve or the arrival holds with less than the probability asked for. */
  readonly unsure: CellFinding | null;
}

/** @param arrive the arrival to keep with the probability asked for; `null` for none */
export function cellSpread(
  prepared: PreparedRoute,
  conditions: Conditions,
  { errors, confidence }: Pick<UncertaintyAsked, "errors" | "confidence">,
  arrive: ArrivalWindow | null,
): CellSpread {
  if (errors.length === 0) return { reserveHolds: null, arrival_s: null, unsure: null };
  const run = estimateRoute(prepared, conditions);
  const spread = errorSpread(prepared, conditions, run, errors)?.spread ?? null;
  const { reserveHolds = null, arrival_s = null } = spread ?? {};
  if (confidence === undefined) return { reserveHolds, arrival_s, unsure: null };
  const { arrival } = run.estimate;
  const arrivalHolds =
    arrival === null || arrival_s === null || arrive === null
      ? null
      : arrivalChance(Date.parse(arrival), arrival_s, arrive);
  const found =
    unsureReserve(run.estimate, conditions, reserveHolds, { confidence, errors }) ??
    unsureArrival(arrive, arrivalHolds, confidence);
  return { reserveHolds, arrival_s, unsure: found && cellFinding(found) };
}
