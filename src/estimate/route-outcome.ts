import type { Finding, Reached, RouteEstimate } from "./result.ts";

/** What a sweep over departures, speeds or members needs of a route. */
export interface RouteOutcome {
  readonly status: RouteEstimate["status"];
  /** ms since 1970 at the last waypoint, before a stay there; `null` where the route stops on the way. */
  readonly arrival: number | null;
  /** Time under way, s, and use and what is left in store units; `null` likewise. */
  readonly time_s: number | null;
  readonly use: number | null;
  readonly remaining: number | null;
  readonly reserve: number | null;
  readonly reached: Reached | null;
  readonly findings: readonly Finding[];
}
