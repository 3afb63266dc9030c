import { type AxisCell, axisCell, latitudeCell, longitudeCell } from "./axis-cell.ts";
import { type Field, NODE_FILLED, NODE_MISSING, type Tile } from "./field.ts";
import { cellOfLevel, cellOfTime, type SampleEdge } from "./sample.ts";
import { WeightedNodes } from "./weighted-nodes.ts";

/** State of a lattice point: what its vector rests on, or why it has none. */
export const LATTICE_COVERED = 0;
export const LATTICE_FILLED = 1;
export const LATTICE_HELD = 2;
export const LATTICE_ZERO_OUTSIDE = 3;
export const LATTICE_GAP = 4;
export const LATTICE_OUTSIDE_TIME = 5;
export const LATTICE_OUTSIDE_AREA = 6;

/** A field at many points at one instant: point (i, j) of longitude i and latitude j stands at j · lons.length + i. */
export interface LatticeSample {
  /** m/s, the way the medium moves; 0 where the state says that there is none. */
  readonly u: Float32Array;
  readonly v: Float32Array;
  readonly state: Uint8Array;
}

/**
 * The field at every pair of a latitude and a longitude (degrees, any turn), at one height (m, `null` for the lowest level)
 * and one time (ms since 1970-01-01T00:00Z): the values of `sampleField`, at a fraction of its time.
 *
 * @example
 * const lon = Float64Array.of(-5, -4);
 * const lat = Float64Array.of(50, 51);
 * const slices = [Float64Array.of(0, 0, 4, 0, 0, 0, 4, 0)];
 * const tile = { files: [], lon, lat, height: null, times: null, slices, gusts: null, masks: [null], global: false, beyond: "stop" };
 * const field = { role: "wind", tiles: [tile], outside: "stop" };
 * [...sampleLattice(field, [50.5], [-4.75, -4.5, 355.75], null, 0).u] // → [1, 2, 3]
 */
export function sampleLattice(
  field: Field,
  lats: ArrayLike<number>,
  lons: ArrayLike<number>,
  height: number | null,
  time: number,
): LatticeSample {
  const count = lats.length * lons.length;
  const sample = { u: new Float32Array(count), v: new Float32Array(count), state: new Uint8Array(count) };
  const tiles = field.tiles.map((tile) => latticeTile(tile, lats, lons, height, time));
  const nodes = new WeightedNodes();
  let point = 0;
  for (let j = 0; j < lats.length; j++) {
    for (let i = 0; i < lons.length; i++, point++) {
      const one = tileFor(tiles, i, j);
      if (one === null)
        sample.state[point] = field.outside === "zero" ? LATTICE_ZERO_OUTSIDE : LATTICE_OUTSIDE_AREA;
      else if (one.time === null) sample.state[point] = LATTICE_OUTSIDE_TIME;
      else {
        const cell = {
          time: one.time,
          level: one.level,
          lat: one.lat[j] as AxisCell,
          lon: one.lon[i] as AxisCell,
        };
        nodes.sum(one.tile, cell, lats[j] as number, lons[i] as number);
        const isGap = nodes.worst === NODE_MISSING;
        sample.u[point] = isGap ? 0 : nodes.u;
        sample.v[point] = isGap ? 0 : nodes.v;
        sample.state[point] = stateOf(nodes.worst, one.isHeld);
      }
    }
  }
  return sample;
}

interface LatticeTile {
  readonly tile: Tile;
  readonly lat: readonly (AxisCell | null)[];
  readonly lon: readonly (AxisCell | null)[];
  readonly level: AxisCell;
  /** `null` where the tile neither has nor holds the time. */
  readonly time: AxisCell | null;
  readonly isHeld: boolean;
}

function latticeTile(
  tile: Tile,
  lats: ArrayLike<number>,
  lons: ArrayLike<number>,
  height: number | null,
  time: number,
): LatticeTile {
  const edges: SampleEdge[] = [];
  const has = tile.times === null || axisCell(tile.times, time) !== null;
  const isAfter = tile.times !== null && time > (tile.times[tile.times.length - 1] as number);
  const isHeld = !has && isAfter && tile.beyond === "hold";
  return {
    tile,
    lat: Array.from(lats, (lat) => latitudeCell(tile.lat, lat)),
    lon: Array.from(lons, (lon) => longitudeCell(tile.lon, lon)),
    level: cellOfLevel(tile, height, edges),
    time: has || isHeld ? cellOfTime(tile, time, edges) : null,
    isHeld,
  };
}

/** The tile that holds at a point, by the rule of `tileAt`; one without a time where none has it, `null` outside all. */
function tileFor(tiles: readonly LatticeTile[], i: number, j: number): LatticeTile | null {
  let held: LatticeTile | null = null;
  let other: LatticeTile | null = null;
  for (const one of tiles) {
    if (one.lat[j] === null || one.lon[i] === null) continue;
    if (one.time !== null && !one.isHeld) return one;
    if (one.isHeld) held ??= one;
    else other ??= one;
  }
  return held ?? other;
}

function stateOf(worst: number, isHeld: boolean): number {
  if (worst === NODE_MISSING) return LATTICE_GAP;
  if (worst === NODE_FILLED) return LATTICE_FILLED;
  return isHeld ? LATTICE_HELD : LATTICE_COVERED;
}
