import { requireFinite, requireNotNegative, requireVelocity } from "./bounds.ts";
import { cosDegrees, directionOf, sinDegrees } from "./direction.ts";

/** The track that comes of a heading. */
export interface MadeGood {
  /** Course made good, degrees clockwise from true north, 0 <= c < 360; 0 where the craft stays in place. */
  readonly course_deg: number;
  /** Speed made good over the ground. */
  readonly groundSpeed: number;
}

/**
 * Course and speed made good by a craft that keeps a heading in a moving medium: g T = V h + w.
 *
 * @param given `heading_deg` degrees clockwise from true north; `throughSpeed` not below 0; `u`, `v` the medium's eastward and
 *   northward velocity, the way it moves, all in one unit of speed
 * @throws InputError where a number is not finite or `throughSpeed` is below 0
 * @see Bowditch, NGA Pub. No. 9, "Dead Reckoning", set and drift
 * @example
 * madeGood({ heading_deg: 0, throughSpeed: 4, u: 3, v: 0 }).groundSpeed // → 5
 */
export function madeGood(given: {
  readonly heading_deg: number;
  readonly throughSpeed: number;
  readonly u: number;
  readonly v: number;
}): MadeGood {
  const { heading_deg, throughSpeed } = given;
  requireFinite(heading_deg, "heading_deg", "deg");
  requireNotNegative(throughSpeed, "throughSpeed", "");
  requireVelocity(throughSpeed, "throughSpeed");
  const east = throughSpeed * sinDegrees(heading_deg) + requireVelocity(given.u, "u");
  const north = throughSpeed * cosDegrees(heading_deg) + requireVelocity(given.v, "v");
  return { course_deg: directionOf(east, north), groundSpeed: Math.hypot(east, north) };
}
