// Rhumb lines against GeographicLib's RhumbSolve (Debian package geographiclib-tools 2.1.2), run as a peer.
import { describe, expect, test } from "vitest";
import { angleDifference, DEGREE } from "../../src/geodesy/angle.ts";
import { ellipsoid, meridionalRadius, transverseRadius, WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { rhumbDirect, rhumbInverse, rhumbTrack } from "../../src/geodesy/rhumb.ts";
import type { Position } from "../../src/geodesy/track.ts";
import { between, seeded } from "../seeded.ts";
import { runPeer } from "./peer.ts";

const COUNT = 10_000;
const rhumbSolve = (options: string[], lines: string[]): number[][] =>
  runPeer("RhumbSolve", "geographiclib-tools", [...options, "-p", "9"], lines);

interface Pair {
  readonly from: Position;
  readonly to: Position;
}

/** Pairs over the whole globe short of the poles: one in four nearly east-west, one in four a short leg. */
function randomPairs(seed: number): Pair[] {
  const random = seeded(seed);
  return Array.from({ length: COUNT }, (_, index) => {
    const from = { lat: between(random, -89.9, 89.9), lon: between(random, -180, 360) };
    const anywhere = { lat: between(random, -89.9, 89.9), lon: between(random, -180, 360) };
    const size = 10 ** between(random, -6, 0);
    const nearParallel = { lat: from.lat + between(random, -1e-6, 1e-6), lon: anywhere.lon };
    const short = {
      lat: Math.max(-89.95, Math.min(89.95, from.lat + between(random, -size, size))),
      lon: from.lon + between(random, -size, size),
    };
    return { from, to: [anywhere, nearParallel, short, anywhere][index % 4] as Position };
  });
}

/** Worst difference in distance, and in course as what it moves the far end sideways, both m. */
function worstAgainstPeer(
  lines: { from: Position; to: Position; course: number; distance: number }[],
  options: string[] = [],
): { distance: number; course: number } {
  const peer = rhumbSolve(
    ["-i", ...options],
    lines.map(({ from, to }) => `${from.lat} ${from.lon} ${to.lat} ${to.lon}`),
  );
  expect(peer).toHaveLength(lines.length);
  const worst = { distance: 0, course: 0 };
  lines.forEach(({ course, distance }, index) => {
    const [peerCourse, peerDistance] = peer[index] as [number, number];
    const turn = Math.abs(angleDifference(course, peerCourse)) * (Math.PI / 180);
    worst.distance = Math.max(worst.distance, Math.abs(distance - peerDistance));
    worst.course = Math.max(worst.course, turn * Math.min(peerDistance, WGS84.a));
  });
  return worst;
}

// Distances reach 2e7 m, where neighbouring doubles are 4e-9 m apart: a handful of roundings.
const TOLERANCE = 3e-8;

describe("rhumb lines agree with RhumbSolve", () => {
  test("in distance and course, on 10,000 seeded pairs", () => {
    const lines = randomPairs(20270504).map((pair) => ({
      ...pair,
      ...rhumbInverse(WGS84, pair.from, pair.to),
    }));
    const worst = worstAgainstPeer(lines);
    expect(worst.distance).toBeLessThan(TOLERANCE);
    expect(worst.course).toBeLessThan(TOLERANCE);
  });

  // The peer's own direct solution starts from a rounded rectifying latitude and loses 3e-7 m on lines that leave from
  // beside a pole; its inverse solution does not, so the places reached are sent back through that.
  test("in the place reached, on 10,000 seeded courses and distances", () => {
    const random = seeded(58_006);
    const lines = randomPairs(6_058).map(({ from, to }) => {
      const inverse = rhumbInverse(WGS84, from, to);
      const distance = inverse.distance * between(random, 0, 1);
      return {
        from,
        to: rhumbDirect(WGS84, from, inverse.course, distance),
        course: inverse.course,
        distance,
      };
    });
    const worst = worstAgainstPeer(lines);
    expect(worst.distance).toBeLessThan(TOLERANCE);
    expect(worst.course).toBeLessThan(TOLERANCE);
  });

  test("all along a track, 10,000 places on seeded tracks", () => {
    const random = seeded(4);
    const lines = randomPairs(77_001).map(({ from, to }) => {
      const track = rhumbTrack(WGS84, from, to);
      const distance = track.length * random();
      return { from, to: track.at(distance), course: track.initialCourse, distance };
    });
    const worst = worstAgainstPeer(lines);
    expect(worst.distance).toBeLessThan(TOLERANCE);
    expect(worst.course).toBeLessThan(TOLERANCE);
  });

  test("in the place reached by the peer's own direct solution, between 80 south and 80 north", () => {
    const lines = randomPairs(8_080).filter(({ from }) => Math.abs(from.lat) < 80);
    const cases = lines.map(({ from, to }) => ({ from, to, ...rhumbInverse(WGS84, from, to) }));
    const peer = rhumbSolve(
      [],
      cases.map(({ from, course, distance }) => `${from.lat} ${from.lon} ${course} ${distance / 2}`),
    );
    let worst = 0;
    cases.forEach(({ from, course, distance }, index) => {
      const [lat, lon] = peer[index] as [number, number];
      const own = rhumbDirect(WGS84, from, course, distance / 2);
      const north = (own.lat - lat) * DEGREE * meridionalRadius(WGS84, lat);
      const east =
        angleDifference(lon, own.lon) * DEGREE * transverseRadius(WGS84, lat) * Math.cos(lat * DEGREE);
      worst = Math.max(worst, Math.hypot(north, east));
    });
    expect(worst).toBeLessThan(TOLERANCE);
  });

  // Not on a prolate one: there the peer's distances err by up to 0.5 mm, and quadrature sides with ours
  // (tests/geodesy/rhumb.test.ts).
  test("on other ellipsoids, a sphere among them", () => {
    for (const f of [0, 1 / 150, 0.02]) {
      const shape = ellipsoid(6_400_000, f);
      const pairs = randomPairs(300).slice(0, 2000);
      const lines = pairs.map((pair) => ({ ...pair, ...rhumbInverse(shape, pair.from, pair.to) }));
      const worst = worstAgainstPeer(lines, ["-e", "6400000", `${f}`]);
      expect(worst.distance).toBeLessThan(TOLERANCE);
      expect(worst.course).toBeLessThan(TOLERANCE);
    }
  });

  test("beside the poles, down to a tenth of a millimetre from them", () => {
    const random = seeded(9090);
    const lines = Array.from({ length: 2000 }, (_, index) => {
      const beside = { lat: 90 - 10 ** between(random, -9, -1), lon: between(random, -180, 180) };
      const other = [
        { lat: between(random, -89, 89), lon: between(random, -180, 180) },
        { lat: 90 - 10 ** between(random, -9, -1), lon: between(random, -180, 180) },
      ][index % 2] as Position;
      const [from, to] = index % 4 < 2 ? [beside, other] : [other, beside];
      return { from, to, ...rhumbInverse(WGS84, from, to) };
    });
    const worst = worstAgainstPeer(lines);
    expect(worst.distance).toBeLessThan(TOLERANCE);
    expect(worst.course).toBeLessThan(TOLERANCE);
  });
});
