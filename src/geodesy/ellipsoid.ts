import { WGS84_A, WGS84_F } from "../constants.ts";
import { InputError } from "../errors.ts";
import { DEGREE, sinCosDegrees } from "./angle.ts";
import {
  isometricLatitude,
  type RectifyingSeries,
  rectifyingSeries,
  seriesSlope,
} from "./auxiliary-latitude.ts";
import { requireLatitude } from "./position.ts";

/** An ellipsoid of revolution. */
export interface Ellipsoid {
  /** Equatorial radius, m. */
  readonly a: number;
  /** Flattening (a - b)/a; 0 for a sphere, negative where the poles stand out. */
  readonly f: number;
  /** Polar radius, m. */
  readonly b: number;
  /** First eccentricity squared, (a² - b²)/a². */
  readonly e2: number;
  /** Second eccentricity squared, (a² - b²)/b². */
  readonly ep2: number;
  /** Third flattening, (a - b)/(a + b). */
  readonly n: number;
  /** Mean radius of the meridian, m: the quarter meridian is π/2 times this. */
  readonly rectifyingRadius: number;
  /** Series between geodetic and rectifying latitude. */
  readonly rectifying: RectifyingSeries;
}

/** Largest flattening, either way, at which the series of this room hold to a micrometre on the Earth's size. */
const MAX_FLATTENING = 0.02;

/**
 * The ellipsoid with equatorial radius a, m, and flattening f.
 *
 * @throws InputError unless a is positive and finite and f is in -0.02..0.02, where the series hold
 *
 * @example
 * ellipsoid(6371000, 0).b // → 6371000
 */
export function ellipsoid(a: number, f: number): Ellipsoid {
  if (!(a > 0 && Number.isFinite(a))) {
    throw new InputError(`equatorial radius is a positive number of metres; found ${a}`);
  }
  if (!(Math.abs(f) <= MAX_FLATTENING)) {
    throw new InputError(`flattening is in -${MAX_FLATTENING}..${MAX_FLATTENING}; found ${f}`);
  }
  const b = a * (1 - f);
  const e2 = f * (2 - f);
  const ep2 = e2 / (1 - f) ** 2;
  const n = f / (2 - f);
  const rectifying = rectifyingSeries(n);
  return { a, f, b, e2, ep2, n, rectifyingRadius: ((a + b) / 2) * rectifying.scale, rectifying };
}

/** The World Geodetic System's ellipsoid. NGA.STND.0036 (2014), table 3.1. */
export const WGS84: Ellipsoid = ellipsoid(WGS84_A, WGS84_F);

/**
 * Radius of curvature of the meridian, M(φ) = a (1 - e²) / (1 - e² sin²φ)^(3/2), m.
 *
 * @param lat latitude, degrees
 * @throws InputError if the latitude is not in -90..90
 *
 * @example
 * meridionalRadius(WGS84, 0) // → 6335439.327
 */
export function meridionalRadius(ellipsoid: Ellipsoid, lat: number): number {
  requireLatitude(lat);
  const { sin } = sinCosDegrees(lat);
  return (ellipsoid.a * (1 - ellipsoid.e2)) / (1 - ellipsoid.e2 * sin * sin) ** 1.5;
}

/**
 * Radius of curvature across the meridian (in the prime vertical), N(φ) = a / (1 - e² sin²φ)^(1/2), m.
 *
 * @param lat latitude, degrees
 * @throws InputError if the latitude is not in -90..90
 *
 * @example
 * transverseRadius(WGS84, 0) // → 6378137
 */
export function transverseRadius(ellipsoid: Ellipsoid, lat: number): number {
  requireLatitude(lat);
  const { sin } = sinCosDegrees(lat);
  return ellipsoid.a / Math.sqrt(1 - ellipsoid.e2 * sin * sin);
}

/**
 * Length of the meridian between two latitudes in degrees, m, positive northward.
 *
 * @throws InputError if a latitude is not in -90..90
 *
 * @example
 * meridianArc(WGS84, 0, 90) // → 10001965.7293
 */
export function meridianArc(ellipsoid: Ellipsoid, fromLat: number, toLat: number): number {
  requireLatitude(fromLat);
  requireLatitude(toLat);
  const difference = (toLat - fromLat) * DEGREE;
  const slope = seriesSlope(ellipsoid.rectifying.fromGeodetic, (fromLat + toLat) * DEGREE, difference);
  return ellipsoid.rectifyingRadius * slope * difference;
}

/**
 * Meridional parts: the isometric latitude in minutes of arc of the EQUATOR (a π/10800 each, 1855.325 m on WGS84,
 * not nautical miles), north positive.
 *
 * @param lat latitude, degrees
 * @throws InputError if the latitude is not between the poles: the meridional parts of a pole are infinite
 *
 * @example
 * meridionalParts(WGS84, 45) // → 3013.647949
 */
export function meridionalParts(ellipsoid: Ellipsoid, lat: number): number {
  if (!(lat > -90 && lat < 90)) {
    throw new InputError(`meridional parts need a latitude between -90 and 90 degrees; found ${lat}`);
  }
  const { sin, cos } = sinCosDegrees(lat);
  return isometricLatitude(ellipsoid.e2, sin, cos) / (DEGREE / 60);
}
