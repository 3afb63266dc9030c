import { describe, expect, test } from "vitest";
import { retracedLegs, toTheRight } from "../../web/chart/side-by-side.ts";
import type { RouteDrawing } from "../../web/worker/protocol.ts";

/** A drawing of straight legs with one sample between waypoints. */
function drawing(places: readonly (readonly [lat: number, lon: number])[]): RouteDrawing {
  const samples = places.flatMap(([lat, lon], at) => {
    const next = places[at + 1];
    return next
      ? [[lat, lon] as const, [(lat + next[0]) / 2, (lon + next[1]) / 2] as const]
      : [[lat, lon] as const];
  });
  return {
    lat: Float64Array.from(samples, ([lat]) => lat),
    lon: Float64Array.from(samples, ([, lon]) => lon),
    distance_m: new Float64Array(samples.length),
    waypoints: Int32Array.from(places, (_, at) => 2 * at),
    profile: null,
  };
}

describe("legs that run back over each other", () => {
  test("are found by their ends", () => {
    const route = drawing([
      [0, 0],
      [1, 0],
      [2, 1],
      [1, 0],
      [5, 5],
    ]);
    expect([...retracedLegs(route)]).toEqual([2, 3]);
  });

  test("are none on a round trip, nor where a leg is run twice the same way", () => {
    const round = [
      [0, 0],
      [1, 0],
      [1, 1],
    ] as const;
    expect(retracedLegs(drawing([...round, ...round])).size).toBe(0);
  });

  test("lie to the right of their own direction, there and back alike", () => {
    const out = [
      { x: 0, y: 100 },
      { x: 0, y: 50 },
      { x: 0, y: 0 },
    ];
    // Up the screen right is east, down the screen it is west.
    expect(toTheRight(out, 4)).toEqual(out.map(({ y }) => ({ x: 4, y })));
    expect(toTheRight(out.toReversed(), 4)).toEqual(out.toReversed().map(({ y }) => ({ x: -4, y })));
  });

  test("leave a point without a direction where it is", () => {
    const still = [
      { x: 3, y: 0 },
      { x: 3, y: 0 },
    ];
    expect(toTheRight(still, 4)).toEqual(still);
    expect(toTheRight([], 4)).toEqual([]);
  });
});
