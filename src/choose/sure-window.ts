import type { CellTrials, TrialCounts } from "./cell-trials.ts";
import type { DepartureWindow } from "./departure-window.ts";
import type { InTime } from "./in-time.ts";
import type { MinuteCells } from "./minute-cells.ts";
import type { RoutePaces } from "./route-paces.ts";
import type { Steps } from "./steps.ts";
import type { BestPair } from "./sure.ts";
import { type FoundBests, foundBests, overallBests, testedBests } from "./sure-bests.ts";
import { type SureInTime, sureInTime } from "./sure-in-time.ts";
import { minuteBests } from "./sure-minutes.ts";
import { type SurePaces, surePaces } from "./sure-paces.ts";
import type { Sweep } from "./sweep.ts";
import type { WindowCell } from "./window-cell.ts";

/** The bests of all routes and of each, plain and sure. */
export interface SureRoutes {
  readonly best: BestPair;
  /** In the order in which the sweep has them. */
  readonly routes: readonly ({ readonly route: string } & BestPair)[];
}

/** A window's bests put to the test with everything that the plan names. */
export interface SureWindow extends SureRoutes, TrialCounts {
  /** To the minute; `null` where that was not asked. */
  readonly refined: SureRoutes | null;
  /** The latest departures that arrive in time; `null` where no arrival is to be kept. */
  readonly inTime: readonly SureInTime[] | null;
  /** The choice of pace per route, put to the test; `null` where it was not asked for. */
  readonly paces: readonly SurePaces[] | null;
}

/** What a window came to by the plain estimate. */
export interface PlainWindow {
  readonly window: DepartureWindow;
  readonly cells: readonly WindowCell[];
  /** By `refineRoutes`; `null` where the bests are not to be refined. */
  readonly minutes: readonly MinuteCells[] | null;
  readonly inTime: InTime | null;
  readonly paces: readonly RoutePaces[] | null;
}

/**
 * Decides a window with everything that the plan names: the bests of its cells are put to the test, and where one does not hold in every
 * member and what-if, the next in rank is, until one holds.
 *
 * Only the cells down to the first that holds are tried, each until its first break, and each once for all three rankings: the
 * work is at most about that of the matrix again, and as much as there are members and what-ifs for each best, unless what breaks cells
 * changes from one to the next. A step is one estimate, the spread of one best, or one search between the minutes of two departures.
 * The choice of pace, where asked for, is searched anew over the craft's range at one departure a route.
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Drone", "moves": "air", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * );
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const wind = (u) => {
 *   const slices = [Float64Array.of(u, 0, u, 0, u, 0, u, 0)];
 *   const axes = { lon: Float64Array.of(-1, 2), lat: Float64Array.of(-1, 1), height: null, times: null };
 *   const tile = { files: [], ...axes, slices, gusts: null, masks: [null], global: false, beyond: "stop" };
 *   return { role: "wind", tiles: [tile], outside: "stop" };
 * };
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const pace = { hold: "through-speed", speed_m_s: 10 };
 * const input = { title: "", departure: 0, craft, pace, reserve: null, fields: [wind(0)], routes, land: null };
 * const sweep = makeSweep(prepareRoutes(input), input);
 * const members = [0, -9].map((u, member) => ({ member, fields: [wind(u)] }));
 * const trials = new CellTrials(sweep, { whatIfs: [], errors: [], members });
 * const window = { from: 0, to: 3600000, every_s: 1800, speeds_m_s: null };
 * const cells = [...windowCells(sweep, window)];
 * const plain = { window, cells, minutes: null, inTime: null, paces: null };
 * const { best } = runSteps(sureWindow(sweep, trials, plain));
 * best.plain.time.sure.worst.code // → "store-empty"
 * best.sure.time // → null
 */
export function* sureWindow(
  sweep: Sweep,
  trials: CellTrials,
  { window, cells, minutes, inTime, paces }: PlainWindow,
): Steps<SureWindow> {
  const own: FoundBests[] = [];
  const routeCells = sweep.prepared.map(({ route: { name } }) => cells.filter(({ route }) => route === name));
  for (const each of routeCells) own.push(yield* foundBests(trials, each));
  return {
    ...trials.counts,
    ...(yield* routesTested(sweep, trials, own, routeCells, cells)),
    refined: minutes && (yield* refinedRoutes(sweep, trials, window, minutes, own)),
    inTime: inTime && (yield* sureInTime(sweep, trials, inTime)),
    paces: paces && (yield* pacesTested(sweep, trials, paces, own)),
  };
}

function* refinedRoutes(
  sweep: Sweep,
  trials: CellTrials,
  window: DepartureWindow,
  minutes: readonly MinuteCells[],
  own: readonly FoundBests[],
): Steps<SureRoutes> {
  const found: FoundBests[] = [];
  for (const [index, each] of minutes.entries())
    found.push(yield* minuteBests(trials, each, window, own[index] as FoundBests));
  const tried = minutes.map((each) => each.tried);
  return yield* routesTested(sweep, trials, found, tried, tried.flat());
}

function* routesTested(
  sweep: Sweep,
  trials: CellTrials,
  own: readonly FoundBests[],
  routeCells: readonly (readonly WindowCell[])[],
  all: readonly WindowCell[],
): Steps<SureRoutes> {
  const routes: ({ readonly route: string } & BestPair)[] = [];
  for (const [index, found] of own.entries()) {
    const route = sweep.prepared[index]?.route.name ?? "";
    routes.push({ route, ...(yield* testedBests(trials, found, routeCells[index] ?? [])) });
  }
  return { best: yield* testedBests(trials, overallBests(own, all), all), routes };
}

function* pacesTested(
  sweep: Sweep,
  trials: CellTrials,
  paces: readonly RoutePaces[],
  own: readonly FoundBests[],
): Steps<SurePaces[]> {
  const tested: SurePaces[] = [];
  for (const each of paces) {
    const index = sweep.prepared.findIndex(({ route }) => route.name === each.route);
    tested.push(yield* surePaces(sweep, trials, each, own[index]?.sure.use ?? null));
  }
  return tested;
}
