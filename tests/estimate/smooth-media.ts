import { expect } from "vitest";
import { STATION_X } from "../../src/estimate/gauss-kronrod.ts";
import { BENDS, PAIR } from "../../src/estimate/smooth-pair.ts";
import { POINT_STATIONS } from "../../src/estimate/smooth-rule.ts";

/* Media for smooth steps by formula, and what holds over them by other methods. */

/** Speed through the medium, m/s. */
export const SPEED = 10;

/** A component of the medium by the place ξ = -1..1 of the step and the share 0..1 of the way from slice to slice, m/s. */
export type Component = (x: number, share: number) => number;
export const none: Component = () => 0;

/** The pair that columns of this medium have. */
export function pairOf(along: Component, cross: Component): Float64Array {
  const pair = new Float64Array(PAIR);
  POINT_STATIONS.forEach((station, n) => {
    const x = STATION_X[station] as number;
    pair.set([along(x, 0), along(x, 1) - along(x, 0), cross(x, 0), cross(x, 1) - cross(x, 0)], 4 * n);
  });
  const bend = (component: Component, share: number) =>
    (component(1, share) + component(-1, share)) / 2 - component(0, share);
  pair.set(
    [along, cross].flatMap((component) => [bend(component, 0), bend(component, 1) - bend(component, 0)]),
    BENDS,
  );
  return pair;
}

export interface Way {
  readonly length: number;
  readonly perSecond?: number;
  readonly share?: number;
}

/** The distance gone after a time falls short of the length by nothing at the answer: by bisection. */
export function timeTo(length: number, distance: (time: number) => number): number {
  let [low, high] = [0, length];
  for (let n = 0; n < 200; n += 1) {
    const middle = (low + high) / 2;
    if (distance(middle) < length) low = middle;
    else high = middle;
  }
  return low;
}

/** Numbers -1..1 in a row that is always the same: Lehmer's generator. */
export function numbers(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 48271) % 2147483647;
    return (2 * state) / 2147483647 - 1;
  };
}

/** A medium that is a parabola in each of the two slices, by random numbers: its bends are `rough` m/s at most. */
export function randomMedium(next: () => number, rough: number): { along: Component; cross: Component } {
  const quadratic = () => [2 * next(), next(), next()] as const;
  const [first, second, third, last] = [quadratic(), quadratic(), quadratic(), quadratic()];
  const at = ([a, b, c]: typeof first, x: number) => a + rough * (b * x + c * x * x);
  const mix = (share: number, a: number, b: number) => a + share * (b - a);
  return {
    along: (x, share) => mix(share, at(first, x), at(second, x)),
    cross: (x, share) => mix(share, at(third, x), at(last, x)),
  };
}

/** Whether the medium of both slices stays below nine tenths of the speed. */
export function isWithinReach(along: Component, cross: Component): boolean {
  return [-1, -0.5, 0, 0.5, 1].every((x) =>
    [0, 1].every((share) => Math.hypot(along(x, share), cross(x, share)) <= 0.9 * SPEED),
  );
}

/** Runge and Kutta's method of the fourth order, 1,000 steps: right to 1e-13 or so. */
export function marched(
  along: Component,
  cross: Component,
  { length, perSecond = 0, share = 0 }: Way,
): number {
  const steps = 1000;
  const slowness = (s: number, time: number) => {
    const [x, part] = [(2 * s) / length - 1, share + perSecond * time];
    const c = cross(x, part);
    return 1 / (along(x, part) + Math.sqrt((SPEED - c) * (SPEED + c)));
  };
  const h = length / steps;
  let time = 0;
  for (let n = 0; n < steps; n += 1) {
    const k1 = slowness(n * h, time);
    const k2 = slowness((n + 0.5) * h, time + (h / 2) * k1);
    const k3 = slowness((n + 0.5) * h, time + (h / 2) * k2);
    const k4 = slowness((n + 1) * h, time + h * k3);
    time += (h / 6) * (k1 + 2 * k2 + 2 * k3 + k4);
  }
  return time;
}

/** Holds a figure, which has to be there, against the exact one: the tolerance is a share of it. */
export function expectClose(actual: number | undefined, exact: number, tolerance: number): void {
  expect(Math.abs((actual ?? Number.NaN) - exact) / exact).toBeLessThan(tolerance);
}
