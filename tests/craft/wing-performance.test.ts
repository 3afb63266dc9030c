import { describe, expect, test } from "vitest";
import {
  type BreguetParameters,
  bestGlideSpeed,
  breguetEndurance,
  breguetRange,
  leastPowerSpeed,
  maxLiftThreeHalvesToDrag,
  maxLiftToDrag,
} from "../../src/craft/wing-performance.ts";
import { InputError } from "../../src/errors.ts";

const polar = { zeroLiftDrag: 0.03, inducedFactor: 0.05 };
const air = { wingArea_m2: 16, airDensity_kg_m3: 1.1 };
const fuel: BreguetParameters = {
  startMass_kg: 1300,
  endMass_kg: 1150,
  propellerEfficiency: 0.8,
  specificConsumption_kg_J: 7.6e-8,
};

/** Greatest value of f(C_L) over the polar by brute force. */
function greatest(f: (lift: number, drag: number) => number): number {
  let best = 0;
  for (let lift = 0.0005; lift < 4; lift += 0.0005)
    best = Math.max(best, f(lift, polar.zeroLiftDrag + polar.inducedFactor * lift * lift));
  return best;
}

describe("the wing's optima", () => {
  test("are the greatest of the polar, found by brute force", () => {
    // A grid of 0.0005 in C_L misses a maximum by at most (0.00025)² of its curvature.
    expect(maxLiftToDrag(polar) / greatest((lift, drag) => lift / drag)).toBeCloseTo(1, 6);
    expect(maxLiftThreeHalvesToDrag(polar) / greatest((lift, drag) => lift ** 1.5 / drag)).toBeCloseTo(1, 6);
  });

  test("the two speeds differ by the fourth root of 3", () => {
    const craft = { ...polar, ...air, mass_kg: 1200 };
    expect(bestGlideSpeed(craft) / leastPowerSpeed(craft)).toBeCloseTo(3 ** 0.25, 15);
  });
});

describe("Breguet", () => {
  test("range and endurance are the integrals of V dm and dm over the fuel flow (Simpson's rule)", () => {
    const n = 2000;
    const step = (fuel.startMass_kg - fuel.endMass_kg) / n;
    let metres = 0;
    let seconds = 0;
    for (let i = 0; i <= n; i++) {
      const mass_kg = fuel.endMass_kg + i * step;
      const weight = (i === 0 || i === n ? 1 : i % 2 === 1 ? 4 : 2) * (step / 3);
      const flow = (v: number, ratio: number) =>
        (fuel.specificConsumption_kg_J * ((mass_kg * 9.80665) / ratio) * v) / fuel.propellerEfficiency;
      const glide = bestGlideSpeed({ ...polar, ...air, mass_kg });
      metres += (weight * glide) / flow(glide, maxLiftToDrag(polar));
      const slow = leastPowerSpeed({ ...polar, ...air, mass_kg });
      const lift = Math.sqrt((3 * polar.zeroLiftDrag) / polar.inducedFactor);
      seconds += weight / flow(slow, lift / (4 * polar.zeroLiftDrag));
    }
    expect(breguetRange(fuel, maxLiftToDrag(polar)) / metres).toBeCloseTo(1, 12);
    expect(breguetEndurance({ ...fuel, ...air }, maxLiftThreeHalvesToDrag(polar)) / seconds).toBeCloseTo(
      1,
      12,
    );
  });

  test("without fuel to spend goes nowhere", () => {
    expect(breguetRange({ ...fuel, endMass_kg: fuel.startMass_kg }, 12)).toBe(0);
  });

  test.each([
    [{ endMass_kg: 1400 }, "end mass is at most the start mass, 1300 kg; found 1400 kg"],
    [{ endMass_kg: 0 }, "end mass is a finite number above 0; found 0 kg"],
    [{ propellerEfficiency: 1.2 }, "propeller efficiency is above 0 and at most 1; found 1.2"],
    [{ specificConsumption_kg_J: 0 }, "specific consumption is a finite number above 0; found 0 kg/J"],
  ])("refuses %j", (fault, message) => {
    expect(() => breguetRange({ ...fuel, ...fault }, 12)).toThrow(new InputError(message));
  });

  test("refuses a ratio that is not above 0", () => {
    expect(() => breguetRange(fuel, 0)).toThrow("lift-to-drag ratio is a finite number above 0; found 0");
    expect(() => breguetEndurance({ ...fuel, ...air }, Number.NaN)).toThrow(InputError);
    expect(() => maxLiftToDrag({ ...polar, zeroLiftDrag: 0 })).toThrow(InputError);
  });
});
