import { describe, expect, test } from "vitest";
import {
  AT_END,
  FIRST_NODE,
  GAUSS_WEIGHT,
  INTEGRAL_TO_STATION,
  KRONROD_WEIGHT,
  LAST_NODE,
  STATION_X,
  STATIONS,
} from "../../src/estimate/gauss-kronrod.ts";

const sum = (weights: Float64Array, power: number) =>
  weights.reduce((so, weight, i) => so + weight * (STATION_X[i] as number) ** power, 0);
const exact = (power: number) => (power % 2 === 0 ? 2 / (power + 1) : 0);

describe("the Gauss-Kronrod pair of 4 and 9 nodes", () => {
  test.each(Array.from({ length: 14 }, (_, n) => n))("Kronrod's sum is exact for x^%i", (power) => {
    // Nine products of numbers below 1.
    expect(Math.abs(sum(KRONROD_WEIGHT, power) - exact(power))).toBeLessThan(3e-15);
  });

  test("and for no even power beyond 13: it is the extension of degree 13, not a longer rule", () => {
    expect(Math.abs(sum(KRONROD_WEIGHT, 14) - exact(14))).toBeGreaterThan(1e-6);
  });

  test.each([0, 1, 2, 3, 4, 5, 6, 7])("Gauss's sum is exact for x^%i", (power) => {
    expect(Math.abs(sum(GAUSS_WEIGHT, power) - exact(power))).toBeLessThan(3e-15);
  });

  test("integrals up to each station are exact for degree 8", () => {
    for (let i = 0; i < STATIONS; i += 1) {
      for (let power = 0; power <= 8; power += 1) {
        let integral = 0;
        for (let j = FIRST_NODE; j <= LAST_NODE; j += 1)
          integral += (INTEGRAL_TO_STATION[i * STATIONS + j] as number) * (STATION_X[j] as number) ** power;
        const from = (-1) ** (power + 1);
        const expected = ((STATION_X[i] as number) ** (power + 1) - from) / (power + 1);
        expect(Math.abs(integral - expected)).toBeLessThan(5e-15);
      }
    }
  });

  test("the nodes' polynomial at the end is exact for degree 8", () => {
    for (let power = 0; power <= 8; power += 1) expect(sum(AT_END, power)).toBeCloseTo(1, 13);
  });
});
