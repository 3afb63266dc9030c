import type { CellTrials } from "./cell-trials.ts";
import type { InTime, RouteInTime } from "./in-time.ts";
import { lastWhole } from "./last-whole.ts";
import { runSteps, type Steps } from "./steps.ts";
import type { SureCell } from "./sure.ts";
import { testedCell } from "./sure-bests.ts";
import { routeOf, type Sweep } from "./sweep.ts";
import { sweepCell } from "./window.ts";
import type { WindowCell } from "./window-cell.ts";

const MINUTE = 60_000;
/** Steps back from the latest departure to the first. */
const STEPS = 144;

/** The latest departures of one route and speed that arrive in time. */
export interface SureInTime {
  readonly route: string;
  readonly speed_m_s: number | null;
  /** By the plain estimate; a member or what-if that arrives too late counts as a stop. */
  readonly plain: SureCell | null;
  /** The latest that holds and arrives in time in every member and what-if; `null` where none does. */
  readonly sure: SureCell | null;
}

/**
 * The latest departures that arrive in time in every member and what-if too: from the latest by the plain estimate back by 144th parts of
 * the time to the first departure, a whole minute at least, until one holds; then halving to the minute. An opening shorter than a step may be missed.
 */
export function* sureInTime(
  sweep: Sweep,
  trials: CellTrials,
  { notAfter, routes }: InTime,
): Steps<SureInTime[]> {
  const found: SureInTime[] = [];
  for (const own of routes) {
    const late = Date.parse(notAfter);
    const latest = yield* latestToHold(sweep, trials, own, late);
    found.push({
      route: own.route,
      speed_m_s: own.speed_m_s,
      plain: yield* testedCell(trials, own.latest, late),
      sure: yield* testedCell(trials, latest, late),
    });
  }
  return found;
}

function* latestToHold(
  sweep: Sweep,
  trials: CellTrials,
  { latest, earliest }: RouteInTime,
  notAfter: number,
): Steps<WindowCell | null> {
  if (latest === null) return null;
  if (yield* trials.holds(latest, notAfter)) return latest;
  const first = Math.ceil(Date.parse(earliest.departure) / MINUTE);
  const last = Math.floor(Date.parse(latest.departure) / MINUTE);
  const step = Math.max(1, Math.ceil((last - first) / STEPS));
  const prepared = routeOf(sweep, latest.route);
  const at = (minute: number) => sweepCell(sweep, prepared, minute * MINUTE, latest.speed_m_s);
  const holds = (minute: number): boolean => runSteps(trials.holds(at(minute), notAfter));
  for (let minute = last; minute >= first; minute -= step) {
    yield;
    if (holds(minute)) return at(lastWhole(holds, minute, Math.min(minute + step, last + 1)));
  }
  return null;
}
