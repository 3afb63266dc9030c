import { describe, expect, test } from "vitest";
import {
  COS,
  evaluate,
  evaluateAll,
  fitTrackCurve,
  LAT,
  LON,
  SIN,
  STRIDE,
  type TrackCurve,
} from "../../src/estimate/track-curve.ts";
import { WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicDirect } from "../../src/geodesy/geodesic.ts";
import { makeTrack } from "../../src/geodesy/make-track.ts";
import type { PathKind, Position, Track } from "../../src/geodesy/track.ts";
import { between, seeded } from "../seeded.ts";

const RADIANS = Math.PI / 180;
const PATHS: readonly PathKind[] = ["geodesic", "rhumb"];

/** The largest differences between a fit and its track, at random places of it. */
interface Worst {
  /** Degrees of latitude; of longitude, on the ground (times cos φ); of the unit vector of the course. */
  lat: number;
  lon: number;
  course: number;
}

function pieceOf({ starts }: TrackCurve, s: number): number {
  const next = starts.findIndex((start) => start > s);
  return next < 0 ? starts.length - 2 : next - 1;
}

function measure(track: Track, random: () => number, places: number, worst: Worst): void {
  const curve = fitTrackCurve(track);
  const { starts, coefficients } = curve;
  for (let n = 0; n < places; n += 1) {
    const s = track.length * random();
    const p = pieceOf(curve, s);
    const from = starts[p] as number;
    const to = starts[p + 1] as number;
    // A piece as short as this stands where the track turns at once, at a pole.
    if (to - from < 2e-4 && track.length > 1) continue;
    const x = (2 * (s - from)) / (to - from) - 1;
    const at = (offset: number) => evaluate(coefficients, p * STRIDE + offset, x);
    const point = track.at(s);
    const cos = Math.cos(point.lat * RADIANS);
    const sine = at(SIN) - Math.sin(point.course * RADIANS);
    const cosine = at(COS) - Math.cos(point.course * RADIANS);
    // Near a pole the longitude, and the course with it, is known to the place's own rounding over the radius of its parallel.
    worst.lat = Math.max(worst.lat, Math.abs(at(LAT) - point.lat));
    worst.lon = Math.max(worst.lon, (Math.abs(at(LON) - point.lon) * cos) / (1 + Math.abs(point.lon) / 90));
    worst.course = Math.max(worst.course, Math.hypot(sine, cosine) * cos);
  }
}

function worstOf(
  seed: number,
  legs: number,
  ends: (random: () => number) => readonly [Position, Position],
): Worst {
  const random = seeded(seed);
  const worst = { lat: 0, lon: 0, course: 0 };
  for (let n = 0; n < legs; n += 1) {
    const [from, to] = ends(random);
    for (const path of PATHS) measure(makeTrack(from, to, path), random, 25, worst);
  }
  return worst;
}
const anywhere = (random: () => number): Position => ({
  lat: Math.asin(between(random, -1, 1)) / RADIANS,
  lon: between(random, -180, 360),
});

/*
 * A piece is accepted at 2e-12° and 1e-13 of the unit vector at four places between its nodes; elsewhere in it the error is at most
 * twice that at a longitude within half a turn. The largest found here are 1.8e-12°, 2.2e-12° and 1.2e-13.
 */
const ANGLE_DEG = 4e-12;
const UNIT = 3e-13;

function expectClose({ lat, lon, course }: Worst): void {
  expect(lat).toBeLessThan(ANGLE_DEG);
  expect(lon).toBeLessThan(ANGLE_DEG);
  expect(course).toBeLessThan(UNIT);
}

describe("a fitted track", () => {
  test("is the track between any two places of the globe, geodesic and rhumb", () => {
    expectClose(worstOf(1, 150, (random) => [anywhere(random), anywhere(random)]));
  });

  test.each([1, -1])("is the track within metres of a pole (%i)", (sign) => {
    const ends = (random: () => number): readonly [Position, Position] => [
      { lat: sign * (90 - 10 ** between(random, -5, 0.5)), lon: between(random, -180, 180) },
      { lat: sign * between(random, 60, 89.9), lon: between(random, -180, 180) },
    ];
    expectClose(worstOf(2, 100, ends));
  });

  test("is the track across the antimeridian, its longitude continuous", () => {
    const ends = (random: () => number): readonly [Position, Position] => [
      { lat: between(random, -80, 80), lon: between(random, 170, 180) },
      { lat: between(random, -80, 80), lon: between(random, -180, -170) },
    ];
    expectClose(worstOf(3, 100, ends));
  });

  test("is the track of a leg of a centimetre to a hundred metres", () => {
    const ends = (random: () => number): readonly [Position, Position] => {
      const from = anywhere(random);
      return [from, geodesicDirect(WGS84, from, between(random, 0, 360), 10 ** between(random, -2, 2))];
    };
    expectClose(worstOf(4, 100, ends));
  });

  test("is the track of a leg nearly halfway round the globe", () => {
    const ends = (random: () => number): readonly [Position, Position] => {
      const from = anywhere(random);
      const lon = from.lon + (from.lon > 90 ? -180 : 180) + between(random, -3, 3);
      return [from, { lat: Math.max(-90, Math.min(90, -from.lat + between(random, -3, 3))), lon }];
    };
    expectClose(worstOf(5, 60, ends));
  });

  test("is the track on both sides of a pole that a leg runs over", () => {
    const track = makeTrack({ lat: 80, lon: 20 }, { lat: 75, lon: -160 }, "geodesic");
    const worst = { lat: 0, lon: 0, course: 0 };
    measure(track, seeded(6), 500, worst);
    expectClose(worst);
  });

  test("begins at 0, ends at the track's length, and its pieces meet in the same place and course", () => {
    const random = seeded(7);
    for (let n = 0; n < 40; n += 1) {
      const track = makeTrack(anywhere(random), anywhere(random), PATHS[n % 2] as PathKind);
      const { starts, coefficients } = fitTrackCurve(track);
      expect(starts[0]).toBe(0);
      // 4 nm is one rounding of 20,000 km.
      expect(Math.abs((starts[starts.length - 1] as number) - track.length)).toBeLessThan(4e-9);
      for (let p = 1; p + 1 < starts.length; p += 1) {
        expect(starts[p]).toBeGreaterThan(starts[p - 1] as number);
        for (const [offset, tolerance] of [
          [LAT, 2 * ANGLE_DEG],
          [SIN, 2 * UNIT],
          [COS, 2 * UNIT],
        ] as const) {
          const before = evaluate(coefficients, (p - 1) * STRIDE + offset, 1);
          expect(Math.abs(evaluate(coefficients, p * STRIDE + offset, -1) - before)).toBeLessThan(tolerance);
        }
      }
    }
  });

  test("has the same value at a list of places as at each of them", () => {
    const { coefficients } = fitTrackCurve(makeTrack({ lat: 58, lon: -6 }, { lat: 61, lon: 3 }, "geodesic"));
    const xs = Float64Array.of(-1, -0.7, 0, 0.31, 1);
    const values = new Float64Array(xs.length);
    for (const offset of [LON, LAT, SIN, COS]) {
      evaluateAll(coefficients, offset, xs, values);
      expect([...values]).toEqual([...xs].map((x) => evaluate(coefficients, offset, x)));
    }
  });
});
