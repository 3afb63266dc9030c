import type { Conditions } from "../estimate/conditions.ts";
import { estimateRoute } from "../estimate/estimate-route.ts";
import { isoTime } from "../estimate/leg-result.ts";
import { mediumRole, type PreparedLeg, type PreparedRoute, prepareRoute } from "../estimate/prepare.ts";
import type { RouteEstimate } from "../estimate/result.ts";
import type { Waypoint } from "../estimate/route.ts";
import { routeOutcome } from "../estimate/route-outcomes.ts";
import { reduceTurn } from "../geodesy/angle.ts";
import type { RoutePlace } from "./turn-back-result.ts";

/** A place on the route at its moment, with what has been used by then. */
export interface Spot {
  readonly place: RoutePlace;
  /** Store units since the route's departure. */
  readonly used: number;
  readonly remaining: number;
}

/** Time and use since the route's departure. */
interface SoFar {
  readonly time: number;
  readonly used: number;
}

/** Nearer than this to a waypoint the craft is there, m. */
export const THERE_M = 1e-3;
/** How far before a place that cannot be moved through the walk ends, m: the first that works. */
const SHORT_OF_STOP_M = [0, THERE_M, 1, 100];

/** The craft on its way along a route: any place of it, with time and use so far, by an estimate of the leg as far as there. */
export class RouteWalk {
  readonly legs: readonly PreparedLeg[];
  readonly prepared: PreparedRoute;
  readonly conditions: Conditions;
  readonly estimate: RouteEstimate;
  /** The last place: the destination, or where the route stops. */
  readonly end: Spot;
  /** Whether that is the destination. */
  readonly isComplete: boolean;
  /** Metres from the route's start to the start of each leg. */
  readonly #legStarts: readonly number[];
  /** At the start of each leg that is reached, after the stay before it. */
  readonly #soFar: readonly SoFar[];

  constructor(prepared: PreparedRoute, conditions: Conditions) {
    this.prepared = prepared;
    this.conditions = conditions;
    this.legs = prepared.legs.map(withoutStay);
    this.estimate = estimateRoute(prepared, conditions).estimate;
    this.#legStarts = this.legs.map((_, n) =>
      this.legs.slice(0, n).reduce((sum, { track }) => sum + track.length, 0),
    );
    this.#soFar = timesSoFar(this.estimate);
    this.isComplete = this.estimate.reached === undefined;
    this.end = this.#end();
  }

  /**
   * The place `at` metres along leg n (from 1); `null` where the leg cannot be run as far as there.
   *
   * @param after a spot before it on the same leg to go on from; the leg's start where left out
   */
  spot(leg: number, at: number, after?: Spot): Spot | null {
    const start = this.#soFar[leg - 1];
    const prepared = this.legs[leg - 1];
    if (start === undefined || prepared === undefined) return null;
    if (at <= THERE_M) return this.#spotWith(leg, 0, start.time, start.used);
    const place = at >= prepared.track.length - THERE_M ? prepared.track.length : at;
    const goesOn = after !== undefined && after.place.leg === leg && place - after.place.at_m > THERE_M;
    const from = goesOn ? after.place.at_m : 0;
    const time = goesOn ? after.place.time_s : start.time;
    const used = goesOn ? after.used : start.used;
    const outcome = routeOutcome(
      { ...this.prepared, legs: [this.#part(leg, from, place)] },
      { ...this.conditions, departure: this.conditions.departure + 1000 * time },
    );
    if (outcome.time_s === null || outcome.use === null) return null;
    return this.#spotWith(leg, place, time + outcome.time_s, used + outcome.use);
  }

  /**
   * How far it is between two neighbouring spots: metres, or, where the second is the first after a stay, the seconds of the stay.
   */
  span(a: Spot, b: Spot): number {
    const { leg, at_m } = a.place;
    if (isStay(a, b)) return b.place.time_s - a.place.time_s;
    return leg === b.place.leg ? b.place.at_m - at_m : b.place.at_m;
  }

  /** The spot so far after `a` on the way to `b` (see {@link span}). During a stay what is used is linear in time. */
  inside(a: Spot, b: Spot, x: number): Spot | null {
    if (!isStay(a, b)) return this.spot(b.place.leg, (a.place.leg === b.place.leg ? a.place.at_m : 0) + x, a);
    const share = x / (b.place.time_s - a.place.time_s);
    return this.#spotWith(a.place.leg, a.place.at_m, a.place.time_s + x, a.used + share * (b.used - a.used));
  }

  /** The place as a waypoint to leave from, at its height along the leg. */
  waypointAt(leg: number, at: number): Waypoint {
    const { track, heights, to } = this.legs[leg - 1] as PreparedLeg;
    const { lat, lon } = track.at(at);
    const lowest = this.#lowestLevel();
    const from = heights.from ?? lowest;
    const height =
      heights.from === null && heights.to === null
        ? null
        : from + ((heights.to ?? lowest) - from) * (at / track.length);
    return { ...to, name: "", lat, lon: reduceTurn(lon), height_m: height, stay_s: 0 };
  }

  /** A leg between two places, without a stay at its end, on the path and at the speed of another. */
  between(from: Waypoint, to: Waypoint, like: Pick<Waypoint, "path" | "speed_m_s">): PreparedLeg {
    const end = { ...to, path: like.path, speed_m_s: like.speed_m_s, stay_s: 0 };
    const route = { name: this.prepared.route.name, waypoints: [from, end] };
    return prepareRoute(route, this.conditions.fields).legs[0] as PreparedLeg;
  }

  /** The leg from one place on it to another. */
  #part(leg: number, from: number, to: number): PreparedLeg {
    const whole = this.legs[leg - 1] as PreparedLeg;
    if (from === 0 && to === whole.track.length) return whole;
    const first = from === 0 ? whole.from : this.waypointAt(leg, from);
    return this.between(first, to === whole.track.length ? whole.to : this.waypointAt(leg, to), whole.to);
  }

  #spotWith(leg: number, at: number, time: number, used: number): Spot {
    const { track } = this.legs[leg - 1] as PreparedLeg;
    const { lat, lon } = track.at(at);
    const { departure, craft } = this.conditions;
    return {
      place: {
        leg,
        at_m: at,
        distance_m: (this.#legStarts[leg - 1] as number) + at,
        lat,
        lon: reduceTurn(lon),
        time_s: time,
        time: isoTime(departure + 1000 * time),
      },
      used,
      remaining: craft.store.usable - used,
    };
  }

  #end(): Spot {
    const { reached } = this.estimate;
    const leg = reached?.leg ?? this.legs.length;
    const at = reached?.at_m ?? (this.legs[leg - 1] as PreparedLeg).track.length;
    for (const short of SHORT_OF_STOP_M) {
      const spot = this.spot(leg, Math.max(0, at - short));
      if (spot !== null) return spot;
    }
    return this.spot(leg, 0) as Spot;
  }

  /** Where a waypoint without any height is, m above the surface. */
  #lowestLevel(): number {
    const { craft, fields } = this.conditions;
    const tiles = fields.filter(({ role }) => role === mediumRole(craft)).flatMap((field) => field.tiles);
    return Math.min(...(tiles.length === 0 ? [0] : tiles.map(({ height }) => height?.[0] ?? 0)));
  }
}

/** Whether two neighbouring spots are one place before and after a stay. */
export function isStay(a: Spot, b: Spot): boolean {
  return a.place.distance_m === b.place.distance_m;
}

function withoutStay(leg: PreparedLeg): PreparedLeg {
  return { ...leg, to: { ...leg.to, stay_s: 0 }, land: [] };
}

function timesSoFar({ legs }: RouteEstimate): SoFar[] {
  const list: SoFar[] = [{ time: 0, used: 0 }];
  for (const { time_s, stay_s, use } of legs) {
    const last = list[list.length - 1] as SoFar;
    if (time_s === null || use === null) break;
    list.push({ time: last.time + time_s + stay_s, used: last.used + use });
  }
  return list;
}
