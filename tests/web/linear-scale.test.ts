import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { linearScale } from "../../web/format/linear-scale.ts";
import { areaPath, linePath } from "../../web/format/svg-path.ts";

describe("a linear scale", () => {
  test("takes the ends of the domain to the ends of the range, and what is between in proportion", () => {
    const scale = linearScale([10, 30], [200, 0]);
    expect([10, 15, 30, 40].map(scale)).toEqual([200, 150, 0, -100]);
  });

  test("takes back what it took there", () => {
    const scale = linearScale([0, 7], [8, 632]);
    for (const value of [0, 0.1, 3, 7]) expect(scale.invert(scale(value))).toBeCloseTo(value, 12);
  });

  test.each([
    [0, 10, 5, [0, 2, 4, 6, 8, 10]],
    [0, 1, 10, [0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.7, 0.8, 0.9, 1]],
    [0, 0.07, 7, [0, 0.01, 0.02, 0.03, 0.04, 0.05, 0.06, 0.07]],
    [-3, 4, 3, [-2, 0, 2, 4]],
    [0, 3040, 6, [0, 500, 1000, 1500, 2000, 2500, 3000]],
    [0.2, 0.3, 2, [0.2, 0.25, 0.3]],
  ])("has round ticks from %d to %d, about %d", (from, to, count, ticks) => {
    expect(linearScale([from, to], [0, 1]).ticks(count)).toEqual(ticks);
  });

  test("has its ticks inside the domain, evenly apart, at most √2.5 times as many as asked for, and one", () => {
    fc.assert(
      fc.property(
        fc.double({ min: -1e6, max: 1e6, noNaN: true }),
        fc.double({ min: 1e-3, max: 1e6, noNaN: true }),
        fc.integer({ min: 1, max: 20 }),
        (from, span, count) => {
          const ticks = linearScale([from, from + span], [0, 1]).ticks(count);
          // The step is at least the rough one divided by √2.5, which is between steps of 2 and of 5.
          expect(ticks.length).toBeLessThanOrEqual(Math.sqrt(2.5) * count + 1.001);
          for (const tick of ticks) {
            expect(tick).toBeGreaterThanOrEqual(from - span * 1e-8);
            expect(tick).toBeLessThanOrEqual(from + span * (1 + 1e-8));
          }
        },
      ),
      { numRuns: 300 },
    );
  });

  test("has no ticks where the domain has no length", () => {
    expect(linearScale([0, 0], [0, 1]).ticks(4)).toEqual([]);
  });
});

test("a path runs through its points, an area comes back along its level", () => {
  const x = (at: number) => at * 10;
  const y = (at: number) => at / 3;
  expect(linePath(3, x, y)).toBe("M0 0L10 0.333L20 0.667");
  expect(areaPath(3, x, y, 5)).toBe("M0 0L10 0.333L20 0.667V5H0Z");
  expect(linePath(0, x, y) + areaPath(0, x, y, 5)).toBe("");
});
