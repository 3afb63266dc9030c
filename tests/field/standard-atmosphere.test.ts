import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  pressureAltitude,
  STANDARD_PRESSURE_RANGE,
  standardAir,
} from "../../src/field/standard-atmosphere.ts";

describe("the ICAO standard atmosphere", () => {
  // ICAO Doc 7488/3 (1993), table 1, by geopotential altitude, from memory; 1,000 m, 11,000 m and 20,000 m also as printed by the
  // documentation of a general atmosphere function (ATM-01 of the check catalogue). Temperatures and pressures are exact to the digits.
  test.each([
    [-5000, 320.65, 177687],
    [0, 288.15, 101325],
    [1000, 281.65, 89874.6],
    [5000, 255.65, 54019.9],
    [11_000, 216.65, 22632.0],
    [20_000, 216.65, 5474.88],
    [32_000, 228.65, 868.014],
    [47_000, 270.65, 110.906],
    [51_000, 270.65, 66.9384],
    [71_000, 214.65, 3.95639],
    [80_000, 196.65, 0.886272],
  ])("has at %d m its printed temperature and pressure", (altitude, temperature, pressure) => {
    const air = standardAir(altitude);
    expect(air.temperature).toBeCloseTo(temperature, 9);
    // Six printed digits.
    expect(Math.abs(air.pressure / pressure - 1)).toBeLessThan(4e-6);
  });

  test.each([
    [0, 1.225, 340.294],
    [1000, 1.111643, 336.434],
    [11_000, 0.363918, 295.0695],
    [20_000, 0.088035, 295.0695],
  ])("has at %d m its printed density and speed of sound", (altitude, density, speedOfSound) => {
    expect(standardAir(altitude).density).toBeCloseTo(density, 6);
    expect(standardAir(altitude).speedOfSound).toBeCloseTo(speedOfSound, 3);
  });

  test("has its gas law and its hydrostatic equation", () => {
    for (let altitude = -4900; altitude < 80_000; altitude += 777) {
      const air = standardAir(altitude);
      const slope = (standardAir(altitude + 1).pressure - standardAir(altitude - 1).pressure) / 2;
      expect(air.pressure).toBeCloseTo(air.density * 287.05287 * air.temperature, 9);
      // A difference over 2 m: its own error is below 1e-7 of the slope but where a layer begins.
      expect(Math.abs(slope / (-9.80665 * air.density) - 1)).toBeLessThan(1e-6);
    }
  });

  test("is inverted from pressure to altitude, at every layer and its edges", () => {
    fc.assert(
      fc.property(fc.double({ min: -5000, max: 80_000, noNaN: true }), (altitude) => {
        // Rounding of a pressure, 1e-16 of it, is 1e-12 m of altitude, times the powers' own rounding of about 20 units.
        expect(pressureAltitude(standardAir(altitude).pressure)).toBeCloseTo(altitude, 8);
      }),
      { numRuns: 2000 },
    );
    for (const edge of [-5000, 0, 11_000, 20_000, 32_000, 47_000, 51_000, 71_000, 80_000]) {
      expect(pressureAltitude(standardAir(edge).pressure)).toBeCloseTo(edge, 8);
    }
  });

  test("ends at -5,000 and 80,000 m", () => {
    const [least, most] = STANDARD_PRESSURE_RANGE;
    for (const altitude of [-5001, 80_001, Number.NaN]) {
      expect(() => standardAir(altitude)).toThrow(`altitude is in -5000..80000 m; found ${altitude}`);
    }
    for (const pressure of [0, -1, least / 1.0001, most * 1.0001, Number.NaN]) {
      expect(() => pressureAltitude(pressure)).toThrow(`Pa; found ${pressure}`);
    }
  });
});
