import type { FindingCode } from "../estimate/result.ts";
import { firstInRank } from "./rank.ts";
import type { CellFinding, WindowCell } from "./window-cell.ts";

/**
 * The best of some cells, among those that are not a `stop`; `null` where there is none. Figures within 1e-12 of each other are equal, and what
 * is still equal after the rules below goes to the first route, then the lowest speed.
 */
export interface WindowBest {
  /** Shortest from departure to arrival; of equals the earliest departure. */
  readonly time: WindowCell | null;
  /** Least use; of equals the earliest departure. */
  readonly use: WindowCell | null;
  /** Latest departure; of equals the shortest passage. */
  readonly latest: WindowCell | null;
  /** What stops the departure after the latest, at the same route and speed; `null` where the window ends there. */
  readonly closedBy: CellFinding | null;
}

/** Why some cells of a route cannot be done: their gravest finding. */
export interface Refusal {
  readonly code: FindingCode;
  readonly cells: number;
  /** First and last departure among them. */
  readonly from: string;
  readonly to: string;
  /** What the first of them says. */
  readonly message: string;
}

export interface RouteSummary {
  readonly route: string;
  readonly cells: number;
  /** How many are not a `stop`. */
  readonly possible: number;
  readonly best: WindowBest;
  /** The commonest first. */
  readonly refused: readonly Refusal[];
}

export interface WindowSummary {
  readonly cells: number;
  readonly possible: number;
  readonly best: WindowBest;
  /** In the order in which the cells name them. */
  readonly routes: readonly RouteSummary[];
}

/**
 * The bests of a window's cells, of all and per route, and what stops the others; over as many cells as there are yet.
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const input = { title: "", departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [], routes, land: null };
 * const sweep = makeSweep(prepareRoutes(input), input);
 * const window = { from: 0, to: 3600000, every_s: 1800, speeds_m_s: [4, 5] };
 * summariseWindow([...windowCells(sweep, window)]).best.latest.departure // → "1970-01-01T01:00:00.000Z"
 */
export function summariseWindow(cells: readonly WindowCell[]): WindowSummary {
  const byRoute = new Map<string, WindowCell[]>();
  for (const cell of cells) {
    const own = byRoute.get(cell.route);
    if (own === undefined) byRoute.set(cell.route, [cell]);
    else own.push(cell);
  }
  return {
    cells: cells.length,
    possible: cells.filter(isPossible).length,
    best: bestOf(cells),
    routes: [...byRoute].map(([route, own]) => ({
      route,
      cells: own.length,
      possible: own.filter(isPossible).length,
      best: bestOf(own),
      refused: refusals(own),
    })),
  };
}

/** Whether a cell can be done. */
export function isPossible({ status }: WindowCell): boolean {
  return status !== "stop";
}

/** The best of cells by time, by use and by latest departure. */
export function bestOf(cells: readonly WindowCell[]): WindowBest {
  const possible = cells.filter(isPossible);
  const latest = firstInRank(possible, "latest", cells);
  return {
    time: firstInRank(possible, "time", cells),
    use: firstInRank(possible, "use", cells),
    latest,
    closedBy: latest === null ? null : (nextAfter(cells, latest)?.worst ?? null),
  };
}

/** The departure after one, at the same route and speed; `null` where the cells end there. */
export function nextAfter(cells: readonly WindowCell[], latest: WindowCell): WindowCell | null {
  const after = cells.filter(
    ({ route, departure }) => route === latest.route && departure > latest.departure,
  );
  // Where each departure has a speed found for it, hardly any two are at the same.
  const same = after.filter(({ speed_m_s }) => speed_m_s === latest.speed_m_s);
  const later = same.length > 0 ? same : after;
  const [next] = later.map(({ departure }) => departure).sort();
  return firstInRank(
    later.filter(({ departure }) => departure === next),
    "time",
  );
}

function refusals(cells: readonly WindowCell[]): Refusal[] {
  const byCode = new Map<FindingCode, WindowCell[]>();
  for (const cell of cells) {
    if (isPossible(cell) || cell.worst === null) continue;
    const own = byCode.get(cell.worst.code);
    if (own === undefined) byCode.set(cell.worst.code, [cell]);
    else own.push(cell);
  }
  return [...byCode]
    .map(([code, own]) => {
      const inTime = [...own].sort((a, b) => (a.departure < b.departure ? -1 : 1));
      const first = inTime[0] as WindowCell;
      const last = inTime[inTime.length - 1] as WindowCell;
      return {
        code,
        cells: own.length,
        from: first.departure,
        to: last.departure,
        message: first.worst?.message ?? "",
      };
    })
    .sort((a, b) => b.cells - a.cells);
}
