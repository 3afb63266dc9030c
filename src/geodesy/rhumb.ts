/**
 * Lines of constant course on the ellipsoid. With µ the rectifying and ψ the isometric latitude (auxiliary-latitude.ts)
 * and R the mean radius of the meridian, a line of course θ and length s obeys
 *
 *     s cos θ = R (µ₂ - µ₁)        λ₂ - λ₁ = tan θ (ψ₂ - ψ₁)
 *
 * (NGA Pub. No. 9, Bowditch, The American Practical Navigator, on Mercator sailing). Where the line runs nearly east-west
 * both differences vanish; everything here uses their slopes instead, after Karney, arXiv:2303.03219, so that no 0/0
 * arises: with δ = φ₂ - φ₁, s = R (µ₁₂/δ) hypot(δ, λ₁₂ / (ψ₁₂/δ)).
 */
import { InputError } from "../errors.ts";
import { angleDifference, DEGREE, normaliseCourse, sinCosDegrees, unroll } from "./angle.ts";
import { isometricSlope, seriesSlope, sineSeries } from "./auxiliary-latitude.ts";
import { type Ellipsoid, meridianArc } from "./ellipsoid.ts";
import { requireFinite, requirePosition } from "./position.ts";
import type { Position, Track, TrackPoint } from "./track.ts";
import { endAt, trackPoint } from "./track-ends.ts";

/** Solution of the inverse rhumb-line problem. */
export interface RhumbInverse {
  /** Length of the shortest rhumb line, m. */
  readonly distance: number;
  /** True course, degrees, 0 <= course < 360. */
  readonly course: number;
}

/**
 * The shortest rhumb line between two positions: it crosses the antimeridian where that is shorter, and goes east where
 * the longitudes are exactly half a turn apart. To or from a pole it is a meridian, of course 0 or 180, whatever
 * longitude the pole was given. Between coincident positions length and course are 0.
 *
 * @throws InputError if a latitude is not in -90..90 or a longitude is not finite
 *
 * @example
 * rhumbInverse(WGS84, { lat: 45, lon: 170 }, { lat: 45, lon: -170 }).distance // → 1576936.70188
 */
export function rhumbInverse(ellipsoid: Ellipsoid, from: Position, to: Position): RhumbInverse {
  requirePosition(from, "start");
  requirePosition(to, "destination");
  const { distance, course } = solveInverse(ellipsoid, from, to);
  return { distance, course };
}

interface Solution extends RhumbInverse {
  /** Differences of longitude and of rectifying latitude, rad. */
  readonly dLon: number;
  readonly dRectifying: number;
  /** (ψ₂ - ψ₁) / (µ₂ - µ₁); 1 where the line is a meridian and nothing depends on it. */
  readonly stretch: number;
}

function solveInverse(ellipsoid: Ellipsoid, from: Position, to: Position): Solution {
  const atPole = Math.abs(from.lat) === 90 || Math.abs(to.lat) === 90;
  const dLon = atPole ? 0 : angleDifference(from.lon, to.lon) * DEGREE;
  const dLat = (to.lat - from.lat) * DEGREE;
  const sum = (from.lat + to.lat) * DEGREE;
  const rectifyingSlope = seriesSlope(ellipsoid.rectifying.fromGeodetic, sum, dLat);
  const dRectifying = rectifyingSlope * dLat;
  const scale = ellipsoid.rectifyingRadius * rectifyingSlope;
  if (dLon === 0) {
    return { distance: scale * Math.abs(dLat), course: dLat < 0 ? 180 : 0, dLon, dRectifying, stretch: 1 };
  }
  const slope = isometricSlopeBetween(ellipsoid, from.lat, to.lat);
  const distance = scale * Math.hypot(dLat, dLon / slope);
  const course = normaliseCourse(Math.atan2(dLon, dLat * slope) / DEGREE);
  return { distance, course, dLon, dRectifying, stretch: slope / rectifyingSlope };
}

/** (ψ₂ - ψ₁) / (φ₂ - φ₁) from latitudes in degrees, neither of them a pole. */
function isometricSlopeBetween(ellipsoid: Ellipsoid, lat1: number, lat2: number): number {
  const one = sinCosDegrees(lat1);
  const two = sinCosDegrees(lat2);
  const difference = (lat2 - lat1) * DEGREE;
  const sinHalf = Math.sin(difference / 2);
  const cosMean = cosOfMean(lat1, lat2);
  return isometricSlope(ellipsoid.e2, one.sin, one.cos, two.sin, two.cos, difference, sinHalf, cosMean);
}

/** cos((φ₁ + φ₂)/2), through the distances from the pole where both latitudes are high: those are exact in degrees. */
function cosOfMean(lat1: number, lat2: number): number {
  const bothHigh = Math.min(Math.abs(lat1), Math.abs(lat2)) > 45 && lat1 * lat2 > 0;
  if (!bothHigh) return sinCosDegrees((lat1 + lat2) / 2).cos;
  return Math.sin(((90 - Math.abs(lat1) + (90 - Math.abs(lat2))) / 2) * DEGREE);
}

/** Latitude on a line and the stretch of the chart so far, from the rectifying latitude gained. */
interface Advance {
  /** Latitude, degrees. */
  readonly lat: number;
  /** (ψ - ψ₁) / (µ - µ₁) from the start to here; not to be used on a meridian, where it may be infinite. */
  readonly stretch: number;
}

/** A function that goes from a latitude, degrees, along a line: rectifying latitude gained (rad) to place. */
function advancer(ellipsoid: Ellipsoid, lat1: number): (dRectifying: number) => Advance {
  const { e2, rectifying } = ellipsoid;
  const { sin: sin1, cos: cos1 } = sinCosDegrees(lat1);
  const twiceRectifying1 = 2 * rectifyingLatitude(ellipsoid, lat1);
  return (dRectifying) => {
    const slope = seriesSlope(rectifying.toGeodetic, twiceRectifying1 + dRectifying, dRectifying);
    const difference = slope * dRectifying;
    const sinHalf = Math.sin(difference / 2);
    const cosHalf = Math.cos(difference / 2);
    const sinMean = sin1 * cosHalf + cos1 * sinHalf;
    const cosMean = cos1 * cosHalf - sin1 * sinHalf;
    const sin2 = sinMean * cosHalf + cosMean * sinHalf;
    // Within rounding of a pole the cosine may come out at or below zero: kept at a nanometre from it.
    const cos2 = Math.max(cosMean * cosHalf - sinMean * sinHalf, 1e-16);
    const isometric = isometricSlope(e2, sin1, cos1, sin2, cos2, difference, sinHalf, cosMean);
    return { lat: lat1 + difference / DEGREE, stretch: isometric * slope };
  };
}

function rectifyingLatitude({ rectifying }: Ellipsoid, lat: number): number {
  const phi = lat * DEGREE;
  return phi + sineSeries(rectifying.fromGeodetic, phi);
}

/**
 * The place `distance` metres from a position on a constant true course. Its longitude is continuous along the line
 * from the start's own.
 *
 * @param course degrees clockwise from north
 * @param distance m; negative is backward
 * @throws InputError if the position is not one, the course or distance is not finite, or the line would reach a pole:
 *   other than along a meridian it winds round the pole without end, and it cannot go through
 *
 * @example
 * rhumbDirect(WGS84, { lat: 0, lon: 170 }, 90, 2226389.8159).lon // → 190
 */
export function rhumbDirect(
  ellipsoid: Ellipsoid,
  from: Position,
  course: number,
  distance: number,
): TrackPoint {
  requirePosition(from, "start");
  requireFinite(course, "course");
  requireFinite(distance, "distance");
  const { sin, cos } = sinCosDegrees(course);
  const northing = distance * cos;
  requireShortOfPole(ellipsoid, from.lat, northing, sin === 0);
  if (Math.abs(from.lat) === 90 && sin !== 0 && distance !== 0) {
    throw new InputError(`rhumb line from a pole has course 0 or 180; found ${course}`);
  }
  const dRectifying = northing / ellipsoid.rectifyingRadius;
  const { lat, stretch } = advancer(ellipsoid, from.lat)(dRectifying);
  const dLon = sin === 0 || distance === 0 ? 0 : ((distance * sin) / ellipsoid.rectifyingRadius) * stretch;
  const bounded = Math.max(-90, Math.min(90, lat));
  return trackPoint(bounded, from.lon + dLon / DEGREE, normaliseCourse(course));
}

/** Sums of distances may pass a pole by this much, m, and mean the pole. */
const POLE_SLACK = 1e-6;

function requireShortOfPole(ellipsoid: Ellipsoid, lat: number, northing: number, isMeridian: boolean): void {
  const pole = northing < 0 ? -90 : 90;
  const arc = Math.abs(meridianArc(ellipsoid, lat, pole));
  const beyond = Math.abs(northing) - arc;
  if (isMeridian ? beyond > POLE_SLACK : northing !== 0 && beyond >= 0) {
    const name = pole > 0 ? "north" : "south";
    throw new InputError(
      `rhumb line ends before the pole; found ${Math.abs(northing)} m toward the ${name} pole, ${arc} m away`,
    );
  }
}

/**
 * The shortest rhumb line between two positions as a track. Its ends come back exactly as given (the destination's
 * longitude by the whole turns that continue the line). A pole at an end takes the longitude of the line's meridian.
 *
 * @throws InputError if a latitude is not in -90..90 or a longitude is not finite
 *
 * @example
 * rhumbTrack(WGS84, { lat: 45, lon: 170 }, { lat: 45, lon: -170 }).at(788468.35094).lon // → 180
 */
export function rhumbTrack(ellipsoid: Ellipsoid, from: Position, to: Position): Track {
  requirePosition(from, "start");
  requirePosition(to, "destination");
  const { distance: length, course, dLon, dRectifying, stretch } = solveInverse(ellipsoid, from, to);
  const startLon = Math.abs(from.lat) === 90 && Math.abs(to.lat) !== 90 ? unroll(to.lon, from.lon) : from.lon;
  const endLon = Math.abs(from.lat) === 90 || Math.abs(to.lat) === 90 ? startLon : unroll(to.lon, from.lon);
  const start = trackPoint(from.lat, startLon, course);
  const end = trackPoint(to.lat, endLon, course);
  const advance = advancer(ellipsoid, from.lat);
  const lonPerShare = dLon / DEGREE / stretch;

  function at(s: number): TrackPoint {
    const place = endAt(s, length);
    if (place !== "inside") return place === "start" ? start : end;
    const share = s / length;
    const here = advance(share * dRectifying);
    // λ - λ₁ = λ₁₂ (ψ - ψ₁)/(ψ₂ - ψ₁), each difference as its stretch times the share of the length.
    const lon = dLon === 0 ? startLon : startLon + lonPerShare * share * here.stretch;
    return trackPoint(here.lat, lon, course);
  }
  return { path: "rhumb", from, to, length, initialCourse: course, finalCourse: course, at };
}
