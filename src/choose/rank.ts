import type { WindowCell } from "./window-cell.ts";

/** What a departure may be the best by. */
export type BestBy = "time" | "use" | "latest";

/**
 * Share of a figure by which two that are equal may differ: above what rounding leaves and what engines differ by in the last bits, and far
 * below what a minute's delay makes in a field that changes.
 */
const ROUNDING = 1e-12;

/** Whether one figure is less than another by more than rounding; either may be infinite. */
export function isLess(a: number, b: number): boolean {
  return b === Number.POSITIVE_INFINITY ? a < b : b - a > ROUNDING * Math.abs(b);
}

type Figure = (cell: WindowCell) => number;

const departure: Figure = (cell) => Date.parse(cell.departure);
const passage: Figure = ({ passage_s }) => passage_s ?? Number.POSITIVE_INFINITY;
const use: Figure = (cell) => cell.use ?? Number.POSITIVE_INFINITY;
const speed: Figure = ({ speed_m_s }) => speed_m_s ?? 0;

/** By what cells are ranked, the least first, and then among equals; at last by route and by speed. */
const FIGURES: Readonly<Record<BestBy, readonly [Figure, Figure]>> = {
  time: [passage, departure],
  use: [use, departure],
  latest: [(cell) => -departure(cell), passage],
};

/** The figure that a cell is ranked by, the least first. */
export function figureOf(by: BestBy): Figure {
  return FIGURES[by][0];
}

/**
 * The first in rank of some cells; `null` where there are none. Figures within 1e-12 of each other are equal, so that rounding chooses
 * nothing: of equals by time or use the earliest departure, by latest departure the shortest passage; then the first route and the lowest
 * speed.
 *
 * @param among cells that name the routes in order; these unless given
 */
export function firstInRank(
  cells: readonly WindowCell[],
  by: BestBy,
  among: readonly WindowCell[] = cells,
): WindowCell | null {
  const figures = figuresOf(by, among);
  return figures.reduce((left, figure) => leastOfAll(left, figure), cells)[0] ?? null;
}

/** Cells in rank, the first as {@link firstInRank} has it. */
export function inRank(cells: readonly WindowCell[], by: BestBy): WindowCell[] {
  return sorted(cells, figuresOf(by, cells));
}

function figuresOf(by: BestBy, among: readonly WindowCell[]): readonly Figure[] {
  const routes = new Map<string, number>();
  for (const { route } of among) if (!routes.has(route)) routes.set(route, routes.size);
  return [...FIGURES[by], ({ route }) => routes.get(route) ?? routes.size, speed];
}

function leastOfAll(cells: readonly WindowCell[], figure: Figure): readonly WindowCell[] {
  const figures = cells.map(figure);
  const least = figures.reduce((so, each) => Math.min(so, each), Number.POSITIVE_INFINITY);
  return cells.filter((_, index) => !isLess(least, figures[index] as number));
}

function sorted(cells: readonly WindowCell[], [figure, ...others]: readonly Figure[]): WindowCell[] {
  if (figure === undefined || cells.length < 2) return [...cells];
  const ascending = cells
    .map((cell) => ({ cell, value: figure(cell) }))
    .sort((a, b) => (a.value === b.value ? 0 : a.value - b.value));
  const groups: WindowCell[][] = [];
  let first = Number.NaN;
  for (const { cell, value } of ascending) {
    const own = groups[groups.length - 1];
    if (own !== undefined && !isLess(first, value)) own.push(cell);
    else {
      groups.push([cell]);
      first = value;
    }
  }
  return groups.flatMap((group) => sorted(group, others));
}
