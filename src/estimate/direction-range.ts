/*
 * Mean and range of a direction along a leg without an arc tangent per sample: the mean is that of the summed unit
 * vectors; the extremes are kept by a pseudo-angle, monotone in the angle from a reference direction (-2..2 for -180°..180°).
 */

const DEGREES = 180 / Math.PI;

export interface DirectionRange {
  /** Reference direction, a unit vector (east, north). */
  east: number;
  north: number;
  sumEast: number;
  sumNorth: number;
  lowest: number;
  highest: number;
}

export function makeDirectionRange(): DirectionRange {
  return {
    east: 0,
    north: 1,
    sumEast: 0,
    sumNorth: 0,
    lowest: Number.POSITIVE_INFINITY,
    highest: Number.NEGATIVE_INFINITY,
  };
}

/** Starts afresh around a reference direction. */
export function startDirection(range: DirectionRange, east: number, north: number): void {
  range.east = east;
  range.north = north;
  range.sumEast = 0;
  range.sumNorth = 0;
  range.lowest = Number.POSITIVE_INFINITY;
  range.highest = Number.NEGATIVE_INFINITY;
}

/** Adds a unit vector with its weight in the mean. */
export function addDirection(range: DirectionRange, east: number, north: number, weight: number): void {
  range.sumEast += weight * east;
  range.sumNorth += weight * north;
  const sine = east * range.north - north * range.east;
  const cosine = east * range.east + north * range.north;
  const angle = cosine >= 0 ? sine : sine >= 0 ? 2 - sine : -2 - sine;
  if (angle < range.lowest) range.lowest = angle;
  if (angle > range.highest) range.highest = angle;
}

/** Mean, least and greatest in degrees, unwrapped around the mean (not reduced to a turn). */
export function directionSpread(range: DirectionRange): { mean: number; min: number; max: number } {
  const reference = Math.atan2(range.east, range.north) * DEGREES;
  const mean = Math.atan2(range.sumEast, range.sumNorth) * DEGREES;
  const around = (angle: number): number => {
    const off = reference + unfold(angle) - mean;
    return mean + off - 360 * Math.round(off / 360);
  };
  return { mean, min: around(range.lowest), max: around(range.highest) };
}

/** Degrees from the reference for a pseudo-angle. */
function unfold(angle: number): number {
  const clipped = (sine: number) => Math.asin(Math.min(1, Math.max(-1, sine))) * DEGREES;
  if (angle > 1) return 180 - clipped(2 - angle);
  if (angle < -1) return -180 - clipped(-2 - angle);
  return clipped(angle);
}
