import { durationText, momentText, speedText } from "../estimate/finding-text.ts";
import { isoTime } from "../estimate/leg-result.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { ArrivalAnswer, ArrivalSolution } from "../estimate/result.ts";
import { type ArrivalWindow, checkArrival } from "./arrival-window.ts";
import { minimaOf, rootsOf, type Sample, scan } from "./line-search.ts";
import { evenlyInTime } from "./speed-range.ts";
import { type PacelessConditions, SpeedTrials } from "./speed-trials.ts";
import { worstFinding } from "./window-cell.ts";

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
  checkArrival(wanted);
  const trials = new SpeedTrials(prepared, conditions);
  const target = (time: number) => (time - conditions.departure) / 1000;
  const latest = target(wanted.notAfter);
  const earliest = wanted.notBefore === null ? Number.NEGATIVE_INFINITY : target(wanted.notBefore);
  const isOneTime = earliest === latest;
  const quick = isOneTime ? quickSpeedsAt(trials, latest) : quickCheapest(trials, earliest, latest);
  const samples = quick === null ? scan(trials.passage, evenlyInTime(trials.range)) : [];
  const speeds =
    quick ??
    (isOneTime ? speedsAt(trials, samples, latest) : cheapestBetween(trials, samples, earliest, latest));
  const solutions = speeds.map((speed) => solutionAt(trials, speed, conditions.departure));
  const chosen = cheapest(solutions);
  const asked = {
    notBefore: wanted.notBefore === null ? null : isoTime(wanted.notBefore),
    notAfter: isoTime(wanted.notAfter),
  };
  if (chosen !== null) return { ...asked, solutions, chosen, nearest: null, reason: null };
  const missed = nearestTo(prepared, trials, samples, earliest, latest, conditions.departure);
  return { ...asked, solutions, chosen, ...missed };
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
function quickCheapest(trials: SpeedTrials, earliest: number, latest: number): number[] | null {
  const { min, max } = trials.range;
  const isEarlyEnough = (trials.passage(max) ?? Number.NEGATIVE_INFINITY) >= earliest;
  const fastest = isEarlyEnough ? max : quickSpeedsAt(trials, earliest)?.[0];
  const slowest =
    (trials.passage(min) ?? Number.POSITIVE_INFINITY) <= latest ? min : quickSpeedsAt(trials, latest)?.[0];
  if (fastest === undefined || slowest === undefined || !(slowest < fastest)) return null;
  const samples = evenlyInTime({ min: slowest, max: fastest }, QUICK_USES).map((x) => ({
    x,
    value: trials.use(x),
  }));
  return samples.some(({ value }) => value === null) ? null : minimaOf(trials.use, samples);
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
): number[] {
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
  return minimaOf(inside, uses);
}

function solutionAt(trials: SpeedTrials, speed: number, departure: number): ArrivalSolution {
  const passage = trials.passage(speed);
  const { use, remaining, status } = trials.at(speed);
  if (passage === null || use === null || remaining === null) throw new Error("a solution does not arrive");
  return { speed_m_s: speed, arrival: isoTime(departure + 1000 * passage), use, remaining, status };
}

/** Index of the solution of least use among those that are not a stop, else of least use; `null` where there is none. */
function cheapest(solutions: readonly ArrivalSolution[]): number | null {
  const isStop = ({ status }: ArrivalSolution) => Number(status === "stop");
  const order = solutions.map((solution, index) => ({ solution, index }));
  order.sort((a, b) => isStop(a.solution) - isStop(b.solution) || a.solution.use - b.solution.use);
  return order[0]?.index ?? null;
}

type Missed = Pick<ArrivalAnswer, "nearest" | "reason">;

/** The achievable arrival nearest to those asked for, and why none of them is. */
function nearestTo(
  { legs }: PreparedRoute,
  trials: SpeedTrials,
  samples: readonly Sample[],
  earliest: number,
  latest: number,
  departure: number,
): Missed {
  const { min, max } = trials.range;
  const whole = `${speedText(min)} to ${speedText(max)}`;
  const missBy = (passage: number) => Math.max(earliest - passage, passage - latest);
  const complete = samples.filter((sample): sample is { x: number; value: number } => sample.value !== null);
  const best = complete.reduce<{ x: number; value: number } | null>(
    (so, each) => (so === null || missBy(each.value) < missBy(so.value) ? each : so),
    null,
  );
  const whyNot = (speed: number) => worstFinding(trials.at(speed).findings)?.message ?? "";
  if (best === null)
    return {
      nearest: null,
      reason: `no speed of the craft's range, ${whole}, completes the route; at the highest, ${whyNot(max)}`,
    };
  const nearest = solutionAt(trials, best.x, departure);
  const late = best.value > latest;
  const by = `${durationText(missBy(best.value))} too ${late ? "late" : "early"}`;
  const arrives = `arrives ${momentText(Date.parse(nearest.arrival))}, ${by}`;
  if (legs.every(({ to }) => to.speed_m_s !== null))
    return { nearest, reason: `every leg names its own speed, and the route ${arrives}` };
  const beyond = samples.filter(({ x, value }) => value === null && (late ? x > best.x : x < best.x));
  const next = beyond[late ? 0 : beyond.length - 1];
  if (next === undefined) {
    const end = late ? "the highest" : "the lowest";
    return { nearest, reason: `${end} speed of the craft's range, ${speedText(best.x)}, ${arrives}` };
  }
  return {
    nearest,
    reason: `the nearest, at ${speedText(best.x)}, ${arrives}; ${late ? "above" : "below"} that speed the route is not completed: ${whyNot(next.x)}`,
  };
}
