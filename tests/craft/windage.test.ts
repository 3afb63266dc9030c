import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { climbPower, stayRate, storeRate } from "../../src/craft/consumption.ts";
import { tablePower } from "../../src/craft/table.ts";
import { checkWindage, windagePower, windageResistance } from "../../src/craft/windage.ts";
import { InputError } from "../../src/errors.ts";
import { aeroplane, barge, craftWith, drone, tender, windage } from "./crafts.ts";

const half = 0.5 * 1.225 * 7 * 0.9;

describe("windageResistance", () => {
  test("is nil in still air: that part belongs to the calm-water curve", () => {
    expect(windageResistance(windage, 0, 0, 6, 0, 1, 0, 1)).toBeCloseTo(0, 12);
  });

  test("is ½ρAC((W + g)² - g²) into the wind and ½ρAC((g - W)² - g²) before it", () => {
    expect(windageResistance(windage, 0, -8, 5, 0, 1, 0, 1)).toBeCloseTo(half * (13 ** 2 - 5 ** 2), 10);
    expect(windageResistance(windage, 0, 3, 5, 0, 1, 0, 1)).toBeCloseTo(half * (2 ** 2 - 5 ** 2), 10);
  });

  test("pushes where the wind overtakes", () => {
    expect(windageResistance(windage, 0, 12, 5, 0, 1, 0, 1)).toBeCloseTo(-half * (7 ** 2 + 5 ** 2), 10);
  });

  test("of a wind abeam is the fore-and-aft share of |W|²: |W| g - g²", () => {
    expect(windageResistance(windage, 9, 0, 5, 0, 1, 0, 1)).toBeCloseTo(
      half * (Math.hypot(9, 5) * 5 - 25),
      10,
    );
  });

  test("does not change when everything turns together", () => {
    const angle = fc.double({ min: 0, max: 7, noNaN: true });
    const wind = fc.double({ min: -30, max: 30, noNaN: true });
    fc.assert(
      fc.property(angle, wind, wind, (turn, u, v) => {
        const s = Math.sin(turn);
        const c = Math.cos(turn);
        const upright = windageResistance(windage, u, v, 4, 0, 1, 0.28, 0.96);
        const turned = windageResistance(
          windage,
          u * c + v * s,
          v * c - u * s,
          4,
          s,
          c,
          0.28 * c + 0.96 * s,
          0.96 * c - 0.28 * s,
        );
        // Rounding of the squares of at most 45 m/s, times ½ρAC.
        expect(Math.abs(turned - upright)).toBeLessThan(1e-11);
      }),
      { numRuns: 1000 },
    );
  });

  test("times V over the efficiency is power", () => {
    expect(windagePower(windage, 300, 4)).toBeCloseTo((300 * 4) / 0.6, 10);
  });

  test.each([
    [{ frontalArea_m2: 0 }, "windage: frontal area is a finite number above 0; found 0 m2"],
    [{ dragCoefficient: Number.NaN }, "windage: drag coefficient is a finite number above 0; found NaN"],
    [{ efficiency: 60 }, "windage: efficiency is above 0 and at most 1; found 60"],
    [{ airDensity_kg_m3: -1 }, "windage: air density is a finite number above 0; found -1 kg/m3"],
  ])("is refused for %j", (fault, message) => {
    expect(() => checkWindage({ ...windage, ...fault })).toThrow(new InputError(message));
  });
});

describe("storeRate", () => {
  test("is the model's rate, the extra power and the hotel load in store units", () => {
    expect(storeRate(barge, 5)).toBe(40800);
    expect(storeRate(barge, 5, 1000)).toBe(41800);
    const diesel = craftWith(barge.power, { storePerRate: 6e-8, storePerJoule: 6e-8, hotelPerSecond: 1e-4 });
    expect(storeRate(diesel, 5, 1000)).toBeCloseTo(41000 * 6e-8 + 1e-4, 18);
  });

  test("never counts propulsion below zero, however hard the wind pushes", () => {
    expect(storeRate(barge, 5, -1e9)).toBe(800);
  });

  test("of a fuel-rate model takes extra power only with a specific consumption", () => {
    const fuelTable = tablePower("kg/s", [
      { speed_m_s: 0, rate: 0.001 },
      { speed_m_s: 6, rate: 0.03 },
    ]);
    const craft = craftWith(fuelTable, { storePerJoule: null, hotelPerSecond: 0.0005 });
    expect(storeRate(craft, 6)).toBe(0.0305);
    expect(() => storeRate(craft, 6, 10)).toThrow(InputError);
  });
});

describe("climbPower", () => {
  test("is m g₀ times the rate of climb over the efficiency, and nothing comes back descending", () => {
    expect(climbPower(drone, 3)).toBeCloseTo((2 * 9.80665 * 3) / 0.8, 12);
    expect(climbPower(drone, -3)).toBe(0);
    expect(climbPower(barge, 3)).toBe(0);
  });

  test("over a height is m g₀ h, whatever the rate: 10 kg through 100 m is 9806.65 J", () => {
    const lifter = { ...drone, power: { ...drone.power, climbForce: 10 * 9.80665 } };
    for (const rate of [0.5, 2, 7]) expect(climbPower(lifter, rate) * (100 / rate)).toBeCloseTo(9806.65, 9);
  });
});

describe("stayRate", () => {
  test("in water is the hotel load alone", () => {
    expect(stayRate(tender, 3)).toBe(800);
  });

  test("of a rotor is the power of hovering against the wind", () => {
    expect(stayRate(drone, 0)).toBe(drone.power.perSecond(0) + 5);
    expect(stayRate(drone, 9)).toBe(drone.power.perSecond(9) + 5);
  });

  test("is null where the power model has no value at the wind's speed", () => {
    const short = craftWith(
      tablePower("W", [
        { speed_m_s: 2, rate: 100 },
        { speed_m_s: 12, rate: 500 },
      ]),
      { moves: "air" },
    );
    expect(stayRate(short, 12)).toBe(1300);
    expect(stayRate(short, 12.0001)).toBeNull();
    expect(stayRate(short, 1)).toBeNull();
    expect(stayRate(short, Number.NaN)).toBeNull();
  });

  test("of a wing is a defect", () => {
    expect(() => stayRate(aeroplane, 5)).toThrow("a wing cannot stay");
  });
});
