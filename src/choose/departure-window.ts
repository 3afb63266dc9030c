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

/** What is wrong with a window. */
export interface WindowFault {
  /** Those of its parts that it lies in. */
  readonly parts: readonly ("from" | "to" | "every" | "speeds")[];
  readonly sentence: string;
}

/**
 * The first thing wrong with a window: it ends before it begins, its step is shorter than a second, a speed is given twice, or it has
 * more than {@link MOST_CELLS} cells; `null` where nothing is.
 *
 * @param routes how many are to be compared
 */
export function windowFault(window: DepartureWindow, routes: number): WindowFault | null {
  const { from, to, every_s, speeds_m_s } = window;
  const found = `found ${writtenInstant(from)} to ${writtenInstant(to)}`;
  if (!(to >= from))
    return {
      parts: ["from", "to"],
      sentence: `a window of departures does not end before it begins; ${found}`,
    };
  const ofStep = stepFault(every_s, `${every_s} s`);
  if (ofStep !== null) return ofStep;
  const speeds = speeds_m_s ?? [0];
  const twice = speeds.find((speed, index) => speeds.indexOf(speed) !== index);
  if (speeds.length === 0)
    return { parts: ["speeds"], sentence: "the speeds of a window are one or more; found none" };
  if (twice !== undefined)
    return { parts: ["speeds"], sentence: `the speeds of a window differ; found ${speedText(twice)} twice` };
  const departures = departureCount(window);
  const cells = departures * routes * speeds.length;
  if (cells <= MOST_CELLS) return null;
  return {
    parts: ["from", "to", "every", "speeds"],
    sentence: `a window has at most ${MOST_CELLS} cells (routes × departures × speeds); found ${routes} × ${departures} × ${speeds.length} = ${cells}: take a longer step or a shorter window`,
  };
}

/** What is wrong with a step, s; `found` is how it was written. */
export function stepFault(every_s: number, found: string): WindowFault | null {
  if (every_s >= 1) return null;
  return {
    parts: ["every"],
    sentence: `the step of a window of departures is at least 1 s; found ${found}`,
  };
}

/**
 * Checks a window before it is worked out.
 *
 * @throws InputError for what {@link windowFault} finds
 */
export function checkWindow(window: DepartureWindow, routes: number): void {
  const fault = windowFault(window, routes);
  if (fault !== null) throw new InputError(fault.sentence);
}
