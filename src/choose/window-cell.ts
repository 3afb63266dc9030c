import type { Pace } from "../craft/craft.ts";
import { InputError } from "../errors.ts";
import type { Conditions } from "../estimate/conditions.ts";
import { isoTime } from "../estimate/leg-result.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { Finding, FindingCode, RouteStatus } from "../estimate/result.ts";
import type { RouteOutcome } from "../estimate/route-outcome.ts";
import { routeOutcome } from "../estimate/route-outcomes.ts";

/** One route at one departure and speed: the figures of a lone estimate, bit for bit. */
export interface WindowCell {
  readonly route: string;
  /** ISO 8601, UTC. */
  readonly departure: string;
  /** The speed tried in place of the pace's, m/s; `null` where the plan's own pace holds. */
  readonly speed_m_s: number | null;
  /** At the last waypoint; `null` where the route stops on the way, and so are the figures below. */
  readonly arrival: string | null;
  /** Under way, s. */
  readonly time_s: number | null;
  /** From departure to arrival, s, stays on the way included. */
  readonly passage_s: number | null;
  /** In store units, as what follows. */
  readonly use: number | null;
  readonly remaining: number | null;
  readonly reserve: number | null;
  readonly status: RouteStatus;
  /** The gravest finding, see {@link worstFinding}; `null` where there are notes at most. */
  readonly worst: CellFinding | null;
}

/** A finding as a cell holds it. */
export type CellFinding = Pick<Finding, "code" | "severity" | "leg" | "at_m" | "message">;

/** What ends a route on the way comes first, then what breaks the store, then the limits. */
const GRAVITY: readonly FindingCode[] = [
  "cannot-hold-track",
  "outside-area",
  "outside-time",
  "gap",
  "outside-power-table",
  "store-empty",
  "reserve-broken",
  "reserve-unsure",
];

/** The gravest of a route's findings, the first along the route of equals; `null` where there are notes at most. */
export function worstFinding(findings: readonly Finding[]): CellFinding | null {
  const grave = findings.filter(({ severity }) => severity !== "note");
  const rank = ({ code, severity }: Finding) => {
    const place = GRAVITY.indexOf(code);
    return severity === "caution" ? GRAVITY.length + 1 : place < 0 ? GRAVITY.length : place;
  };
  const worst = grave.reduce<Finding | null>(
    (so, each) => (so === null || rank(each) < rank(so) ? each : so),
    null,
  );
  return worst === null ? null : cellFinding(worst);
}

/** A finding as a cell holds it. */
export function cellFinding({ code, severity, leg, at_m, message }: Finding): CellFinding {
  return { code, severity, leg, at_m, message };
}

/**
 * Estimates a prepared route at one departure, and at one speed in place of its pace's.
 *
 * @param departure ms since 1970-01-01T00:00Z
 * @param speed m/s, through the medium or over the ground as the pace holds it; `null` for the pace as it is. A leg that
 *   names its own speed keeps it.
 * @throws InputError where a speed is given and the pace holds none, or as `estimateRoute` does
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * const waypoint = (name, lon) => ({ name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }, []);
 * const pace = { hold: "through-speed", speed_m_s: 5 };
 * windowCell(prepared, { departure: 0, craft, pace, reserve: null, fields: [] }, 3600000, 4).arrival // → "1970-01-01T08:43:49.873Z"
 */
export function windowCell(
  prepared: PreparedRoute,
  conditions: Conditions,
  departure: number,
  speed: number | null,
): WindowCell {
  const pace = paceAt(conditions.pace, speed);
  return cellOf(prepared, departure, speed, routeOutcome(prepared, { ...conditions, departure, pace }));
}

/** When a cell or route arrives, ms since 1970-01-01T00:00Z; `null` where it does not. */
export function arrivalOf({ arrival }: { readonly arrival: string | null }): number | null {
  return arrival === null ? null : Date.parse(arrival);
}

/** A cell from a route's outcome. */
export function cellOf(
  prepared: PreparedRoute,
  departure: number,
  speed: number | null,
  outcome: RouteOutcome,
): WindowCell {
  return {
    route: prepared.route.name,
    departure: isoTime(departure),
    speed_m_s: speed,
    arrival: outcome.arrival === null ? null : isoTime(outcome.arrival),
    time_s: outcome.time_s,
    passage_s: passageTime(prepared, outcome),
    use: outcome.use,
    remaining: outcome.remaining,
    reserve: outcome.reserve,
    status: outcome.status,
    worst: worstFinding(outcome.findings),
  };
}

/** From departure to arrival, s, stays on the way included and one at the last waypoint not; `null` where there is no arrival. */
export function passageTime({ legs }: PreparedRoute, { time_s }: RouteOutcome): number | null {
  if (time_s === null) return null;
  const stays = legs.slice(0, -1).reduce((sum, { to }) => sum + to.stay_s, 0);
  return time_s + stays;
}

/** The pace with another speed, as it is for `null`. */
export function paceAt(pace: Pace, speed: number | null): Pace {
  if (speed === null) return pace;
  if (pace.hold === "through-speed" || pace.hold === "ground-speed")
    return { hold: pace.hold, speed_m_s: speed };
  throw new InputError(
    `speeds to try belong to a pace that holds a through-speed or a ground-speed; found the pace "${pace.hold}"`,
  );
}
