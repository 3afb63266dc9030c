import { expect, test } from "vitest";
import { ellipsoid, WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicInverse } from "../../src/geodesy/geodesic.ts";
import { makeTrack, makeTrackOn } from "../../src/geodesy/make-track.ts";
import { rhumbInverse } from "../../src/geodesy/rhumb.ts";

const from = { lat: 58.1, lon: -6.4 };
const to = { lat: 61.2, lon: 4.9 };

test("a track is the line of its kind on WGS84, and keeps what it was made from", () => {
  const geodesic = makeTrack(from, to, "geodesic");
  const rhumb = makeTrack(from, to, "rhumb");
  expect(geodesic).toMatchObject({
    path: "geodesic",
    from,
    to,
    length: geodesicInverse(WGS84, from, to).distance,
  });
  expect(rhumb).toMatchObject({ path: "rhumb", from, to, length: rhumbInverse(WGS84, from, to).distance });
  expect(rhumb.length).toBeGreaterThan(geodesic.length);
});

test("a track can be made on another ellipsoid", () => {
  const sphere = ellipsoid(6371000, 0);
  for (const path of ["geodesic", "rhumb"] as const) {
    const track = makeTrackOn(sphere, { lat: 0, lon: 0 }, { lat: 0, lon: 90 }, path);
    expect(track.length).toBeCloseTo((6371000 * Math.PI) / 2, 7);
    expect(track.at(track.length / 3).lon).toBeCloseTo(30, 11);
  }
});
