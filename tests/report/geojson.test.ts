import { describe, expect, it } from "vitest";
import { WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicInverse } from "../../src/geodesy/geodesic.ts";
import { makeTrack } from "../../src/geodesy/make-track.ts";
import { writeGeoJson } from "../../src/report/geojson.ts";
import { drone, ocean, tender } from "./fixtures.ts";

interface Feature {
  readonly type: string;
  readonly geometry: { readonly type: string; readonly coordinates: unknown };
  readonly properties: Readonly<Record<string, unknown>>;
}
type LonLat = readonly [number, number];

function features(text: string, kind: string): Feature[] {
  const collection = JSON.parse(text) as { features: Feature[] };
  return collection.features.filter((feature) => feature.properties.kind === kind);
}

function lines({ geometry }: Feature): readonly (readonly LonLat[])[] {
  return geometry.type === "LineString"
    ? [geometry.coordinates as LonLat[]]
    : (geometry.coordinates as LonLat[][]);
}

describe("GeoJSON", () => {
  it("is a FeatureCollection of legs, waypoints and the findings that have a place", () => {
    const text = writeGeoJson(tender);
    const collection = JSON.parse(text);
    expect(Object.keys(collection)).toEqual(["type", "title", "advisory", "features"]);
    expect(collection.type).toBe("FeatureCollection");
    expect(features(text, "leg")).toHaveLength(2 + 2 + 3);
    expect(features(text, "waypoint")).toHaveLength(3 + 3 + 4);
    expect(features(text, "finding").map((feature) => feature.properties.code)).toEqual([
      "wind-against-current",
      "cannot-hold-track",
    ]);
    for (const feature of collection.features)
      expect(Object.keys(feature)).toEqual(["type", "geometry", "properties"]);
  });

  it("gives a leg's line its figures, and ends where the waypoints are", () => {
    const [leg] = features(writeGeoJson(tender), "leg");
    const [route] = tender.estimate.routes;
    expect(leg?.properties).toMatchObject({ route: "Outer", storeUnit: "J", ...route?.legs[0] });
    const line = leg === undefined ? [] : (lines(leg)[0] ?? []);
    expect(line[0]).toEqual([-6.3871, 58.1032]);
    expect(line.at(-1)).toEqual([-6.68333, 58.25333]);
  });

  it("cuts the leg that crosses the antimeridian on it, and no other", () => {
    for (const feature of features(writeGeoJson(ocean), "leg")) {
      const parts = lines(feature);
      const crosses = feature.properties.leg === 5;
      expect(feature.geometry.type).toBe(crosses ? "MultiLineString" : "LineString");
      expect(parts).toHaveLength(crosses ? 2 : 1);
      if (crosses) {
        expect(parts[0]?.at(-1)?.[0]).toBe(180);
        expect(parts[1]?.[0]?.[0]).toBe(-180);
        expect(parts[0]?.at(-1)?.[1]).toBe(parts[1]?.[0]?.[1]);
      }
      for (const [lon, lat] of parts.flat()) {
        expect(Math.abs(lon)).toBeLessThanOrEqual(180);
        expect(Math.abs(lat)).toBeLessThanOrEqual(90);
      }
    }
  });

  it("draws a geodesic so that the middle of every straight piece is within 50 m of the track", () => {
    const [feature] = features(writeGeoJson(ocean), "leg");
    const [from, to] = ocean.routes[0]?.waypoints ?? [];
    if (feature === undefined || from === undefined || to === undefined)
      throw new Error("the fixture has a leg");
    const track = makeTrack(from, to, "geodesic");
    const [line = []] = lines(feature);
    expect(line.length).toBeGreaterThan(4);
    for (let i = 1; i < line.length; i += 1) {
      const [a, b] = [line[i - 1], line[i]];
      if (a === undefined || b === undefined) continue;
      const middle = { lat: (a[1] + b[1]) / 2, lon: (a[0] + b[0]) / 2 };
      const along = geodesicInverse(WGS84, from, middle).distance;
      expect(geodesicInverse(WGS84, middle, track.at(along)).distance).toBeLessThan(50);
    }
  });

  it("keeps heights out of the coordinates: they are above the surface, not the ellipsoid", () => {
    const points = features(writeGeoJson(drone), "waypoint");
    expect(points.map((point) => point.properties.height_m)).toEqual([0, 60, 0]);
    for (const point of points) expect(point.geometry.coordinates).toHaveLength(2);
  });
});
