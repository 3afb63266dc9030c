import type { Reserve } from "../craft/craft.ts";
import type { RouteEstimate } from "../estimate/result.ts";
import type { Covariance, ErrorCovariance } from "./error-covariance.ts";
import type { DelayWeights, Sensitivities } from "./sensitivity.ts";

/** Standard deviations of a leg's figures under the forecast's stated error: s, and store units. */
export interface LegSpread {
  readonly leg: number;
  /** Of the time under way and of the use on the leg. */
  readonly time_s: number;
  readonly use: number;
  /** Of the arrival at its waypoint, and of what is left after it. */
  readonly arrival_s: number;
  readonly remaining: number;
}

/** Every leg's deviations, and that of what is left above the reserve at the end. */
export function legSpreads(
  estimate: RouteEstimate,
  found: Sensitivities,
  covariance: ErrorCovariance,
  reserve: Reserve | null,
): { readonly legs: readonly LegSpread[]; readonly margin: number } {
  const legs: LegSpread[] = [];
  const sum: Covariance = { tt: 0, tu: 0, uu: 0 };
  let before: DelayWeights = { time: 1, use: 0 };
  let margin = 0;
  for (const [index, { own, before: mixed }] of covariance.legs.entries()) {
    const end = found.delayAtLegEnd[index] as DelayWeights;
    const blocks: Blocks = { sum, own, mixed };
    const { time, use, arrival, spent } = legWeights(before, end);
    legs.push({
      leg: index + 1,
      time_s: deviation(blocks, time),
      use: deviation(blocks, use),
      arrival_s: deviation(blocks, arrival),
      remaining: deviation(blocks, spent),
    });
    margin = deviation(blocks, marginWeights(estimate, reserve, time, use, spent));
    sum.tt += 2 * mixed.tt + own.tt;
    sum.uu += 2 * mixed.uu + own.uu;
    sum.tu += mixed.tu + mixed.ut + own.tu;
    before = end;
  }
  return { legs, margin };
}

/**
 * Weights of the whole route's sensitivities T and U in what holds at a leg's end: with μ and ν there, a delay is T/μ and the use
 * U - (ν/μ) T. What the leg takes and spends itself is that less the same at its start.
 */
function legWeights(start: DelayWeights, end: DelayWeights) {
  const slope = -end.use / end.time;
  return {
    time: { bt: 1 / end.time - 1 / start.time, bu: 0, ot: 1 / end.time, ou: 0 },
    use: { bt: slope + start.use / start.time, bu: 0, ot: slope, ou: 1 },
    arrival: { bt: 1 / end.time, bu: 0, ot: 1 / end.time, ou: 0 },
    spent: { bt: slope, bu: 1, ot: slope, ou: 1 },
  };
}

/** Weights of time and use on the legs before (b) and on the leg itself (o). */
interface Weights {
  readonly bt: number;
  readonly bu: number;
  readonly ot: number;
  readonly ou: number;
}

interface Blocks {
  /** Among the legs before, between them and the leg, and within the leg. */
  readonly sum: Covariance;
  readonly mixed: ErrorCovariance["legs"][number]["before"];
  readonly own: Covariance;
}

/**
 * What is left above the reserve, on the last leg. A reserve of a time R at the leg's rate u/t moves by R (δu/t - u δt/t²); a
 * stay at the last waypoint counts with the leg here.
 */
function marginWeights(
  estimate: RouteEstimate,
  reserve: Reserve | null,
  time: Weights,
  use: Weights,
  spent: Weights,
): Weights {
  const last = estimate.legs[estimate.legs.length - 1];
  if (reserve?.kind !== "time" || !last?.time_s) return spent;
  const perUse = reserve.time_s / last.time_s;
  const perTime = -(estimate.reserve as number) / last.time_s;
  const weight = (key: keyof Weights) => spent[key] + perUse * use[key] + perTime * time[key];
  return { bt: weight("bt"), bu: weight("bu"), ot: weight("ot"), ou: weight("ou") };
}

/** Standard deviation of bt T + bu U over the legs before plus ot T + ou U on the leg. */
function deviation({ sum, mixed, own }: Blocks, { bt, bu, ot, ou }: Weights): number {
  const before = bt * bt * sum.tt + 2 * bt * bu * sum.tu + bu * bu * sum.uu;
  const between = bt * ot * mixed.tt + bt * ou * mixed.tu + bu * ot * mixed.ut + bu * ou * mixed.uu;
  const here = ot * ot * own.tt + 2 * ot * ou * own.tu + ou * ou * own.uu;
  // Rounding may leave a variance of nothing a hair below 0.
  return Math.sqrt(Math.max(0, before + 2 * between + here));
}
