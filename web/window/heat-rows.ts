import type { WindowCell } from "../core.ts";
import { inUnit, type ShownUnit } from "../format/units.ts";
import type { WindowShape } from "../worker/protocol.ts";
import type { Filled } from "./window-fill.ts";

/** What the colours of a window stand for. */
export type Measure = "time" | "use" | "left";

/** A row of a window: one route at one speed over all departures. */
export interface HeatRow {
  /** Among the routes that were estimated. */
  readonly route: number;
  /** Among the window's speeds; `null` where the plan's pace holds. */
  readonly speed: number | null;
  readonly name: string;
}

/** Every route at every speed of the window, every route at one of them, or one route at all of them. */
export interface RowChoice {
  readonly by: "all" | "routes" | "speeds";
  readonly route: number;
  readonly speed: number;
}

/** Most rows that are shown where every route is shown at every speed. */
const MOST_ROWS = 12;

/** Whether every route can be shown at every speed. */
export function canShowAll({ routes, speeds }: WindowShape): boolean {
  return speeds !== null && routes * speeds.length <= MOST_ROWS;
}

export function heatRows(
  { shape, plan }: Filled,
  { by, route, speed }: RowChoice,
  unit: ShownUnit,
): HeatRow[] {
  const { speeds } = shape;
  const at = speeds === null ? null : Math.min(speed, speeds.length - 1);
  if (by === "all" && speeds !== null && canShowAll(shape)) {
    return plan.routes.flatMap(({ name }, index) =>
      speeds.map((value, order) => ({
        route: index,
        speed: order,
        // The speed first, which a narrow screen does not cut off.
        name: `${inUnit(value, unit)} ${name}`,
      })),
    );
  }
  if (by !== "speeds" || speeds === null) {
    return plan.routes.map(({ name }, index) => ({ route: index, speed: at, name }));
  }
  return speeds.map((value, index) => ({
    route: Math.min(route, shape.routes - 1),
    speed: index,
    name: `${inUnit(value, unit)} ${unit.symbol}`,
  }));
}

export function cellIndex({ routes, speeds }: WindowShape, departure: number, row: HeatRow): number {
  return (departure * routes + row.route) * (speeds?.length ?? 1) + (row.speed ?? 0);
}

/** A cell's figure, s or store units; `null` where it does not arrive. */
export function figureOf(cell: WindowCell, measure: Measure): number | null {
  if (measure === "time") return cell.passage_s;
  return measure === "use" ? cell.use : cell.remaining;
}

/** Least and greatest figure among cells that can be done, or among all that arrive where none can; `null` where none arrives. */
export function figureRange(
  cells: readonly (WindowCell | null)[],
  measure: Measure,
): readonly [number, number] | null {
  const within = (counted: (cell: WindowCell) => boolean): readonly [number, number] | null => {
    let least = Number.POSITIVE_INFINITY;
    let most = Number.NEGATIVE_INFINITY;
    for (const cell of cells) {
      const figure = cell === null || !counted(cell) ? null : figureOf(cell, measure);
      if (figure === null) continue;
      least = Math.min(least, figure);
      most = Math.max(most, figure);
    }
    return least <= most ? [least, most] : null;
  };
  return within(({ status }) => status !== "stop") ?? within(() => true);
}

/** Class of a figure, 0 for the best of the range … `classes` - 1 for the worst. */
export function heatClass(
  figure: number,
  [least, most]: readonly [number, number],
  measure: Measure,
  classes: number,
): number {
  const share = most > least ? (figure - least) / (most - least) : 0;
  const worse = measure === "left" ? 1 - share : share;
  return Math.min(Math.max(Math.floor(worse * classes), 0), classes - 1);
}
