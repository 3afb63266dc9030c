import { InputError } from "../errors.ts";
import type { PreparedLeg } from "../estimate/prepare.ts";
import type { FindingCode } from "../estimate/result.ts";
import type { Waypoint } from "../estimate/route.ts";
import type { RouteOutcome } from "../estimate/route-outcome.ts";
import { routeOutcome } from "../estimate/route-outcomes.ts";
import { reduceTurn } from "../geodesy/angle.ts";
import type { Alternate } from "./alternate.ts";
import type { Goal, Reach } from "./turn-back-result.ts";
import { type RouteWalk, type Spot, THERE_M } from "./turn-back-walk.ts";

/** What going to a goal from a place, at once and without stays, comes to. */
export interface Journey {
  readonly reach: Reach;
  readonly time: number | null;
  readonly use: number | null;
  /** Left above the reserve on arriving, store units. */
  readonly margin: number | null;
  readonly stop: FindingCode | null;
  readonly limit: FindingCode | null;
}

/** What of an outcome a journey is judged by. */
type Answer = Pick<RouteOutcome, "time_s" | "use" | "reserve" | "reached" | "findings">;

/** Stops that say what the craft cannot do; at the others the data end. */
const CANNOT: readonly FindingCode[] = ["cannot-hold-track", "outside-power-table"];
const STOPS: readonly FindingCode[] = [...CANNOT, "outside-area", "outside-time", "gap"];
const LIMITS: readonly FindingCode[] = ["wind-limit", "gust-limit"];
/** From so far beside a goal the rate of arriving there is taken, m. */
const BESIDE_M = 1;

/** The journeys from the places of a route to everywhere that the craft could make for; each is worked out once. */
export class Journeys {
  readonly goals: readonly Goal[];
  readonly #walk: RouteWalk;
  readonly #alternates: readonly Alternate[];
  /** Leg n from its end to its start, at index n - 1. */
  readonly #back: PreparedLeg[] = [];
  readonly #known = new WeakMap<Spot, Map<number, Journey>>();

  constructor(walk: RouteWalk, alternates: readonly Alternate[]) {
    this.#walk = walk;
    this.#alternates = alternates;
    const { waypoints } = walk.prepared.route;
    const goalAt = (kind: Goal["kind"], { name, lat, lon }: Pick<Goal, "name" | "lat" | "lon">): Goal => {
      return { kind, name, lat, lon: reduceTurn(lon) };
    };
    this.goals = [
      goalAt("start", waypoints[0] as Waypoint),
      goalAt("destination", waypoints[waypoints.length - 1] as Waypoint),
      ...alternates.map((alternate) => goalAt("alternate", alternate)),
    ];
  }

  /** The journey from a spot to a goal by its index. */
  to(goal: number, spot: Spot): Journey {
    const known = this.#known.get(spot) ?? new Map<number, Journey>();
    this.#known.set(spot, known);
    const before = known.get(goal);
    if (before !== undefined) return before;
    const journey = this.#workOut(goal, spot);
    known.set(goal, journey);
    return journey;
  }

  #workOut(goal: number, spot: Spot): Journey {
    if (goal === 1 && !this.#staysAhead(spot)) return this.#restOfRoute(spot);
    const { leg, at_m } = spot.place;
    const legs = this.#legsTo(goal, leg, at_m);
    if (legs.length > 0) return this.#run(legs, spot);
    const reserve = this.#reserveThere(goal, spot);
    return typeof reserve === "number" ? arrived(spot, 0, 0, reserve, null) : reserve;
  }

  /** The reserve where the craft is at the goal already: one of time is counted at the rate of arriving from beside it. */
  #reserveThere(goal: number, spot: Spot): number | Journey {
    const { reserve, craft } = this.#walk.conditions;
    if (reserve === null) return 0;
    if (reserve.kind === "share") return reserve.share * craft.store.usable;
    if (reserve.kind === "amount") return reserve.amount;
    const { leg, at_m } = spot.place;
    const length = this.#walk.legs[leg - 1]?.track.length ?? 0;
    const beside = at_m + BESIDE_M <= length ? at_m + BESIDE_M : Math.max(at_m - BESIDE_M, 0);
    const near = this.#run(this.#legsTo(goal, leg, beside), spot);
    return near.margin === null || near.use === null ? near : spot.remaining - near.use - near.margin;
  }

  /** Whether the route stays somewhere between here and its destination. */
  #staysAhead({ place }: Spot): boolean {
    return this.#walk.prepared.route.waypoints.slice(place.leg, -1).some(({ stay_s }) => stay_s > 0);
  }

  /** Going on is what the route's own estimate says of the rest. */
  #restOfRoute(spot: Spot): Journey {
    const { end, isComplete, estimate } = this.#walk;
    const { leg, at_m } = spot.place;
    const findings = estimate.findings.filter(
      (finding) => (finding.leg ?? 0) > leg || (finding.leg === leg && (finding.to_m ?? 0) > at_m),
    );
    const use = end.used - spot.used;
    const time = end.place.time_s - spot.place.time_s;
    return judged(spot, {
      time_s: isComplete ? time : null,
      use: isComplete ? use : null,
      reserve: estimate.reserve,
      reached: isComplete ? null : { leg: end.place.leg, at_m: end.place.at_m, time_s: time, use },
      findings: isComplete ? findings : estimate.findings,
    });
  }

  #run(legs: readonly PreparedLeg[], spot: Spot): Journey {
    const { prepared, conditions } = this.#walk;
    const departure = conditions.departure + 1000 * spot.place.time_s;
    try {
      return judged(spot, routeOutcome({ ...prepared, legs }, { ...conditions, departure }));
    } catch (fault) {
      // The pace has no speed on this way even in a still medium, as uphill where the route runs downhill.
      if (fault instanceof InputError) return notArrived("cannot", "outside-power-table");
      throw fault;
    }
  }

  #legsTo(goal: number, leg: number, at: number): readonly PreparedLeg[] {
    if (goal === 0) return this.#legsToStart(leg, at);
    if (goal === 1) return this.#legsOn(leg, at);
    return this.#legsOff(this.#alternates[goal - 2] as Alternate, leg, at);
  }

  #legsToStart(leg: number, at: number): readonly PreparedLeg[] {
    const walk = this.#walk;
    const earlier = Array.from({ length: leg - 1 }, (_, n) => this.#legBack(leg - 1 - n));
    if (at <= THERE_M) return earlier;
    const { from, to, track } = walk.legs[leg - 1] as PreparedLeg;
    if (at >= track.length) return [this.#legBack(leg), ...earlier];
    return [walk.between(walk.waypointAt(leg, at), from, to), ...earlier];
  }

  #legBack(leg: number): PreparedLeg {
    const { from, to } = this.#walk.legs[leg - 1] as PreparedLeg;
    const back = this.#back[leg - 1] ?? this.#walk.between(to, from, to);
    this.#back[leg - 1] = back;
    return back;
  }

  #legsOn(leg: number, at: number): readonly PreparedLeg[] {
    const walk = this.#walk;
    const later = walk.legs.slice(leg);
    const { to, track } = walk.legs[leg - 1] as PreparedLeg;
    if (at >= track.length - THERE_M) return later;
    return [walk.between(walk.waypointAt(leg, at), to, to), ...later];
  }

  #legsOff(alternate: Alternate, leg: number, at: number): readonly PreparedLeg[] {
    const here = this.#walk.waypointAt(leg, at);
    const there = { ...here, ...alternate, height_m: alternate.height_m ?? here.height_m };
    const off = this.#walk.between(here, there, { path: "geodesic", speed_m_s: null });
    return off.track.length <= THERE_M ? [] : [off];
  }
}

function arrived(spot: Spot, time: number, use: number, reserve: number, limit: FindingCode | null): Journey {
  const margin = spot.remaining - use - reserve;
  return { reach: margin >= 0 ? "reachable" : "short", time, use, margin, stop: null, limit };
}

function notArrived(reach: Reach, stop: FindingCode): Journey {
  return { reach, time: null, use: null, margin: null, stop, limit: null };
}

function judged(spot: Spot, outcome: Answer): Journey {
  const { time_s, use, reserve, reached, findings } = outcome;
  if (time_s !== null && use !== null && reserve !== null) {
    const limit = findings.find(({ code }) => LIMITS.includes(code))?.code ?? null;
    return arrived(spot, time_s, use, reserve, limit);
  }
  const stop = findings.filter(({ code }) => STOPS.includes(code)).at(-1)?.code ?? "gap";
  // What was spent before the data end may be more than there is already.
  const isShort = spot.remaining - (reached?.use ?? 0) < (reserve ?? 0);
  if (CANNOT.includes(stop)) return notArrived("cannot", stop);
  return notArrived(isShort ? "short" : "unknown", stop);
}
