import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { DEGREE } from "../../src/geodesy/angle.ts";
import { cutAtAntimeridian, densify } from "../../src/geodesy/drawn-line.ts";
import { ellipsoid, WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicInverse } from "../../src/geodesy/geodesic.ts";
import { makeTrack, makeTrackOn } from "../../src/geodesy/make-track.ts";
import type { PathKind, Position } from "../../src/geodesy/track.ts";
import { anyPosition } from "./arbitrary.ts";

const at = (lat: number, lon: number): Position => ({ lat, lon });
const PATHS: PathKind[] = ["geodesic", "rhumb"];

/** Place in space, m, on WGS84: the straight distance between two is a lower bound of that on the surface. */
function inSpace({ lat, lon }: Position): [number, number, number] {
  const sin = Math.sin(lat * DEGREE);
  const normal = WGS84.a / Math.sqrt(1 - WGS84.e2 * sin * sin);
  const across = normal * Math.cos(lat * DEGREE);
  return [across * Math.cos(lon * DEGREE), across * Math.sin(lon * DEGREE), normal * (1 - WGS84.e2) * sin];
}

/** Distance, m, of a place from the nearest of a fine row of places. */
function nearest(place: Position, row: Position[]): number {
  const [x, y, z] = inSpace(place);
  let least = Number.POSITIVE_INFINITY;
  for (const other of row) {
    const [ox, oy, oz] = inSpace(other);
    least = Math.min(least, Math.hypot(x - ox, y - oy, z - oz));
  }
  return least;
}

const between = (one: Position, two: Position, share: number): Position =>
  at(one.lat + (two.lat - one.lat) * share, one.lon + (two.lon - one.lon) * share);

describe("a densified track", () => {
  test("stays within the tolerance of the track, for any two positions and either path", () => {
    const tolerance = 500;
    fc.assert(
      fc.property(anyPosition, anyPosition, fc.constantFrom(...PATHS), (from, to, path) => {
        const track = makeTrack(from, to, path);
        const points = densify(track, tolerance);
        for (let i = 1; i < points.length; i++) {
          const [one, two] = [points[i - 1], points[i]] as [(typeof points)[0], (typeof points)[0]];
          // The chord, and the track beside it, each as 64 steps: the steps of the chord are the error of `nearest`.
          const chord = Array.from({ length: 65 }, (_, k) => between(one, two, k / 64));
          const step = geodesicInverse(WGS84, chord[32] as Position, chord[33] as Position).distance;
          for (const share of [0.07, 0.2, 0.35, 0.5, 0.65, 0.8, 0.93]) {
            const place = track.at(one.s + (two.s - one.s) * share);
            const slack = Math.hypot(tolerance, step);
            expect(nearest(place, chord)).toBeLessThan(slack);
          }
        }
      }),
      { numRuns: 60 },
    );
  });

  test("runs from end to end in order, its vertices on the track", () => {
    for (const path of PATHS) {
      const track = makeTrack(at(50, -5), at(41, -71), path);
      const points = densify(track);
      expect(points[0]).toEqual({ s: 0, lat: 50, lon: -5 });
      expect(points.at(-1)).toEqual({ s: track.length, lat: 41, lon: -71 });
      for (let i = 1; i < points.length; i++) {
        expect((points[i] as { s: number }).s).toBeGreaterThan((points[i - 1] as { s: number }).s);
      }
      for (const { s, lat, lon } of points) expect(track.at(s)).toMatchObject({ lat, lon });
    }
  });

  test("has no vertex to spare where the track is straight in longitude and latitude", () => {
    expect(densify(makeTrack(at(10, 20), at(-30, 20), "geodesic"))).toHaveLength(2);
    expect(densify(makeTrack(at(40, 20), at(40, 60), "rhumb"))).toHaveLength(2);
    expect(densify(makeTrack(at(0, 20), at(0, 60), "geodesic"))).toHaveLength(2);
  });

  test("has about the square root as many vertices for a tolerance as much wider", () => {
    const track = makeTrack(at(50, -5), at(41, -71), "geodesic");
    const fine = densify(track, 10).length;
    const coarse = densify(track, 1000).length;
    expect(fine).toBeLessThan(800);
    expect(fine / coarse).toBeGreaterThan(5);
    expect(fine / coarse).toBeLessThan(20);
  });

  test("is bounded where it crosses a pole or passes beside one", () => {
    for (const to of [at(80, 180), at(80, 179.9999), at(80, 179.999999999), at(90, 12), at(85, 170)]) {
      for (const path of PATHS) {
        for (const track of [makeTrack(at(80, 0), to, path), makeTrack(to, at(80, 0), path)]) {
          expect(densify(track, 1).length).toBeLessThan(5000);
        }
      }
    }
  });

  test("of a geodesic over a pole has a vertex within the tolerance of it", () => {
    const points = densify(makeTrack(at(70, 10), at(60, -170), "geodesic"), 50);
    const highest = Math.max(...points.map(({ lat }) => lat));
    expect((90 - highest) * 111_694).toBeLessThan(50);
  });

  test("meets the antimeridian at the track's own latitude, each path at its own", () => {
    // GeodSolve and the closed form of the conformal latitude, computed outside this project; straight: -16.6666667.
    const expected = { geodesic: -16.8028164, rhumb: -16.6757895 };
    for (const path of PATHS) {
      for (const [from, to, edge] of [
        [at(-18, 175), at(-14, -170), 180],
        [at(-14, -170), at(-18, 175), -180],
        [at(-18, 175 + 360), at(-14, 190), 540],
      ] as const) {
        const crossing = densify(makeTrack(from, to, path), 1000).filter(({ lon }) => lon === edge);
        expect(crossing).toHaveLength(1);
        expect(crossing[0]?.lat).toBeCloseTo(expected[path], 7);
      }
    }
  });

  test("of coincident positions is one vertex", () => {
    expect(densify(makeTrack(at(50, 10), at(50, 10), "rhumb"))).toEqual([{ s: 0, lat: 50, lon: 10 }]);
  });

  test("can be had on another ellipsoid", () => {
    const small = ellipsoid(1000, 0);
    const track = makeTrackOn(small, at(50, -5), at(41, -71), "geodesic");
    expect(densify(track, 200, small)).toHaveLength(2);
    expect(densify(track, 0.01, small).length).toBeGreaterThan(50);
  });

  test.each([0, -1, 0.001, Number.NaN, Number.POSITIVE_INFINITY])(
    "refuses a tolerance of %d",
    (tolerance) => {
      expect(() => densify(makeTrack(at(0, 0), at(1, 1), "rhumb"), tolerance)).toThrow(
        `tolerance of a drawn line is at least 0.01 m; found ${tolerance}`,
      );
    },
  );
});

describe("a line cut at the antimeridian", () => {
  test("stays whole where it does not cross, and comes back to -180..180", () => {
    expect(cutAtAntimeridian([at(1, 10), at(2, 20)])).toEqual([
      [
        [10, 1],
        [20, 2],
      ],
    ]);
    expect(cutAtAntimeridian([at(1, 359), at(2, 362)])).toEqual([
      [
        [-1, 1],
        [2, 2],
      ],
    ]);
  });

  test("has two parts that meet there, eastward and westward", () => {
    expect(cutAtAntimeridian([at(0, 170), at(10, 190), at(10, 200)])).toEqual([
      [
        [170, 0],
        [180, 5],
      ],
      [
        [-180, 5],
        [-170, 10],
        [-160, 10],
      ],
    ]);
    expect(cutAtAntimeridian([at(0, -170), at(10, -190)])).toEqual([
      [
        [-170, 0],
        [-180, 5],
      ],
      [
        [180, 5],
        [170, 10],
      ],
    ]);
  });

  test("is cut at a vertex that stands on the antimeridian, not at the straight line's place", () => {
    expect(cutAtAntimeridian([at(0, 170), at(7, 180), at(10, 190)])).toEqual([
      [
        [170, 0],
        [180, 7],
      ],
      [
        [-180, 7],
        [-170, 10],
      ],
    ]);
  });

  test("that only touches the antimeridian, or begins or ends there, is not cut", () => {
    expect(cutAtAntimeridian([at(0, 170), at(5, 180), at(10, 170)])).toHaveLength(1);
    expect(cutAtAntimeridian([at(0, 170), at(5, 180)])).toEqual([
      [
        [170, 0],
        [180, 5],
      ],
    ]);
    expect(cutAtAntimeridian([at(5, 180), at(0, 190)])).toEqual([
      [
        [-180, 5],
        [-170, 0],
      ],
    ]);
    expect(cutAtAntimeridian([at(0, 180), at(5, 180), at(6, 170)])).toEqual([
      [
        [180, 0],
        [180, 5],
        [170, 6],
      ],
    ]);
    expect(cutAtAntimeridian([at(0, -180), at(5, -180)])).toEqual([
      [
        [-180, 0],
        [-180, 5],
      ],
    ]);
  });

  test("more than once round has as many parts as it has turns", () => {
    const parts = cutAtAntimeridian([at(0, 0), at(8, 1440)]);
    expect(parts).toHaveLength(5);
    expect(parts[1]).toEqual([
      [-180, 1],
      [180, 3],
    ]);
  });

  test("of one position, or of none, is that", () => {
    expect(cutAtAntimeridian([at(3, 359)])).toEqual([[[-1, 3]]]);
    expect(cutAtAntimeridian([at(3, 180)])).toEqual([[[180, 3]]]);
    expect(cutAtAntimeridian([])).toEqual([]);
  });

  test("of any track lies within -180..180, joins up, and leaves nothing out", () => {
    fc.assert(
      fc.property(anyPosition, anyPosition, fc.constantFrom(...PATHS), (from, to, path) => {
        const track = makeTrack(from, to, path);
        fc.pre(track.length > 1);
        const points = densify(track, 5000);
        const parts = cutAtAntimeridian(points);
        const flat = parts.flat();
        for (const [lon, lat] of flat) {
          expect(Math.abs(lon)).toBeLessThanOrEqual(180);
          expect(Math.abs(lat)).toBeLessThanOrEqual(90);
        }
        for (let i = 1; i < parts.length; i++) {
          const end = parts[i - 1]?.at(-1) as [number, number];
          const start = parts[i]?.[0] as [number, number];
          expect(start).toEqual([-end[0], end[1]]);
          expect(Math.abs(end[0])).toBe(180);
        }
        expect(parts.every((part) => part.length >= 2)).toBe(true);
        // Every vertex once, and the meeting places twice.
        expect(flat).toHaveLength(points.length + parts.length - 1);
      }),
      { numRuns: 300 },
    );
  });
});
