import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { STATION_X } from "../../src/estimate/gauss-kronrod.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import type { Route } from "../../src/estimate/route.ts";
import { NO_PAIR, SmoothColumns } from "../../src/estimate/smooth-columns.ts";
import { BENDS, PAIR } from "../../src/estimate/smooth-pair.ts";
import { POINT_STATIONS } from "../../src/estimate/smooth-rule.ts";
import { type Field, NODE_FILLED, NODE_MISSING, type Tile } from "../../src/field/field.ts";
import { gridField, routeOf, spaced, waypoint } from "./fixtures.ts";

const RADIANS = Math.PI / 180;
const box = { lon: spaced(-2, 8, 10), lat: spaced(-3, 5, 8), hours: [0, 3, 6] };
const wind = gridField("wind", box, (lon, lat, hours) => [
  3 * Math.sin(lon + hours),
  2 * Math.cos(1.3 * lat) + hours / 6,
]);
const north = routeOf(waypoint("A", -1, -1), waypoint("B", 3.4, 5.7));
const REACH = 12;

/** The columns of a route's only leg, and its panels. */
function columnsOn(route: Route, field: Field, more: { reach?: number; alongOnly?: boolean } = {}) {
  const leg = prepareRoute(route, [field]).legs[0];
  if (leg === undefined) throw new Error("the route has no leg");
  const columns = new SmoothColumns(field, more.alongOnly ?? false);
  columns.onLeg(leg, leg.cells[0] ?? [], more.reach ?? REACH);
  return { columns, leg, panels: leg.panels.piece.length };
}

type Leg = ReturnType<typeof columnsOn>["leg"];

/** Components of one slice at a place, by hand: linear in longitude and latitude between the four nodes around it. */
function componentsAt(leg: Leg, tile: Tile, slice: number, s: number): readonly [number, number] {
  const { lat, lon, course } = leg.track.at(s);
  const at = (axis: Float64Array, value: number) => {
    const cell = Math.max(
      0,
      Math.min(
        axis.findLastIndex((node) => node <= value),
        axis.length - 2,
      ),
    );
    const west = axis[cell] as number;
    return { cell, share: (value - west) / ((axis[cell + 1] as number) - west) };
  };
  const [x, y] = [at(tile.lon, lon), at(tile.lat, lat)];
  const values = tile.slices[slice] as Float64Array;
  const node = (east: number, up: number, component: number) =>
    values[2 * ((y.cell + up) * tile.lon.length + x.cell + east) + component] as number;
  const [u, v] = [0, 1].map(
    (component) =>
      (1 - y.share) * ((1 - x.share) * node(0, 0, component) + x.share * node(1, 0, component)) +
      y.share * ((1 - x.share) * node(0, 1, component) + x.share * node(1, 1, component)),
  ) as [number, number];
  const [sin, cos] = [Math.sin(course * RADIANS), Math.cos(course * RADIANS)];
  return [u * sin + v * cos, u * cos - v * sin];
}

/** Holds a pair at `at` in `numbers` against the medium at its places on the stretch from..to, m. */
function expectPair(numbers: Float64Array, at: number, leg: Leg, slice: number, from: number, to: number) {
  const tile = wind.tiles[0] as Tile;
  POINT_STATIONS.forEach((station, n) => {
    const s = from + ((to - from) * ((STATION_X[station] as number) + 1)) / 2;
    const [along, cross] = componentsAt(leg, tile, slice, s);
    const [alongNext, crossNext] = componentsAt(leg, tile, slice + 1, s);
    const exact = [along, alongNext - along, cross, crossNext - cross];
    exact.forEach((value, k) => {
      // Positions are fitted to 2e-12°, across which the medium changes by 1e-11 m/s at most.
      expect(Math.abs((numbers[at + 4 * n + k] as number) - value)).toBeLessThan(5e-11);
    });
  });
}

describe("a pair of columns", () => {
  test("is the medium at the start and the nodes, as values and changes from slice to slice", () => {
    const { columns, leg, panels } = columnsOn(north, wind);
    for (let panel = 0; panel < panels; panel += 1) {
      columns.enter(panel);
      expect(columns.tile).toBe(0);
      for (const slice of [1, 0]) {
        const at = columns.pair(slice, slice + 1);
        expect(at).toBe(slice * PAIR);
        const [from, to] = [leg.panels.s[panel] as number, leg.panels.s[panel + 1] as number];
        expectPair(columns.pairs, at, leg, slice, from, to);
      }
    }
  });

  test("has half the second derivative of a parabola, and no change in a steady tile", () => {
    const steady = gridField("wind", { lon: [-1, 3], lat: [-1, 3] }, (lon, lat) => [lon * lat, 1]);
    const { columns, leg } = columnsOn(
      routeOf(waypoint("A", 0, 0), waypoint("B", 1, 1, { path: "rhumb" })),
      steady,
    );
    columns.enter(0);
    expect(columns.pair(0, 0)).toBe(0);
    const changes = [1, 3, 5, 7, 9, 11, 13, 15, 17, 19, BENDS + 1, BENDS + 3];
    for (const n of changes) expect(columns.pairs[n]).toBe(0);
    // u = λφ, v = 1 on a line where λ and φ rise by half a degree a unit of ξ: ½ u'' = ¼, times sin and cos of the course.
    const course = leg.track.at(0).course * RADIANS;
    expect(columns.pairs[BENDS]).toBeCloseTo(Math.sin(course) / 4, 3);
    expect(columns.pairs[BENDS + 2]).toBeCloseTo(Math.cos(course) / 4, 3);
  });

  test("of a part is the medium at the part's own places", () => {
    const { columns, leg, panels } = columnsOn(north, wind);
    const parts = new Float64Array(2 * PAIR);
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: panels - 1 }),
        fc.integer({ min: 0, max: 1 }),
        fc.double({ min: -1, max: 1, noNaN: true }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (panel, slice, start, share) => {
          columns.enter(panel);
          const half = (share * (1 - start)) / 2;
          expect(columns.part(slice, slice + 1, start, half, parts, PAIR)).toBe(true);
          const from = leg.panels.s[panel] as number;
          const perUnit = ((leg.panels.s[panel + 1] as number) - from) / 2;
          const place = from + (start + 1) * perUnit;
          expectPair(parts, PAIR, leg, slice, place, place + 2 * half * perUnit);
          const whole = columns.pair(slice, slice + 1) + BENDS;
          for (let n = 0; n < 4; n += 1)
            expect(parts[PAIR + BENDS + n]).toBe(half * half * (columns.pairs[whole + n] as number));
        },
      ),
      { numRuns: 150, endOnFailure: true },
    );
  });

  test("has no cross-track component where that is taken as zero", () => {
    const { columns } = columnsOn(north, wind, { alongOnly: true });
    const { columns: both } = columnsOn(north, wind);
    const parts = new Float64Array(PAIR);
    for (const each of [columns, both]) {
      each.enter(2);
      each.pair(0, 1);
    }
    expect(columns.part(0, 1, -0.5, 0.25, parts, 0)).toBe(true);
    for (let n = 0; n < PAIR; n += 4)
      for (const k of [n + 2, n + 3]) expect([columns.pairs[k], parts[k]]).toEqual([0, 0]);
    for (let n = 0; n < BENDS; n += 4) expect(columns.pairs[n]).toBe(both.pairs[n]);
  });

  test("does not depend on what was asked before it", () => {
    const { columns } = columnsOn(north, wind);
    const { columns: fresh } = columnsOn(north, wind);
    columns.enter(4);
    columns.pair(0, 1);
    columns.part(1, 2, -1, 0.5, new Float64Array(PAIR), 0);
    for (const each of [columns, fresh]) {
      each.enter(1);
      each.pair(1, 2);
    }
    expect(columns.pairs.slice(PAIR, 2 * PAIR)).toEqual(fresh.pairs.slice(PAIR, 2 * PAIR));
  });
});

describe("there is no pair", () => {
  const nodes = box.lon.length * box.lat.length;
  const masked = (state: number, slice: number): Field => {
    const masks = box.hours.map((_, n) => (n === slice ? new Uint8Array(nodes).fill(state) : null));
    return gridField("wind", box, () => [1, 1], { masks });
  };

  test("where a node of either slice is missing or filled", () => {
    for (const state of [NODE_MISSING, NODE_FILLED]) {
      const { columns } = columnsOn(north, masked(state, 1));
      columns.enter(0);
      expect(columns.pair(0, 1)).toBe(NO_PAIR);
      expect(columns.pair(1, 2)).toBe(NO_PAIR);
      expect(columns.part(0, 1, -1, 0.5, new Float64Array(PAIR), 0)).toBe(false);
    }
    const { columns } = columnsOn(north, masked(NODE_MISSING, 2));
    columns.enter(0);
    expect(columns.pair(0, 1)).toBe(0);
  });

  test("where a node is faster than the reach, though the track itself may not be", () => {
    const gale = gridField("wind", box, (_lon, lat) => [lat >= 5 ? 9 : 1, 0]);
    const low = routeOf(waypoint("A", 4.1, 0), waypoint("B", 4.1, 0.9));
    const pairUpTo = (reach: number) => {
      const { columns } = columnsOn(low, gale, { reach });
      columns.enter(0);
      return columns.pair(0, 1);
    };
    expect(pairUpTo(9)).toBe(0);
    expect(pairUpTo(9 * (1 - 1e-15))).toBe(NO_PAIR);
    expect(pairUpTo(-1)).toBe(NO_PAIR);
    // Between two levels the nodes of both count.
    const levels = gridField("wind", { ...box, height: [10, 100] }, (_lon, _lat, _hours, height) => [
      height / 10,
      0,
    ]);
    const at = (height_m: number, reach: number) => {
      const route = routeOf(waypoint("A", 0, 0, { height_m }), waypoint("B", 0.5, 0.5, { height_m }));
      const { columns } = columnsOn(route, levels, { reach });
      columns.enter(0);
      return columns.pair(0, 1);
    };
    expect(at(20, 9.9)).toBe(NO_PAIR);
    expect(at(20, 10)).toBe(0);
    expect(at(10, 1)).toBe(0);
    expect(at(101, 20)).toBe(NO_PAIR);
  });

  test("outside the area and beyond 85° of latitude", () => {
    const { columns, panels } = columnsOn(routeOf(waypoint("A", 0, 7), waypoint("B", 0, 9)), wind);
    columns.enter(0);
    expect(columns.tile).toBe(0);
    columns.enter(panels - 1);
    expect([columns.tile, columns.pair(0, 1)]).toEqual([-1, NO_PAIR]);
    const polar = gridField(
      "wind",
      { lon: spaced(-20, 20, 4), lat: spaced(80, 89, 9), hours: [0, 3] },
      () => [1, 1],
    );
    const { columns: beyond } = columnsOn(routeOf(waypoint("A", 86, 1), waypoint("B", 86, 8)), polar);
    beyond.enter(0);
    expect([beyond.tile, beyond.pair(0, 1)]).toEqual([-1, NO_PAIR]);
  });

  test("of a part, where the polynomials miss the medium between their nodes: the whole still has one", () => {
    // One cell of 20°, in which a great circle at 70° of latitude turns by half a degree a panel.
    const wide = gridField("wind", { lon: [-5, 15], lat: [58, 85.5], hours: [0, 3] }, (lon, lat) => [
      0.4 * lon,
      2 + lat / 30,
    ]);
    const { columns } = columnsOn(routeOf(waypoint("A", 70, 0), waypoint("B", 70.3, 14)), wide);
    columns.enter(0);
    expect(columns.pair(0, 1)).toBe(0);
    expect(columns.part(0, 1, -1, 0.5, new Float64Array(PAIR), 0)).toBe(false);
  });
});
