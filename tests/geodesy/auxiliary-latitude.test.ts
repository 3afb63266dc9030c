import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  isometricLatitude,
  isometricSlope,
  rectifyingSeries,
  seriesSlope,
  sineSeries,
} from "../../src/geodesy/auxiliary-latitude.ts";
import { ellipsoid, WGS84 } from "../../src/geodesy/ellipsoid.ts";

const angle = fc.double({ min: -Math.PI / 2, max: Math.PI / 2, noNaN: true });
const flattenings = [0, WGS84.f, -WGS84.f, 1 / 150, 0.02, -0.02];

describe("the rectifying series", () => {
  test("have the leading coefficients that Helmert and Krüger print", () => {
    // Karney, arXiv:2212.05818, appendix A (from memory): µ - φ and φ - µ in powers of the third flattening.
    const { n } = WGS84;
    const { fromGeodetic, toGeodetic } = rectifyingSeries(n);
    // Both are printed to n⁶; n⁷ is 4e-20.
    const printedFrom = [
      (-3 / 2) * n + (9 / 16) * n ** 3 - (3 / 32) * n ** 5,
      (15 / 16) * n ** 2 - (15 / 32) * n ** 4 + (135 / 2048) * n ** 6,
      (-35 / 48) * n ** 3 + (105 / 256) * n ** 5,
    ];
    const printedTo = [
      (3 / 2) * n - (27 / 32) * n ** 3 + (269 / 512) * n ** 5,
      (21 / 16) * n ** 2 - (55 / 32) * n ** 4 + (6759 / 4096) * n ** 6,
      (151 / 96) * n ** 3 - (417 / 128) * n ** 5,
    ];
    printedFrom.forEach((printed, index) => {
      expect(Math.abs((fromGeodetic[index] as number) - printed)).toBeLessThan(2e-18);
    });
    printedTo.forEach((printed, index) => {
      expect(Math.abs((toGeodetic[index] as number) - printed)).toBeLessThan(2e-18);
    });
  });

  test.each(flattenings)("undo each other for f = %d", (f) => {
    const { fromGeodetic, toGeodetic } = rectifyingSeries(f / (2 - f));
    fc.assert(
      fc.property(angle, (phi) => {
        const mu = phi + sineSeries(fromGeodetic, phi);
        // Rounding of an angle near π/2 is 2e-16; on the Earth 4e-16 is 3 nm.
        expect(Math.abs(mu + sineSeries(toGeodetic, mu) - phi)).toBeLessThan(7e-16);
      }),
      { numRuns: 300 },
    );
  });
});

describe("slopes between two latitudes", () => {
  test.each(flattenings)("are differences over differences for f = %d", (f) => {
    const { fromGeodetic } = rectifyingSeries(f / (2 - f));
    fc.assert(
      fc.property(angle, angle, (one, two) => {
        const slope = seriesSlope(fromGeodetic, one + two, two - one);
        const difference = two - one + sineSeries(fromGeodetic, two) - sineSeries(fromGeodetic, one);
        expect(Math.abs(slope * (two - one) - difference)).toBeLessThan(2e-15);
      }),
      { numRuns: 300 },
    );
  });

  test("become derivatives where the latitudes meet", () => {
    const { e2, rectifying } = WGS84;
    for (const phi of [-1.5, -0.7, 0, 0.3, 1.2]) {
      const sin = Math.sin(phi);
      const cos = Math.cos(phi);
      const isometric = (difference: number) =>
        isometricSlope(
          e2,
          sin,
          cos,
          Math.sin(phi + difference),
          Math.cos(phi + difference),
          difference,
          Math.sin(difference / 2),
          Math.cos(phi + difference / 2),
        );
      expect(isometric(0)).toBeCloseTo((1 - e2) / (cos * (1 - e2 * sin * sin)), 14);
      expect(isometric(1e-12) / isometric(0)).toBeCloseTo(1, 10);
      expect(isometric(-1e-300) / isometric(0)).toBeCloseTo(1, 14);
      const rectifyingSlope = (difference: number) =>
        seriesSlope(rectifying.fromGeodetic, 2 * phi + difference, difference);
      expect(rectifyingSlope(1e-12)).toBeCloseTo(rectifyingSlope(0), 11);
    }
  });

  test.each(flattenings)("of the isometric latitude are its differences for f = %d", (f) => {
    const { e2 } = ellipsoid(1, f);
    const between = fc.double({ min: -1.55, max: 1.55, noNaN: true });
    fc.assert(
      fc.property(between, between, (one, two) => {
        const [sin1, cos1, sin2, cos2] = [Math.sin(one), Math.cos(one), Math.sin(two), Math.cos(two)];
        const difference = two - one;
        const sinHalf = Math.sin(difference / 2);
        const slope = isometricSlope(
          e2,
          sin1,
          cos1,
          sin2,
          cos2,
          difference,
          sinHalf,
          Math.cos((one + two) / 2),
        );
        const plain = isometricLatitude(e2, sin2, cos2) - isometricLatitude(e2, sin1, cos1);
        // The plain difference of two values up to 4.6, beside a cosine of 0.02, rounds at 1e-14.
        expect(Math.abs(slope * difference - plain)).toBeLessThan(4e-14);
      }),
      { numRuns: 300 },
    );
  });
});
