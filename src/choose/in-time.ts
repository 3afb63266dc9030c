import { InputError } from "../errors.ts";
import { isoTime } from "../estimate/leg-result.ts";
import { writtenInstant } from "../instant.ts";
import type { DepartureWindow } from "./departure-window.ts";
import { latestDeparture } from "./latest-departure.ts";
import type { Sweep } from "./sweep.ts";
import { paceAt, type WindowCell, windowCell } from "./window-cell.ts";

const MINUTE = 60_000;

/** The latest departures that arrive in time. */
export interface InTime {
  readonly notAfter: string;
  /** One a route and speed, in the order of the cells. */
  readonly routes: readonly RouteInTime[];
}

export interface RouteInTime {
  readonly route: string;
  /** m/s; `null` for the plan's own pace. */
  readonly speed_m_s: number | null;
  /**
   * The latest departure that can be done and arrives in time, on the whole minute before it where that can be done too; `null`
   * where there is none.
   */
  readonly latest: WindowCell | null;
  /** The first departure of the window, which says why where there is none. */
  readonly earliest: WindowCell;
}

/**
 * The latest departure, from the first of a window on, that arrives by the window's `arriveBy`, for every route and speed.
 * The end of the window does not bound it.
 *
 * @returns `null` where the window names no `arriveBy`
 * @throws InputError where it is not after the first departure, or the pace itself asks for an arrival
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "200 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const routes = [{ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }];
 * const input = { title: "", departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 5 }, reserve: null, fields: [], routes, land: null };
 * const sweep = makeSweep(prepareRoutes(input), input);
 * const window = { from: 0, to: 3600000, every_s: 1800, speeds_m_s: null, arriveBy: 86400000 };
 * latestInTime(sweep, window).routes[0].latest.departure // → "1970-01-01T17:48:00.000Z"
 */
export function latestInTime(
  { prepared, conditions, arrive }: Sweep,
  { from, arriveBy, speeds_m_s }: DepartureWindow,
): InTime | null {
  if (arriveBy === undefined) return null;
  if (arrive !== null && speeds_m_s === null)
    throw new InputError(
      `an arriveBy of a window belongs to a pace that says how fast; found ${writtenInstant(arriveBy)} beside a pace that asks for an arrival`,
    );
  const routes = prepared.flatMap((route) =>
    (speeds_m_s ?? [null]).map((speed): RouteInTime => {
      const pace = paceAt(conditions.pace, speed);
      const given = { ...conditions, pace };
      const { latest: exact, earliest } = latestDeparture(route, given, from, arriveBy);
      const latest =
        exact === null
          ? null
          : onMinute(exact, from, (departure) => windowCell(route, given, departure, null));
      const named = (cell: WindowCell): WindowCell => ({ ...cell, speed_m_s: speed });
      return {
        route: route.route.name,
        speed_m_s: speed,
        latest: latest === null ? null : named(latest),
        earliest: named(earliest),
      };
    }),
  );
  return { notAfter: isoTime(arriveBy), routes };
}

/** The cell on the whole minute before one, which arrives no later; the cell itself where that minute cannot be done. */
function onMinute(cell: WindowCell, from: number, at: (departure: number) => WindowCell): WindowCell {
  const departure = Math.floor(Date.parse(cell.departure) / MINUTE) * MINUTE;
  if (departure < from) return cell;
  const whole = at(departure);
  return whole.status === "stop" ? cell : whole;
}
