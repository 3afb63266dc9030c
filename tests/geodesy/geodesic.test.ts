import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { angleDifference } from "../../src/geodesy/angle.ts";
import { ellipsoid, meridianArc, WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicDirect, geodesicInverse, geodesicTrack } from "../../src/geodesy/geodesic.ts";
import type { Position } from "../../src/geodesy/track.ts";
import { anyPosition, apart } from "./arbitrary.ts";

const SPHERE = ellipsoid(6371000, 0);
const at = (lat: number, lon: number): Position => ({ lat, lon });
// Distances reach 2e7 m, where neighbouring doubles are 4e-9 m apart; the series are good to 15 nm.
const TOLERANCE = 5e-8;

describe("the geodesic inverse and direct problems", () => {
  test("undo each other all over the globe", () => {
    fc.assert(
      fc.property(anyPosition, anyPosition, (from, to) => {
        const { distance, initialCourse, finalCourse } = geodesicInverse(WGS84, from, to);
        const reached = geodesicDirect(WGS84, from, initialCourse, distance);
        expect(apart(WGS84, to, reached)).toBeLessThan(TOLERANCE);
        const back = geodesicDirect(WGS84, to, finalCourse, -distance);
        expect(apart(WGS84, from, back)).toBeLessThan(TOLERANCE);
      }),
      { numRuns: 1000 },
    );
  });

  test("give the same length both ways", () => {
    fc.assert(
      fc.property(anyPosition, anyPosition, (from, to) => {
        const there = geodesicInverse(WGS84, from, to);
        const back = geodesicInverse(WGS84, to, from);
        expect(Math.abs(there.distance - back.distance)).toBeLessThan(TOLERANCE);
      }),
      { numRuns: 500 },
    );
  });

  test("on a sphere are great circles", () => {
    const quarter = (6371000 * Math.PI) / 2;
    expect(geodesicInverse(SPHERE, at(0, 0), at(0, 90)).distance).toBeCloseTo(quarter, 7);
    expect(geodesicInverse(SPHERE, at(0, 0), at(90, 0)).distance).toBeCloseTo(quarter, 7);
    // From 45 N, a quarter turn of longitude away: cos σ = 1/2.
    const { distance, initialCourse } = geodesicInverse(SPHERE, at(45, 0), at(45, 90));
    expect(distance).toBeCloseTo((6371000 * Math.PI) / 3, 7);
    expect(initialCourse).toBeCloseTo(Math.atan(Math.SQRT2) / (Math.PI / 180), 12);
  });

  test("along the equator keep to it as far as it is shortest", () => {
    expect(geodesicInverse(WGS84, at(0, 359), at(0, 2))).toMatchObject({
      initialCourse: 90,
      finalCourse: 90,
    });
    expect(geodesicInverse(WGS84, at(0, 2), at(0, 359))).toMatchObject({
      initialCourse: 270,
      finalCourse: 270,
    });
    expect(geodesicInverse(WGS84, at(0, 0), at(0, 179.5)).initialCourse).toBeLessThan(60);
  });

  test("over a pole have the length of the two meridian arcs", () => {
    const { distance, initialCourse, finalCourse } = geodesicInverse(WGS84, at(70, 10), at(60, -170));
    const arcs = meridianArc(WGS84, 70, 90) + meridianArc(WGS84, 60, 90);
    expect(Math.abs(distance - arcs)).toBeLessThan(TOLERANCE);
    expect([initialCourse, finalCourse]).toEqual([0, 180]);
  });

  test("between coincident positions have length and courses 0", () => {
    const none = { distance: 0, initialCourse: 0, finalCourse: 0 };
    expect(geodesicInverse(WGS84, at(50, 10), at(50, 10))).toEqual(none);
    expect(geodesicInverse(WGS84, at(50, -10), at(50, 350))).toEqual(none);
    expect(geodesicInverse(WGS84, at(90, 0), at(90, 120))).toEqual(none);
  });

  test.each([
    [at(91, 0), at(0, 0), "latitude of the start is in -90..90 degrees; found 91"],
    [at(Number.NaN, 0), at(0, 0), "latitude of the start is in -90..90 degrees; found NaN"],
    [at(0, 0), at(-90.5, 0), "latitude of the destination is in -90..90 degrees; found -90.5"],
    [at(0, Number.NaN), at(0, 0), "longitude of the start is a finite number of degrees; found NaN"],
    [at(0, 0), at(0, -1 / 0), "longitude of the destination is a finite number of degrees; found -Infinity"],
  ])("refuse what is no position: %j to %j", (from, to, message) => {
    expect(() => geodesicInverse(WGS84, from, to)).toThrow(message);
    expect(() => geodesicTrack(WGS84, from, to)).toThrow(message);
  });

  test("refuse a course or distance that is not finite", () => {
    expect(() => geodesicDirect(WGS84, at(0, 0), Number.NaN, 1)).toThrow(
      "course is a finite number; found NaN",
    );
    expect(() => geodesicDirect(WGS84, at(0, 0), 0, 1 / 0)).toThrow(
      "distance is a finite number; found Infinity",
    );
    expect(() => geodesicDirect(WGS84, at(95, 0), 0, 1)).toThrow("latitude of the start");
  });
});

describe("a geodesic track", () => {
  test("begins and ends exactly at what it was given, for any two positions", () => {
    fc.assert(
      fc.property(anyPosition, anyPosition, (from, to) => {
        const track = geodesicTrack(WGS84, from, to);
        const start = track.at(0);
        const end = track.at(track.length);
        if (track.length > 0) {
          expect(end.lat).toBe(to.lat + 0);
          expect(Math.abs(angleDifference(end.lon, to.lon))).toBeLessThan(1e-12);
        }
        expect([start.lat, start.lon, start.course]).toEqual([
          from.lat + 0,
          from.lon + 0,
          track.initialCourse,
        ]);
      }),
      { numRuns: 500 },
    );
  });

  test("is continuous, and its parts add up, for any two positions", () => {
    const share = fc.double({ min: 0.001, max: 0.999, noNaN: true });
    fc.assert(
      fc.property(anyPosition, anyPosition, share, (from, to, part) => {
        const track = geodesicTrack(WGS84, from, to);
        fc.pre(track.length > 1);
        const s = part * track.length;
        const place = track.at(s);
        expect(place.course).toBeGreaterThanOrEqual(0);
        expect(place.course).toBeLessThan(360);
        expect(Math.abs(place.lon - from.lon)).toBeLessThanOrEqual(180 + 1e-9);
        const there = geodesicInverse(WGS84, from, place).distance;
        const onward = geodesicInverse(WGS84, place, to).distance;
        expect(Math.abs(there - s)).toBeLessThan(TOLERANCE);
        expect(Math.abs(onward - (track.length - s))).toBeLessThan(TOLERANCE);
      }),
      { numRuns: 500 },
    );
  });

  test("keeps its longitude continuous from the start's own, across Greenwich and the antimeridian", () => {
    for (const [from, to, end] of [
      [at(10, 359), at(20, 2), 362],
      [at(10, 2), at(20, 359), -1],
      [at(10, 175), at(20, -170), 190],
      [at(10, -170), at(20, 175), -185],
      [at(10, 181), at(20, 179), 179],
    ] as const) {
      const track = geodesicTrack(WGS84, from, to);
      const lons = Array.from({ length: 101 }, (_, i) => track.at((track.length * i) / 100).lon);
      expect(lons[0]).toBe(from.lon);
      expect(lons[100]).toBe(end);
      const steps = lons.slice(1).map((lon, i) => Math.abs(lon - (lons[i] as number)));
      expect(Math.max(...steps)).toBeLessThan(1);
    }
  });

  test("along a meridian has that longitude to the last bit", () => {
    for (const track of [
      geodesicTrack(WGS84, at(10, 20), at(-30, 20)),
      geodesicTrack(WGS84, at(-30, 20), at(10, 20)),
    ]) {
      for (let i = 0; i <= 100; i++) {
        const place = track.at((track.length * i) / 100);
        expect([place.lon, place.course]).toEqual([20, track.initialCourse]);
      }
    }
  });

  test("over a pole turns to the other meridian and the other course there", () => {
    for (const [from, to] of [
      [at(70, 10), at(60, -170)],
      [at(70, -170), at(60, 10)],
      [at(70, 190), at(60, 370)],
    ] as const) {
      const track = geodesicTrack(WGS84, from, to);
      const pole = meridianArc(WGS84, from.lat, 90);
      expect(track.at(pole).lat).toBeCloseTo(90, 12);
      expect(track.at(pole - 1)).toMatchObject({ lon: from.lon, course: 0 });
      expect(track.at(pole + 1)).toMatchObject({ lon: from.lon + 180, course: 180 });
      expect(track.at(track.length)).toEqual({ lat: to.lat, lon: from.lon + 180, course: 180 });
    }
  });

  test("from and to a pole runs on one meridian, its course at the pole counted from the longitude given there", () => {
    const from = geodesicTrack(WGS84, at(90, 50), at(50, 10));
    expect(from.initialCourse).toBe(220);
    expect(from.at(0)).toEqual({ lat: 90, lon: 50, course: 220 });
    expect(from.at(1)).toMatchObject({ lon: 10, course: 180 });
    const to = geodesicTrack(WGS84, at(50, 10), at(90, 77));
    expect(to.at(to.length - 1)).toMatchObject({ lon: 10, course: 0 });
    expect(to.at(to.length)).toEqual({ lat: 90, lon: 77, course: 67 });
    const along = geodesicTrack(WGS84, at(0, 180), at(90, 180));
    expect(along.at(along.length).lon).toBe(180);
    const through = geodesicTrack(WGS84, at(90, 0), at(-90, 33));
    expect(through.at(through.length / 2)).toMatchObject({ lon: 33, course: 180 });
    expect(through.length).toBeCloseTo(2 * meridianArc(WGS84, 0, 90), 7);
  });

  test("between opposite meridians goes east, over the nearer pole", () => {
    const track = geodesicTrack(WGS84, at(-80, 0), at(-80, -180));
    expect(track.initialCourse).toBe(180);
    expect(track.at(track.length)).toEqual({ lat: -80, lon: 180, course: 0 });
  });

  test("between coincident positions stays there", () => {
    const track = geodesicTrack(WGS84, at(50, 10), at(50, 10));
    expect([track.length, track.initialCourse, track.finalCourse]).toEqual([0, 0, 0]);
    expect(track.at(0)).toEqual({ lat: 50, lon: 10, course: 0 });
  });

  test("takes a micrometre beyond an end as the end, and more as a defect", () => {
    const track = geodesicTrack(WGS84, at(50, 10), at(51, 11));
    expect(track.at(-1e-7)).toEqual(track.at(0));
    expect(track.at(track.length + 1e-7)).toEqual(track.at(track.length));
    for (const s of [-1, track.length + 1, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(() => track.at(s)).toThrow(RangeError);
    }
  });
});
