import type { WindowCell } from "../core.ts";
import { cellIndex, type HeatRow } from "./heat-rows.ts";
import type { Filled } from "./window-fill.ts";

/** The letters of a window's bests: least time, least use, latest departure. */
export const BESTS = [
  ["time", "T", "Least time"],
  ["use", "U", "Least use"],
  ["latest", "L", "Latest departure"],
] as const;

/** Where the bests of the whole window stand among the rows; letters that fall on one cell stand together. */
export function bestMarks(
  { bests, shape, cells }: Filled,
  rows: readonly HeatRow[],
): readonly { readonly row: number; readonly column: number; readonly letters: string }[] {
  if (bests === null) return [];
  const { best } = bests.summary;
  const found = new Map<string, { row: number; column: number; letters: string }>();
  for (const [key, letter] of BESTS) {
    const cell = best[key];
    const place =
      cell === null
        ? null
        : placeOf(
            cell,
            shape.departures,
            rows,
            (column, row) => cells[cellIndex(shape, column, row)] ?? null,
          );
    if (place === null) continue;
    const at = `${place.row} ${place.column}`;
    found.set(at, { ...place, letters: (found.get(at)?.letters ?? "") + letter });
  }
  return [...found.values()];
}

function placeOf(
  cell: WindowCell,
  departures: readonly number[],
  rows: readonly HeatRow[],
  at: (column: number, row: HeatRow) => WindowCell | null,
): { row: number; column: number } | null {
  const column = departures.indexOf(Date.parse(cell.departure));
  if (column < 0) return null;
  const row = rows.findIndex((candidate) => {
    const own = at(column, candidate);
    return own !== null && own.route === cell.route && own.speed_m_s === cell.speed_m_s;
  });
  return row < 0 ? null : { row, column };
}
