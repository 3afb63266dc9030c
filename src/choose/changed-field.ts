import type { PanelCells } from "../estimate/panels.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { Field, Tile } from "../field/field.ts";
import { DEGREE } from "../geodesy/angle.ts";

/** How a field's vectors are changed: made longer by a factor and turned clockwise. Gusts take the factor. */
export interface FieldChange {
  readonly factor: number;
  readonly veer_deg: number;
}

/** The part of a tile that routes lie in: first node along each axis and how many. */
interface Box {
  readonly column: number;
  readonly row: number;
  readonly width: number;
  readonly rows: number;
}

/** A changed field with the routes prepared for it. */
export interface ChangedField {
  readonly field: Field;
  readonly prepared: readonly PreparedRoute[];
}

/**
 * A field with its vectors changed, cut to the nodes around these prepared routes, so that it takes no more memory than they span;
 * the routes' cells are counted from the cut's first node.
 *
 * @param index of the field among those that the routes were prepared for
 * @returns the field and routes themselves where nothing changes
 */
export function changeField(
  field: Field,
  index: number,
  change: FieldChange,
  prepared: readonly PreparedRoute[],
): ChangedField {
  if (change.factor === 1 && change.veer_deg === 0) return { field, prepared };
  const boxes = field.tiles.map((tile, number) => boxOf(tile, cellsOf(prepared, index, number)));
  const tiles = field.tiles.map((tile, number) => {
    const box = boxes[number] ?? null;
    return box === null ? tile : changeTile(tile, change, box);
  });
  return { field: { ...field, tiles }, prepared: prepared.map((route) => movedRoute(route, index, boxes)) };
}

function cellsOf(prepared: readonly PreparedRoute[], field: number, tile: number): PanelCells[] {
  return prepared.flatMap(({ legs }) =>
    legs.map(({ cells }) => {
      const here = cells[field]?.[tile];
      if (here === undefined) throw new Error("the field is not one that the route was prepared for");
      return here;
    }),
  );
}

/** The nodes at the corners of every cell, `null` where no route touches the tile. */
function boxOf(tile: Tile, cells: readonly PanelCells[]): Box | null {
  let [west, east, south, north] = [Number.POSITIVE_INFINITY, -1, Number.POSITIVE_INFINITY, -1];
  for (const { column, row } of cells) {
    for (const [panel, at] of column.entries()) {
      if (at < 0) continue;
      west = Math.min(west, at);
      east = Math.max(east, at);
      south = Math.min(south, row[panel] as number);
      north = Math.max(north, row[panel] as number);
    }
  }
  if (east < 0) return null;
  const width = Math.min(east + 2, tile.lon.length) - west;
  return { column: west, row: south, width, rows: Math.min(north + 2, tile.lat.length) - south };
}

function changeTile(tile: Tile, { factor, veer_deg }: FieldChange, box: Box): Tile {
  const along = factor * Math.cos(veer_deg * DEGREE);
  const across = factor * Math.sin(veer_deg * DEGREE);
  const nodes = nodesOf(tile, box);
  const slices = tile.slices.map((slice) => {
    const changed = new Float64Array(2 * nodes.length);
    for (const [at, node] of nodes.entries()) {
      const u = slice[2 * node] as number;
      const v = slice[2 * node + 1] as number;
      changed[2 * at] = along * u + across * v;
      changed[2 * at + 1] = along * v - across * u;
    }
    return changed;
  });
  return {
    ...tile,
    lon: tile.lon.subarray(box.column, box.column + box.width),
    lat: tile.lat.subarray(box.row, box.row + box.rows),
    slices,
    gusts:
      tile.gusts?.map((gusts) => Float64Array.from(nodes, (node) => factor * (gusts[node] as number))) ??
      null,
    masks: tile.masks.map((mask) => mask && Uint8Array.from(nodes, (node) => mask[node] as number)),
    global: false,
  };
}

/** Indices of a box's nodes in its tile, on every level. */
function nodesOf({ lon, lat, height }: Tile, { column, row, width, rows }: Box): Int32Array {
  const levels = height?.length ?? 1;
  return Int32Array.from({ length: levels * rows * width }, (_, at) => {
    const line = Math.floor(at / width);
    const level = Math.floor(line / rows);
    return (level * lat.length + row + (line % rows)) * lon.length + column + (at % width);
  });
}

function movedRoute(route: PreparedRoute, index: number, boxes: readonly (Box | null)[]): PreparedRoute {
  const legs = route.legs.map((leg) => ({
    ...leg,
    cells: leg.cells.map((tiles, field) =>
      field === index ? tiles.map((cells, number) => movedCells(cells, boxes[number] ?? null)) : tiles,
    ),
  }));
  return { ...route, legs };
}

function movedCells(cells: PanelCells, box: Box | null): PanelCells {
  if (box === null) return cells;
  return {
    ...cells,
    column: cells.column.map((column) => (column < 0 ? column : column - box.column)),
    row: cells.row.map((row) => (row < 0 ? row : row - box.row)),
  };
}
