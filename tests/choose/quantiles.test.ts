import { describe, expect, test } from "vitest";
import { quantiles } from "../../src/choose/quantiles.ts";

describe("quantiles", () => {
  // numpy.quantile(figures, [0, 0.1, 0.5, 0.9, 1]), NumPy 1.24.2, whose default is Hyndman & Fan's definition 7.
  test.each([
    [[5], [5, 5, 5, 5, 5]],
    [
      [2, 1],
      [1, 1.1, 1.5, 1.9, 2],
    ],
    [
      [3.5, -1.25, 8, 0.5],
      [-1.25, -0.7249999999999999, 2, 6.65, 8],
    ],
    [
      [7, 1, 9, 4, 4, 2, 11],
      [1, 1.6, 4, 9.8, 11],
    ],
    [Array.from({ length: 50 }, (_, n) => n), [0, 4.9, 24.5, 44.1, 49]],
  ])("of %j are NumPy's", (figures, [min, p10, p50, p90, max]) => {
    const found = quantiles(figures);
    expect(found?.min).toBe(min);
    expect(found?.p10).toBeCloseTo(p10 as number, 14);
    expect(found?.p50).toBeCloseTo(p50 as number, 14);
    expect(found?.p90).toBeCloseTo(p90 as number, 13);
    expect(found?.max).toBe(max);
  });

  test("of nothing are nothing, and the figures stay in their order", () => {
    expect(quantiles([])).toBeNull();
    const figures = [3, 1, 2];
    quantiles(figures);
    expect(figures).toEqual([3, 1, 2]);
  });
});
