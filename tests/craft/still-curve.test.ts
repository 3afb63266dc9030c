import { describe, expect, test } from "vitest";
import type { Craft } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { stillCurve, stillPoint } from "../../src/craft/still-curve.ts";
import { tender } from "./crafts.ts";

const hotel = 0.5;
/** P = 2 V³ with a hotel load: least use per metre where d/dV (2 V² + h/V) = 0, V = (h/4)^(1/3). */
const cube: Craft = {
  ...tender,
  speed_m_s: 4,
  power: cubePower({ referenceSpeed_m_s: 1, referencePower_W: 2, exponent: 3 }),
  windage: null,
  speeds: { min: 0.1, max: 8 },
  hotelPerSecond: hotel,
  storePerRate: 1,
  store: { unit: "J", usable: 1000 },
};

describe("a craft's still curve", () => {
  test("is the model's rate with the hotel load, and that over the speed", () => {
    const curve = stillCurve(cube);
    if (curve === null) throw new Error("a craft with a range has a curve");
    expect(curve.speed_m_s[0]).toBeCloseTo(0.32, 12);
    expect(curve.speed_m_s.at(-1)).toBe(8);
    for (const [n, v] of curve.speed_m_s.entries()) {
      // Both sides are a few roundings from the exact value.
      expect(curve.usePerSecond[n]).toBeCloseTo(2 * v ** 3 + hotel, 9);
      expect(curve.usePerMetre[n]).toBeCloseTo(2 * v ** 2 + hotel / v, 9);
    }
  });

  test("ends at the table's rows, and has none where nothing bounds the speed", () => {
    expect(stillCurve(tender)?.speed_m_s.at(-1)).toBe(
      Math.min(tender.power.max, tender.speeds?.max ?? Infinity),
    );
    expect(stillCurve({ ...cube, speeds: null })?.speed_m_s.at(-1)).toBe(6);
    expect(stillCurve({ ...cube, speeds: null, speed_m_s: null })).toBeNull();
  });
});

describe("a pace in a still medium", () => {
  test("lasts as long and as far as the usable store at its rate", () => {
    const point = stillPoint(cube, { hold: "through-speed", speed_m_s: 3 });
    const rate = 2 * 27 + hotel;
    expect(point?.usePerSecond).toBeCloseTo(rate, 9);
    expect(point?.endurance_s).toBeCloseTo(1000 / rate, 9);
    expect(point?.range_m).toBeCloseTo(3000 / rate, 9);
  });

  test("of least energy is where the curve per metre is least", () => {
    const point = stillPoint(cube, { hold: "least-energy" });
    // The solver refines the speed to rounding of a flat minimum.
    expect(point?.speed_m_s).toBeCloseTo((hotel / 4) ** (1 / 3), 6);
  });

  test("is none where a table has no value at its speed", () => {
    expect(stillPoint(tender, { hold: "through-speed", speed_m_s: tender.power.max + 1 })).toBeNull();
  });
});
