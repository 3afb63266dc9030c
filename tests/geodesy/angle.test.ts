import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  angleDifference,
  normaliseCourse,
  reduceTurn,
  sinCosDegrees,
  unroll,
} from "../../src/geodesy/angle.ts";

const anyAngle = fc.double({ min: -1e6, max: 1e6, noNaN: true });

describe("a course", () => {
  test.each([
    [0, 0],
    [360, 0],
    [-360, 0],
    [-0, 0],
    [-90, 270],
    [450, 90],
    [-1e-20, 0],
    [359.99999999999994, 359.99999999999994],
  ])("of %d degrees is normalised to %d", (given, expected) => {
    expect(normaliseCourse(given)).toBe(expected);
  });

  test("is in 0..360 with 360 left out and never -0, whatever the angle", () => {
    fc.assert(
      fc.property(anyAngle, (angle) => {
        const course = normaliseCourse(angle);
        expect(course).toBeGreaterThanOrEqual(0);
        expect(course).toBeLessThan(360);
        expect(Object.is(course, -0)).toBe(false);
      }),
      { numRuns: 1000 },
    );
  });
});

describe("an angle difference", () => {
  test.each([
    [350, 20, 30],
    [20, 350, -30],
    [0, 180, 180],
    [180, 0, 180],
    [0, -180, 180],
    [179, -179, 2],
    [359, 2, 3],
    [10, 370, 0],
    [-90, 90, 180],
  ])("from %d to %d is %d", (from, to, expected) => {
    expect(angleDifference(from, to)).toBe(expected);
  });

  test("is in -180..180 with -180 left out, and leads from the one to the other", () => {
    fc.assert(
      fc.property(anyAngle, anyAngle, (from, to) => {
        const difference = angleDifference(from, to);
        expect(difference).toBeGreaterThan(-180);
        expect(difference).toBeLessThanOrEqual(180);
        // Sums of angles up to 1e6 round at 1e-10.
        expect(Math.abs(reduceTurn(from + difference - to))).toBeLessThan(1e-9);
      }),
      { numRuns: 1000 },
    );
  });
});

describe("unrolling a longitude", () => {
  test.each([
    [-179, 178, 181],
    [2, 359, 362],
    [359, 2, -1],
    [-180, 0, 180],
    [180, 0, 180],
    [77, 10, 77],
  ])("%d near %d gives %d", (longitude, near, expected) => {
    expect(unroll(longitude, near)).toBe(expected);
  });

  test("shifts by whole turns to within half a turn", () => {
    const longitude = fc.double({ min: -360, max: 720, noNaN: true });
    fc.assert(
      fc.property(longitude, longitude, (lon, near) => {
        const unrolled = unroll(lon, near);
        expect(Math.abs(unrolled - near)).toBeLessThanOrEqual(180 + 1e-12);
        expect(Math.abs(reduceTurn(unrolled - lon))).toBeLessThan(1e-12);
      }),
      { numRuns: 500 },
    );
  });
});

describe("sine and cosine in degrees", () => {
  test.each([
    [0, 0, 1],
    [90, 1, 0],
    [180, 0, -1],
    [-180, 0, -1],
    [270, -1, 0],
    [-90, -1, 0],
    [720, 0, 1],
  ])("are exact at %d", (angle, sin, cos) => {
    expect(sinCosDegrees(angle)).toEqual({ sin, cos });
  });

  test("keep the distance from a pole to full relative precision", () => {
    const { cos } = sinCosDegrees(90 - 2 ** -40);
    expect(cos / (2 ** -40 * (Math.PI / 180))).toBeCloseTo(1, 15);
  });

  test("agree with radians everywhere", () => {
    fc.assert(
      fc.property(fc.double({ min: -720, max: 720, noNaN: true }), (angle) => {
        const { sin, cos } = sinCosDegrees(angle);
        // 720 degrees in radians are rounded to 2e-15.
        expect(Math.abs(sin - Math.sin((angle * Math.PI) / 180))).toBeLessThan(4e-15);
        expect(Math.abs(cos - Math.cos((angle * Math.PI) / 180))).toBeLessThan(4e-15);
      }),
      { numRuns: 500 },
    );
  });
});
