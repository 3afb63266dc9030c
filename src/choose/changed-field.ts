import { LEVEL_BETWEEN } from "../estimate/panels.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { Field, Tile } from "../field/field.ts";
import { DEGREE } from "../geodesy/angle.ts";

/** How a field's vectors are changed: made longer by a factor and turned clockwise. Gusts take the factor. */
export interface FieldChange {
  readonly factor: number;
  readonly veer_deg: number;
}

/**
 * A field changed at every node that these prepared routes touch, at every valid time; other nodes are 0 and not for use. On a
 * field of hundreds of megabytes that costs what the routes touch: memory that is not written to is not taken.
 *
 * @param index of the field among those that the routes were prepared for
 * @returns the field itself where nothing changes
 */
export function changeField(
  field: Field,
  index: number,
  change: FieldChange,
  prepared: readonly PreparedRoute[],
): Field {
  if (change.factor === 1 && change.veer_deg === 0) return field;
  const tiles = field.tiles.map((tile, number) =>
    changeTile(tile, change, touchedNodes(tile, index, number, prepared)),
  );
  return { ...field, tiles };
}

function changeTile(tile: Tile, { factor, veer_deg }: FieldChange, nodes: Int32Array): Tile {
  const along = factor * Math.cos(veer_deg * DEGREE);
  const across = factor * Math.sin(veer_deg * DEGREE);
  const slices = tile.slices.map((slice) => {
    const changed = new Float64Array(slice.length);
    for (const node of nodes) {
      const u = slice[2 * node] as number;
      const v = slice[2 * node + 1] as number;
      changed[2 * node] = along * u + across * v;
      changed[2 * node + 1] = along * v - across * u;
    }
    return changed;
  });
  const gusts =
    factor === 1 || tile.gusts === null
      ? tile.gusts
      : tile.gusts.map((gusts) => scaled(gusts, factor, nodes));
  return { ...tile, slices, gusts };
}

function scaled(gusts: Float64Array, factor: number, nodes: Int32Array): Float64Array {
  const changed = new Float64Array(gusts.length);
  for (const node of nodes) changed[node] = factor * (gusts[node] as number);
  return changed;
}

/** The nodes at the corners of every cell that a panel of the routes lies in. */
function touchedNodes(
  tile: Tile,
  field: number,
  number: number,
  prepared: readonly PreparedRoute[],
): Int32Array {
  const width = tile.lon.length;
  const rows = tile.lat.length;
  const touched = new Set<number>();
  for (const { cells } of prepared.flatMap(({ legs }) => legs)) {
    const here = cells[field]?.[number];
    if (here === undefined) throw new Error("the field is not one that the route was prepared for");
    for (const [panel, column] of here.column.entries()) {
      if (column < 0) continue;
      const row = here.row[panel] as number;
      const level = here.level[panel] as number;
      const levels = here.levelState[panel] === LEVEL_BETWEEN ? 2 : 1;
      for (let k = level; k < level + levels; k += 1)
        for (let j = row; j <= Math.min(row + 1, rows - 1); j += 1)
          for (let i = column; i <= Math.min(column + 1, width - 1); i += 1)
            touched.add((k * rows + j) * width + i);
    }
  }
  return Int32Array.from(touched);
}
