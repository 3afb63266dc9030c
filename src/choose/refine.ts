import { type DepartureWindow, windowDepartures } from "./departure-window.ts";
import { lastWhole } from "./last-whole.ts";
import { leastWhole } from "./least-whole.ts";
import { MinuteCells } from "./minute-cells.ts";
import { figureOf, inRank, isLess } from "./rank.ts";
import type { Sweep } from "./sweep.ts";
import type { WindowCell } from "./window-cell.ts";
import { bestOf, isPossible, type WindowBest } from "./window-summary.ts";

const MINUTE = 60_000;
/** How many valleys of a route's figures are looked into: the deepest. */
const MOST_VALLEYS = 3;

/** The bests of a window to the minute. */
export interface RefinedWindow {
  readonly best: WindowBest;
  readonly routes: readonly { readonly route: string; readonly best: WindowBest }[];
}

/**
 * Refines the bests of a window to the whole minute, on the routes' true figures: around each of the deepest valleys of
 * time and of use a golden-section search between the departures on either side, and for the latest departure a bisection between
 * it and the next, which is a stop. Never worse than the cells, and ranked as they are: of equals, as in a steady field, the earliest
 * departure. A valley or an opening between two departures that no cell
 * shows is not seen: the step of the window is the resolution.
 *
 * @param cells all of the window
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const input = { title: "", departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [], routes, land: null };
 * const sweep = makeSweep(prepareRoutes(input), input);
 * const window = { from: 0, to: 3600000, every_s: 1800, speeds_m_s: [4, 5] };
 * refineWindow(sweep, window, [...windowCells(sweep, window)]).best.use.speed_m_s // → 4
 */
export function refineWindow(
  sweep: Sweep,
  window: DepartureWindow,
  cells: readonly WindowCell[],
): RefinedWindow {
  return refinedBests(refineRoutes(sweep, window, cells));
}

/** The bests of all cells tried. */
export function refinedBests(found: readonly MinuteCells[]): RefinedWindow {
  return {
    best: bestOf(found.flatMap(({ tried }) => tried)),
    routes: found.map(({ route, tried }) => ({ route, best: bestOf(tried) })),
  };
}

/** The cells of each route, with those tried between them for {@link refineWindow}. */
export function refineRoutes(
  sweep: Sweep,
  window: DepartureWindow,
  cells: readonly WindowCell[],
): MinuteCells[] {
  return sweep.prepared.map((prepared) => {
    const own = cells.filter(({ route }) => route === prepared.route.name);
    const minutes = new MinuteCells(sweep, prepared, window, own);
    refineRoute(minutes, window);
    return minutes;
  });
}

function refineRoute(minutes: MinuteCells, window: DepartureWindow): void {
  const series = seriesOf(minutes);
  for (const by of ["time", "use"] as const) {
    const figure = (cell: WindowCell): number => (isPossible(cell) ? figureOf(by)(cell) : Infinity);
    for (const valley of inRank(valleys(series, figure), by).slice(0, MOST_VALLEYS))
      searchAround(valley, window, (minute) => figure(minutes.at(minute, valley)));
  }
  narrowLatest(minutes.cells, window, minutes, isPossible);
}

/** Searches the whole minutes around a departure of a window, less than a step away, for a figure's least. */
export function searchAround(
  { departure }: WindowCell,
  window: DepartureWindow,
  figure: (minute: number) => number,
): void {
  const { low, high } = around(Date.parse(departure), window);
  if (low <= high) leastWhole(figure, low, Date.parse(departure) / MINUTE, high);
}

function seriesOf(minutes: MinuteCells): WindowCell[][] {
  const { cells } = minutes;
  const speeds = [...new Set(cells.map((cell) => minutes.triedSpeed(cell)))];
  return speeds.map((speed) =>
    cells
      .filter((cell) => minutes.triedSpeed(cell) === speed)
      .sort((a, b) => Date.parse(a.departure) - Date.parse(b.departure)),
  );
}

/** Cells that are not above their neighbours in departure. */
function valleys(series: readonly WindowCell[][], figure: (cell: WindowCell) => number): WindowCell[] {
  return series.flatMap((cells) =>
    cells.filter((cell, index) => {
      const beside = [cells[index - 1], cells[index + 1]];
      return (
        isPossible(cell) && beside.every((each) => each === undefined || !isLess(figure(each), figure(cell)))
      );
    }),
  );
}

/** First and last whole minute less than a step from a departure, within the window. */
function around(departure: number, { from, to, every_s }: DepartureWindow): { low: number; high: number } {
  const step = 1000 * every_s;
  return {
    low: Math.ceil(Math.max(from, departure - step) / MINUTE),
    high: Math.floor(Math.min(to, departure + step) / MINUTE),
  };
}

/** Halves the step between the latest departure that can be done and the next, at every speed that reaches it. */
export function narrowLatest(
  cells: readonly WindowCell[],
  window: DepartureWindow,
  minutes: MinuteCells,
  canBeDone: (cell: WindowCell) => boolean,
): void {
  const able = cells.filter(canBeDone);
  const latest = able
    .map(({ departure }) => departure)
    .sort()
    .at(-1);
  const departures = windowDepartures(window);
  if (latest === undefined || Date.parse(latest) === departures[departures.length - 1]) return;
  for (const cell of able) {
    if (cell.departure !== latest) continue;
    const departure = Date.parse(cell.departure);
    const shut = Math.ceil((departure + 1000 * window.every_s) / MINUTE);
    lastWhole((minute) => canBeDone(minutes.at(minute, cell)), Math.floor(departure / MINUTE), shut);
  }
}
