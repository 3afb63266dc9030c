/** Radians in a degree. */
export const DEGREE = Math.PI / 180;

/** An angle in degrees brought to -180 < x <= 180 by whole turns; exact. */
export function reduceTurn(degrees: number): number {
  // The remainder and both shifts are exact in floating point (Sterbenz); adding 0 turns -0 into 0.
  const remainder = degrees % 360;
  if (remainder > 180) return remainder - 360;
  if (remainder <= -180) return remainder + 360;
  return remainder + 0;
}

/**
 * A course in degrees brought to 0 <= course < 360 by whole turns; never -0 and never 360.
 *
 * @example
 * normaliseCourse(-90) // → 270
 */
export function normaliseCourse(degrees: number): number {
  const remainder = degrees % 360;
  const course = remainder < 0 ? remainder + 360 : remainder + 0;
  // A negative angle too small to show beside 360 is north.
  return course === 360 ? 0 : course;
}

/**
 * The turn that leads from one direction, or one longitude, to another, degrees, clockwise or eastward positive,
 * -180 < d <= 180: exactly half a turn is eastward.
 *
 * @example
 * angleDifference(350, 20) // → 30
 */
export function angleDifference(from: number, to: number): number {
  return reduceTurn(reduceTurn(to) - reduceTurn(from));
}

/**
 * The longitude, degrees, that differs from `longitude` by whole turns and lies within half a turn of `near`.
 *
 * @example
 * unroll(-179, 178) // → 181
 */
export function unroll(longitude: number, near: number): number {
  return longitude + 360 * Math.round((near - longitude) / 360);
}

/** Sine and cosine of one angle. */
export interface SineCosine {
  readonly sin: number;
  readonly cos: number;
}

/** Sine and cosine of an angle in degrees, exact at multiples of 90 and accurate close to them. */
export function sinCosDegrees(degrees: number): SineCosine {
  const angle = reduceTurn(degrees);
  const quarter = Math.round(angle / 90);
  const rest = (angle - 90 * quarter) * DEGREE;
  const sin = Math.sin(rest);
  const cos = Math.cos(rest);
  switch (quarter) {
    case 0:
      return { sin, cos };
    case 1:
      return { sin: cos, cos: -sin + 0 };
    case -1:
      return { sin: -cos, cos: sin };
    default:
      return { sin: -sin + 0, cos: -cos };
  }
}
