import { InputError } from "../errors.ts";
import type { Conditions } from "../estimate/conditions.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import { routeOutcome } from "../estimate/route-outcomes.ts";
import { writtenInstant } from "../instant.ts";
import { rootsOf, scan } from "./line-search.ts";
import { type WindowCell, windowCell } from "./window-cell.ts";

/** Steps of the scan over departures; an opening shorter than a step may be missed. */
const DEPARTURE_STEPS = 144;
/** How near to the time asked a departure's arrival is found, s. */
const ACCURACY = 1e-6;

export interface LatestDeparture {
  /** The latest departure that is not a `stop` and arrives in time, to the millisecond; `null` where there is none. */
  readonly latest: WindowCell | null;
  /** The earliest departure considered, which says why where there is none. */
  readonly earliest: WindowCell;
}

/**
 * The latest departure that arrives in time at the pace given. Departures are scanned over the whole range, since a reversing stream
 * opens and shuts a route several times; the latest of all openings counts.
 *
 * @param earliest first departure considered, ms since 1970-01-01T00:00Z
 * @param notAfter the arrival to keep, ms since 1970-01-01T00:00Z
 * @throws InputError where `notAfter` is not after `earliest`
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "200 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }, []);
 * const pace = { hold: "through-speed", speed_m_s: 5 };
 * const conditions = { departure: 0, craft, pace, reserve: null, fields: [] };
 * latestDeparture(prepared, conditions, 0, 86400000).latest.departure // → "1970-01-01T17:48:56.101Z"
 */
export function latestDeparture(
  prepared: PreparedRoute,
  conditions: Conditions,
  earliest: number,
  notAfter: number,
): LatestDeparture {
  if (!(notAfter > earliest))
    throw new InputError(
      `an arrival is after the earliest departure considered; found ${writtenInstant(notAfter)} and ${writtenInstant(earliest)}`,
    );
  /** Seconds to spare at a departure so many seconds after the earliest. */
  const spare = (after: number): number | null => {
    const departure = earliest + 1000 * after;
    const { status, arrival } = routeOutcome(prepared, { ...conditions, departure });
    return status === "stop" || arrival === null ? null : (notAfter - arrival) / 1000;
  };
  const span = (notAfter - earliest) / 1000;
  const places = Array.from({ length: DEPARTURE_STEPS + 1 }, (_, n) => (span * n) / DEPARTURE_STEPS);
  const samples = scan(spare, places);
  const inTime = samples.filter(({ value }) => value !== null && value >= 0).map(({ x }) => x);
  const found = [...inTime, ...rootsOf(spare, samples, ACCURACY)].sort((a, b) => b - a);
  const cellAt = (departure: number) => windowCell(prepared, conditions, departure, null);
  const latest = found
    .map((after) => cellAt(Math.floor(earliest + 1000 * after)))
    .find(({ status, arrival }) => status !== "stop" && arrival !== null && Date.parse(arrival) <= notAfter);
  return { latest: latest ?? null, earliest: cellAt(earliest) };
}
