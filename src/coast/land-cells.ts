/**
 * Land, cut once into small cells so that a question about a leg looks at a few short rings only.
 *
 * The cells' edges lie where no position is ever written, since a place exactly on one
 * may count as land.
 */
export interface Land {
  /** Ranges of rings by cell: rings `ringRange[2 c]` up to `ringRange[2 c + 1]` are those of cell number `cellAt(…)` = c. */
  readonly ringRange: Int32Array;
  /** First coordinate in `xy` of each ring, and one past the last ring's end. */
  readonly ringStart: Int32Array;
  /** Number of the polygon that each ring is cut from: polygons may overlap, rings of one are told apart by the even-odd rule. */
  readonly ringPolygon: Int32Array;
  /** Longitude and latitude in turn, degrees; longitudes between `WEST` and `WEST` + 360. */
  readonly xy: Float64Array;
}

/**
 * Side of a cell, degrees. With 1:10m land a cell has at most 800 positions: a degree prepares in half the time of half a
 * degree, in 9 MB against 16, and a route along a broken coast costs about as much.
 */
export const CELL = 1;
/** How many cells there are around the globe, and from pole to pole. */
export const COLUMNS = 360 / CELL;
export const ROWS = 180 / CELL + 1;

/** Longitude and latitude at which cell (0, 0) begins, degrees: off whole degrees and minutes by more digits than are typed. */
export const WEST = -180.007314159;
export const SOUTH = -90.004171828;

/** Number of the cell in a column (counted from `WEST`, any turn) and a row (counted from `SOUTH`). */
export function cellAt(column: number, row: number): number {
  return row * COLUMNS + (((column % COLUMNS) + COLUMNS) % COLUMNS);
}
