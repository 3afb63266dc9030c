import type { CellTrials } from "./cell-trials.ts";
import type { DepartureWindow } from "./departure-window.ts";
import type { MinuteCells } from "./minute-cells.ts";
import { type BestBy, figureOf } from "./rank.ts";
import { narrowLatest, searchAround } from "./refine.ts";
import { runSteps, type Steps } from "./steps.ts";
import { type FoundBests, foundBests } from "./sure-bests.ts";
import type { WindowCell } from "./window-cell.ts";

/**
 * The bests of one route to the minute that hold in every member and what-if. Where the plain best to the minute does not hold, the minutes
 * around the best departure of the window that does are searched, as `refineWindow` does around its own, with the departures that do
 * not hold left out; then the best of all minutes tried is the answer. So it is never worse than the best of the window, and an
 * opening that no departure of the window shows is not seen.
 *
 * @param own the route's bests among the departures of the window
 */
export function* minuteBests(
  trials: CellTrials,
  minutes: MinuteCells,
  window: DepartureWindow,
  own: FoundBests,
): Steps<FoundBests> {
  const before = yield* foundBests(trials, minutes.tried);
  const holds = (cell: WindowCell): boolean => runSteps(trials.holds(cell));
  const isPassedOver = (by: BestBy): boolean => before.plain[by] !== before.sure[by];
  for (const by of ["time", "use"] as const) {
    const best = own.sure[by];
    if (best === null || !isPassedOver(by)) continue;
    const figure = figureOf(by);
    searchAround(best, window, (minute) => {
      const cell = minutes.at(minute, best);
      return holds(cell) ? figure(cell) : Number.POSITIVE_INFINITY;
    });
    yield;
  }
  const { latest } = own.sure;
  if (latest !== null && isPassedOver("latest")) {
    const late = minutes.cells.filter(({ departure }) => departure >= latest.departure);
    narrowLatest(late, window, minutes, holds);
    yield;
  }
  return yield* foundBests(trials, minutes.tried);
}
