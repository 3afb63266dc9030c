import { POLAR_FRAME_LATITUDE } from "../constants.ts";
import type { Field, Tile } from "../field/field.ts";
import { COS, evaluate, LAT, LON, STRIDE, type TrackCurve } from "./track-curve.ts";

/*
 * Panels: a leg cut at every place where the interpolated field has a kink in space: the grid lines of every tile in longitude,
 * latitude and height, and 85° of latitude. Inside a panel the field is smooth, so that a Gauss rule converges
 * at its full order (Davis & Rabinowitz, Methods of Numerical Integration, 1984, section 2.9). Times are cut later.
 */

/** Level state of a panel in a tile with heights. */
export const LEVEL_BETWEEN = 0;
/** The level below or at hand alone counts: the tile has no heights, or the craft is exactly on the level. */
const LEVEL_SINGLE = 1;
/** Below the lowest or above the highest level: the nearest one holds, and it is a finding. */
export const LEVEL_BEYOND = 2;

/** Where the panels of a leg lie in one tile; `column` is -1 where a panel is outside the tile. */
export interface PanelCells {
  readonly column: Int32Array;
  readonly row: Int32Array;
  readonly level: Int32Array;
  readonly levelState: Uint8Array;
  /** Degrees to add to a track longitude to bring it to the tile's turn. */
  readonly turn: Float64Array;
}

export interface Panels {
  /** Ends of the panels, metres from the leg's start; one more than there are panels. */
  readonly s: Float64Array;
  /** Piece of the track's curve that holds each panel. */
  readonly piece: Int32Array;
  /** 1 where the panel lies beyond 85° of latitude. */
  readonly polar: Uint8Array;
}

/** Heights at both ends of a leg, m above the surface; `null` where the lowest level of a field is meant. */
export interface LegHeights {
  readonly from: number | null;
  readonly to: number | null;
}

/** Ends nearer than this are one (1 µm: the slope of the field cannot change a figure over it). */
const MERGE_M = 1e-6;
/** How far outside its area a tile still holds (0.1 mm: the rounding of a track along the edge). */
const EDGE_DEG = 1e-9;

/** Cuts a leg into panels at the kinks of the fields. */
export function cutPanels(curve: TrackCurve, fields: readonly Field[], heights: LegHeights): Panels {
  const tiles = fields.flatMap((field) => field.tiles);
  const length = curve.starts[curve.starts.length - 1] as number;
  const ends: number[] = [];
  const piece: number[] = [];
  const levelCuts = tiles.flatMap((tile) => heightCuts(tile, heights, length));
  for (let p = 0; p + 1 < curve.starts.length; p += 1) {
    const from = curve.starts[p] as number;
    const to = curve.starts[p + 1] as number;
    const cuts = levelCuts.filter((s) => s > from && s < to);
    collectCrossings(curve.coefficients, p, tiles, (x) => cuts.push(from + ((to - from) * (x + 1)) / 2));
    cuts.sort((a, b) => a - b);
    let last = from;
    ends.push(from);
    piece.push(p);
    for (const s of cuts) {
      if (s - last > MERGE_M && to - s > MERGE_M) {
        ends.push(s);
        piece.push(p);
        last = s;
      }
    }
  }
  ends.push(length);
  const panels = { s: Float64Array.from(ends), piece: Int32Array.from(piece) };
  return { ...panels, polar: markPolar(curve, panels.s, panels.piece) };
}

/** Finds the cell of every panel in a tile, at the panel's middle. */
export function locatePanels(curve: TrackCurve, panels: Panels, tile: Tile, heights: LegHeights): PanelCells {
  const count = panels.piece.length;
  const cells: PanelCells = {
    column: new Int32Array(count),
    row: new Int32Array(count),
    level: new Int32Array(count),
    levelState: new Uint8Array(count),
    turn: new Float64Array(count),
  };
  const length = curve.starts[curve.starts.length - 1] as number;
  for (let n = 0; n < count; n += 1) {
    const middle = ((panels.s[n] as number) + (panels.s[n + 1] as number)) / 2;
    const p = panels.piece[n] as number;
    const x = pieceVariable(curve, p, middle);
    const lon = evaluate(curve.coefficients, p * STRIDE + LON, x);
    const lat = evaluate(curve.coefficients, p * STRIDE + LAT, x);
    const turn = turnInto(tile.lon, lon);
    cells.turn[n] = turn;
    cells.column[n] = cellIn(tile.lon, lon + turn);
    cells.row[n] = cellIn(tile.lat, lat);
    if ((cells.row[n] as number) < 0) cells.column[n] = -1;
    const height = heightAt(heights, tile, middle / length);
    cells.level[n] = levelBelow(tile.height, height);
    cells.levelState[n] = levelState(tile.height, height);
  }
  return cells;
}

/** The variable ξ of piece p at s. */
function pieceVariable(curve: TrackCurve, p: number, s: number): number {
  const from = curve.starts[p] as number;
  const to = curve.starts[p + 1] as number;
  return (2 * (s - from)) / (to - from) - 1;
}

/** Height at a share of the leg: linear between the waypoints, the tile's lowest level where a waypoint has none. */
export function heightAt(heights: LegHeights, tile: Tile, share: number): number {
  const lowest = tile.height?.[0] ?? 0;
  const from = heights.from ?? lowest;
  const to = heights.to ?? lowest;
  return from + (to - from) * share;
}

/** Cell of a value on an ascending axis (the last cell holds its upper end), -1 outside; 0 on an axis of one node. */
function cellIn(axis: Float64Array, value: number): number {
  const last = axis.length - 1;
  if (!(value >= (axis[0] as number) - EDGE_DEG && value <= (axis[last] as number) + EDGE_DEG)) return -1;
  return Math.min(Math.max(lowerBound(axis, value), 0), Math.max(last - 1, 0));
}

/** Index of the last node at or below a value; -1 where there is none. */
export function lowerBound(axis: Float64Array, value: number): number {
  let low = -1;
  let high = axis.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if ((axis[middle] as number) <= value) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** Whole turns, in degrees, that bring a longitude at or after the first meridian of an axis. */
function turnInto(lonAxis: Float64Array, lon: number): number {
  return Math.ceil(((lonAxis[0] as number) - EDGE_DEG - lon) / 360) * 360;
}

function levelBelow(levels: Float64Array | null, height: number): number {
  if (levels === null) return 0;
  const below = lowerBound(levels, height);
  return Math.max(below, 0);
}

function levelState(levels: Float64Array | null, height: number): number {
  if (levels === null) return LEVEL_SINGLE;
  const below = lowerBound(levels, height);
  if (below < 0) return LEVEL_BEYOND;
  if (levels[below] === height) return LEVEL_SINGLE;
  return below === levels.length - 1 ? LEVEL_BEYOND : LEVEL_BETWEEN;
}

function heightCuts(tile: Tile, heights: LegHeights, length: number): number[] {
  const from = heightAt(heights, tile, 0);
  const to = heightAt(heights, tile, 1);
  if (tile.height === null || from === to) return [];
  return Array.from(tile.height)
    .filter((level) => (level - from) * (level - to) < 0)
    .map((level) => (length * (level - from)) / (to - from));
}

function markPolar(curve: TrackCurve, s: Float64Array, piece: Int32Array): Uint8Array {
  const polar = new Uint8Array(piece.length);
  for (let n = 0; n < piece.length; n += 1) {
    const p = piece[n] as number;
    const x = pieceVariable(curve, p, ((s[n] as number) + (s[n + 1] as number)) / 2);
    const lat = evaluate(curve.coefficients, p * STRIDE + LAT, x);
    polar[n] = Math.abs(lat) > POLAR_FRAME_LATITUDE ? 1 : 0;
  }
  return polar;
}

/** Calls `found` with the variable ξ of every crossing of a grid line, or of 85° of latitude, inside piece p. */
function collectCrossings(
  coefficients: Float64Array,
  p: number,
  tiles: readonly Tile[],
  found: (x: number) => void,
): void {
  const lon = p * STRIDE + LON;
  const lat = p * STRIDE + LAT;
  const turning = turningPoint(coefficients, p * STRIDE + COS);
  const polarLines = Float64Array.of(-POLAR_FRAME_LATITUDE, POLAR_FRAME_LATITUDE);
  for (const axis of [polarLines, ...tiles.map((tile) => tile.lat)]) {
    crossings(coefficients, lat, -1, turning, axis, 0, found);
    if (turning < 1) crossings(coefficients, lat, turning, 1, axis, 0, found);
  }
  for (const { lon: axis } of tiles) {
    const first = evaluate(coefficients, lon, -1);
    const last = evaluate(coefficients, lon, 1);
    const lowestTurn = Math.ceil((Math.min(first, last) - (axis[axis.length - 1] as number)) / 360);
    const highestTurn = Math.floor((Math.max(first, last) - (axis[0] as number)) / 360);
    for (let turn = lowestTurn; turn <= highestTurn; turn += 1) {
      crossings(coefficients, lon, -1, 1, axis, turn * 360, found);
    }
  }
}

/** Where the latitude turns inside a piece (course east or west, cos θ = 0); 1 where it does not. */
function turningPoint(coefficients: Float64Array, cos: number): number {
  const first = evaluate(coefficients, cos, -1);
  const last = evaluate(coefficients, cos, 1);
  return first * last < 0 ? root(coefficients, cos, -1, 1, 0) : 1;
}

/** Crossings of the lines `axis + shift` by a polynomial that is monotone from xa to xb. */
function crossings(
  coefficients: Float64Array,
  offset: number,
  xa: number,
  xb: number,
  axis: Float64Array,
  shift: number,
  found: (x: number) => void,
): void {
  const a = evaluate(coefficients, offset, xa) - shift;
  const b = evaluate(coefficients, offset, xb) - shift;
  const low = Math.min(a, b);
  const high = Math.max(a, b);
  for (let n = lowerBound(axis, low) + 1; n < axis.length && (axis[n] as number) < high; n += 1) {
    const line = axis[n] as number;
    if (line > low) found(root(coefficients, offset, xa, xb, line + shift));
  }
}

/** The ξ between xa and xb where a monotone polynomial takes a value: regula falsi with the Illinois step, then bisection's guard. */
function root(coefficients: Float64Array, offset: number, xa: number, xb: number, value: number): number {
  let a = xa;
  let b = xb;
  let fa = evaluate(coefficients, offset, a) - value;
  let fb = evaluate(coefficients, offset, b) - value;
  for (let step = 0; step < 60 && Math.abs(b - a) > 4e-16 && fa !== fb; step += 1) {
    const x = Math.min(Math.max((a * fb - b * fa) / (fb - fa), Math.min(a, b)), Math.max(a, b));
    const fx = evaluate(coefficients, offset, x) - value;
    if (fx === 0 || x === a || x === b) return x;
    if (fx * fb < 0) {
      a = b;
      fa = fb;
    } else {
      fa /= 2;
    }
    b = x;
    fb = fx;
  }
  return b;
}
