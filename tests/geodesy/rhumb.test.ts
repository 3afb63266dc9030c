import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { angleDifference, DEGREE } from "../../src/geodesy/angle.ts";
import {
  type Ellipsoid,
  ellipsoid,
  meridianArc,
  meridionalParts,
  meridionalRadius,
  transverseRadius,
  WGS84,
} from "../../src/geodesy/ellipsoid.ts";
import { geodesicInverse } from "../../src/geodesy/geodesic.ts";
import { rhumbDirect, rhumbInverse, rhumbTrack } from "../../src/geodesy/rhumb.ts";
import type { Position } from "../../src/geodesy/track.ts";
import { anyPosition, apart, awayFromPoles } from "./arbitrary.ts";

const SPHERE = ellipsoid(6371000, 0);
const at = (lat: number, lon: number): Position => ({ lat, lon });
// Distances reach 2e7 m, where neighbouring doubles are 4e-9 m apart: a handful of roundings.
const TOLERANCE = 3e-8;
// There and back rounds twice, and once in the course.
const UNDONE = 1e-7;

/** dψ/dφ = M / (N cos φ). */
const isometricRate = (shape: Ellipsoid, lat: number): number =>
  meridionalRadius(shape, lat) / (transverseRadius(shape, lat) * Math.cos(lat * DEGREE));

/** Nodes and weights of the 5-point Gauss-Legendre rule on [-1, 1] (Abramowitz & Stegun, table 25.4). */
const GAUSS = [
  [0, 0.5688888888888889],
  [-0.5384693101056831, 0.4786286704993665],
  [0.5384693101056831, 0.4786286704993665],
  [-0.906179845938664, 0.2369268850561891],
  [0.906179845938664, 0.2369268850561891],
] as const;

/** Integral over latitude, degrees, of a function of it, in radians, by Gauss's rule on 200 panels. */
function quadrature(integrand: (lat: number) => number, from: number, to: number): number {
  const half = (to - from) / 400;
  let sum = 0;
  for (let panel = 0; panel < 200; panel += 1) {
    const middle = from + (2 * panel + 1) * half;
    for (const [node, weight] of GAUSS) sum += weight * integrand(middle + half * node);
  }
  return sum * half * DEGREE;
}

describe("the rhumb inverse and direct problems", () => {
  test("undo each other all over the globe", () => {
    fc.assert(
      // Nearer to a pole the rounding of a latitude in degrees (1e-14) alone moves these by more.
      fc.property(awayFromPoles(1), awayFromPoles(1), (from, to) => {
        const { distance, course } = rhumbInverse(WGS84, from, to);
        const reached = rhumbDirect(WGS84, from, course, distance);
        expect(apart(WGS84, to, reached)).toBeLessThan(UNDONE);
        expect(Math.abs(rhumbInverse(WGS84, from, reached).distance - distance)).toBeLessThan(UNDONE);
      }),
      { numRuns: 2000 },
    );
  });

  test("give the same length both ways, on the reversed course", () => {
    fc.assert(
      fc.property(awayFromPoles(0.01), awayFromPoles(0.01), (from, to) => {
        fc.pre(angleDifference(from.lon, to.lon) !== 180);
        const there = rhumbInverse(WGS84, from, to);
        const back = rhumbInverse(WGS84, to, from);
        fc.pre(there.distance > 0);
        expect(Math.abs(there.distance - back.distance)).toBeLessThan(TOLERANCE);
        const turn = Math.abs(angleDifference(there.course + 180, back.course)) * DEGREE;
        // Courses are rounded at 3e-14 degrees, 1e-8 m over 2e7 m, and so is the reversal.
        expect(turn * there.distance).toBeLessThan(UNDONE);
      }),
      { numRuns: 1000 },
    );
  });

  test("are never shorter than the geodesic", () => {
    fc.assert(
      fc.property(anyPosition, anyPosition, (from, to) => {
        const rhumb = rhumbInverse(WGS84, from, to).distance;
        expect(rhumb).toBeGreaterThan(geodesicInverse(WGS84, from, to).distance - TOLERANCE);
      }),
      { numRuns: 500 },
    );
  });

  test("obey Mercator's triangle: the tangent of the course is longitude over meridional parts", () => {
    for (const [from, to] of [
      [at(24, -74.25), at(46, -53.75)],
      [at(-33, 151), at(60, 20)],
      [at(5, 170), at(-20, -175)],
    ] as const) {
      const { course, distance } = rhumbInverse(WGS84, from, to);
      const parts = meridionalParts(WGS84, to.lat) - meridionalParts(WGS84, from.lat);
      const expected = Math.atan2(angleDifference(from.lon, to.lon) * 60, parts) / DEGREE;
      expect(Math.abs(angleDifference(course, expected))).toBeLessThan(1e-12);
      const arc = meridianArc(WGS84, from.lat, to.lat);
      expect(distance).toBeCloseTo(arc / Math.cos(expected * DEGREE), 6);
    }
  });

  test("along a parallel have the parallel's length, and course 90 or 270 to the last bit", () => {
    for (const f of [0, WGS84.f, -0.01]) {
      const shape = ellipsoid(6378137, f);
      for (const lat of [-89, -45, 0, 1e-7, 30, 60, 89.999]) {
        const expected = transverseRadius(shape, lat) * Math.cos(lat * DEGREE) * 30 * DEGREE;
        const east = rhumbInverse(shape, at(lat, 165), at(lat, -165));
        const west = rhumbInverse(shape, at(lat, -165), at(lat, 165));
        expect(Math.abs(east.distance - expected)).toBeLessThan(TOLERANCE);
        expect([east.course, west.course]).toEqual([90, 270]);
      }
    }
  });

  test("nearly along a parallel pass smoothly into it", () => {
    const level = rhumbInverse(WGS84, at(45, 170), at(45, -170));
    for (let power = -15; power <= -3; power++) {
      const lat = 45 + 10 ** power;
      const { distance, course } = rhumbInverse(WGS84, at(45, 170), at(lat, -170));
      const northing = (lat - 45) * DEGREE * meridionalRadius(WGS84, 45);
      // To first order the middle parallel is shorter by half the northing times λ sin φ.
      const shortening = northing * 0.5 * 20 * DEGREE * Math.sin(45 * DEGREE);
      const second = 2e-7 * northing + (northing * northing) / 1e6;
      expect(Math.abs(distance - (level.distance - shortening))).toBeLessThan(TOLERANCE + second);
      // The same shortening of the base turns the course: by a relative 1e-10 x northing here.
      const turned = Math.atan2(northing, level.distance) / DEGREE;
      expect(Math.abs(90 - turned - course)).toBeLessThan(2e-14 + turned * 1e-5);
    }
  });

  test("on a sphere have the textbook's length", () => {
    const { distance, course } = rhumbInverse(SPHERE, at(0, 0), at(30, 40));
    const expectedCourse = Math.atan2(40 * DEGREE, Math.atanh(0.5)) / DEGREE;
    expect(course).toBeCloseTo(expectedCourse, 12);
    expect(distance).toBeCloseTo((6371000 * 30 * DEGREE) / Math.cos(expectedCourse * DEGREE), 7);
  });

  test("have the length that quadrature gives, on oblate and prolate ellipsoids", () => {
    const latitude = fc.double({ min: -80, max: 80, noNaN: true });
    const turn = fc.double({ min: -179, max: 179, noNaN: true });
    const flattening = fc.constantFrom(WGS84.f, -WGS84.f, -1 / 150, 0.02, -0.02);
    fc.assert(
      fc.property(latitude, latitude, turn, flattening, (lat1, lat2, lon, f) => {
        fc.pre(Math.abs(lat2 - lat1) > 0.1);
        const shape = ellipsoid(6400000, f);
        const arc = quadrature((lat) => meridionalRadius(shape, lat), lat1, lat2);
        const chart = quadrature((lat) => isometricRate(shape, lat), lat1, lat2);
        const expected = Math.abs(arc) * Math.hypot(1, (lon * DEGREE) / chart);
        // Found at most 6e-8 m apart: the rounding of 20,000 km and of the sums.
        expect(Math.abs(rhumbInverse(shape, at(lat1, 0), at(lat2, lon)).distance - expected)).toBeLessThan(
          2e-7,
        );
      }),
      {
        numRuns: 100,
        // 2026-12-01: Simpson's rule was 2e-6 m off here.
        examples: [[-77.59456874593776, 22.36692080080045, -178.89968904637615, -WGS84.f]],
      },
    );
  });

  test("take the shorter way round, and east where the longitudes are half a turn apart", () => {
    expect(rhumbInverse(WGS84, at(10, 170), at(10, -170)).course).toBe(90);
    expect(rhumbInverse(WGS84, at(10, -170), at(10, 170)).course).toBe(270);
    expect(rhumbInverse(WGS84, at(10, 359), at(10, 2)).course).toBe(90);
    for (const [from, to] of [
      [0, 180],
      [180, 0],
      [0, -180],
      [-90, 90],
      [270, 90],
    ] as const) {
      expect(rhumbInverse(WGS84, at(10, from), at(10, to)).course).toBe(90);
    }
  });

  test("to or from a pole are meridians, whatever the pole's longitude", () => {
    expect(rhumbInverse(WGS84, at(50, 10), at(90, 77))).toEqual({
      distance: meridianArc(WGS84, 50, 90),
      course: 0,
    });
    expect(rhumbInverse(WGS84, at(90, 50), at(50, 10))).toEqual({
      distance: meridianArc(WGS84, 50, 90),
      course: 180,
    });
    expect(rhumbInverse(WGS84, at(-90, 0), at(90, 33)).course).toBe(0);
    expect(rhumbInverse(WGS84, at(90, 0), at(90, 33))).toEqual({ distance: 0, course: 0 });
  });

  test("beside a pole come near the meridian as the pole is approached", () => {
    let before = Number.POSITIVE_INFINITY;
    for (let power = -1; power >= -12; power--) {
      const to = at(90 - 10 ** power, 120);
      const { distance, course } = rhumbInverse(WGS84, at(60, 10), to);
      const excess = distance / meridianArc(WGS84, 60, to.lat) - 1;
      const psi = (meridionalParts(WGS84, to.lat) - meridionalParts(WGS84, 60)) / 60;
      expect(course).toBeCloseTo(Math.atan2(110, psi) / DEGREE, 10);
      expect(excess).toBeGreaterThan(0);
      expect(excess).toBeLessThan(before);
      before = excess;
    }
  });

  test("between coincident positions have length and course 0", () => {
    expect(rhumbInverse(WGS84, at(50, 10), at(50, 10))).toEqual({ distance: 0, course: 0 });
    expect(rhumbInverse(WGS84, at(50, -10), at(50, 350))).toEqual({ distance: 0, course: 0 });
  });

  test("go backward for a negative distance", () => {
    const place = rhumbDirect(WGS84, at(40, 10), 30, -100000);
    const { course, distance } = rhumbInverse(WGS84, place, at(40, 10));
    expect(course).toBeCloseTo(30, 11);
    expect(distance).toBeCloseTo(100000, 7);
  });

  test("reach a pole along a meridian, and refuse to go through it or to wind round it", () => {
    const arc = meridianArc(WGS84, 50, 90);
    expect(rhumbDirect(WGS84, at(50, 10), 0, arc)).toEqual({ lat: 90, lon: 10, course: 0 });
    expect(rhumbDirect(WGS84, at(90, 10), 180, arc).lat).toBeCloseTo(50, 12);
    expect(rhumbDirect(WGS84, at(50, 10), 45, 1e6).lat).toBeGreaterThan(50);
    expect(() => rhumbDirect(WGS84, at(50, 10), 0, arc + 1)).toThrow(
      /ends before the pole; found .* north pole/,
    );
    expect(() => rhumbDirect(WGS84, at(-50, 10), 135, 2 * arc)).toThrow(
      /ends before the pole; found .* south pole/,
    );
    expect(() => rhumbDirect(WGS84, at(50, 10), 135, -2 * arc)).toThrow(/north pole/);
    expect(() => rhumbDirect(WGS84, at(90, 10), 135, 10)).toThrow(
      "rhumb line from a pole has course 0 or 180; found 135",
    );
  });

  test.each([
    [at(91, 0), at(0, 0), "latitude of the start is in -90..90 degrees; found 91"],
    [at(0, 0), at(Number.NaN, 0), "latitude of the destination is in -90..90 degrees; found NaN"],
    [at(0, 1 / 0), at(0, 0), "longitude of the start is a finite number of degrees; found Infinity"],
  ])("refuse what is no position: %j to %j", (from, to, message) => {
    expect(() => rhumbInverse(WGS84, from, to)).toThrow(message);
    expect(() => rhumbTrack(WGS84, from, to)).toThrow(message);
  });

  test("refuse a course or distance that is not finite", () => {
    expect(() => rhumbDirect(WGS84, at(0, 0), Number.NaN, 1)).toThrow("course is a finite number; found NaN");
    expect(() => rhumbDirect(WGS84, at(0, 0), 0, 1 / 0)).toThrow(
      "distance is a finite number; found Infinity",
    );
    expect(() => rhumbDirect(WGS84, at(95, 0), 0, 1)).toThrow("latitude of the start");
  });
});

describe("a rhumb track", () => {
  test("begins and ends exactly at what it was given, on one course, for any two positions", () => {
    fc.assert(
      fc.property(anyPosition, anyPosition, (from, to) => {
        const track = rhumbTrack(WGS84, from, to);
        const isPolar = Math.abs(from.lat) === 90 || Math.abs(to.lat) === 90;
        const start = track.at(0);
        const end = track.at(track.length);
        expect(start.lat).toBe(from.lat + 0);
        if (!isPolar) expect(start.lon).toBe(from.lon + 0);
        if (track.length > 0) expect(end.lat).toBe(to.lat + 0);
        if (isPolar) expect(end.lon).toBe(start.lon);
        else expect(Math.abs(angleDifference(end.lon, to.lon))).toBeLessThan(1e-12);
        expect(track.finalCourse).toBe(track.initialCourse);
        expect([track.length, track.initialCourse]).toEqual(Object.values(rhumbInverse(WGS84, from, to)));
      }),
      { numRuns: 500 },
    );
  });

  test("adds up: its parts have the same course and their lengths sum to the whole, for any two positions", () => {
    const share = fc.double({ min: 0.001, max: 0.999, noNaN: true });
    fc.assert(
      fc.property(anyPosition, anyPosition, share, (from, to, part) => {
        const track = rhumbTrack(WGS84, from, to);
        fc.pre(track.length > 1);
        const s = part * track.length;
        const place = track.at(s);
        const there = rhumbInverse(WGS84, from, place);
        const onward = rhumbInverse(WGS84, place, to);
        expect(Math.abs(there.distance - s)).toBeLessThan(1e-7);
        expect(Math.abs(onward.distance - (track.length - s))).toBeLessThan(1e-7);
        expect(Math.abs(angleDifference(there.course, track.initialCourse)) * DEGREE * s).toBeLessThan(1e-7);
      }),
      { numRuns: 1000 },
    );
  });

  test("moves at its course: the derivative of the place is the unit vector of the course", () => {
    const share = fc.double({ min: 0.01, max: 0.99, noNaN: true });
    fc.assert(
      fc.property(awayFromPoles(2), awayFromPoles(2), share, (from, to, part) => {
        const track = rhumbTrack(WGS84, from, to);
        fc.pre(track.length > 20_000);
        const s = part * track.length;
        const [before, here, after] = [track.at(s - 50), track.at(s), track.at(s + 50)];
        const north = ((after.lat - before.lat) / 100) * DEGREE * meridionalRadius(WGS84, here.lat);
        const parallel = transverseRadius(WGS84, here.lat) * Math.cos(here.lat * DEGREE);
        const east = ((after.lon - before.lon) / 100) * DEGREE * parallel;
        const course = track.initialCourse * DEGREE;
        // A central difference over 100 m errs by (50 m / distance to the pole)² at 2 degrees, and rounding by 1e-10.
        expect(Math.abs(north - Math.cos(course))).toBeLessThan(1e-7);
        expect(Math.abs(east - Math.sin(course))).toBeLessThan(1e-7);
      }),
      { numRuns: 500 },
    );
  });

  test("is smooth: third differences of its longitude and latitude do not jump", () => {
    const track = rhumbTrack(WGS84, at(-60, 170), at(62, -40));
    const step = track.length / 2000;
    const places = Array.from({ length: 2001 }, (_, i) => track.at(i * step));
    const third = (key: "lat" | "lon") =>
      places.slice(3).map((place, i) => {
        const [a, b, c] = places.slice(i, i + 3) as [typeof place, typeof place, typeof place];
        return Math.abs(place[key] - 3 * c[key] + 3 * b[key] - a[key]);
      });
    // In steps of 0.061 degrees of latitude the ellipsoid's 2.5e-3 sin 2µ has third differences up to 1.4e-9 degrees.
    expect(Math.max(...third("lat"))).toBeLessThan(2e-9);
    expect(Math.max(...third("lon"))).toBeLessThan(1e-5);
  });

  test("along a meridian and along a parallel has that longitude or latitude to the last bit", () => {
    const meridian = rhumbTrack(WGS84, at(-30, 20), at(10, 20));
    const parallel = rhumbTrack(WGS84, at(58.1, 359), at(58.1, 2));
    for (let i = 0; i <= 100; i++) {
      expect(meridian.at((meridian.length * i) / 100)).toMatchObject({ lon: 20, course: 0 });
      const place = parallel.at((parallel.length * i) / 100);
      expect([place.lat, place.course]).toEqual([58.1, 90]);
      expect(place.lon).toBeCloseTo(359 + (3 * i) / 100, 11);
    }
  });

  test("keeps its longitude continuous from the start's own", () => {
    const track = rhumbTrack(WGS84, at(10, 175), at(20, -170));
    expect(track.at(track.length).lon).toBe(190);
    expect(rhumbTrack(WGS84, at(10, 359), at(20, 2)).at(1e5).lon).toBeGreaterThan(359);
    expect(rhumbTrack(WGS84, at(10, 2), at(20, 359)).at(1e5).lon).toBeLessThan(2);
  });

  test("to or from a pole runs on the one meridian that has a longitude", () => {
    const to = rhumbTrack(WGS84, at(50, 350), at(90, 77));
    expect(to.at(to.length)).toEqual({ lat: 90, lon: 350, course: 0 });
    const from = rhumbTrack(WGS84, at(90, 350), at(50, 10));
    expect(from.at(0)).toEqual({ lat: 90, lon: 370, course: 180 });
    expect(from.at(from.length)).toEqual({ lat: 50, lon: 370, course: 180 });
    const through = rhumbTrack(WGS84, at(-90, 12), at(90, 33));
    expect(through.at(through.length / 2)).toMatchObject({ lon: 12, course: 0 });
    expect(through.at(through.length / 2).lat).toBeCloseTo(0, 12);
  });

  test("between coincident positions stays there", () => {
    const track = rhumbTrack(WGS84, at(50, 10), at(50, 10));
    expect([track.length, track.at(0)]).toEqual([0, { lat: 50, lon: 10, course: 0 }]);
  });

  test("takes a micrometre beyond an end as the end, and more as a defect", () => {
    const track = rhumbTrack(WGS84, at(50, 10), at(51, 11));
    expect(track.at(-1e-7)).toEqual(track.at(0));
    expect(track.at(track.length + 1e-7)).toEqual(track.at(track.length));
    for (const s of [-1, track.length + 1, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(() => track.at(s)).toThrow(RangeError);
    }
  });
});
