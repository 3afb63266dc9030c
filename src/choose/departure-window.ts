import { InputError } from "../errors.ts";
import { speedText } from "../estimate/finding-text.ts";
import { writtenInstant } from "../instant.ts";

/** Departures to compare, and speeds where they are to be compared too. */
export interface DepartureWindow {
  /** First and last departure, ms since 1970-01-01T00:00Z; the last is tried where the steps meet it. */
  readonly from: number;
  readonly to: number;
  /** Step, s. */
  readonly every_s: number;
  /** In place of the pace's speed, m/s; `null` for the pace as it is. */
  readonly speeds_m_s: readonly number[] | null;
  /** An arrival to keep, ms since 1970-01-01T00:00Z, for which the latest departure is looked for. */
  readonly arriveBy?: number;
}

/** Most cells (routes × departures × speeds) of a window. */
const MOST_CELLS = 100_000;

/** Number of departures in a window. */
function departureCount({ from, to, every_s }: DepartureWindow): number {
  return Math.floor((to - from) / Math.round(1000 * every_s)) + 1;
}

/**
 * The departures of a window, ms since 1970-01-01T00:00Z, ascending.
 *
 * @example
 * windowDepartures({ from: 0, to: 4000000, every_s: 1800, speeds_m_s: null }) // → [0, 1800000, 3600000]
 */
export function windowDepartures(window: DepartureWindow): number[] {
  const step = Math.round(1000 * window.every_s);
  return Array.from({ length: departureCount(window) }, (_, n) => window.from + n * step);
}

/**
 * Checks a window before it is worked out.
 *
 * @param routes how many are to be compared
 * @throws InputError where it ends before it begins, its step is shorter than a second, a speed is given twice, or it has more than {@link MOST_CELLS} cells
 */
export function checkWindow(window: DepartureWindow, routes: number): void {
  const { from, to, every_s, speeds_m_s } = window;
  if (!(to >= from))
    throw new InputError(
      `a window of departures does not end before it begins; found ${writtenInstant(from)} to ${writtenInstant(to)}`,
    );
  if (!(every_s >= 1))
    throw new InputError(`the step of a window of departures is at least 1 s; found ${every_s} s`);
  const speeds = speeds_m_s ?? [0];
  if (speeds.length === 0) throw new InputError("the speeds of a window are one or more; found none");
  const twice = speeds.find((speed, index) => speeds.indexOf(speed) !== index);
  if (twice !== undefined)
    throw new InputError(`the speeds of a window differ; found ${speedText(twice)} twice`);
  const cells = departureCount(window) * routes * speeds.length;
  if (cells > MOST_CELLS)
    throw new InputError(
      `a window has at most ${MOST_CELLS} cells (routes × departures × speeds); found ${routes} × ${departureCount(window)} × ${speeds.length} = ${cells}: take a longer step or a shorter window`,
    );
}
