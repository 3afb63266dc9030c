import type { PathKind } from "../geodesy/track.ts";

/** A waypoint; `path`, `speed_m_s` and `height_m` belong to the leg that arrives at it. */
export interface Waypoint {
  readonly name: string;
  /** Degrees, north positive. */
  readonly lat: number;
  /** Degrees, east positive, -180..360. */
  readonly lon: number;
  readonly path: PathKind;
  /** Speed ordered for the leg that arrives here, m/s, in place of the pace's; `null` where none. */
  readonly speed_m_s: number | null;
  /** Height above the surface here, m; `null` where neither this waypoint nor an earlier one names any. */
  readonly height_m: number | null;
  /** Time spent here before the next leg, s. */
  readonly stay_s: number;
}

/** A route: at least two waypoints, none equal to the one before it. */
export interface Route {
  readonly name: string;
  readonly waypoints: readonly Waypoint[];
}
