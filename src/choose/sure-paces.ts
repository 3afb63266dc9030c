import type { CellTrials } from "./cell-trials.ts";
import { lastToHold } from "./last-to-hold.ts";
import type { RoutePaces } from "./route-paces.ts";
import { evenlyInSpeed, speedRange } from "./speed-range.ts";
import type { Steps } from "./steps.ts";
import type { SureCell } from "./sure.ts";
import { testedCell } from "./sure-bests.ts";
import { routeOf, type Sweep } from "./sweep.ts";
import { sweepCell } from "./window.ts";
import type { WindowCell } from "./window-cell.ts";

/** Share of a speed to which the fastest that holds is found. */
const CLOSENESS = 1e-9;

/** A route's choice of pace, put to the test. */
export interface SurePaces {
  readonly route: string;
  /** As `RoutePaces` has them. */
  readonly leastUse: SureCell | null;
  readonly fastest: SureCell | null;
  /**
   * At the fastest through-speed that holds in every member and what-if, at the route's best departure by use that holds, else at that of
   * `fastest`; `null` where none does.
   */
  readonly sureFastest: SureCell | null;
}

/**
 * Puts a route's choice of pace to the test. Where the fastest speed that keeps the reserve does not hold, the speeds of the craft's range
 * are gone down in 64 steps to the first that does, then halved to a billionth: a stretch of speeds narrower than a step may be missed.
 *
 * @param held the route's best departure by use that holds, at one of the window's speeds; `null` for none
 */
export function* surePaces(
  sweep: Sweep,
  trials: CellTrials,
  { route, departure, leastUse, fastest }: RoutePaces,
  held: WindowCell | null,
): Steps<SurePaces> {
  const tested = yield* testedCell(trials, fastest);
  const at = held?.departure ?? departure;
  const holds = at === departure && (tested === null || tested.sure.status !== "stop");
  return {
    route,
    leastUse: yield* testedCell(trials, leastUse),
    fastest: tested,
    sureFastest: holds ? tested : yield* testedCell(trials, yield* fastestToHold(sweep, trials, route, at)),
  };
}

function* fastestToHold(
  sweep: Sweep,
  trials: CellTrials,
  route: string,
  departure: string,
): Steps<WindowCell | null> {
  const prepared = routeOf(sweep, route);
  const cellAt = (speed: number) => sweepCell(sweep, prepared, Date.parse(departure), speed);
  const holds = (speed: number) => trials.holds(cellAt(speed));
  let tooFast: number | null = null;
  for (const speed of evenlyInSpeed(speedRange(sweep.conditions.craft)).reverse()) {
    if (yield* holds(speed))
      return cellAt(tooFast === null ? speed : yield* lastToHold(holds, speed, tooFast, CLOSENESS));
    tooFast = speed;
    yield;
  }
  return null;
}
