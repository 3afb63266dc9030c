import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { leastOf } from "../../src/choose/least-of.ts";
import { leastWhole } from "../../src/choose/least-whole.ts";
import { minimaOf, rootsOf, scan } from "../../src/choose/line-search.ts";
import { spaced } from "../estimate/fixtures.ts";

describe("a scan of a function that has no value at some places", () => {
  const hole = (x: number) => (x > 2.2 && x < 3.7 ? null : Math.sin(x));

  test("finds both sides of every edge to a ten-millionth", () => {
    const samples = scan(hole, spaced(0, 6, 6));
    const edges = samples.filter(({ x }) => Math.abs(x - 2.2) < 1e-6 || Math.abs(x - 3.7) < 1e-6);
    expect(edges.map(({ value }) => value === null)).toEqual([false, true, true, false]);
    for (const { x } of edges) expect(Math.min(Math.abs(x - 2.2), Math.abs(x - 3.7))).toBeLessThan(5e-7);
    expect(samples.map(({ x }) => x)).toEqual([...samples.map(({ x }) => x)].sort((a, b) => a - b));
  });

  test("gives every root that the steps part, and none inside the hole", () => {
    const roots = rootsOf(hole, scan(hole, spaced(-1, 7, 20)), 1e-12);
    expect(roots).toHaveLength(2);
    expect(roots[0]).toBeCloseTo(0, 10);
    expect(roots[1]).toBeCloseTo(2 * Math.PI, 10);
  });

  test("finds a root beside a hole that the bracket meets only on its way", () => {
    // Both ends have values of different signs; the chord's first step falls into the hole.
    const measure = (x: number) => (x > 0.45 && x < 0.55 ? null : x - 0.6);
    const roots = rootsOf(measure, scan(measure, [0.1, 1]), 1e-12);
    expect(roots).toHaveLength(1);
    expect(roots[0]).toBeCloseTo(0.6, 10);
  });

  test("takes a jump through zero for no root", () => {
    const jump = (x: number) => (x < 1 / 3 ? -1 : 1);
    expect(rootsOf(jump, scan(jump, spaced(0, 1, 5)), 1e-9)).toEqual([]);
  });

  test("gives the foot of every valley, and ends where the function still falls", () => {
    const measure = (x: number) => Math.cos(x);
    const feet = minimaOf(measure, scan(measure, spaced(1, 14, 26)));
    expect(feet).toHaveLength(3);
    expect(feet[0]).toBeCloseTo(Math.PI, 6);
    expect(feet[1]).toBeCloseTo(3 * Math.PI, 6);
    expect(feet[2]).toBe(14);
  });

  test("a constant has one foot", () => {
    expect(
      minimaOf(
        () => 1,
        scan(() => 1, [1, 2, 3]),
      ),
    ).toHaveLength(1);
  });
});

describe("the least of a function", () => {
  test("of a valley is found to the square root of the rounding error", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.2, max: 9, noNaN: true }),
        fc.double({ min: 0.1, max: 9.9, noNaN: true }),
        (foot, best) => {
          const at = leastOf((x) => (x - foot) ** 2 * (1 + 0.1 * x), 0, best, 10);
          expect(Math.abs(at - foot)).toBeLessThan(1e-6);
        },
      ),
      { numRuns: 200 },
    );
  });

  test("is never worse than the place given, even where nearly all is infinite", () => {
    const spike = (x: number) => (Math.abs(x - 7.3) < 1e-3 ? x : Number.POSITIVE_INFINITY);
    expect(spike(leastOf(spike, 0, 7.3, 10))).toBeLessThanOrEqual(7.3);
  });

  test("among whole numbers is that of trying all, for one valley", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -50, max: 50 }),
        fc.integer({ min: 0, max: 200 }),
        fc.double({ min: -60, max: 260, noNaN: true }),
        (low, span, foot) => {
          const of = (n: number) => Math.abs(n - foot);
          const all = Array.from({ length: span + 1 }, (_, n) => low + n);
          const least = Math.min(...all.map(of));
          expect(of(leastWhole(of, low, low, low + span))).toBe(least);
        },
      ),
      { numRuns: 300 },
    );
  });

  test("of equals is the lowest, whatever the last bits say, and a level above the least hides nothing", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: -500, max: 500 }),
        fc.integer({ min: 5, max: 500 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.nat(1_000_000),
        (low, span, share, seed) => {
          const noise = (n: number) => 1 + Number.EPSILON * ((seed * Math.abs(n + 3)) % 7);
          const near = low + share * span;
          expect(leastWhole((n) => 2e4 * noise(n), low, near, low + span)).toBe(low);
          // Level but for a valley of 5 around the place near which it is sought.
          // Rounding from below zero gives -0, which is no other whole number.
          const foot = Math.round(near) + 0;
          const of = (n: number) => (Math.abs(n - foot) > 5 ? 2e4 : 1e4 + Math.abs(n - foot)) * noise(n);
          expect(leastWhole(of, low, foot, low + span)).toBe(foot);
        },
      ),
      { numRuns: 200, endOnFailure: true, examples: [[-499, 499, 0.9999999999999994, 999_985]] },
    );
  });

  test("between no whole numbers is a defect", () => {
    expect(() => leastWhole((n) => n, 3, 3, 2)).toThrow("no whole number");
  });
});
