import type { PreparedRoute } from "../estimate/prepare.ts";
import { type DepartureWindow, windowDepartures } from "./departure-window.ts";
import { leastWhole } from "./least-whole.ts";
import { type Sweep, sweepCell } from "./window.ts";
import type { WindowCell } from "./window-cell.ts";
import { bestOf, isPossible, least, type WindowBest } from "./window-summary.ts";

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
 * it and the next, which is a stop. Never worse than the cells. A valley or an opening between two departures that no cell
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
  const found = sweep.prepared.map((prepared) => {
    const own = cells.filter(({ route }) => route === prepared.route.name);
    return { route: prepared.route.name, tried: refinedCells(sweep, prepared, window, own) };
  });
  return {
    best: bestOf(found.flatMap(({ tried }) => tried)),
    routes: found.map(({ route, tried }) => ({ route, best: bestOf(tried) })),
  };
}

/** The cells of one route and those tried between them. */
function refinedCells(
  sweep: Sweep,
  prepared: PreparedRoute,
  window: DepartureWindow,
  cells: readonly WindowCell[],
): WindowCell[] {
  // Where the window names no speeds, a cell's speed is the one found for its own departure.
  const triedSpeed = ({ speed_m_s }: WindowCell) => (window.speeds_m_s === null ? null : speed_m_s);
  const tried = new Map(cells.map((cell) => [`${cell.departure} ${triedSpeed(cell)}`, cell]));
  const at = (minute: number, like: WindowCell): WindowCell => {
    const speed = triedSpeed(like);
    const key = `${new Date(minute * MINUTE).toISOString()} ${speed}`;
    const known = tried.get(key) ?? sweepCell(sweep, prepared, minute * MINUTE, speed);
    tried.set(key, known);
    return known;
  };
  const series = seriesOf(cells, triedSpeed);
  for (const figure of [passage, use]) {
    for (const valley of valleys(series, figure)) {
      const departure = Date.parse(valley.departure);
      const { low, high } = around(departure, window);
      if (low <= high) leastWhole((minute) => figure(at(minute, valley)), low, departure / MINUTE, high);
    }
  }
  narrowLatest(cells, window, at);
  return [...tried.values()];
}

const passage = (cell: WindowCell): number => (isPossible(cell) ? (cell.passage_s ?? Infinity) : Infinity);
const use = (cell: WindowCell): number => (isPossible(cell) ? (cell.use ?? Infinity) : Infinity);

function seriesOf(
  cells: readonly WindowCell[],
  triedSpeed: (cell: WindowCell) => number | null,
): WindowCell[][] {
  const speeds = [...new Set(cells.map(triedSpeed))];
  return speeds.map((speed) =>
    cells
      .filter((cell) => triedSpeed(cell) === speed)
      .sort((a, b) => Date.parse(a.departure) - Date.parse(b.departure)),
  );
}

/** Cells that are not above their neighbours in departure, the deepest first. */
function valleys(series: readonly WindowCell[][], figure: (cell: WindowCell) => number): WindowCell[] {
  return series
    .flatMap((cells) =>
      cells.filter((cell, index) => {
        const before = cells[index - 1];
        const after = cells[index + 1];
        return (
          isPossible(cell) &&
          (before === undefined || figure(before) >= figure(cell)) &&
          (after === undefined || figure(after) >= figure(cell))
        );
      }),
    )
    .sort((a, b) => figure(a) - figure(b))
    .slice(0, MOST_VALLEYS);
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
function narrowLatest(
  cells: readonly WindowCell[],
  window: DepartureWindow,
  at: (minute: number, like: WindowCell) => WindowCell,
): void {
  const latest = least(
    cells.filter(isPossible),
    (cell) => -Date.parse(cell.departure),
    () => 0,
  );
  const departures = windowDepartures(window);
  if (latest === null || Date.parse(latest.departure) === departures[departures.length - 1]) return;
  for (const cell of cells) {
    if (!isPossible(cell) || cell.departure !== latest.departure) continue;
    const departure = Date.parse(cell.departure);
    let open = Math.floor(departure / MINUTE);
    let shut = Math.ceil((departure + 1000 * window.every_s) / MINUTE);
    while (shut - open > 1) {
      const middle = Math.floor((open + shut) / 2);
      if (isPossible(at(middle, cell))) open = middle;
      else shut = middle;
    }
  }
}
