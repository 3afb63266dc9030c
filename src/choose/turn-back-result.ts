import type { FindingCode } from "../estimate/result.ts";

/*
 * What turning back comes to along a route: plain data, SI with the unit in the key, `null` where a figure is not known or does
 * not exist, never NaN.
 */

/** A place on a route with the moment of being there; a stay is one place with many moments. */
export interface RoutePlace {
  /** Number of the leg, from 1, and metres from its start. */
  readonly leg: number;
  readonly at_m: number;
  /** Metres from the route's start. */
  readonly distance_m: number;
  readonly lat: number;
  /** Degrees, -180 < lon <= 180. */
  readonly lon: number;
  /** Seconds since the route's departure, stays included, and the same as ISO 8601 in UTC. */
  readonly time_s: number;
  readonly time: string;
}

export type GoalKind = "start" | "destination" | "alternate";

/** Somewhere that the craft could make for from anywhere on its route. */
export interface Goal {
  readonly kind: GoalKind;
  readonly name: string;
  readonly lat: number;
  readonly lon: number;
}

/**
 * What becomes of going to a goal from a place: it arrives with the reserve kept; the reserve is broken; the craft cannot move
 * so; or it is not known, because the data end.
 */
export type Reach = "reachable" | "short" | "cannot" | "unknown";

/** One goal seen from every sampled place, leaving at the moment of being there. */
export interface GoalSeries {
  readonly reach: readonly Reach[];
  readonly time_s: readonly (number | null)[];
  /** Store units. */
  readonly use: readonly (number | null)[];
  /** Left above the reserve on arriving there, store units: usable less use so far, less use to go, less the reserve; negative is short. */
  readonly margin: readonly (number | null)[];
  /** Why the journey does not arrive, a code of `Finding`; `null` where it arrives. */
  readonly stops: readonly (FindingCode | null)[];
  /** A limit of the craft that is broken on a journey that arrives; `null` where none is. */
  readonly limit: readonly (FindingCode | null)[];
}

/** Figures at places in order along the route: one entry a place in every list. */
export interface TurnBackSamples {
  readonly leg: readonly number[];
  readonly at_m: readonly number[];
  readonly distance_m: readonly number[];
  readonly lat: readonly number[];
  readonly lon: readonly number[];
  /** Since the route's departure, stays included. */
  readonly time_s: readonly number[];
  /** So far, and left, store units. */
  readonly use: readonly number[];
  readonly remaining: readonly number[];
  /** In the order of `goals`. */
  readonly goals: readonly GoalSeries[];
}

/** A stretch of the route on which one thing holds. */
export interface ReachStretch {
  readonly reach: Reach;
  /** Why the journey does not arrive at the stretch's beginning, a code of `Finding`; `null` where it arrives. */
  readonly reason: FindingCode | null;
  readonly from: RoutePlace;
  readonly to: RoutePlace;
}

/** How far along the route a goal is reachable with the reserve kept. */
export interface TurnLimit {
  /** Index into `goals`; `null` for any one of the start and the alternates. */
  readonly goal: number | null;
  /** The last place from which it is reachable so; `null` where it is from none that is known. */
  readonly last: RoutePlace | null;
  /**
   * What becomes of going there from just beyond `last`: `short` or `cannot` make `last` the point of no return; `null` where
   * the route ends there, so that it has none.
   */
  readonly beyond: Exclude<Reach, "reachable"> | null;
  /** First place after `last` from which it is not known, and the code of why; `null` where all is known. */
  readonly notKnownFrom: RoutePlace | null;
  readonly reason: FindingCode | null;
}

/** A place from which two goals are equally far in time. */
export interface EqualTimePoint {
  /** Indices into `goals`. */
  readonly between: readonly [number, number];
  readonly place: RoutePlace;
  /** Time to go to either, s. */
  readonly time_s: number;
}

/** Everything about turning back and turning off along one route. */
export interface TurnBack {
  /** The start, the destination, then the alternates in the order of the plan. */
  readonly goals: readonly Goal[];
  /** Where the analysis ends: the destination, or where the route stops. */
  readonly end: RoutePlace;
  readonly samples: TurnBackSamples;
  /** To the start, to each alternate, and, where there are alternates, to any of them all. */
  readonly limits: readonly TurnLimit[];
  readonly equalTime: readonly EqualTimePoint[];
  /** Per goal, the whole route in stretches. */
  readonly stretches: readonly (readonly ReachStretch[])[];
  /**
   * Where neither start nor destination nor any alternate is reachable with the reserve kept (`short`), or that is not known of
   * some while none is (`unknown`).
   */
  readonly nowhere: readonly ReachStretch[];
}
