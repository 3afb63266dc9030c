import { isoTime } from "../estimate/leg-result.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { ArrivalAnswer, ArrivalSolution } from "../estimate/result.ts";
import { solutionAt } from "./arrival-solution.ts";
import { type ArrivalWindow, checkArrival } from "./arrival-window.ts";
import { minimaOf, rootsOf, type Sample, scan } from "./line-search.ts";
import { nearestTo } from "./nearest-arrival.ts";
import { evenlyInTime } from "./speed-range.ts";
import { type PacelessConditions, SpeedTrials } from "./speed-trials.ts";

/** How near to the time asked a root is found, s. */
const ACCURACY = 1e-6;
/** By how much an end of the arrival window may be missed and still count as met, s. */
const SLACK = 1e-3;

/**
 * The constant through-speeds within the craft's range at which a route arrives when it should: for one time every speed that
 * does, for a window of times every speed there of locally least use. The one of least use among those that are not a `stop`
 * is chosen, else that of least use. Legs that name their own speed keep it.
 *
 * Search: since dx/dt = g(x, t; V) rises with V at every place and time, a faster craft that completes the route is ahead all along it,
 * so the passage falls with the speed and one arrival time has at most one speed: it is bracketed from the fastest down and found
 * to a microsecond. Where some speed on the way does not complete the route, or none arrives then, 64 steps of the range, evenly
 * spaced in passage time, are scanned with the edges between speeds that complete the route and speeds that do not.
 *
 * @throws InputError where the craft's speeds have no bound, or as `estimateRoute` does
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }, []);
 * const conditions = { departure: 0, craft, reserve: null, fields: [] };
 * solveArrival(prepared, conditions, { notBefore: null, notAfter: 36000000 }).solutions[0].speed_m_s.toFixed(6) // → "3.092208"
 */
export function solveArrival(
  prepared: PreparedRoute,
  conditions: PacelessConditions,
  wanted: ArrivalWindow,
): ArrivalAnswer {
  return searchArrival(prepared, conditions, wanted).answer;
}

/** A search for the speeds that arrive when they should, with what it tried. */
export interface ArrivalSearch {
  readonly answer: ArrivalAnswer;
  readonly speeds: SpeedTrials;
  /** ms since 1970-01-01T00:00Z. */
  readonly departure: number;
  /** Speeds tried, ascending, with the use of those that arrive in a span of times; empty where one moment is asked for. */
  readonly uses: readonly Sample[];
}

/** As {@link solveArrival}, with what was tried. */
export function searchArrival(
  prepared: PreparedRoute,
  conditions: PacelessConditions,
  wanted: ArrivalWindow,
): ArrivalSearch {
  checkArrival(wanted);
  const { departure } = conditions;
  const trials = new SpeedTrials(prepared, conditions);
  const target = (time: number) => (time - departure) / 1000;
  const latest = target(wanted.notAfter);
  const earliest = wanted.notBefore === null ? Number.NEGATIVE_INFINITY : target(wanted.notBefore);
  const isOneTime = earliest === latest;
  const quick = isOneTime
    ? ofOneTime(quickSpeedsAt(trials, latest))
    : quickCheapest(trials, earliest, latest);
  const samples = quick === null ? scan(trials.passage, evenlyInTime(trials.range)) : [];
  const { speeds, uses } =
    quick ??
    (isOneTime
      ? { speeds: speedsAt(trials, samples, latest), uses: [] }
      : cheapestBetween(trials, samples, earliest, latest));
  const solutions = speeds.map((speed) => solutionAt(trials, speed, departure));
  const chosen = cheapest(solutions);
  const asked = {
    notBefore: wanted.notBefore === null ? null : isoTime(wanted.notBefore),
    notAfter: isoTime(wanted.notAfter),
  };
  const missed =
    chosen === null
      ? nearestTo(prepared, trials, samples, earliest, latest, departure)
      : { nearest: null, reason: null };
  return { answer: { ...asked, solutions, chosen, ...missed }, speeds: trials, departure, uses };
}

/** Speeds of locally least use, and those tried for them with their use. */
interface Valleys {
  readonly speeds: readonly number[];
  readonly uses: readonly Sample[];
}

function ofOneTime(speeds: readonly number[] | null): Valleys | null {
  return speeds && { speeds, uses: [] };
}

/** Steps from the fastest down in which a quick search looks for a bracket. */
const QUICK_STEPS = 8;
/** Steps of a quick search for the least use between two speeds. */
const QUICK_USES = 16;

/** The speed for one arrival time where every speed met on the way to it completes the route; `null` where that is not settled. */
function quickSpeedsAt(trials: SpeedTrials, target: number): number[] | null {
  const slower: Sample[] = [];
  for (const x of evenlyInTime(trials.range, QUICK_STEPS).reverse()) {
    const value = trials.passage(x);
    if (value === null) return null;
    slower.unshift({ x, value });
    if (value >= target) break;
  }
  const roots = speedsAt(trials, slower.slice(0, 2), target);
  return roots.length === 1 ? roots : null;
}

/** As {@link quickSpeedsAt}, the speeds of locally least use between two arrival times. */
function quickCheapest(trials: SpeedTrials, earliest: number, latest: number): Valleys | null {
  const { min, max } = trials.range;
  const isEarlyEnough = (trials.passage(max) ?? Number.NEGATIVE_INFINITY) >= earliest;
  const fastest = isEarlyEnough ? max : quickSpeedsAt(trials, earliest)?.[0];
  const slowest =
    (trials.passage(min) ?? Number.POSITIVE_INFINITY) <= latest ? min : quickSpeedsAt(trials, latest)?.[0];
  if (fastest === undefined || slowest === undefined || !(slowest < fastest)) return null;
  const uses = evenlyInTime({ min: slowest, max: fastest }, QUICK_USES).map((x) => ({
    x,
    value: trials.use(x),
  }));
  return uses.some(({ value }) => value === null) ? null : { speeds: minimaOf(trials.use, uses), uses };
}

function speedsAt({ passage }: SpeedTrials, samples: readonly Sample[], target: number): number[] {
  const off = (value: number | null) => (value === null ? null : value - target);
  return rootsOf(
    (speed) => off(passage(speed)),
    samples.map(({ x, value }) => ({ x, value: off(value) })),
    ACCURACY,
  );
}

function cheapestBetween(
  trials: SpeedTrials,
  samples: readonly Sample[],
  earliest: number,
  latest: number,
): Valleys {
  const ends = [earliest, latest].flatMap((target) =>
    Number.isFinite(target) ? speedsAt(trials, samples, target) : [],
  );
  const inside = (speed: number): number | null => {
    const passage = trials.passage(speed);
    const isInside = passage !== null && passage >= earliest - SLACK && passage <= latest + SLACK;
    return isInside ? trials.use(speed) : null;
  };
  const places = [...new Set([...samples.map(({ x }) => x), ...ends])].sort((a, b) => a - b);
  const uses = places.map((x) => ({ x, value: inside(x) }));
  return { speeds: minimaOf(inside, uses), uses };
}

/** Index of the solution of least use among those that are not a stop, else of least use; `null` where there is none. */
function cheapest(solutions: readonly ArrivalSolution[]): number | null {
  const isStop = ({ status }: ArrivalSolution) => Number(status === "stop");
  const order = solutions.map((solution, index) => ({ solution, index }));
  order.sort((a, b) => isStop(a.solution) - isStop(b.solution) || a.solution.use - b.solution.use);
  return order[0]?.index ?? null;
}
