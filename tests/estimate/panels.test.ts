import { describe, expect, test } from "vitest";
import {
  cutPanels,
  LEVEL_BETWEEN,
  LEVEL_BEYOND,
  type LegHeights,
  locatePanels,
  type PanelCells,
  type Panels,
} from "../../src/estimate/panels.ts";
import { fitTrackCurve } from "../../src/estimate/track-curve.ts";
import type { Field, Tile } from "../../src/field/field.ts";
import { makeTrack } from "../../src/geodesy/make-track.ts";
import type { Position, Track } from "../../src/geodesy/track.ts";
import { between, seeded } from "../seeded.ts";
import { gridField, spaced } from "./fixtures.ts";

/** Ends of panels are found to about a micrometre; a place nearer to one than this belongs to either side. */
const NEAR_END_M = 1e-4;
/** Places this far on either side of every end are looked at besides random ones. */
const BESIDE_END_M = 1e-3;

function ascending(random: () => number, from: number, to: number, count: number): number[] {
  const steps = Array.from({ length: count }, () => between(random, 0.2, 1));
  const whole = steps.reduce((sum, step) => sum + step, 0);
  return [
    from,
    ...steps.map((_, n) => from + ((to - from) * steps.slice(0, n + 1).reduce((a, b) => a + b)) / whole),
  ];
}

/** A field of two tiles with axes of uneven spacing, one of them on another turn of longitude, with levels, or global. */
function anyField(random: () => number): Field {
  const still = () => [0, 0] as const;
  const turn = random() < 0.5 ? 360 : 0;
  const height = ascending(random, 10, 400, 3);
  const wide = gridField(
    "wind",
    { lon: ascending(random, -30 + turn, 40 + turn, 60), lat: ascending(random, 20, 88, 50), height },
    still,
  );
  const around = gridField(
    "wind",
    { lon: ascending(random, 20, 380, 90), lat: ascending(random, -90, 90, 40) },
    still,
    { global: true },
  );
  return { role: "wind", tiles: [...wide.tiles, ...around.tiles], outside: "stop" };
}

function anyTrack(random: () => number): Track {
  const place = (): Position => ({ lat: between(random, -85, 89.9), lon: between(random, -180, 360) });
  const from = place();
  const far =
    random() < 0.3
      ? place()
      : { lat: Math.min(89.9, from.lat + between(random, -4, 8)), lon: from.lon + between(random, -60, 60) };
  return makeTrack(
    from,
    { lat: far.lat, lon: Math.max(-180, Math.min(360, far.lon)) },
    random() < 0.5 ? "geodesic" : "rhumb",
  );
}

/** Index of the cell that holds a value, every cell looked at; -1 where none does. */
function cellByLooking(axis: Float64Array, value: number): number {
  for (let n = 0; n + 1 < axis.length; n += 1)
    if (value >= (axis[n] as number) && value < (axis[n + 1] as number)) return n;
  return -1;
}

function columnByLooking(tile: Tile, lon: number): { column: number; turn: number } {
  for (let turn = -1080; turn <= 1080; turn += 360) {
    const column = cellByLooking(tile.lon, lon + turn);
    if (column >= 0) return { column, turn };
  }
  return { column: -1, turn: 0 };
}

interface Looked {
  readonly column: number;
  readonly row: number;
  readonly lon: number;
  readonly lat: number;
  readonly height: number;
}

function look(tile: Tile, track: Track, heights: { from: number; to: number }, s: number): Looked {
  const { lat, lon } = track.at(s);
  const row = cellByLooking(tile.lat, lat);
  const { column, turn } = columnByLooking(tile, lon);
  return {
    column: row < 0 ? -1 : column,
    row,
    lon: lon + turn,
    lat,
    height: heights.from + ((heights.to - heights.from) * s) / track.length,
  };
}

/** The panel that holds s, or -1 where s is at an end of one. */
function panelAt({ s: ends }: Panels, s: number): number {
  if (ends.some((end) => Math.abs(end - s) < NEAR_END_M)) return -1;
  return ends.findIndex((end) => end > s) - 1;
}

function expectPlace(tile: Tile, cells: PanelCells, panel: number, looked: Looked): void {
  expect(cells.column[panel]).toBe(looked.column);
  if (looked.column < 0) return;
  expect(cells.row[panel]).toBe(looked.row);
  if (tile.height === null) return;
  const level = cellByLooking(tile.height, looked.height);
  expect(cells.levelState[panel]).toBe(level < 0 ? LEVEL_BEYOND : LEVEL_BETWEEN);
  const nearest = looked.height < (tile.height[0] as number) ? 0 : tile.height.length - 1;
  expect(cells.level[panel]).toBe(level < 0 ? nearest : level);
}

describe("the panels of a leg", () => {
  test("lie each in one cell of every tile: the cell found by looking at all of them, at random places of random legs", () => {
    const random = seeded(11);
    let seen = 0;
    for (let n = 0; n < 120; n += 1) {
      const field = anyField(random);
      const track = anyTrack(random);
      const heights = { from: between(random, -20, 500), to: between(random, -20, 500) };
      const curve = fitTrackCurve(track);
      const panels = cutPanels(curve, [field], heights);
      const cells = field.tiles.map((tile) => locatePanels(curve, panels, tile, heights));
      const places = Array.from({ length: 60 }, () => track.length * random());
      for (const end of panels.s.subarray(1, -1)) places.push(end - BESIDE_END_M, end + BESIDE_END_M);
      for (const s of places) {
        const panel = panelAt(panels, s);
        if (panel < 0) continue;
        seen += 1;
        field.tiles.forEach((tile, q) => {
          expectPlace(tile, cells[q] as PanelCells, panel, look(tile, track, heights, s));
        });
        expect(panels.polar[panel]).toBe(Math.abs(track.at(s).lat) > 85 ? 1 : 0);
      }
    }
    expect(seen).toBeGreaterThan(19_000);
  });

  test("end only where a grid line, a level, 85° or a piece of the track does", () => {
    const random = seeded(12);
    for (let n = 0; n < 60; n += 1) {
      const field = anyField(random);
      const track = anyTrack(random);
      const heights = { from: between(random, -20, 500), to: between(random, -20, 500) };
      const curve = fitTrackCurve(track);
      const { s: ends } = cutPanels(curve, [field], heights);
      for (const s of ends.subarray(1, -1)) {
        if (curve.starts.includes(s)) continue;
        const { lat, lon } = track.at(s);
        const height = heights.from + ((heights.to - heights.from) * s) / track.length;
        const off = field.tiles.flatMap((tile) => [
          ...[...tile.lat].map((line) => Math.abs(line - lat)),
          ...[...tile.lon].map((line) => Math.abs(line - lon - 360 * Math.round((line - lon) / 360))),
          ...[...(tile.height ?? [])].map((level) => Math.abs(level - height) / 1000),
        ]);
        expect(Math.min(...off, Math.abs(Math.abs(lat) - 85))).toBeLessThan(1e-9);
      }
    }
  });

  test("find both crossings of a parallel that a geodesic bulges over", () => {
    const lat = [40, 45.001, 50];
    const field = gridField("wind", { lon: [-180, 180], lat }, () => [0, 0]);
    const track = makeTrack({ lat: 45, lon: -2 }, { lat: 45, lon: 2 }, "geodesic");
    const curve = fitTrackCurve(track);
    const heights: LegHeights = { from: null, to: null };
    const panels = cutPanels(curve, [field], heights);
    const { row } = locatePanels(curve, panels, field.tiles[0] as Tile, heights);
    expect([...row]).toEqual([0, 1, 0]);
    expect((panels.s[1] as number) + (panels.s[2] as number)).toBeCloseTo(track.length, 5);
  });

  test("do not cut a leg that runs along a meridian of the grid, and put it beside that meridian", () => {
    const field = gridField("wind", { lon: spaced(0, 4, 4), lat: [0, 1, 2] }, () => [0, 0]);
    const curve = fitTrackCurve(makeTrack({ lat: 0.5, lon: 2 }, { lat: 1.5, lon: 2 }, "rhumb"));
    const heights: LegHeights = { from: null, to: null };
    const panels = cutPanels(curve, [field], heights);
    const { column, row } = locatePanels(curve, panels, field.tiles[0] as Tile, heights);
    expect(panels.piece).toHaveLength(2);
    expect([...row]).toEqual([0, 1]);
    for (const cell of column) expect([1, 2]).toContain(cell);
  });

  test("keep a leg along the edge of the area inside it, and one a metre beyond outside", () => {
    const field = gridField("wind", { lon: [0, 1, 2], lat: [0, 1, 2] }, () => [0, 0]);
    const cellsAt = (lat: number) => {
      const curve = fitTrackCurve(makeTrack({ lat, lon: 0.2 }, { lat, lon: 0.8 }, "rhumb"));
      const heights: LegHeights = { from: null, to: null };
      return locatePanels(curve, cutPanels(curve, [field], heights), field.tiles[0] as Tile, heights);
    };
    expect([...cellsAt(2).row]).toEqual([1]);
    expect([...cellsAt(2.00001).column]).toEqual([-1]);
  });
});
