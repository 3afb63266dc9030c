import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  ellipsoid,
  meridianArc,
  meridionalParts,
  meridionalRadius,
  transverseRadius,
  WGS84,
} from "../../src/geodesy/ellipsoid.ts";

const SPHERE = ellipsoid(6371000, 0);
const latitude = fc.double({ min: -90, max: 90, noNaN: true });

describe("derived quantities", () => {
  test("of WGS84 are those that its standard prints", () => {
    // NGA.STND.0036 (2014), table 3.5 (from memory): b, e² and e'².
    expect(WGS84.b).toBeCloseTo(6356752.3142, 4);
    expect(WGS84.e2).toBeCloseTo(6.694379990141e-3, 15);
    expect(WGS84.ep2).toBeCloseTo(6.739496742276e-3, 15);
    expect(WGS84.n).toBeCloseTo((WGS84.a - WGS84.b) / (WGS84.a + WGS84.b), 16);
  });

  test("of a sphere are trivial", () => {
    expect(SPHERE).toMatchObject({ b: 6371000, e2: 0, ep2: 0, n: 0, rectifyingRadius: 6371000 });
    expect(SPHERE.rectifying).toEqual({ scale: 1, fromGeodetic: [], toGeodetic: [] });
  });

  test.each([
    [0, 0, "equatorial radius is a positive number of metres; found 0"],
    [-1, 0, "equatorial radius is a positive number of metres; found -1"],
    [Number.NaN, 0, "equatorial radius is a positive number of metres; found NaN"],
    [Number.POSITIVE_INFINITY, 0, "equatorial radius is a positive number of metres; found Infinity"],
    [1, 0.5, "flattening is in -0.02..0.02; found 0.5"],
    [1, Number.NaN, "flattening is in -0.02..0.02; found NaN"],
  ])("of a = %d, f = %d are refused", (a, f, message) => {
    expect(() => ellipsoid(a, f)).toThrow(message);
  });
});

describe("radii of curvature", () => {
  test("at the equator and the poles have their closed forms", () => {
    const { a, b, e2 } = WGS84;
    expect(meridionalRadius(WGS84, 0)).toBeCloseTo(a * (1 - e2), 8);
    expect(transverseRadius(WGS84, 0)).toBe(a);
    for (const pole of [90, -90]) {
      expect(meridionalRadius(WGS84, pole)).toBeCloseTo((a * a) / b, 7);
      expect(transverseRadius(WGS84, pole)).toBeCloseTo((a * a) / b, 7);
    }
    expect(meridionalRadius(SPHERE, 37)).toBe(6371000);
  });

  test.each([91, -90.001, Number.NaN, Number.POSITIVE_INFINITY])("are refused at latitude %d", (lat) => {
    expect(() => meridionalRadius(WGS84, lat)).toThrow(`latitude is in -90..90 degrees; found ${lat}`);
    expect(() => transverseRadius(WGS84, lat)).toThrow(`latitude is in -90..90 degrees; found ${lat}`);
  });
});

describe("the meridian", () => {
  test("has the quarter that the complete elliptic integral gives", () => {
    // a E(e²) by the arithmetic-geometric mean, which converges quadratically.
    let [x, y, sum, power] = [1, Math.sqrt(1 - WGS84.e2), WGS84.e2 / 2, 0.5];
    while (Math.abs(x - y) > 1e-15) {
      const half = (x - y) / 2;
      power *= 2;
      sum += power * half * half;
      [x, y] = [(x + y) / 2, Math.sqrt(x * y)];
    }
    const quarter = (WGS84.a * Math.PI * (1 - sum)) / (2 * x);
    // Neighbouring doubles at 1e7 m are 2e-9 m apart.
    expect(Math.abs(meridianArc(WGS84, 0, 90) - quarter)).toBeLessThan(1e-8);
  });

  test("is the integral of its radius of curvature", () => {
    fc.assert(
      fc.property(latitude, latitude, (from, to) => {
        // Simpson's rule on 256 strips is exact to rounding for so smooth an integrand.
        const strips = 256;
        let sum = 0;
        for (let i = 0; i <= strips; i++) {
          const weight = i === 0 || i === strips ? 1 : i % 2 === 1 ? 4 : 2;
          const lat = Math.max(-90, Math.min(90, from + ((to - from) * i) / strips));
          sum += weight * meridionalRadius(WGS84, lat);
        }
        const integral = (sum * (to - from) * (Math.PI / 180)) / (3 * strips);
        expect(Math.abs(meridianArc(WGS84, from, to) - integral)).toBeLessThan(1e-5);
      }),
      { numRuns: 200 },
    );
  });

  test("adds up, changes sign when reversed, and is symmetrical about the equator", () => {
    fc.assert(
      fc.property(latitude, latitude, latitude, (one, two, three) => {
        const whole = meridianArc(WGS84, one, three);
        const parts = meridianArc(WGS84, one, two) + meridianArc(WGS84, two, three);
        expect(Math.abs(whole - parts)).toBeLessThan(2e-8);
        expect(meridianArc(WGS84, three, one) + 0).toBe(-whole + 0);
        expect(meridianArc(WGS84, -one, -three) + 0).toBe(-whole + 0);
      }),
      { numRuns: 500 },
    );
  });

  test("keeps full relative precision over a millimetre", () => {
    const lat = 50 + 1e-8;
    const expected = meridionalRadius(WGS84, 50) * (lat - 50) * (Math.PI / 180);
    expect(meridianArc(WGS84, 50, lat) / expected).toBeCloseTo(1, 9);
  });
});

describe("meridional parts", () => {
  test("on the sphere are the Gudermannian's inverse in minutes", () => {
    for (const lat of [-89.9, -45, 0, 1e-9, 30, 80]) {
      const expected = Math.atanh(Math.sin((lat * Math.PI) / 180)) * (10800 / Math.PI);
      expect(meridionalParts(SPHERE, lat)).toBeCloseTo(expected, 7);
    }
  });

  test("rise with latitude and are odd", () => {
    fc.assert(
      fc.property(fc.double({ min: -89.999, max: 89.999, noNaN: true }), (lat) => {
        expect(meridionalParts(WGS84, -lat) + meridionalParts(WGS84, lat)).toBe(0);
        expect(meridionalParts(WGS84, lat + 1e-6)).toBeGreaterThan(meridionalParts(WGS84, lat));
      }),
      { numRuns: 500 },
    );
  });

  test.each([90, -90, 91, Number.NaN])("are refused at latitude %d", (lat) => {
    expect(() => meridionalParts(WGS84, lat)).toThrow(
      `meridional parts need a latitude between -90 and 90 degrees; found ${lat}`,
    );
  });
});
