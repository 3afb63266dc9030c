import type { StoreUnit } from "../craft/craft.ts";
import { isOfStore } from "../estimate/findings.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { RouteOutcome } from "../estimate/route-outcome.ts";
import { minimaOf, rootsOf, scan } from "./line-search.ts";
import { evenlyInSpeed, SPEED_STEPS, speedRange } from "./speed-range.ts";
import { type PacelessConditions, SpeedTrials } from "./speed-trials.ts";
import { cellOf, type WindowCell, windowCell } from "./window-cell.ts";

/** Time and use of a route against the speed through the medium. */
export interface PaceCurve {
  readonly storeUnit: StoreUnit;
  readonly usable: number;
  /** One a speed, in the order given; each with the reserve at that speed. */
  readonly points: readonly WindowCell[];
}

/**
 * Time and use of a route against through-speed in its real field at one departure.
 *
 * @param speeds m/s; left out, 33 over the craft's range, evenly spaced
 * @throws InputError where no speeds are given and the craft's have no bound, or as `estimateRoute` does
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }, []);
 * const conditions = { departure: 0, craft, reserve: null, fields: [] };
 * paceCurve(prepared, conditions, [4, 8]).points.map(({ use }) => (use / 3.6e6).toFixed(3)) // → ["79.161", "316.642"]
 */
export function paceCurve(
  prepared: PreparedRoute,
  conditions: PacelessConditions,
  speeds: readonly number[] = evenlyInSpeed(speedRange(conditions.craft), SPEED_STEPS / 2),
): PaceCurve {
  const { unit, usable } = conditions.craft.store;
  const points = speeds.map((speed) => {
    const pace = { hold: "through-speed", speed_m_s: speed } as const;
    return windowCell(prepared, { ...conditions, pace }, conditions.departure, speed);
  });
  return { storeUnit: unit, usable, points };
}

/**
 * The constant through-speed of least use over the ground for a whole route in its real field, among speeds that are not a
 * `stop`, else among those that complete the route; `null` where none does. Scanned at 64 steps of the craft's range, then Brent's
 * search in every valley.
 *
 * @throws InputError where the craft's speeds have no bound, or as `estimateRoute` does
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }, []);
 * const conditions = { departure: 0, craft, reserve: null, fields: [] };
 * leastUseSpeed(prepared, conditions).speed_m_s // → 2
 */
export function leastUseSpeed(prepared: PreparedRoute, conditions: PacelessConditions): WindowCell | null {
  const trials = new SpeedTrials(prepared, conditions);
  const clearUse = (speed: number) => (trials.at(speed).status === "stop" ? null : trials.use(speed));
  const best = leastAt(trials, clearUse) ?? leastAt(trials, trials.use);
  return best === null ? null : cellOf(prepared, conditions.departure, best, trials.at(best));
}

function leastAt({ range }: SpeedTrials, use: (speed: number) => number | null): number | null {
  const valleys = minimaOf(use, scan(use, evenlyInSpeed(range)));
  return valleys.reduce<number | null>(
    (best, speed) => (best === null || (use(speed) ?? Infinity) < (use(best) ?? Infinity) ? speed : best),
    null,
  );
}

/** Share of a speed by which one is lowered at first where rounding leaves it just short of the reserve. */
const NUDGE = 1e-13;

/**
 * The fastest constant through-speed that keeps the reserve and is not otherwise a `stop`; `null` where none does.
 *
 * @throws InputError where the craft's speeds have no bound, or as `estimateRoute` does
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }, []);
 * const conditions = { departure: 0, craft, reserve: { kind: "share", share: 0.2 }, fields: [] };
 * fastestWithReserve(prepared, conditions).speed_m_s.toFixed(6) // → "4.021153"
 */
export function fastestWithReserve(
  prepared: PreparedRoute,
  conditions: PacelessConditions,
): WindowCell | null {
  const trials = new SpeedTrials(prepared, conditions);
  const margin = (speed: number) => marginOf(trials.at(speed));
  const samples = scan(margin, evenlyInSpeed(trials.range));
  const accuracy = 1e-9 * conditions.craft.store.usable;
  const kept = samples.filter(({ value }) => value !== null && value >= 0).map(({ x }) => x);
  const edges = rootsOf(margin, samples, accuracy).map((speed) => loweredTo(speed, margin));
  const fastest = Math.max(...kept, ...edges);
  if (!Number.isFinite(fastest)) return null;
  return cellOf(prepared, conditions.departure, fastest, trials.at(fastest));
}

/** What is left above the reserve; `null` where the route does not arrive or something but the store makes it a stop. */
function marginOf({ remaining, reserve, findings }: RouteOutcome): number | null {
  if (remaining === null || reserve === null) return null;
  const isStopped = findings.some((finding) => finding.severity === "stop" && !isOfStore(finding));
  return isStopped ? null : remaining - reserve;
}

function loweredTo(speed: number, margin: (speed: number) => number | null): number {
  for (let share = NUDGE; share < 1e-6; share *= 2) {
    const lowered = speed * (1 - share);
    if ((margin(lowered) ?? -1) >= 0) return lowered;
  }
  return Number.NEGATIVE_INFINITY;
}
