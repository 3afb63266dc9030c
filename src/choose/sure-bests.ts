import { speedText } from "../estimate/finding-text.ts";
import type { CellTrials } from "./cell-trials.ts";
import { type BestBy, firstInRank, inRank } from "./rank.ts";
import type { Steps } from "./steps.ts";
import type { BestPair, SureBest, SureCell } from "./sure.ts";
import type { CellFinding, WindowCell } from "./window-cell.ts";
import { bestOf, isPossible, nextAfter, type WindowBest } from "./window-summary.ts";

/** The bests of one route's cells, not yet put to the test in full. */
export interface FoundBests {
  readonly plain: WindowBest;
  readonly sure: Omit<WindowBest, "closedBy">;
}

const ALL = ["time", "use", "latest"] as const satisfies readonly BestBy[];

/**
 * Goes down some cells, the best first, until one holds in every member and what-if: by time, by use and by latest departure.
 * Cells that a plain estimate stops are not tried.
 */
export function* foundBests(trials: CellTrials, cells: readonly WindowCell[]): Steps<FoundBests> {
  const possible = cells.filter(isPossible);
  const sure: Record<BestBy, WindowCell | null> = { time: null, use: null, latest: null };
  for (const by of ALL) sure[by] = yield* firstToHold(trials, possible, by);
  return { plain: bestOf(cells), sure };
}

function* firstToHold(
  trials: CellTrials,
  possible: readonly WindowCell[],
  by: BestBy,
): Steps<WindowCell | null> {
  for (const cell of inRank(possible, by)) if (yield* trials.holds(cell)) return cell;
  return null;
}

/**
 * The bests of several routes from those of each; the first among all their cells of equals.
 *
 * @param all the cells of all routes
 */
export function overallBests(of: readonly FoundBests[], all: readonly WindowCell[]): FoundBests {
  const overall = (by: BestBy): WindowCell | null => {
    const own = new Set(of.map(({ sure }) => sure[by]));
    return firstInRank(
      all.filter((cell) => own.has(cell)),
      by,
      all,
    );
  };
  return {
    plain: bestOf(all),
    sure: { time: overall("time"), use: overall("use"), latest: overall("latest") },
  };
}

/**
 * Puts the bests that were found to the test in full.
 *
 * @param cells of which they are the bests
 */
export function* testedBests(
  trials: CellTrials,
  { plain, sure }: FoundBests,
  cells: readonly WindowCell[],
): Steps<BestPair> {
  const closedBy = yield* closing(trials, sure.latest, cells);
  return {
    plain: yield* tested(trials, plain),
    sure: yield* tested(trials, { ...sure, closedBy }),
  };
}

function* closing(
  trials: CellTrials,
  latest: WindowCell | null,
  cells: readonly WindowCell[],
): Steps<CellFinding | null> {
  const next = latest === null ? null : nextAfter(cells, latest);
  const found = next === null ? null : yield* trials.stoppedBy(next);
  if (next === null || found === null || next.status === "stop" || !trials.findsSpeeds) return found;
  const speed = next.speed_m_s === null ? "" : `, ${speedText(next.speed_m_s)}`;
  return {
    ...found,
    message: `no speed was found that arrives then and holds in all that the plan names; at the cheapest by the plain estimate${speed}: ${found.message}`,
  };
}

function* tested(trials: CellTrials, { time, use, latest, closedBy }: WindowBest): Steps<SureBest> {
  return {
    time: yield* testedCell(trials, time),
    use: yield* testedCell(trials, use),
    latest: yield* testedCell(trials, latest),
    closedBy,
  };
}

/** A cell with all that it comes to; `null` for none. @param notAfter an arrival to keep, as `CellTrials.sure` takes it */
export function* testedCell(
  trials: CellTrials,
  cell: WindowCell | null,
  notAfter: number | null = null,
): Steps<SureCell | null> {
  return cell === null ? null : { ...cell, sure: yield* trials.sure(cell, notAfter) };
}
