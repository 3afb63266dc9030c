import { STATION_X } from "./gauss-kronrod.ts";
import { POINT_STATIONS } from "./smooth-rule.ts";

/* How a pair of columns is laid out: all that a smooth step reads of the medium. */

/** Numbers of a pair at each of its points (the start and the four nodes): along and its change, cross and its change, m/s. */
export const POINT = 4;
export const POINTS = POINT_STATIONS.length;
/** Distances of the points from the start, in half lengths. */
export const POINT_Z = Float64Array.from(POINT_STATIONS, (station) => 1 + (STATION_X[station] as number));
/** Where the halved second derivatives in ξ = -1..1 of the same four stand. */
export const BENDS = POINT * POINTS;
/** Numbers in a pair. */
export const PAIR = BENDS + POINT;
