import { fastestBound, leastUseBound, type PaceBound } from "./pace-bound.ts";
import { fastestWithReserve, leastUseSpeed } from "./pace-curve.ts";
import type { Sweep } from "./sweep.ts";
import type { WindowCell } from "./window-cell.ts";
import type { WindowBest } from "./window-summary.ts";

/** A route's choice of pace at one departure, among all speeds of the craft's range. */
export interface RoutePaces {
  readonly route: string;
  readonly departure: string;
  /** At the through-speed of least use over the ground; `null` where no speed completes the route. */
  readonly leastUse: WindowCell | null;
  /** What keeps `leastUse` from being a true least, as the end of the forecast does; `null` where the use rises on both sides. */
  readonly leastUseBound: PaceBound | null;
  /** At the fastest through-speed that keeps the reserve; `null` where none does. */
  readonly fastest: WindowCell | null;
  /** What bounds `fastest` other than the reserve; `null` where that does. */
  readonly fastestBound: PaceBound | null;
}

/**
 * For each route, at its best departure by use: the speed of least use and the fastest that keeps the reserve, on the route's true
 * figures and not among the speeds of the window alone. Routes of which nothing can be done are left out.
 *
 * @param routes with their bests, of the window or to the minute
 * @throws InputError where the craft's speeds have no bound
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const input = { title: "", departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 4 }, reserve: null, fields: [], routes, land: null };
 * const sweep = makeSweep(prepareRoutes(input), input);
 * const window = { from: 0, to: 3600000, every_s: 1800, speeds_m_s: null };
 * routePaces(sweep, summariseWindow([...windowCells(sweep, window)]))[0].leastUse.speed_m_s // → 2
 */
export function routePaces(
  { prepared, conditions }: Sweep,
  { routes }: { readonly routes: readonly { readonly route: string; readonly best: WindowBest }[] },
): RoutePaces[] {
  return routes.flatMap(({ route, best }) => {
    const way = prepared.find((each) => each.route.name === route);
    if (way === undefined || best.use === null) return [];
    const { departure } = best.use;
    const given = { ...conditions, departure: Date.parse(departure) };
    const leastUse = leastUseSpeed(way, given);
    const fastest = fastestWithReserve(way, given);
    return [
      {
        route,
        departure,
        leastUse,
        leastUseBound: leastUseBound(way, given, leastUse),
        fastest,
        fastestBound: fastestBound(way, given, fastest),
      },
    ];
  });
}
