import type { SureCell, SureWindow, WindowBest, WindowCell } from "../core.ts";
import { cellIndex, type HeatRow } from "./heat-rows.ts";
import type { Filled } from "./window-fill.ts";

/** The letters of a window's bests: least time, least use, latest departure. */
const BESTS = [
  ["time", "T", "Least time"],
  ["use", "U", "Least use"],
  ["latest", "L", "Latest departure"],
] as const;

/** A best of a window as it is told. */
export interface ToldBest {
  readonly by: "time" | "use" | "latest";
  readonly letter: string;
  readonly name: string;
  /** Whether it is the plain estimate's alone, and does not hold: its letter then stands in brackets. */
  readonly isPassed: boolean;
  /** `null` where no departure holds. */
  readonly cell: WindowCell | SureCell | null;
}

/** The bests to tell of: those that hold, each followed by the plain estimate's where that is another; the plain ones until they are tried. */
export function toldBests(pair: SureWindow["best"] | null, plain: WindowBest): readonly ToldBest[] {
  return BESTS.flatMap(([by, letter, name]): ToldBest[] => {
    const own = { by, letter, name, isPassed: false, cell: pair === null ? plain[by] : pair.sure[by] };
    const passed = pair?.plain[by] ?? null;
    if (passed === null || isSameCell(passed, own.cell)) return own.cell === null ? [] : [own];
    return [own, { by, letter, name: `${name} by the plain estimate`, isPassed: true, cell: passed }];
  });
}

function isSameCell(a: WindowCell, b: WindowCell | null): boolean {
  return a.route === b?.route && a.departure === b.departure && a.speed_m_s === b.speed_m_s;
}

/** Letters on one cell of the map. */
export interface BestMark {
  readonly row: number;
  readonly column: number;
  /** `TU`, `L(T)`: in brackets those of the plain estimate that do not hold. */
  readonly letters: string;
  /** Whether none of them holds. */
  readonly isPassed: boolean;
}

/** Where the bests of the whole window stand among the rows; letters that fall on one cell stand together. */
export function bestMarks(
  { bests, sure, shape, cells }: Filled,
  rows: readonly HeatRow[],
): readonly BestMark[] {
  if (bests === null) return [];
  const found = new Map<string, { row: number; column: number; held: string; passed: string }>();
  for (const { letter, cell, isPassed } of toldBests(sure?.best ?? null, bests.summary.best)) {
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
    const mark = found.get(at) ?? { ...place, held: "", passed: "" };
    mark[isPassed ? "passed" : "held"] += letter;
    found.set(at, mark);
  }
  return [...found.values()].map(({ row, column, held, passed }) => ({
    row,
    column,
    letters: passed === "" ? held : `${held}(${passed})`,
    isPassed: held === "",
  }));
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
