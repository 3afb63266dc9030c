import type { SureCell, SureWindow, WindowBest, WindowCell } from "../core.ts";
import { cellIndex, type HeatRow } from "./heat-rows.ts";
import type { Filled } from "./window-fill.ts";

/** The letters of a window's bests: least time, least use, latest departure. */
const BESTS = [
  ["time", "T", "Least time"],
  ["use", "U", "Least use"],
  ["latest", "L", "Latest departure"],
] as const;

/** A best of a window as it is told: with its letter, small where it is the plain estimate's and does not hold. */
export interface ToldBest {
  readonly by: "time" | "use" | "latest";
  readonly letter: string;
  readonly name: string;
  /** `null` where no departure holds. */
  readonly cell: WindowCell | SureCell | null;
}

/** The bests to tell of: those that hold, each followed by the plain estimate's where that is another; the plain ones until they are tried. */
export function toldBests(pair: SureWindow["best"] | null, plain: WindowBest): readonly ToldBest[] {
  return BESTS.flatMap(([by, letter, name]): ToldBest[] => {
    const own = { by, letter, name, cell: pair === null ? plain[by] : pair.sure[by] };
    const passed = pair?.plain[by] ?? null;
    if (passed === null || isSameCell(passed, own.cell)) return own.cell === null ? [] : [own];
    return [own, { by, letter: letter.toLowerCase(), name: `${name} by the plain estimate`, cell: passed }];
  });
}

function isSameCell(a: WindowCell, b: WindowCell | null): boolean {
  return a.route === b?.route && a.departure === b.departure && a.speed_m_s === b.speed_m_s;
}

/** Where the bests of the whole window stand among the rows; letters that fall on one cell stand together. */
export function bestMarks(
  { bests, sure, shape, cells }: Filled,
  rows: readonly HeatRow[],
): readonly { readonly row: number; readonly column: number; readonly letters: string }[] {
  if (bests === null) return [];
  const found = new Map<string, { row: number; column: number; letters: string }>();
  for (const { letter, cell } of toldBests(sure?.best ?? null, bests.summary.best)) {
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
