import { type Field, NODE_FILLED, NODE_MISSING, type Tile } from "../field/field.ts";
import { STATIONS } from "./gauss-kronrod.ts";
import {
  heightAt,
  LEVEL_BETWEEN,
  LEVEL_BEYOND,
  type LegHeights,
  lowerBound,
  type PanelCells,
} from "./panels.ts";
import type { Stations } from "./stations.ts";

/*
 * A field as one leg sees it: in a panel and between two valid times every component is a polynomial in the place times a straight
 * line in time. `resolve` picks tile, cell and slices by the policies; `project` turns them, station by station, into
 * along- and cross-track components as value and rate of change, so that the implicit solution for time costs no more look-ups.
 */

type FlowState = "data" | "zero" | "outside-area" | "outside-time" | "gap";

/** Field of one role, with its times counted from the route's departure, and what it resolved to in the current panel. */
export interface Flow {
  readonly field: Field;
  /** Per tile: seconds since departure, `null` for a steady tile. */
  readonly times: readonly (Float64Array | null)[];
  /** Per tile: cells of the current leg's panels. */
  cells: readonly PanelCells[];
  heights: LegHeights;

  state: FlowState;
  panel: number;
  /** Tile in use, -1 for none. */
  tile: number;
  slice: number;
  nextSlice: number;
  /** The share of the way from slice to nextSlice at time t is (t - from) · perSecond. */
  from: number;
  perSecond: number;
  /** Time up to which this resolution holds. */
  until: number;
  /** Whether the last valid time is held beyond its end, whether a node was filled, whether a level was held. */
  held: boolean;
  filled: boolean;
  beyondLevels: boolean;

  /** Corner values of the cell: (slice, level) × (u, v) × (west, east) × (south, north minus south). */
  readonly corners: Float64Array;
  /** Per station: shares of the way across the cell, eastward and northward. */
  readonly shareEast: Float64Array;
  readonly shareNorth: Float64Array;
  /** Components found by the last look-up, m/s eastward and northward. */
  u: number;
  v: number;
  /** Components of the flow at each station at time `from`, and their change from slice to slice, m/s. */
  readonly along: Float64Array;
  readonly alongChange: Float64Array;
  readonly cross: Float64Array;
  readonly crossChange: Float64Array;
}

/** A flow for one departure (ms since 1970). */
export function makeFlow(field: Field, departure: number): Flow {
  return {
    field,
    times: field.tiles.map(({ times }) => times?.map((time) => (time - departure) / 1000) ?? null),
    cells: [],
    heights: { from: null, to: null },
    state: "outside-area",
    panel: 0,
    tile: -1,
    slice: 0,
    nextSlice: 0,
    from: 0,
    perSecond: 0,
    until: 0,
    held: false,
    filled: false,
    beyondLevels: false,
    corners: new Float64Array(32),
    shareEast: new Float64Array(STATIONS),
    shareNorth: new Float64Array(STATIONS),
    u: 0,
    v: 0,
    along: new Float64Array(STATIONS),
    alongChange: new Float64Array(STATIONS),
    cross: new Float64Array(STATIONS),
    crossChange: new Float64Array(STATIONS),
  };
}

/** Share of the way from `slice` to `nextSlice` at a time since departure. */
export function shareOf(flow: Flow, time: number): number {
  return (time - flow.from) * flow.perSecond;
}

/** Settles which data hold in a panel from a time on; afterwards `flow.state` says what was found. */
export function resolve(flow: Flow, panel: number, time: number, stations: Stations): void {
  flow.panel = panel;
  flow.tile = -1;
  flow.held = false;
  flow.filled = false;
  flow.beyondLevels = false;
  flow.until = Number.POSITIVE_INFINITY;
  let covered = false;
  let hold = -1;
  for (let q = 0; q < flow.cells.length && flow.tile < 0; q += 1) {
    if (((flow.cells[q] as PanelCells).column[panel] as number) < 0) continue;
    covered = true;
    const times = flow.times[q] as Float64Array | null;
    if (times === null) {
      useSlices(flow, q, 0, 0, 0, 0);
    } else if (time < (times[0] as number)) {
      flow.until = Math.min(flow.until, times[0] as number);
    } else if (time >= (times[times.length - 1] as number)) {
      if (hold < 0 && flow.field.tiles[q]?.beyond === "hold") hold = q;
    } else {
      const k = lowerBound(times, time);
      const start = times[k] as number;
      const end = times[k + 1] as number;
      flow.until = Math.min(flow.until, end);
      useSlices(flow, q, k, k + 1, start, 1 / (end - start));
    }
  }
  if (flow.tile < 0 && hold >= 0) {
    const last = (flow.times[hold] as Float64Array).length - 1;
    useSlices(flow, hold, last, last, 0, 0);
    flow.held = true;
  }
  if (flow.tile >= 0) loadCell(flow, panel, stations);
  else if (covered) flow.state = "outside-time";
  else flow.state = flow.field.outside === "zero" ? "zero" : "outside-area";
}

/** Reads a tile's cell of a panel at one slice alone, whatever the time; `flow.state` says whether data are there. */
export function readSlice(flow: Flow, panel: number, tile: number, slice: number, stations: Stations): void {
  flow.panel = panel;
  flow.held = false;
  flow.filled = false;
  useSlices(flow, tile, slice, slice, 0, 0);
  loadCell(flow, panel, stations);
}

function useSlices(
  flow: Flow,
  tile: number,
  slice: number,
  next: number,
  from: number,
  perSecond: number,
): void {
  flow.tile = tile;
  flow.slice = slice;
  flow.nextSlice = next;
  flow.from = from;
  flow.perSecond = perSecond;
}

function loadCell(flow: Flow, panel: number, stations: Stations): void {
  const tile = flow.field.tiles[flow.tile] as Tile;
  const cells = flow.cells[flow.tile] as PanelCells;
  flow.state = "data";
  flow.beyondLevels = cells.levelState[panel] === LEVEL_BEYOND;
  const levels = cells.levelState[panel] === LEVEL_BETWEEN ? 2 : 1;
  const slices = flow.nextSlice === flow.slice ? 1 : 2;
  for (let slice = 0; slice < slices; slice += 1) {
    const index = slice === 0 ? flow.slice : flow.nextSlice;
    for (let level = 0; level < levels; level += 1) {
      const mask = tile.masks[index] ?? null;
      if (mask !== null) checkCorners(flow, tile, cells, panel, level, mask, stations);
      loadCorners(
        flow,
        tile,
        cells,
        panel,
        level,
        tile.slices[index] as Float64Array,
        (slice * 2 + level) * 8,
      );
    }
  }
}

function loadCorners(
  flow: Flow,
  tile: Tile,
  cells: PanelCells,
  panel: number,
  level: number,
  data: Float64Array,
  to: number,
): void {
  const width = tile.lon.length;
  const rows = tile.lat.length;
  const column = cells.column[panel] as number;
  const row = cells.row[panel] as number;
  const base = ((cells.level[panel] as number) + level) * rows * width;
  const south = base + row * width + column;
  const north = row + 1 < rows ? south + width : south;
  const east = column + 1 < width ? 1 : 0;
  const corners = flow.corners;
  for (let component = 0; component < 2; component += 1) {
    const at = to + component * 4;
    const sw = data[2 * south + component] as number;
    const se = data[2 * (south + east) + component] as number;
    corners[at] = sw;
    corners[at + 1] = (data[2 * north + component] as number) - sw;
    corners[at + 2] = se;
    corners[at + 3] = (data[2 * (north + east) + component] as number) - se;
  }
}

/** A corner with less weight than this at the panel's middle is one that the track, along a grid line, does not use. */
const NO_WEIGHT = 1e-9;

function checkCorners(
  flow: Flow,
  tile: Tile,
  cells: PanelCells,
  panel: number,
  level: number,
  mask: Uint8Array,
  stations: Stations,
): void {
  const column = cells.column[panel] as number;
  const row = cells.row[panel] as number;
  const width = tile.lon.length;
  const base = ((cells.level[panel] as number) + level) * tile.lat.length * width;
  const fx = share(tile.lon, column, stations.middleLon + (cells.turn[panel] as number));
  const fy = share(tile.lat, row, stations.middleLat);
  for (let corner = 0; corner < 4; corner += 1) {
    const east = corner & 1;
    const north = corner >> 1;
    if ((east === 1 ? fx : 1 - fx) < NO_WEIGHT || (north === 1 ? fy : 1 - fy) < NO_WEIGHT) continue;
    const state = mask[base + (row + north) * width + column + east];
    if (state === NODE_MISSING) flow.state = "gap";
    else if (state === NODE_FILLED) flow.filled = true;
  }
}

/** Share of the way through a cell of an axis; 0 on an axis of one node. */
function share(axis: Float64Array, cell: number, value: number): number {
  if (axis.length === 1) return 0;
  const start = axis[cell] as number;
  return (value - start) / ((axis[cell + 1] as number) - start);
}

/** Share of the way from the level below to the one above at a share of the leg. */
export function levelShare(flow: Flow, tile: Tile, cells: PanelCells, panel: number, share: number): number {
  const levels = tile.height as Float64Array;
  const level = cells.level[panel] as number;
  const below = levels[level] as number;
  const above = levels[level + 1] as number;
  return (heightAt(flow.heights, tile, share) - below) / (above - below);
}

/** Gust speed at a station and a time since departure, linear like the wind itself; NaN where a corner in use has none. */
export function gustAt(flow: Flow, station: number, time: number, stations: Stations): number {
  const gusts = (flow.field.tiles[flow.tile] as Tile).gusts;
  if (gusts === null) return Number.NaN;
  const first = scalarAt(flow, gusts[flow.slice] as Float64Array, station, stations);
  if (flow.nextSlice === flow.slice) return first;
  const next = scalarAt(flow, gusts[flow.nextSlice] as Float64Array, station, stations);
  return first + shareOf(flow, time) * (next - first);
}

function scalarAt(flow: Flow, values: Float64Array, station: number, stations: Stations): number {
  const tile = flow.field.tiles[flow.tile] as Tile;
  const cells = flow.cells[flow.tile] as PanelCells;
  const panel = flow.panel;
  const width = tile.lon.length;
  const column = cells.column[panel] as number;
  const row = cells.row[panel] as number;
  const fx = share(tile.lon, column, (stations.lon[station] as number) + (cells.turn[panel] as number));
  const fy = share(tile.lat, row, stations.lat[station] as number);
  const atLevel = (level: number): number => {
    const south = (level * tile.lat.length + row) * width + column;
    return mix(fy, parallel(values, south, fx), fy > 0 ? parallel(values, south + width, fx) : 0);
  };
  const level = cells.level[panel] as number;
  if (cells.levelState[panel] !== LEVEL_BETWEEN) return atLevel(level);
  return mix(
    levelShare(flow, tile, cells, panel, stations.share[station] as number),
    atLevel(level),
    atLevel(level + 1),
  );
}

function parallel(values: Float64Array, west: number, fx: number): number {
  return mix(fx, values[west] as number, fx > 0 ? (values[west + 1] as number) : 0);
}

function mix(share: number, a: number, b: number): number {
  return a + share * (b - a);
}
