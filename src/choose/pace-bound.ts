import { isOfStore } from "../estimate/findings.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { RouteOutcome } from "../estimate/route-outcome.ts";
import { type PacelessConditions, SpeedTrials } from "./speed-trials.ts";
import { type CellFinding, type WindowCell, worstFinding } from "./window-cell.ts";

/** What keeps a choice of speed from going on to slower or faster ones. */
export interface PaceBound {
  /** On which side the speeds end. */
  readonly beyond: "slower" | "faster";
  /** What stops the route there; `null` where the craft has no such speed. */
  readonly stop: CellFinding | null;
}

/** How far beside a speed is looked, as a share of it: well above the 1e-7 to which the edge of what completes the route is found. */
const BESIDE = 1e-6;

/**
 * What keeps the speed of least use from being a true least: where it is the craft's slowest or fastest, or the next speed does not
 * complete the route or is a `stop`. `null` where the use rises on both sides.
 *
 * @param found as `leastUseSpeed` gives it, under the same conditions
 * @throws InputError where the craft's speeds have no bound
 */
export function leastUseBound(
  prepared: PreparedRoute,
  conditions: PacelessConditions,
  found: WindowCell | null,
): PaceBound | null {
  const stopOf = ({ use, status, findings }: RouteOutcome): CellFinding | null =>
    use === null || (status === "stop" && found?.status !== "stop") ? worstFinding(findings) : null;
  return (
    boundOf(prepared, conditions, found, "slower", stopOf) ??
    boundOf(prepared, conditions, found, "faster", stopOf)
  );
}

/**
 * What bounds the fastest speed that keeps the reserve, other than the reserve: the craft's own fastest, or what stops a faster one.
 *
 * @param found as `fastestWithReserve` gives it, under the same conditions
 * @throws InputError where the craft's speeds have no bound
 */
export function fastestBound(
  prepared: PreparedRoute,
  conditions: PacelessConditions,
  found: WindowCell | null,
): PaceBound | null {
  return boundOf(prepared, conditions, found, "faster", ({ findings }) =>
    worstFinding(findings.filter((finding) => finding.severity === "stop" && !isOfStore(finding))),
  );
}

function boundOf(
  prepared: PreparedRoute,
  conditions: PacelessConditions,
  found: WindowCell | null,
  beyond: PaceBound["beyond"],
  stopOf: (next: RouteOutcome) => CellFinding | null,
): PaceBound | null {
  if (found === null || found.speed_m_s === null) return null;
  const trials = new SpeedTrials(prepared, conditions);
  const { min, max } = trials.range;
  const next = found.speed_m_s * (beyond === "slower" ? 1 - BESIDE : 1 + BESIDE);
  if (next < min || next > max) return { beyond, stop: null };
  const stop = stopOf(trials.at(next));
  return stop === null ? null : { beyond, stop };
}
