import type { PreparedRoute } from "../estimate/prepare.ts";
import { decidesArrival } from "./arrival-kept.ts";
import type { ArrivalTests, ArrivalTestsAt } from "./arrival-tests.ts";
import { CellTrials } from "./cell-trials.ts";
import { actingErrors } from "./error-spread.ts";
import type { Measure } from "./line-search.ts";
import { normalQuantile } from "./normal-distribution.ts";
import type { SpeedTrials } from "./speed-trials.ts";
import { runSteps } from "./steps.ts";
import type { Sweep } from "./sweep.ts";
import { trialsOf } from "./trial.ts";
import type { UncertaintyAsked } from "./uncertain-estimate.ts";
import { cellOf, type WindowCell } from "./window-cell.ts";

/** By how much earlier than needed the probability of arriving is looked for, s: arrivals are told to the millisecond. */
const TOLD_TO = 1e-3;

/**
 * How speeds found for a sweep's arrival are put to the test; `null` where the pace asks for one moment or none, or nothing that the plan
 * names decides.
 */
export function arrivalTestsAt(
  sweep: Pick<Sweep, "prepared" | "conditions" | "arrive">,
  asked: UncertaintyAsked,
): ArrivalTestsAt | null {
  const { conditions, arrive } = sweep;
  if (!decidesArrival(arrive) || !CellTrials.decide(asked)) return null;
  const trials = trialsOf(sweep, asked);
  const { confidence, errors } = asked;
  const isChance = confidence !== undefined && actingErrors(conditions, errors).length > 0;
  const beyond = isChance ? normalQuantile(confidence) : null;
  // A search tries many speeds of which none is asked about again: each has trials of its own, so that it is forgotten with them.
  return (prepared, speeds, departure) => {
    const own = new CellTrials(sweep, asked, undefined, trials);
    return testsOf({ trials: own, prepared, speeds, departure }, arrive.notAfter, trials.length, beyond);
  };
}

interface Tested {
  readonly trials: CellTrials;
  readonly prepared: PreparedRoute;
  readonly speeds: SpeedTrials;
  readonly departure: number;
}

/** @param beyond standard deviations that the latest time has to be beyond the arrival; `null` where no probability is asked for */
function testsOf(
  { trials, prepared, speeds, departure }: Tested,
  notAfter: number,
  count: number,
  beyond: number | null,
): ArrivalTests {
  const cellAt = (speed: number): WindowCell => cellOf(prepared, departure, speed, speeds.at(speed));
  const lateBy = (arrival: number | null) => (arrival === null ? null : (arrival - notAfter) / 1000);
  const lateIn =
    (place: number): Measure =>
    (speed) =>
      lateBy(trials.arrivalIn(place, cellAt(speed)));
  const lateByChance: Measure = (speed) => {
    const late_s = lateBy(speeds.at(speed).arrival);
    const { arrival_s } = trials.spreadOf(cellAt(speed));
    return late_s === null || arrival_s === null ? null : late_s + (beyond ?? 0) * arrival_s + TOLD_TO;
  };
  return {
    late: Array.from({ length: count }, (_, place) => lateIn(place)),
    lateByChance: beyond === null ? null : lateByChance,
    holds: (speed) => runSteps(trials.holds(cellAt(speed))),
    isBrokenAlike: (speed) => runSteps(trials.isBrokenAlike(cellAt(speed))),
    stoppedBy: (speed) => runSteps(trials.stoppedBy(cellAt(speed))),
  };
}
