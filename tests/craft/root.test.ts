import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { findRoot } from "../../src/craft/root.ts";

function counted(f: (x: number) => number) {
  return {
    calls: 0,
    residual(x: number) {
      this.calls++;
      return f(x);
    },
  };
}

describe("findRoot", () => {
  test("finds simple roots to rounding in few steps", () => {
    const cases: [(x: number) => number, number, number, number][] = [
      [(x) => x * x - 2, 0, 2, Math.SQRT2],
      [(x) => Math.exp(x) - 5, 0, 4, Math.log(5)],
      [(x) => Math.cos(x), 0, 3, Math.PI / 2],
      [(x) => x ** 3 - 1e-9, 0, 1, 1e-3],
    ];
    for (const [f, low, high, root] of cases) {
      const of = counted(f);
      expect(Math.abs(findRoot(of, low, f(low), high, f(high), high) / root - 1)).toBeLessThanOrEqual(4e-16);
      expect(of.calls).toBeLessThan(25);
    }
  });

  test("takes an end that is a root at once", () => {
    const of = counted((x) => x);
    expect(findRoot(of, 0, 0, 1, 1, 1)).toBe(0);
    expect(findRoot(of, -1, -1, 0, 0, 1)).toBe(0);
    expect(of.calls).toBe(0);
  });

  test("finds the jump where the residual jumps through zero", () => {
    const f = (x: number) => (x < Math.E ? -1 : 3);
    expect(findRoot(counted(f), 0, -1, 10, 3, 10)).toBeCloseTo(Math.E, 14);
  });

  test("never leaves its bracket, and the sign changes where it stops", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.001, max: 0.999, noNaN: true }),
        fc.integer({ min: 1, max: 9 }),
        fc.double({ min: -8, max: 8, noNaN: true }),
        (at, power, skew) => {
          const f = (x: number) => Math.sign(x - at) * Math.abs(x - at) ** power * Math.exp(skew * x);
          const root = findRoot(counted(f), 0, f(0), 1, f(1), 1);
          expect(root).toBeGreaterThanOrEqual(0);
          expect(root).toBeLessThanOrEqual(1);
          // The bracket closes to two units in the last place on either side.
          expect(Math.abs(root - at)).toBeLessThanOrEqual(4 * Number.EPSILON * at);
        },
      ),
      { numRuns: 1000 },
    );
  });
});
