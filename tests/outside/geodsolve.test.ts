// Geodesics against GeographicLib's GeodSolve (Debian package geographiclib-tools 2.1.2), run as a peer.
import { describe, expect, test } from "vitest";
import { angleDifference } from "../../src/geodesy/angle.ts";
import { transverseRadius, WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicDirect, geodesicInverse, geodesicTrack } from "../../src/geodesy/geodesic.ts";
import type { Position } from "../../src/geodesy/track.ts";
import { between, seeded } from "../seeded.ts";
import { runPeer } from "./peer.ts";

const COUNT = 4_000;
// Distances reach 2e7 m, where neighbouring doubles are 4e-9 m apart: a handful of roundings.
const TOLERANCE = 2e-8;

const geodSolve = (options: string[], lines: string[]): number[][] =>
  runPeer("GeodSolve", "geographiclib-tools", [...options, "-p", "9"], lines);

/** Pairs over the whole globe; one in four within a degree of the other's antipode, one in four a short leg. */
function randomPairs(seed: number): { from: Position; to: Position }[] {
  const random = seeded(seed);
  return Array.from({ length: COUNT }, (_, index) => {
    const from = { lat: between(random, -89, 89), lon: between(random, -180, 360) };
    const anywhere = { lat: between(random, -90, 90), lon: between(random, -180, 360) };
    const nearAntipode = {
      lat: -from.lat + between(random, -1, 1),
      lon: from.lon + 180 + between(random, -1, 1),
    };
    const short = { lat: from.lat + between(random, -0.1, 0.1), lon: from.lon + between(random, -0.1, 0.1) };
    return { from, to: [anywhere, nearAntipode, short, anywhere][index % 4] as Position };
  });
}

/** Distance, m, between two places close together. */
function apart(one: Position, lat: number, lon: number): number {
  const north = (one.lat - lat) * 111_200;
  const perDegree = transverseRadius(WGS84, lat) * Math.cos((lat * Math.PI) / 180) * (Math.PI / 180);
  return Math.hypot(north, angleDifference(lon, one.lon) * perDegree);
}

describe("geodesics agree with GeodSolve", () => {
  test("in distance and both courses, on 4,000 seeded pairs", () => {
    const pairs = randomPairs(1_2027);
    const peer = geodSolve(
      ["-i", "-f"],
      pairs.map(({ from, to }) => `${from.lat} ${from.lon} ${to.lat} ${to.lon}`),
    );
    expect(peer).toHaveLength(COUNT);
    let worstDistance = 0;
    let worstCourse = 0;
    pairs.forEach(({ from, to }, index) => {
      // Columns: lat1 lon1 azi1 lat2 lon2 azi2 s12 a12 m12 ...
      const row = peer[index] as number[];
      const [azi1, azi2, s12, m12] = [row[2], row[5], row[6], row[8]] as [number, number, number, number];
      const own = geodesicInverse(WGS84, from, to);
      worstDistance = Math.max(worstDistance, Math.abs(own.distance - s12));
      // A course error counts by what it moves the other end sideways: by the reduced length m12.
      const initial = Math.abs(angleDifference(own.initialCourse, azi1));
      const final = Math.abs(angleDifference(own.finalCourse, azi2));
      worstCourse = Math.max(worstCourse, Math.max(initial, final) * (Math.PI / 180) * Math.abs(m12));
    });
    expect(worstDistance).toBeLessThan(TOLERANCE);
    expect(worstCourse).toBeLessThan(TOLERANCE);
  });

  test("in the place reached, on 4,000 seeded courses and distances up to round the Earth", () => {
    const random = seeded(313);
    const cases = Array.from({ length: COUNT }, () => ({
      from: { lat: between(random, -89, 89), lon: between(random, -180, 360) },
      course: between(random, 0, 360),
      distance: between(random, -4e7, 4e7),
    }));
    const peer = geodSolve(
      ["-u"],
      cases.map(({ from, course, distance }) => `${from.lat} ${from.lon} ${course} ${distance}`),
    );
    let worst = 0;
    cases.forEach(({ from, course, distance }, index) => {
      const [lat, lon] = peer[index] as [number, number];
      const own = geodesicDirect(WGS84, from, course, distance);
      worst = Math.max(worst, apart(own, lat, lon));
      // Both unroll from the start's own longitude: no turn apart.
      expect(Math.abs(own.lon - lon)).toBeLessThan(1e-6);
    });
    expect(worst).toBeLessThan(TOLERANCE);
  });

  test("all along a track, 4,000 places on seeded tracks", () => {
    const random = seeded(9);
    const lines: string[] = [];
    const places = randomPairs(77).map(({ from, to }) => {
      const track = geodesicTrack(WGS84, from, to);
      const s = track.length * random();
      lines.push(`${from.lat} ${from.lon} ${track.initialCourse} ${s}`);
      return { own: track.at(s), start: from };
    });
    const peer = geodSolve(["-u"], lines);
    let worst = 0;
    places.forEach(({ own, start }, index) => {
      const [lat, lon] = peer[index] as [number, number];
      worst = Math.max(worst, apart(own, lat, lon));
      expect(Math.abs(own.lon - start.lon)).toBeLessThanOrEqual(180.000001);
      expect(Math.abs(own.lon - lon)).toBeLessThan(1e-6);
    });
    expect(worst).toBeLessThan(TOLERANCE);
  });
});
