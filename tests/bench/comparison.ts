import type { Timing } from "./timing.ts";

/** One line of the results: a figure of ours against a peer's or against a limit. */
export interface Comparison {
  readonly what: string;
  readonly ours: string;
  readonly peer: string;
  readonly ratio: string;
  /** What the ratio, or our figure, has to be; empty where it is there to be seen alone. */
  readonly goal: string;
  readonly met: boolean | null;
}

/** What a part of the benchmarks hands back. */
export interface Part {
  readonly comparisons: readonly Comparison[];
  readonly timings: readonly Timing[];
}

/**
 * How many times our speed is a peer's, by the least times, which noise disturbs least.
 *
 * @param goal least ratio asked for, `null` for none
 * @param unit divisor and name for showing the times, e.g. 1e-3 and "ms"
 */
export function faster(
  what: string,
  ours: Timing,
  peer: Timing,
  goal: number | null,
  unit: readonly [number, string],
): Comparison {
  const ratio = peer.least / ours.least;
  return {
    what,
    ours: spread(ours, unit),
    peer: `${peer.name}: ${spread(peer, unit)}`,
    ratio: `${figure(ratio)} × as fast (means: ${figure(peer.mean / ours.mean)})`,
    goal: goal === null ? "" : `at least ${figure(goal)} ×`,
    met: goal === null ? null : ratio >= goal,
  };
}

/** A figure that must not pass a limit. */
export function atMost(
  what: string,
  value: number,
  limit: number,
  unit: string,
  peer = "",
  ratio = "",
): Comparison {
  const suffix = unit === "" ? "" : ` ${unit}`;
  const goal = `at most ${figure(limit)}${suffix}`;
  return { what, ours: `${figure(value)}${suffix}`, peer, ratio, goal, met: value <= limit };
}

/** Least time, then mean and standard deviation. */
export function spread({ least, mean, deviation }: Timing, [scale, name]: readonly [number, string]): string {
  return `${figure(least / scale)} ${name} (${figure(mean / scale)} ± ${figure(deviation / scale)})`;
}

/** Three significant digits. */
export function figure(value: number): string {
  if (value === 0 || (Math.abs(value) >= 1e-3 && Math.abs(value) < 1e5)) {
    const digits = Math.max(0, 2 - Math.floor(Math.log10(Math.abs(value) || 1)));
    return String(Number(value.toFixed(digits)));
  }
  return value.toExponential(1);
}
