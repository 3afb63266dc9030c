import { bbox, booleanPointInPolygon, polygon } from "@turf/turf";
import fc from "fast-check";
import type { Feature, FeatureCollection, MultiPolygon, Polygon } from "geojson";
import { feature } from "topojson-client";
import { describe, expect, it } from "vitest";
import { prepareLand } from "../../src/coast/land.ts";
import { isOnLand, type LandStretch, landCrossings, type PathPoint } from "../../src/coast/land-crossings.ts";
import { densify } from "../../src/geodesy/drawn-line.ts";
import { makeTrack } from "../../src/geodesy/make-track.ts";
import type { PathKind, Position } from "../../src/geodesy/track.ts";
import { naturalEarth } from "./natural-earth.ts";

const topology = naturalEarth();
const land = prepareLand(topology);

const place = (lat: number, lon: number): Position => ({ lat, lon });
const leg = (from: Position, to: Position, path: PathKind = "geodesic") => densify(makeTrack(from, to, path));
const lengthOf = (stretches: readonly LandStretch[]) =>
  stretches.reduce((sum, { from_m, to_m }) => sum + to_m - from_m, 0);

/** Land from 10 to 20 east, 10 south to 10 north. */
const block = prepareLand({
  type: "Topology",
  arcs: [
    [
      [10, -10],
      [20, -10],
      [20, 10],
      [10, 10],
      [10, -10],
    ],
  ],
  objects: { land: { type: "Polygon", arcs: [[0]] } },
});

describe("land crossings of a rectangular land", () => {
  const points: PathPoint[] = [
    { s: 0, lat: 1, lon: 5 },
    { s: 1000, lat: 1, lon: 15 },
    { s: 3000, lat: 1, lon: 35 },
  ];

  it("are one stretch with exact ends, however many cells and points it spans", () => {
    const [stretch, ...more] = landCrossings(block, points);
    expect(more).toEqual([]);
    // 5 degrees of the first thousand metres, then 5 of the 20 of the next two thousand; rounding alone.
    expect(stretch?.from_m).toBeCloseTo(500, 9);
    expect(stretch?.to_m).toBeCloseTo(1500, 9);
  });

  it("are the same on another turn of longitude", () => {
    const turned = points.map((point) => ({ ...point, lon: point.lon - 360 }));
    const [stretch] = landCrossings(block, turned);
    expect(stretch?.from_m).toBeCloseTo(500, 7);
    expect(stretch?.to_m).toBeCloseTo(1500, 7);
  });

  it("start at 0 and end at the leg's end where both ends are on land", () => {
    const inside = [
      { s: 0, lat: -3, lon: 12 },
      { s: 700, lat: 4, lon: 17 },
    ];
    expect(landCrossings(block, inside)).toEqual([{ from_m: 0, to_m: 700 }]);
  });

  it("are none beside it, and none for a line along its own edge's outside", () => {
    const beside = [
      { s: 0, lat: 10.0001, lon: 5 },
      { s: 900, lat: 10.0001, lon: 25 },
    ];
    expect(landCrossings(block, beside)).toEqual([]);
  });

  it("are two stretches where the leg leaves and comes back", () => {
    const zigzag = [
      { s: 0, lat: 5, lon: 15 },
      { s: 1000, lat: 15, lon: 15 },
      { s: 2000, lat: 5, lon: 15 },
    ];
    const stretches = landCrossings(block, zigzag);
    expect(stretches).toHaveLength(2);
    expect(stretches[0]?.to_m).toBeCloseTo(500, 9);
    expect(stretches[1]?.from_m).toBeCloseTo(1500, 9);
  });

  it("leave out a length of nothing and keep one that stands still on land", () => {
    const still = [
      { s: 0, lat: 5, lon: 15 },
      { s: 0, lat: 5, lon: 15 },
      { s: 100, lat: 5, lon: 15 },
    ];
    expect(landCrossings(block, still)).toEqual([{ from_m: 0, to_m: 100 }]);
  });

  it("are none for a leg of one point or none", () => {
    expect(landCrossings(block, [])).toEqual([]);
    expect(landCrossings(block, [{ s: 0, lat: 0, lon: 15 }])).toEqual([]);
  });
});

describe("land crossings of Natural Earth 1:10m", () => {
  it("find the Isthmus of Panama, which is 50 to 90 km across there (from memory)", () => {
    const stretches = landCrossings(land, leg(place(9.7, -79.8), place(8.3, -79.4)));
    expect(lengthOf(stretches)).toBeGreaterThan(50e3);
    expect(lengthOf(stretches)).toBeLessThan(90e3);
    expect(stretches[0]?.from_m).toBeGreaterThan(1e3);
  });

  it("find the Suez isthmus, 115 to 170 km, since the canal is not drawn (from memory)", () => {
    const stretches = landCrossings(land, leg(place(31.6, 32.5), place(29.5, 32.6), "rhumb"));
    expect(lengthOf(stretches)).toBeGreaterThan(115e3);
    expect(lengthOf(stretches)).toBeLessThan(190e3);
  });

  it("are none through the Strait of Gibraltar, the Bering Strait and Bass Strait", () => {
    expect(landCrossings(land, leg(place(35.95, -5.9), place(36, -4.8)))).toEqual([]);
    expect(landCrossings(land, leg(place(65.2, -168.6), place(66.5, -168.4)))).toEqual([]);
    expect(landCrossings(land, leg(place(-39.3, 143), place(-39.3, 145.5), "rhumb"))).toEqual([]);
  });

  it("are none across an empty ocean, on either side of the antimeridian", () => {
    expect(landCrossings(land, leg(place(35, 150), place(41, -165)))).toEqual([]);
    expect(landCrossings(land, leg(place(35, 150), place(41, 195), "rhumb"))).toEqual([]);
  });

  it("down the antimeridian find Wrangel Island, then Chukotka, then no more before Fiji", () => {
    const stretches = landCrossings(land, leg(place(73, 180), place(0, 180), "rhumb"));
    const track = makeTrack(place(73, 180), place(0, 180), "rhumb");
    const latitudes = stretches.map(({ from_m, to_m }) => [track.at(from_m).lat, track.at(to_m).lat]);
    // Wrangel lies between 70.7 and 71.6 N; Chukotka's coasts are at 68.9 N and 65 N there (from memory).
    expect(latitudes[0]?.[0]).toBeLessThan(71.7);
    expect(latitudes[0]?.[1]).toBeGreaterThan(70.7);
    expect(latitudes[1]?.[0]).toBeLessThan(69.2);
    expect(latitudes.at(-1)?.[1]).toBeGreaterThan(64.5);
  });

  it("end at the pole for a meridian leg into Antarctica, and begin once", () => {
    const points = leg(place(-60, 120), place(-90, 120));
    const stretches = landCrossings(land, points);
    expect(stretches.at(-1)?.to_m).toBe(points.at(-1)?.s);
    // Wilkes Land's coast at 120 E is near 67 S (from memory): 23 degrees of 111.5 km to the pole.
    expect(lengthOf(stretches)).toBeGreaterThan(2450e3);
    expect(lengthOf(stretches)).toBeLessThan(2640e3);
  });

  it("cover the whole of a geodesic over the South Pole", () => {
    const points = leg(place(-80, 100), place(-80, -80));
    const [stretch, ...more] = landCrossings(land, points);
    expect(more).toEqual([]);
    expect(stretch).toEqual({ from_m: 0, to_m: points.at(-1)?.s });
  });

  it("are the reverse of those of the leg the other way", () => {
    const points = leg(place(60, -10), place(30, 40));
    const length = points.at(-1)?.s ?? 0;
    const reversed = points.map((point) => ({ ...point, s: length - point.s })).reverse();
    const there = landCrossings(land, points);
    const back = landCrossings(land, reversed).reverse();
    expect(there.length).toBeGreaterThan(3);
    expect(back).toHaveLength(there.length);
    for (const [i, stretch] of there.entries()) {
      // A micrometre: rounding of s on a leg of 5,000 km.
      expect(length - (back[i]?.to_m ?? 0)).toBeCloseTo(stretch.from_m, 5);
      expect(length - (back[i]?.from_m ?? 0)).toBeCloseTo(stretch.to_m, 5);
    }
  });
});

/** The land's polygons as they were decoded, each ring a polygon of its own, with longitudes made continuous from its first. */
function plainPolygons(): Feature<Polygon>[][] {
  const { features } = feature(topology, topology.objects.land) as FeatureCollection<MultiPolygon>;
  return features.flatMap(({ geometry }) =>
    geometry.coordinates.filter(isReal).map((rings) =>
      rings.map((ring) => {
        const shape = polygon([continuous(ring as [number, number][])]);
        return { ...shape, bbox: bbox(shape) };
      }),
    ),
  );
}

/** All but the placeholder at 0° N 0° E, an island of a kilometre that is not there. */
function isReal(rings: number[][][]): boolean {
  const [lon = 0, lat = 0] = rings[0]?.[0] ?? [];
  return Math.hypot(lon, lat) > 0.01;
}

/** Antarctica, which goes round the pole, is closed over it. */
function continuous(ring: [number, number][]): [number, number][] {
  const out: [number, number][] = [];
  for (const [lon, lat] of ring) {
    let x = lon;
    const previous = out.at(-1)?.[0] ?? lon;
    while (x - previous > 180) x -= 360;
    while (x - previous < -180) x += 360;
    out.push([x, lat]);
  }
  const [first] = ring;
  const last = out.at(-1);
  if (first !== undefined && last !== undefined && Math.abs(last[0] - first[0]) > 180) {
    out.push([last[0], -90], [first[0], -90], first);
  }
  return out;
}

const PLAIN = plainPolygons();
/** Every position of a coast, to draw places near coasts from. */
const COAST = PLAIN.flat().flatMap((ring) => ring.geometry.coordinates.flat()) as [number, number][];

/** On land by point in polygon over all polygons and turns, with no index: inside an odd number of rings of one polygon. */
function onLandPlainly({ lat, lon }: Position): boolean {
  const within = (ring: Feature<Polygon>) =>
    [-720, -360, 0, 360, 720].some((turn) => booleanPointInPolygon([lon + turn, lat], ring));
  return PLAIN.some((rings) => rings.filter(within).length % 2 === 1);
}

/** Degrees, but not so near zero that a place falls on the coast's own position, where rounding decides. */
const offset = fc.double({ min: -0.3, max: 0.3, noNaN: true }).filter((degrees) => Math.abs(degrees) > 1e-6);
/** A place within a third of a degree of some coast. */
const nearCoast = fc
  .record({
    at: fc.integer({ min: 0, max: COAST.length - 1 }),
    east: offset,
    north: offset,
  })
  .map(({ at, east, north }): Position => {
    const [lon, lat] = COAST[at] as [number, number];
    return place(Math.max(-90, Math.min(90, lat + north)), lon + east);
  });
const anywhere = fc.record({
  lat: fc.double({ min: -90, max: 90, noNaN: true }),
  lon: fc.double({ min: -360, max: 360, noNaN: true }),
});

describe("against point in polygon over the whole coast, without an index", () => {
  it("a place is on land or not, near coasts and anywhere", () => {
    fc.assert(
      fc.property(fc.oneof(nearCoast, anywhere), (position) => {
        expect(isOnLand(land, position)).toBe(onLandPlainly(position));
      }),
      { numRuns: 1500 },
    );
  });

  it("the places of a leg are on land in its stretches and at sea outside them", () => {
    const shares = fc.array(fc.double({ min: 0, max: 1, noNaN: true }), { minLength: 8, maxLength: 8 });
    fc.assert(
      fc.property(nearCoast, anywhere, nearCoast, fc.boolean(), shares, (from, far, near, toFar, at) => {
        const to = toFar ? far : place(near.lat, near.lon);
        const points: PathPoint[] = [
          { s: 0, ...from },
          { s: 1e6, ...to },
        ];
        const stretches = landCrossings(land, points);
        for (const share of at) {
          const s = share * 1e6;
          // A place within a metre (of a thousand km) of a stretch's end may fall to either side.
          if (stretches.some(({ from_m, to_m }) => Math.abs(s - from_m) < 1 || Math.abs(s - to_m) < 1))
            continue;
          const covered = stretches.some(({ from_m, to_m }) => from_m < s && s < to_m);
          const here = place(from.lat + (to.lat - from.lat) * share, from.lon + (to.lon - from.lon) * share);
          expect(covered).toBe(onLandPlainly(here));
        }
      }),
      { numRuns: 200 },
    );
  });
});
