import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { constantPower } from "../../src/craft/constant.ts";
import type { PowerModel } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import {
  bladeProfilePower,
  glauertInducedSpeed,
  inducedPower,
  type RotorParameters,
  rotorPower,
} from "../../src/craft/rotor.ts";
import { tablePower } from "../../src/craft/table.ts";
import { type WingParameters, wingPower } from "../../src/craft/wing.ts";
import { bestGlideSpeed, leastPowerSpeed, maxLiftToDrag } from "../../src/craft/wing-performance.ts";
import { InputError } from "../../src/errors.ts";
import { aeroplane, barge, drone, tenderTable } from "./crafts.ts";

const rotor: RotorParameters = {
  bladeProfilePower_W: 80,
  inducedPower_W: 88,
  tipSpeed_m_s: 120,
  hoverInducedSpeed_m_s: 4,
  fuselageDragRatio: 0.6,
  solidity: 0.05,
  discArea_m2: 0.5,
  airDensity_kg_m3: 1.225,
  efficiency: 0.8,
  mass_kg: 2,
};
const wing: WingParameters = {
  mass_kg: 12,
  wingArea_m2: 0.7,
  zeroLiftDrag: 0.03,
  inducedFactor: 0.05,
  efficiency: 0.6,
  airDensity_kg_m3: 1.225,
};
const models: [string, PowerModel, number, number][] = [
  ["table", tenderTable, 0.01, 9.2],
  ["cube", barge.power, 0.01, 20],
  ["power law", cubePower({ referenceSpeed_m_s: 3, referencePower_W: 50, exponent: 2.4 }), 0.01, 20],
  ["rotor", drone.power, 0.01, 60],
  ["wing", aeroplane.power, 3, 60],
  ["constant", constantPower("kg/s", 0.002), 0, 20],
];

describe("every power model", () => {
  test.each(models)("%s: its slope is the derivative of its rate", (_, model, min, max) => {
    fc.assert(
      fc.property(fc.double({ min, max, noNaN: true }), (v) => {
        const h = 1e-6 * Math.max(v, 0.1);
        if (model.kinks.some((kink) => Math.abs(kink - v) < 2 * h) || v - h < 0) return;
        const difference = (model.perSecond(v + h) - model.perSecond(v - h)) / (2 * h);
        const size = Math.abs(model.slope(v)) + model.perSecond(v) / Math.max(v, 0.1);
        // Central difference at 1e-6: rounding 2e-16/1e-6 and the third derivative's 1e-12.
        expect(Math.abs(difference - model.slope(v))).toBeLessThanOrEqual(3e-9 * size);
      }),
      { numRuns: 300 },
    );
  });

  test.each(models)("%s: its rate is finite and not below 0 all over its domain", (_, model) => {
    const max = Math.min(model.max, 1e4);
    for (let i = 0; i <= 1000; i++) {
      const v = model.min + ((max - model.min) * i) / 1000;
      expect(model.perSecond(v)).toBeGreaterThanOrEqual(0);
      expect(model.perSecond(v)).toBeLessThan(Number.POSITIVE_INFINITY);
      expect(model.slope(v)).toSatisfy(Number.isFinite);
    }
  });
});

describe("tablePower", () => {
  test("sorts its rows and keeps to them", () => {
    const model = tablePower("kg/s", [
      { speed_m_s: 6, rate: 0.03 },
      { speed_m_s: 0, rate: 0.001 },
      { speed_m_s: 3, rate: 0.01 },
    ]);
    expect(model).toMatchObject({ model: "table", unit: "kg/s", min: 0, max: 6, kinks: [3], climbForce: 0 });
    expect([0, 3, 6].map((v) => model.perSecond(v))).toEqual([0.001, 0.01, 0.03]);
  });

  test("does not reorder what it was given", () => {
    const rows = [
      { speed_m_s: 6, rate: 3 },
      { speed_m_s: 0, rate: 1 },
    ];
    tablePower("W", rows);
    expect(rows.map((row) => row.speed_m_s)).toEqual([6, 0]);
  });

  test.each([
    [[], "a speed-power table has at least two rows; found 0"],
    [[[1, 2]], "a speed-power table has at least two rows; found 1"],
    [
      [
        [1, 2],
        [1, 3],
      ],
      "a speed-power table's speeds differ; found 1 m/s twice",
    ],
    [
      [
        [-1, 2],
        [1, 3],
      ],
      "a table's speed is a finite number not below 0; found -1 m/s",
    ],
    [
      [
        [0, -2],
        [1, 3],
      ],
      "a table's rate at 0 m/s is a finite number not below 0; found -2 W",
    ],
    [
      [
        [0, Number.NaN],
        [1, 3],
      ],
      "a table's rate at 0 m/s is a finite number not below 0; found NaN W",
    ],
    [
      [
        [0, 1],
        [Number.POSITIVE_INFINITY, 3],
      ],
      "a table's speed is a finite number not below 0; found Infinity m/s",
    ],
  ])("refuses the rows %j", (rows, message) => {
    const given = rows.map(([speed_m_s, rate]) => ({ speed_m_s: speed_m_s as number, rate: rate as number }));
    expect(() => tablePower("W", given)).toThrow(new InputError(message));
  });
});

describe("cubePower", () => {
  test("passes through its reference and goes with the cube: 0.8 of the speed takes 0.512 of the power", () => {
    const model = cubePower({ referenceSpeed_m_s: 25, referencePower_W: 1e6 });
    expect(model.perSecond(25)).toBe(1e6);
    expect(model.perSecond(20) / 1e6).toBeCloseTo(0.512, 14);
    expect(model.perSecond(0)).toBe(0);
    expect(model.slope(0)).toBe(0);
  });

  test.each([
    [{ referenceSpeed_m_s: 0 }, "reference speed is a finite number above 0; found 0 m/s"],
    [{ referencePower_W: -1 }, "reference power is a finite number above 0; found -1 W"],
    [{ exponent: Number.NaN }, "exponent is a finite number; found NaN"],
    [{ exponent: 0.9 }, "the exponent of a power law is at least 1; found 0.9"],
  ])("refuses %j", (fault, message) => {
    const given = { referenceSpeed_m_s: 5, referencePower_W: 10, ...fault };
    expect(() => cubePower(given)).toThrow(new InputError(message));
  });
});

describe("rotorPower", () => {
  test("is the formula of Zeng, Xu & Zhang (2019), eq. (12), as printed, over the efficiency", () => {
    const model = rotorPower(rotor);
    for (const v of [0, 1, 5, 10, 18, 30]) {
      const printed =
        80 * (1 + (3 * v ** 2) / 120 ** 2) +
        88 * Math.sqrt(Math.sqrt(1 + v ** 4 / (4 * 4 ** 4)) - v ** 2 / (2 * 4 ** 2)) +
        0.5 * 0.6 * 1.225 * 0.05 * 0.5 * v ** 3;
      // The printed difference of near-equals loses two or three digits at 30 m/s.
      expect(Math.abs(model.perSecond(v) / (printed / 0.8) - 1)).toBeLessThan(1e-13);
    }
  });

  test("goes with P_i v₀ / V at speed, where the printed difference would have lost every digit", () => {
    const still = { ...rotor, bladeProfilePower_W: 0, fuselageDragRatio: 0, efficiency: 1 };
    const v = 1e6;
    // The next term of the series is (v₀/V)⁴/2 relative.
    expect((rotorPower(still).perSecond(v) * v) / (88 * 4)).toBeCloseTo(1, 14);
  });

  test("lifts its weight in a climb: m g₀ / η per metre a second", () => {
    expect(rotorPower(rotor).climbForce).toBeCloseTo((2 * 9.80665) / 0.8, 14);
    const { mass_kg, ...light } = rotor;
    expect(mass_kg).toBe(2);
    expect(rotorPower(light).climbForce).toBe(0);
  });

  test("agrees with Glauert's induced speed: P_i times v/v₀ is the weight times v", () => {
    const hover = glauertInducedSpeed(20, 1.225, 0.503);
    const v = 9;
    const model = rotorPower({
      ...rotor,
      bladeProfilePower_W: 0,
      fuselageDragRatio: 0,
      inducedPower_W: inducedPower({
        inducedCorrection: 0,
        weight_N: 20,
        airDensity_kg_m3: 1.225,
        discArea_m2: 0.503,
      }),
      hoverInducedSpeed_m_s: hover,
      efficiency: 1,
    });
    expect(model.perSecond(v) / (20 * glauertInducedSpeed(20, 1.225, 0.503, v))).toBeCloseTo(1, 14);
  });

  test("Glauert's induced speed solves the momentum balance T = 2 ρ A v sqrt(V² + v²)", () => {
    for (const speed of [0, 2, 7, 40]) {
      const v = glauertInducedSpeed(35, 1.1, 0.4, speed);
      expect((2 * 1.1 * 0.4 * v * Math.hypot(speed, v)) / 35).toBeCloseTo(1, 13);
    }
  });

  test("blade profile and induced power are Table I's figures, 79.86 W and 88.63 W", () => {
    const air = { airDensity_kg_m3: 1.225, discArea_m2: 0.503 };
    const profile = bladeProfilePower({
      ...air,
      profileDragCoefficient: 0.012,
      solidity: 0.05,
      bladeSpeed_rad_s: 300,
      rotorRadius_m: 0.4,
    });
    expect(profile).toBeCloseTo(79.86, 2);
    expect(inducedPower({ ...air, inducedCorrection: 0.1, weight_N: 20 })).toBeCloseTo(88.63, 2);
  });

  test.each([
    ["bladeProfilePower_W", -1],
    ["inducedPower_W", 0],
    ["tipSpeed_m_s", 0],
    ["hoverInducedSpeed_m_s", Number.NaN],
    ["fuselageDragRatio", -0.1],
    ["solidity", 0],
    ["discArea_m2", Number.POSITIVE_INFINITY],
    ["airDensity_kg_m3", -1.2],
    ["efficiency", 1.01],
    ["efficiency", 0],
    ["mass_kg", 0],
  ])("refuses %s = %d, naming the quantity and what was found", (key, value) => {
    expect(() => rotorPower({ ...rotor, [key]: value })).toThrow(InputError);
    expect(() => rotorPower({ ...rotor, [key]: value })).toThrow(`found ${value}`);
  });
});

describe("wingPower", () => {
  test("is drag times speed over the efficiency, with lift equal to weight", () => {
    const model = wingPower(wing);
    const weight = 12 * 9.80665;
    for (const v of [8, 15, 30]) {
      const dynamic = 0.5 * 1.225 * v * v;
      const lift = weight / (dynamic * 0.7);
      const drag = dynamic * 0.7 * (0.03 + 0.05 * lift * lift);
      expect(model.perSecond(v)).toBeCloseTo((drag * v) / 0.6, 10);
    }
    expect(model.climbForce).toBeCloseTo(weight / 0.6, 12);
  });

  test("takes least power at leastPowerSpeed, and least energy per metre, W/(L/D)_max, at bestGlideSpeed", () => {
    const model = wingPower({ ...wing, efficiency: 1 });
    expect(model.slope(leastPowerSpeed(wing))).toBeCloseTo(0, 12);
    const glide = bestGlideSpeed(wing);
    expect(model.perSecond(glide) / glide).toBeCloseTo((12 * 9.80665) / maxLiftToDrag(wing), 12);
  });

  test.each([
    ["mass_kg", 0],
    ["wingArea_m2", -1],
    ["zeroLiftDrag", 0],
    ["inducedFactor", Number.NaN],
    ["efficiency", 60],
    ["airDensity_kg_m3", 0],
  ])("refuses %s = %d, naming the quantity and what was found", (key, value) => {
    expect(() => wingPower({ ...wing, [key]: value })).toThrow(InputError);
    expect(() => wingPower({ ...wing, [key]: value })).toThrow(`found ${value}`);
  });
});

describe("constantPower", () => {
  test.each([-1, Number.NaN, Number.POSITIVE_INFINITY])("refuses a rate of %d", (rate) => {
    expect(() => constantPower("L/s", rate)).toThrow(
      `rate is a finite number not below 0; found ${rate} L/s`,
    );
  });
});
