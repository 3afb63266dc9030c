import { findRoot } from "../craft/root.ts";
import { leastOf } from "./least-of.ts";

/*
 * Searches along one variable on a function that has no value at some places, such as the arrival of a route that
 * cannot be sailed at every speed. A scan at given places comes first; what lies wholly between two of them is not seen.
 */

/** A function of one variable; `null` where it has no value. */
export type Measure = (x: number) => number | null;

export interface Sample {
  readonly x: number;
  readonly value: number | null;
}

/** Share of x to which the edge of where a function has values is found; runs beside an edge are the dearest of all. */
const EDGE = 1e-7;
const MOST_HALVINGS = 60;
/** How often a bracket is split where the function turns out to have no value inside it. */
const MOST_SPLITS = 6;

/**
 * Samples a function, and both sides of every edge between a place where it has a value and one where it has none.
 *
 * @param places ascending
 */
export function scan(measure: Measure, places: readonly number[]): Sample[] {
  const samples: Sample[] = [];
  for (const x of places) {
    const sample = { x, value: measure(x) };
    const before = samples[samples.length - 1];
    if (before !== undefined && (before.value === null) !== (sample.value === null))
      samples.push(...edge(measure, before, sample));
    samples.push(sample);
  }
  return samples;
}

/** The two sides of the edge between a sample with a value and one without, in ascending order. */
function edge(measure: Measure, low: Sample, high: Sample): [Sample, Sample] {
  let from = low;
  let to = high;
  for (let n = 0; n < MOST_HALVINGS; n += 1) {
    const x = 0.5 * (from.x + to.x);
    if (to.x - from.x <= EDGE * Math.max(Math.abs(from.x), Math.abs(to.x)) || x <= from.x || x >= to.x) break;
    const middle = { x, value: measure(x) };
    if ((middle.value === null) === (low.value === null)) from = middle;
    else to = middle;
  }
  return [from, to];
}

/**
 * Where a function is zero: one place in every step between neighbouring samples over which its sign changes, ascending.
 *
 * @param accuracy size of the function's value that passes for zero
 */
export function rootsOf(measure: Measure, samples: readonly Sample[], accuracy: number): number[] {
  const isZero = (value: number) => Math.abs(value) <= accuracy;
  return samples.flatMap((sample, index) => {
    if (sample.value === null) return [];
    if (isZero(sample.value)) return [sample.x];
    const before = samples[index - 1];
    if (before === undefined || before.value === null || isZero(before.value)) return [];
    return between(measure, before, sample, accuracy, MOST_SPLITS);
  });
}

function between(measure: Measure, low: Sample, high: Sample, accuracy: number, splits: number): number[] {
  if (low.value === null || high.value === null || low.value > 0 === high.value > 0) return [];
  const seen: { hole: number | null; zero: boolean } = { hole: null, zero: false };
  const residual = (x: number): number => {
    const value = measure(x);
    if (value === null) seen.hole = x;
    seen.zero = value !== null && Math.abs(value) <= accuracy;
    return value === null || seen.zero ? 0 : value;
  };
  const root = findRoot({ residual }, low.x, low.value, high.x, high.value, high.x);
  // Without a value that passes for zero the sign changes at a jump, over which there is no root.
  if (seen.hole === null) return seen.zero || isContinuous(measure, root, accuracy) ? [root] : [];
  if (splits === 0) return [];
  const parts = scan(measure, [low.x, seen.hole, high.x]);
  return parts.flatMap((part, index) => {
    const before = parts[index - 1];
    return before === undefined ? [] : between(measure, before, part, accuracy, splits - 1);
  });
}

/** Whether the value where the bracket closed is zero to within a thousand times the accuracy, not one side of a jump. */
function isContinuous(measure: Measure, root: number, accuracy: number): boolean {
  const value = measure(root);
  return value !== null && Math.abs(value) <= 1000 * accuracy;
}

/** Where a function is least among its surroundings: one place for every sample that is not above its neighbours, ascending. */
export function minimaOf(measure: Measure, samples: readonly Sample[]): number[] {
  return samples.flatMap(({ x, value }, index) => {
    if (value === null) return [];
    const before = samples[index - 1];
    const after = samples[index + 1];
    if (before !== undefined && before.value !== null && before.value <= value) return [];
    if (after !== undefined && after.value !== null && after.value < value) return [];
    const low = before === undefined || before.value === null ? x : before.x;
    const high = after === undefined || after.value === null ? x : after.x;
    return [leastOf((place) => measure(place) ?? Number.POSITIVE_INFINITY, low, x, high)];
  });
}
