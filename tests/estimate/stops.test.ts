import { describe, expect, test } from "vitest";
import { tablePower } from "../../src/craft/table.ts";
import { WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicInverse } from "../../src/geodesy/geodesic.ts";
import { craftOf, estimateOf, gridField, routeOf, spaced, waypoint } from "./fixtures.ts";

const box = { lon: spaced(-2, 12, 14), lat: spaced(-2, 2, 4) };
const along = routeOf(waypoint("A", 0, 0), waypoint("B", 0, 10), waypoint("C", 0, 11));
const degree = geodesicInverse(WGS84, { lat: 0, lon: 0 }, { lat: 0, lon: 1 }).distance;

/** Every number of a plain object, however deep. */
function numbers(value: unknown): number[] {
  if (typeof value === "number") return [value];
  return value !== null && typeof value === "object" ? Object.values(value).flatMap(numbers) : [];
}

describe("a track that cannot be held", () => {
  test("stops where the cross component reaches the speed, to a metre", () => {
    // v = 3 m/s per degree of longitude reaches 10 m/s at 10/3 degrees along the equator.
    const { estimate } = estimateOf(along, { fields: [gridField("wind", box, (lon) => [0, 3 * lon])] });
    expect(estimate.reached?.leg).toBe(1);
    expect(Math.abs((estimate.reached?.at_m ?? 0) - (10 / 3) * degree)).toBeLessThan(1);
    expect(estimate.findings[0]).toMatchObject({ code: "cannot-hold-track", severity: "stop", leg: 1 });
    // T = L' / V ∫ dx / sqrt(1 - x²) over 0..1 = (L'/V) π/2, up to the last half metre, whose time is bounded by its square root.
    const exact = (((10 / 3) * degree) / 10) * (Math.PI / 2);
    expect(Math.abs((estimate.reached?.time_s ?? 0) - exact) / exact).toBeLessThan(3e-3);
  });

  test("stops where the head component reaches the speed", () => {
    const { estimate } = estimateOf(along, { fields: [gridField("wind", box, (lon) => [-2 * lon, 0])] });
    expect(Math.abs((estimate.reached?.at_m ?? 0) - 5 * degree)).toBeLessThan(1);
    expect(estimate.findings[0]?.message).toMatch(/leaves no ground speed/);
  });

  test("at the start, at exactly the speed, counts as not held (WIND-06 c and d)", () => {
    for (const flow of [
      [-10, 0],
      [0, 10],
      [0, -10],
    ] as const) {
      const { estimate } = estimateOf(along, { fields: [gridField("wind", box, () => flow)] });
      expect(estimate.status).toBe("stop");
      expect(estimate.reached).toMatchObject({ leg: 1, at_m: 0, time_s: 0, use: 0 });
    }
  });

  test("leaves null, never NaN, from the leg on in which it stops, and keeps geometry and still figures", () => {
    const { estimate } = estimateOf(along, { fields: [gridField("wind", box, (lon) => [0, 3 * lon])] });
    expect(estimate.arrival).toBeNull();
    for (const leg of estimate.legs) {
      expect(leg.time_s).toBeNull();
      expect(leg.penalty).toBeNull();
      expect(leg.wind).toBeNull();
      expect(leg.departure).toBeNull();
      expect(leg.distance_m).toBeGreaterThan(0);
      expect(leg.still.time_s).toBeCloseTo(leg.distance_m / 10, 6);
    }
    expect(estimate.totals.use).toBeNull();
    expect(estimate.totals.still.time_s).toBeCloseTo((11 * degree) / 10, 3);
    expect(numbers(estimate).every(Number.isFinite)).toBe(true);
  });
});

describe("the edges of the data", () => {
  const narrow = { lon: spaced(-1, 4, 5), lat: spaced(-1, 1, 2) };

  test("outside the area the route stops at the edge", () => {
    const { estimate } = estimateOf(along, { fields: [gridField("wind", narrow, () => [0, 0])] });
    expect(estimate.findings[0]?.code).toBe("outside-area");
    expect(estimate.reached?.at_m).toBeCloseTo(4 * degree, 3);
  });

  test("outside the area as nothing moving, the distance is told and not covered", () => {
    const { estimate } = estimateOf(along, {
      fields: [gridField("wind", narrow, () => [5, 0], { outside: "zero" })],
    });
    expect(estimate.status).toBe("caution");
    expect(estimate.legs[0]?.wind?.covered).toBeCloseTo(0.4, 9);
    expect(estimate.legs[0]?.time_s).toBeCloseTo((4 * degree) / 15 + (6 * degree) / 10, 4);
    expect(estimate.findings[0]).toMatchObject({ code: "zero-outside", leg: 1 });
    expect(estimate.findings[0]?.at_m).toBeCloseTo(4 * degree, 3);
  });

  test("before the first valid time the route stops at once", () => {
    const field = gridField("wind", { ...box, hours: [1, 2] }, () => [0, 0], { beyond: "hold" });
    const { estimate } = estimateOf(along, { fields: [field] });
    expect(estimate.findings[0]?.code).toBe("outside-time");
    expect(estimate.findings[0]?.message).toMatch(
      /the wind is valid from \S+ \S+ UTC to \S+ \S+ UTC; the estimate/,
    );
    expect(estimate.reached?.at_m).toBe(0);
  });

  test("after the last valid time it stops there, to a microsecond, or holds and says so", () => {
    const short = { ...box, hours: [-1, 2.5] };
    const stopped = estimateOf(along, { fields: [gridField("wind", short, () => [2, 0])] }).estimate;
    expect(stopped.findings[0]?.code).toBe("outside-time");
    expect(stopped.findings[0]?.message).toMatch(
      /it is (\S+ \S+ UTC) here, .* to \1 and not beyond; the estimate stops/,
    );
    expect(stopped.reached?.time_s).toBeCloseTo(9000, 6);
    expect(stopped.reached?.at_m).toBeCloseTo(9000 * 12, 4);
    const held = estimateOf(along, {
      fields: [gridField("wind", short, () => [2, 0], { beyond: "hold" })],
    }).estimate;
    expect(held.status).toBe("caution");
    expect(held.legs[0]?.time_s).toBeCloseTo((10 * degree) / 12, 4);
    expect(held.findings.map(({ code, leg }) => [code, leg])).toEqual([
      ["held-beyond", 1],
      ["held-beyond", 2],
    ]);
    expect(held.legs[0]?.wind?.covered).toBeCloseTo((9000 * 12) / (10 * degree), 9);
    expect(held.legs[1]?.wind?.covered).toBe(0);
  });

  test("a missing node stops the route at the cell, a filled one is told", () => {
    const mask = new Uint8Array(box.lon.length * box.lat.length);
    const at = 2 * box.lon.length + 5; // latitude 0, longitude 3
    mask[at] = 2;
    const gap = estimateOf(along, {
      fields: [gridField("wind", box, () => [1, 0], { masks: [mask] })],
    }).estimate;
    expect(gap.findings[0]?.code).toBe("gap");
    expect(gap.reached?.at_m).toBeCloseTo(2 * degree, 3);
    const filled = mask.map((state) => (state === 2 ? 1 : 0));
    const told = estimateOf(along, {
      fields: [gridField("wind", box, () => [1, 0], { masks: [filled] })],
    }).estimate;
    expect(told.findings[0]).toMatchObject({ code: "gap-filled", severity: "caution", leg: 1 });
    expect(told.findings[0]?.at_m).toBeCloseTo(2 * degree, 3);
    expect(told.findings[0]?.to_m).toBeCloseTo(4 * degree, 3);
    expect(told.legs[0]?.wind?.covered).toBeCloseTo(0.8, 9);
  });

  test("a track along a grid line needs the nodes of that line alone", () => {
    const mask = new Uint8Array(box.lon.length * box.lat.length);
    for (let i = 0; i < box.lon.length; i += 1) {
      mask[1 * box.lon.length + i] = 2;
      mask[3 * box.lon.length + i] = 2;
    }
    const { estimate } = estimateOf(along, {
      fields: [gridField("wind", box, () => [1, 0], { masks: [mask] })],
    });
    expect(estimate.status).toBe("clear");
  });

  test("a track along the edge of the area is inside it", () => {
    const edge = { lon: spaced(0, 11, 11), lat: [0, 1] };
    expect(estimateOf(along, { fields: [gridField("wind", edge, () => [1, 0])] }).estimate.status).toBe(
      "clear",
    );
  });
});

describe("the power model's range", () => {
  const craft = craftOf({
    power: tablePower("W", [
      { speed_m_s: 5, rate: 100 },
      { speed_m_s: 12, rate: 900 },
    ]),
  });

  test("a ground-speed pace stops where the speed through the medium leaves the table", () => {
    // Held at 10 m/s over the ground against u = -lon m/s: V = 10 + lon reaches 12 at 2 degrees.
    const { estimate } = estimateOf(along, {
      craft,
      pace: { hold: "ground-speed", speed_m_s: 10 },
      fields: [gridField("wind", box, (lon) => [-lon, 0])],
    });
    expect(estimate.findings[0]?.code).toBe("outside-power-table");
    expect(Math.abs((estimate.reached?.at_m ?? 0) - 2 * degree)).toBeLessThan(1);
    expect(estimate.reached?.time_s).toBeCloseTo((estimate.reached?.at_m ?? 0) / 10, 6);
  });

  test("a pace without a speed in the range even in still air is an input error that names the leg", () => {
    expect(() =>
      estimateOf(along, {
        craft: { ...craft, speeds: { min: 5, max: 12 } },
        pace: { hold: "power", power_W: 5000 },
      }),
    ).toThrow(/leg 1 of route "Route" to B: .* found none/);
  });
});
