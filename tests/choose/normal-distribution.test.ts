import { describe, expect, test } from "vitest";
import { erfc, normalProbability, normalQuantile } from "../../src/choose/normal-distribution.ts";

// SciPy 1.10: [(x, scipy.special.erfc(x)) for x in (...)] and scipy.stats.norm.cdf
const ERFC: readonly [number, number][] = [
  [-3.0, 1.9999779095030015],
  [-0.5, 1.5204998778130465],
  [0.0, 1.0],
  [1e-10, 0.999999999887162],
  [0.1, 0.8875370839817152],
  [0.5, 0.4795001221869535],
  [1.0, 0.15729920705028516],
  [1.5, 0.03389485352468927],
  [1.9, 0.007209570764742531],
  [1.999, 0.0046984433486294865],
  [2.0, 0.004677734981047266],
  [2.5, 0.00040695201744495886],
  [3.0, 2.2090496998585445e-5],
  [5.0, 1.5374597944280347e-12],
  [10.0, 2.0884875837625446e-45],
  [20.0, 5.395865611607901e-176],
  [26.0, 5.663192408856145e-296],
];
const PHI: readonly [number, number][] = [
  [-8.0, 6.22096057427174e-16],
  [-3.0, 0.0013498980316300933],
  [-1.0, 0.15865525393145707],
  [0.0, 0.5],
  [0.6744897501960817, 0.75],
  [1.2815515655446004, 0.8999999999999999],
  [1.959963984540054, 0.975],
  [3.0, 0.9986501019683699],
];

describe("the complementary error function", () => {
  test.each(ERFC)("at %d is SciPy's %d", (x, value) => {
    // 1 - erf loses the digits that erfc(1.5) = 0.034 is smaller by.
    expect(Math.abs(erfc(x) / value - 1)).toBeLessThan(1e-14);
  });

  test("and the normal probability of opposite arguments add up to 2, and to 1", () => {
    for (const x of [0, 1e-9, 0.3, 1, 1.9999, 2, 2.0001, 5, 20]) {
      expect(erfc(x) + erfc(-x)).toBe(2);
      expect(normalProbability(x) + normalProbability(-x)).toBeCloseTo(1, 15);
    }
  });

  test.each(PHI)("gives the normal probability of %d as SciPy's %d", (z, value) => {
    // exp(-z²/2) at z = -8 multiplies the rounding of its argument by 32.
    expect(Math.abs(normalProbability(z) / value - 1)).toBeLessThan(4e-14);
  });

  test.each(PHI)("of %d is %d, of which the quantile is the former", (z, value) => {
    // A rounding of the probability moves z by as much over the density, 0.0044 at z = 3.
    expect(Math.abs(normalQuantile(value) - z)).toBeLessThan(5e-14);
  });

  test("falls from 2 to 0 and ends there without NaN", () => {
    expect(erfc(Number.NEGATIVE_INFINITY)).toBe(2);
    expect(erfc(Number.POSITIVE_INFINITY)).toBe(0);
    expect(erfc(40)).toBe(0);
  });
});
