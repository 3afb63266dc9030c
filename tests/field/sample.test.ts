import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { Field } from "../../src/field/field.ts";
import type { GridFile } from "../../src/field/grid-file.ts";
import {
  LATTICE_COVERED,
  LATTICE_FILLED,
  LATTICE_GAP,
  LATTICE_HELD,
  LATTICE_OUTSIDE_AREA,
  LATTICE_OUTSIDE_TIME,
  LATTICE_ZERO_OUTSIDE,
  sampleLattice,
} from "../../src/field/lattice.ts";
import { type FieldSource, mergeField } from "../../src/field/merge.ts";
import { type FieldSample, type NoSample, sampleField } from "../../src/field/sample.ts";
import { makeGrid } from "./make-grid.ts";

const HOUR = 3_600_000;

function fieldOf(grid: GridFile | readonly GridFile[], policies: Partial<FieldSource> = {}): Field {
  const grids = [grid].flat() as GridFile[];
  return mergeField(
    "wind",
    grids.map((one) => ({ grid: one, gaps: "stop", beyond: "stop", outside: "stop", ...policies })),
  );
}

/** u and v of a sample that must exist. */
function vector(sample: FieldSample | NoSample): readonly [number, number] {
  if (sample.none !== null) throw new Error(`no sample: ${sample.none}`);
  return [sample.u, sample.v];
}

// A product of straight lines is what linear interpolation in each axis gives back exactly.
const u = (lon: number, lat: number, height: number, time: number) =>
  (2 + lon) * (lat - 40) * (1 + height / 50) * (1 + time / HOUR);
const v = (lon: number, lat: number, height: number, time: number) =>
  3 * lon - lat + height / 9 - time / HOUR;

const BOX = makeGrid({
  lon: [-3, -1, 0, 2.5],
  lat: [50, 50.5, 53],
  height: [10, 80, 120],
  times: [0, HOUR, 4 * HOUR],
  at: (...place) => [u(...place), v(...place)],
  gust: (...place) => v(...place) + 100,
});

describe("inside a field", () => {
  test("a node has its own values", () => {
    expect(vector(sampleField(fieldOf(BOX), 50.5, -1, 80, HOUR))).toEqual([
      u(-1, 50.5, 80, HOUR),
      v(-1, 50.5, 80, HOUR),
    ]);
  });

  test("components that are products of straight lines come back everywhere", () => {
    const field = fieldOf(BOX);
    const place = fc.record({
      lat: fc.double({ min: 50, max: 53, noNaN: true }),
      lon: fc.double({ min: -3, max: 2.5, noNaN: true }),
      height: fc.double({ min: 10, max: 120, noNaN: true }),
      time: fc.double({ min: 0, max: 4 * HOUR, noNaN: true }),
      turns: fc.integer({ min: -2, max: 2 }),
    });
    fc.assert(
      fc.property(place, ({ lat, lon, height, time, turns }) => {
        const sample = sampleField(field, lat, lon + 360 * turns, height, time) as FieldSample;
        // u reaches 800 m/s: 1e-10 is a few hundred units in the last place; a turn of 360° costs 1e-13° of longitude.
        expect(sample.u).toBeCloseTo(u(lon, lat, height, time), 9);
        expect(sample.v).toBeCloseTo(v(lon, lat, height, time), 9);
        expect(sample.gust).toBeCloseTo(v(lon, lat, height, time) + 100, 9);
        expect(sample.covered).toBe(true);
        expect(sample.edges).toEqual([]);
      }),
      { numRuns: 300 },
    );
  });

  test("a cell across the seam of a global grid is as any other", () => {
    const global = makeGrid({
      lon: [-180, -60, 60, 180],
      lat: [0, 10],
      global: true,
      at: (lon) => [Math.abs(lon), 0],
    });
    expect(vector(sampleField(fieldOf(global), 5, 120, null, 0))[0]).toBeCloseTo(120, 12);
    expect(vector(sampleField(fieldOf(global), 5, -120, null, 0))[0]).toBeCloseTo(120, 12);
    expect(vector(sampleField(fieldOf(global), 5, 179.999999, null, 0))[0]).toBeCloseTo(180, 5);
    expect(vector(sampleField(fieldOf(global), 5, 540, null, 0))[0]).toBe(180);
  });

  test("a grid across the antimeridian is met from either side", () => {
    const grid = makeGrid({ lon: [175, 180, 185], lat: [0, 1], at: (lon) => [lon, 0] });
    for (const [lon, expected] of [
      [177, 177],
      [-179, 181],
      [-176, 184],
      [181, 181],
    ] as const) {
      expect(vector(sampleField(fieldOf(grid), 0.5, lon, null, 0))[0]).toBeCloseTo(expected, 10);
    }
    expect(sampleField(fieldOf(grid), 0.5, -174, null, 0)).toEqual({ none: "outside-area" });
  });

  test("a field without levels or times is the same at every height and time", () => {
    const steady = makeGrid({ lon: [0, 1], lat: [0, 1], at: () => [3, 4] });
    expect(sampleField(fieldOf(steady), 0.5, 0.5, 900, 1e15)).toEqual({
      none: null,
      u: 3,
      v: 4,
      gust: null,
      covered: true,
      edges: [],
    });
  });
});

describe("beyond 85° of latitude", () => {
  /** A wind that is one and the same vector of the plane over the pole: (x, y) toward longitudes 0 and 90. */
  function planar(x: number, y: number, pole: 1 | -1) {
    return (lon: number): readonly [number, number] => {
      const angle = (lon * Math.PI) / 180;
      const east = -x * Math.sin(angle) + y * Math.cos(angle);
      const outward = x * Math.cos(angle) + y * Math.sin(angle);
      return [east, -pole * outward];
    };
  }

  test.each([[1], [-1]] as const)(
    "a uniform flow over the pole of sign %d is uniform between any nodes, pole rows included",
    (pole) => {
      const at = planar(7, -3, pole);
      const lat = [84, 87, 90].map((one) => pole * one).sort((a, b) => a - b);
      const field = fieldOf(
        makeGrid({ lon: [-180, -90, 0, 90, 180], lat, global: true, at: (lon) => at(lon) }),
      );
      const places = fc.record({
        lat: fc.double({ min: 85.001, max: 90, noNaN: true }),
        lon: fc.double({ min: -400, max: 400, noNaN: true }),
      });
      fc.assert(
        fc.property(places, (place) => {
          const [east, north] = vector(sampleField(field, pole * place.lat, place.lon, null, 0));
          const [trueEast, trueNorth] = at(place.lon);
          // Sines and products of numbers below 10: rounding stays under 1e-13.
          expect(east).toBeCloseTo(trueEast, 12);
          expect(north).toBeCloseTo(trueNorth, 12);
        }),
        { numRuns: 200 },
      );
    },
  );

  test("at 85° itself the components are still interpolated as they are", () => {
    const field = fieldOf(makeGrid({ lon: [0, 90], lat: [80, 90], at: (lon) => [lon === 0 ? 2 : 0, 0] }));
    expect(vector(sampleField(field, 85, 45, null, 0))).toEqual([1, 0]);
  });
});

describe("gaps", () => {
  const at = (lon: number, lat: number) => (lon === 1 && lat === 1 ? null : ([1, 1] as const));
  const gappy = () => makeGrid({ lon: [0, 1, 2], lat: [0, 1, 2], at });

  test("stop where a missing node counts, and nowhere else", () => {
    const field = fieldOf(gappy());
    expect(sampleField(field, 0.5, 0.5, null, 0)).toEqual({ none: "gap" });
    expect(sampleField(field, 1, 1, null, 0)).toEqual({ none: "gap" });
    expect(vector(sampleField(field, 0, 0.5, null, 0))).toEqual([1, 1]);
    expect(vector(sampleField(field, 0.5, 0, null, 0))).toEqual([1, 1]);
    expect(vector(sampleField(field, 2, 1, null, 0))).toEqual([1, 1]);
  });

  test("that are filled are said to be, and do not count as covered", () => {
    const sample = sampleField(fieldOf(gappy(), { gaps: "zero" }), 0.5, 0.5, null, 0);
    expect(sample).toEqual({
      none: null,
      u: 0.75,
      v: 0.75,
      gust: null,
      covered: false,
      edges: ["gap-filled"],
    });
    expect(sampleField(fieldOf(gappy(), { gaps: "nearest" }), 0.5, 0.5, null, 0)).toMatchObject({
      u: 1,
      edges: ["gap-filled"],
    });
  });

  test("of gusts take the gust alone", () => {
    const grid = makeGrid({
      lon: [0, 1],
      lat: [0, 1],
      at: () => [1, 1],
      gust: (lon) => (lon === 0 ? Number.NaN : 9),
    });
    expect(sampleField(fieldOf(grid), 0, 0.5, null, 0)).toMatchObject({ u: 1, gust: null, covered: true });
    expect(sampleField(fieldOf(grid), 0, 1, null, 0)).toMatchObject({ gust: 9 });
  });

  test("at a time or level that does not count are not met", () => {
    const grid = makeGrid({
      lon: [0, 1],
      lat: [0, 1],
      height: [0, 10],
      times: [0, HOUR],
      at: (_, __, height, time) => (time === 0 && height === 0 ? [1, 1] : null),
    });
    expect(vector(sampleField(fieldOf(grid), 0.5, 0.5, 0, 0))).toEqual([1, 1]);
    expect(vector(sampleField(fieldOf(grid), 0.5, 0.5, null, 0))).toEqual([1, 1]);
    expect(sampleField(fieldOf(grid), 0.5, 0.5, 1, 0)).toEqual({ none: "gap" });
    expect(sampleField(fieldOf(grid), 0.5, 0.5, 0, 1)).toEqual({ none: "gap" });
  });
});

describe("at the edges", () => {
  test("outside the area there is no value, on its border there is", () => {
    const field = fieldOf(BOX);
    expect(sampleField(field, 49.999, 0, 10, 0)).toEqual({ none: "outside-area" });
    expect(sampleField(field, 51, 2.501, 10, 0)).toEqual({ none: "outside-area" });
    expect(sampleField(field, 51, -3.001, 10, 0)).toEqual({ none: "outside-area" });
    expect(sampleField(field, 50, -3, 10, 0).none).toBeNull();
    expect(sampleField(field, 53, 2.5, 10, 0).none).toBeNull();
    // A position of a track may miss the border by its rounding.
    expect(sampleField(field, 53 + 1e-12, 2.5 + 1e-12, 10, 0).none).toBeNull();
    expect(sampleField(field, 50 - 1e-12, -3 - 1e-12, 10, 0).none).toBeNull();
  });

  test("outside the area nothing moves where the policy is zero", () => {
    const field = fieldOf(BOX, { outside: "zero" });
    expect(sampleField(field, 0, 0, 10, 0)).toEqual({
      none: null,
      u: 0,
      v: 0,
      gust: null,
      covered: false,
      edges: ["zero-outside"],
    });
    expect(sampleField(field, 51, 0, 10, -1)).toEqual({ none: "outside-time" });
  });

  test("before the first valid time there is no value, after the last by the policy", () => {
    expect(sampleField(fieldOf(BOX), 51, 0, 10, -1)).toEqual({ none: "outside-time" });
    expect(sampleField(fieldOf(BOX), 51, 0, 10, 4 * HOUR + 1)).toEqual({ none: "outside-time" });
    const held = fieldOf(BOX, { beyond: "hold" });
    expect(sampleField(held, 51, 0, 10, -1)).toEqual({ none: "outside-time" });
    expect(sampleField(held, 50, 0, 10, 9 * HOUR)).toMatchObject({
      u: u(0, 50, 10, 4 * HOUR),
      covered: false,
      edges: ["held-beyond"],
    });
  });

  test("outside the levels the nearest holds, is said to, and counts as covered", () => {
    const field = fieldOf(BOX);
    const edge = { covered: true, edges: ["height-outside-field"] };
    expect(sampleField(field, 50, 0, 5, 0)).toMatchObject({ v: v(0, 50, 10, 0), ...edge });
    expect(sampleField(field, 50, 0, 121, 0)).toMatchObject({ v: v(0, 50, 120, 0), ...edge });
    expect(sampleField(field, 50, 0, null, 0)).toMatchObject({
      v: v(0, 50, 10, 0),
      covered: true,
      edges: [],
    });
  });

  test("a position or time that is no number has no value", () => {
    const field = fieldOf(BOX);
    expect(sampleField(field, Number.NaN, 0, 10, 0).none).toBe("outside-area");
    expect(sampleField(field, 51, Number.NaN, 10, 0).none).toBe("outside-area");
    expect(sampleField(field, 51, Number.POSITIVE_INFINITY, 10, 0).none).toBe("outside-area");
    expect(sampleField(field, 51, 0, 10, Number.NaN).none).toBe("outside-time");
  });

  test("a field without tiles is outside everywhere", () => {
    expect(sampleField(mergeField("wind", []), 0, 0, null, 0)).toEqual({ none: "outside-area" });
  });
});

describe("tiles that overlap", () => {
  const tile = (value: number, more: Partial<Parameters<typeof makeGrid>[0]>) =>
    makeGrid({ lon: [0, 1], lat: [0, 1], file: `${value}.csv`, at: () => [value, 0], ...more });

  test("leave the place to the earlier in the list", () => {
    const field = fieldOf([tile(1, { lon: [0.5, 1] }), tile(2, {})]);
    expect(vector(sampleField(field, 0.5, 0.75, null, 0))[0]).toBe(1);
    expect(vector(sampleField(field, 0.5, 0.25, null, 0))[0]).toBe(2);
  });

  test("leave the time to one that has it, before one that holds beyond its last", () => {
    const first = {
      grid: tile(1, { lon: [0, 0.5, 1], times: [0, HOUR] }),
      gaps: "stop",
      beyond: "hold",
      outside: "stop",
    } as const;
    const second = { ...first, grid: tile(2, { times: [0, 9 * HOUR] }), beyond: "stop" } as const;
    const field = mergeField("wind", [first, second]);
    expect(vector(sampleField(field, 0.5, 0.5, null, HOUR))[0]).toBe(1);
    expect(sampleField(field, 0.5, 0.5, null, 2 * HOUR)).toMatchObject({ u: 2, edges: [] });
    expect(sampleField(field, 0.5, 0.5, null, 10 * HOUR)).toMatchObject({ u: 1, edges: ["held-beyond"] });
  });
});

describe("a lattice", () => {
  test("has the values of single samples, and their states", () => {
    const at = (lon: number, lat: number) => (lon === 1 && lat === 51 ? null : ([lon, lat] as const));
    const near = makeGrid({ lon: [0, 1, 2], lat: [50, 51, 52], times: [0, HOUR], at, file: "near.csv" });
    const far = makeGrid({
      lon: [0, 10],
      lat: [40, 60],
      times: [0, 4 * HOUR],
      at: () => [9, 9],
      file: "far.csv",
    });
    const lats = [39, 45, 50, 50.5, 51, 51.5, 52, 58, 61];
    const lons = [-360.5, 0, 0.5, 1, 361.5, 2, 5, 11];
    const states = new Set<number>();
    for (const gaps of ["stop", "nearest"] as const) {
      for (const beyond of ["stop", "hold"] as const) {
        for (const outside of ["stop", "zero"] as const) {
          const field = fieldOf([structuredClone(near), far], { gaps, beyond, outside });
          for (const time of [-1, 0, HOUR / 3, 3 * HOUR, 5 * HOUR]) {
            const lattice = sampleLattice(field, lats, lons, null, time);
            for (const [j, lat] of lats.entries()) {
              for (const [i, lon] of lons.entries()) {
                const point = j * lons.length + i;
                const sample = sampleField(field, lat, lon, null, time);
                const expected = sample.none === null ? [sample.u, sample.v] : [0, 0];
                expect([lattice.u[point], lattice.v[point]]).toEqual(expected.map(Math.fround));
                expect(lattice.state[point]).toBe(stateOf(sample));
                states.add(stateOf(sample));
              }
            }
          }
        }
      }
    }
    expect(states.size).toBe(7);
  });
});

function stateOf(sample: FieldSample | NoSample): number {
  const none = {
    gap: LATTICE_GAP,
    "outside-area": LATTICE_OUTSIDE_AREA,
    "outside-time": LATTICE_OUTSIDE_TIME,
  };
  if (sample.none !== null) return none[sample.none];
  if (sample.edges.includes("zero-outside")) return LATTICE_ZERO_OUTSIDE;
  if (sample.edges.includes("gap-filled")) return LATTICE_FILLED;
  return sample.edges.includes("held-beyond") ? LATTICE_HELD : LATTICE_COVERED;
}
