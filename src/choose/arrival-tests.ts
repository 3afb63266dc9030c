import type { PreparedRoute } from "../estimate/prepare.ts";
import type { Measure } from "./line-search.ts";
import type { SpeedTrials } from "./speed-trials.ts";
import type { CellFinding } from "./window-cell.ts";

/** Through-speeds of a route at one departure, put to the test with everything that a plan names. */
export interface ArrivalTests {
  /**
   * By how many seconds the route arrives after the latest time asked for, against the speed, in each member and what-if: not above 0 where
   * it is in time; `null` where it does not arrive.
   */
  readonly late: readonly Measure[];
  /** Likewise with the probability asked for; `null` where none is. */
  readonly lateByChance: Measure | null;
  /** Whether the route can be done at a speed, and arrives when it should and keeps its reserve in all of them. */
  holds(speed: number): boolean;
  /** Whether a speed is stopped by what stopped the last that did not hold, or by the plain estimate. */
  isBrokenAlike(speed: number): boolean;
  /** What stops the route at a speed, be it the plain estimate or one of them; `null` where nothing does. */
  stoppedBy(speed: number): CellFinding | null;
}

/**
 * The tests of a route at one departure.
 *
 * @param speeds the runs of the plain estimate
 * @param departure ms since 1970-01-01T00:00Z
 */
export type ArrivalTestsAt = (
  prepared: PreparedRoute,
  speeds: SpeedTrials,
  departure: number,
) => ArrivalTests;
