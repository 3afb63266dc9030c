import { describe, expect, test } from "vitest";
import { type PreparedRoute, prepareRoute } from "../../src/estimate/prepare.ts";
import type { Field, Tile } from "../../src/field/field.ts";
import { areasOf } from "../../web/chart/field-areas.ts";
import { fieldText } from "../../web/chart/UnderPointer.tsx";
import { fieldsAt } from "../../web/worker/field-at.ts";
import { levelOfRoutes, levelsOf } from "../../web/worker/field-levels.ts";
import { answerLattice } from "../../web/worker/lattice.ts";

const knot = 1852 / 3600;

/** Two degrees square with a missing north-east corner; the flow is given as components, m/s. */
function field(role: Field["role"], u: number, v: number, more: Partial<Tile> = {}): Field {
  const node = [u, v];
  const tile: Tile = {
    files: [],
    lon: Float64Array.of(0, 1, 2),
    lat: Float64Array.of(50, 51, 52),
    height: null,
    times: null,
    slices: [Float64Array.from([...Array(8)].flatMap(() => node).concat([0, 0]))],
    gusts: null,
    masks: [Uint8Array.of(0, 0, 0, 0, 0, 0, 0, 0, 2)],
    global: false,
    beyond: "stop",
    ...more,
  };
  return { role, tiles: [tile], outside: "stop" };
}

const at = (lat: number, lon: number) => ({ lat, lon, height_m: null, instant: 0 });

describe("the fields at a place", () => {
  test("tell a wind by where it comes from, a current by where it sets", () => {
    // Both move toward the south-east.
    const fields = [field("wind", 5, -5), field("current", 0.5, -0.5)];
    const [wind, current] = fieldsAt(fields, at(50.5, 0.5));
    expect(wind?.flow?.direction_deg).toBeCloseTo(315, 9);
    expect(current?.flow?.direction_deg).toBeCloseTo(135, 9);
    if (!wind || !current) throw new Error("two fields have two answers");
    expect(fieldText(wind, "sea")).toBe(`wind from 315° ${(Math.hypot(5, 5) / knot).toFixed(1)} kn`);
    expect(fieldText(current, "metric")).toBe("current sets 135° 0.7 m/s");
  });

  test("say why there is no value", () => {
    const fields = [field("wind", 5, -5)];
    expect(fieldsAt(fields, at(40, 0.5))).toEqual([{ role: "wind", flow: null, none: "outside-area" }]);
    const [gap] = fieldsAt(fields, at(51.9, 1.9));
    expect(gap?.none).toBe("gap");
    if (gap) expect(fieldText(gap, "sea")).toBe("wind: a gap");
  });

  test("a direction that rounds to a full turn is 000", () => {
    const flow = { speed_m_s: 1, direction_deg: 359.7, gust_m_s: 2 };
    expect(fieldText({ role: "wind", flow, none: null }, "metric")).toBe("wind from 000° 1.0 m/s, gusts 2.0");
  });

  test("have the levels of all their tiles, each once", () => {
    const low = field("wind", 1, 1, { height: Float64Array.of(10, 50) });
    const high = field("wind", 1, 1, { height: Float64Array.of(50, 100) });
    expect(levelsOf([low, high, field("current", 1, 1)])).toEqual([10, 50, 100]);
  });
});

describe("the level that the chart begins with", () => {
  const routeAt = (...heights: (number | null)[]): PreparedRoute =>
    prepareRoute(
      {
        name: "Route",
        waypoints: heights.map((height_m, at) => ({
          name: `${at}`,
          lat: 50,
          lon: at,
          path: "rhumb",
          speed_m_s: null,
          height_m,
          stay_s: 0,
        })),
      },
      [],
    );

  test("is the one nearest to where the routes run most of their way", () => {
    const levels = [10, 60, 120];
    expect(levelOfRoutes(levels, [routeAt(10, 120, 120, 120, 10)])).toBe(120);
    expect(levelOfRoutes(levels, [routeAt(50, 50), routeAt(70, 70, 70)])).toBe(60);
  });

  test("is the lowest of routes without heights, and none where the fields have none", () => {
    expect(levelOfRoutes([10, 60, 120], [routeAt(null, null)])).toBe(10);
    expect(levelOfRoutes([], [routeAt(10, 10)])).toBeNull();
  });
});

describe("the lattice for the chart", () => {
  test("tells gaps from values, and leaves out what lies outside", () => {
    const question = {
      role: "wind",
      instant: 0,
      height_m: null,
      south: 49,
      north: 53,
      west: -1,
      east: 3,
    } as const;
    const { lat, lon, state } = answerLattice([field("wind", 5, -5)], {
      ...question,
      stepLat: 0.5,
      stepLon: 0.5,
      phase: 0.5,
    });
    expect(lat.length).toBe(16);
    const gaps = [...state].flatMap((value, n) => (value === 0 ? [] : [[lat[n], lon[n]]]));
    expect(gaps).toEqual([
      [51.25, 1.25],
      [51.25, 1.75],
      [51.75, 1.25],
      [51.75, 1.75],
    ]);
  });
});

describe("the areas of field files", () => {
  const axis = { count: 2, step: null };
  const inspection = {
    latitude: { ...axis, first: 50, last: 52 },
    longitude: { ...axis, first: 175, last: 190 },
    global: false,
  };

  test("are those of the files that were read; one around the globe has no edge", () => {
    const fields = [
      { role: "wind", file: "a.csv" },
      { role: "wind", file: "globe.csv" },
      { role: "current", file: "unread.csv" },
    ] as const;
    const held = { "a.csv": inspection, "globe.csv": { ...inspection, global: true } };
    // Only the axes of an inspection are looked at.
    expect(areasOf(fields, held as unknown as Parameters<typeof areasOf>[1])).toEqual([
      { role: "wind", south: 50, north: 52, west: 175, east: 190 },
    ]);
  });
});
