/*
 * Directions in degrees clockwise from true north, kept exact at the cardinal points: the angle is brought into ±45° in
 * degrees, where the reduction is exact, before it becomes radians (Karney, J. Geodesy 87 (2013), section 2, "care with angles").
 */

const RADIANS = Math.PI / 180;
const DEGREES = 180 / Math.PI;

/** Sine of an angle in degrees; exact at multiples of 90°. */
export function sinDegrees(angle_deg: number): number {
  const r = angle_deg % 360;
  const quarter = Math.round(r / 90);
  const rest = (r - 90 * quarter) * RADIANS;
  switch (((quarter % 4) + 4) % 4) {
    case 0:
      return Math.sin(rest);
    case 1:
      return Math.cos(rest);
    case 2:
      return 0 - Math.sin(rest);
    default:
      return 0 - Math.cos(rest);
  }
}

/** Cosine of an angle in degrees; exact at multiples of 90°. */
export function cosDegrees(angle_deg: number): number {
  const r = angle_deg % 360;
  const quarter = Math.round(r / 90);
  const rest = (r - 90 * quarter) * RADIANS;
  switch (((quarter % 4) + 4) % 4) {
    case 0:
      return Math.cos(rest);
    case 1:
      return 0 - Math.sin(rest);
    case 2:
      return 0 - Math.cos(rest);
    default:
      return Math.sin(rest);
  }
}

/** The same direction in 0 <= d < 360. */
export function wrapDirection(angle_deg: number): number {
  const r = angle_deg % 360;
  const turned = r < 0 ? r + 360 : r;
  // A tiny negative angle rounds up to a whole turn; adding 0 turns -0 into 0.
  return turned >= 360 ? 0 : turned + 0;
}

/** Direction in which the vector (east, north) points, 0 <= d < 360; 0 for the zero vector. */
export function directionOf(east: number, north: number): number {
  return east === 0 && north === 0 ? 0 : wrapDirection(Math.atan2(east, north) * DEGREES);
}

/** Angle from the first axis of (along, across) to the vector, degrees, -180 < a <= 180; 0 for the zero vector. */
export function turnOf(along: number, across: number): number {
  if (across === 0) return along < 0 ? 180 : 0;
  return Math.atan2(across, along) * DEGREES;
}
