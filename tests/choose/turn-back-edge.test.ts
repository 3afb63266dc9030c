import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { bracketEdge } from "../../src/choose/turn-back-edge.ts";

describe("the bracket of an edge", () => {
  test("holds a zero of a random monotone cubic between its sides, as near as asked", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.01, max: 0.99, noNaN: true }),
        fc.double({ min: 0, max: 50, noNaN: true }),
        fc.boolean(),
        (root, bend, falls) => {
          const sign = falls ? -1 : 1;
          const f = (x: number) => sign * (x - root + bend * (x - root) ** 3);
          const { inside, outside } = bracketEdge(f, 1, f(0), f(1), 1e-9, 1e-3);
          expect(Math.abs(inside - outside)).toBeLessThanOrEqual(1e-9);
          expect(f(inside) >= 0).toBe(f(0) >= 0);
          expect(f(outside) >= 0).toBe(f(1) >= 0);
        },
      ),
      { numRuns: 200 },
    );
  });

  test("finds where a function has no value any more, to the coarse width", () => {
    const f = (x: number) => (x < 731.4 ? 5 + x : null);
    const { inside, outside } = bracketEdge(f, 1000, 5, null, 1e-6, 1);
    expect(inside).toBeLessThan(731.4);
    expect(outside).toBeGreaterThanOrEqual(731.4);
    expect(outside - inside).toBeLessThanOrEqual(1);
  });

  test("finds a zero that comes before the place without values, to the fine width", () => {
    const f = (x: number) => (x < 900 ? 300 - x : null);
    const { inside, outside } = bracketEdge(f, 1000, 300, null, 1e-6, 1);
    expect(inside).toBeLessThanOrEqual(300);
    expect(outside).toBeGreaterThan(300);
    expect(outside - inside).toBeLessThanOrEqual(1e-6);
  });

  test("ends at a value that is near enough", () => {
    const tried: number[] = [];
    const f = (x: number) => {
      tried.push(x);
      return Math.abs(x - 0.5) < 0.01 ? 0 : 0.5 - x;
    };
    const { inside } = bracketEdge(f, 1, 0.5, -0.5, 1e-12, 1, 0);
    expect(Math.abs(inside - 0.5)).toBeLessThan(0.01);
    expect(tried).toHaveLength(1);
  });
});
