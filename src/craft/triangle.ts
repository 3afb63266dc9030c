import { requireFinite, requireNotNegative, requirePositive, requireVelocity } from "./bounds.ts";
import { cosDegrees, directionOf, sinDegrees, turnOf, wrapDirection } from "./direction.ts";

/*
 * The triangle of velocities. With T = (sin θ, cos θ) along the course θ, N = (cos θ, -sin θ) to starboard and the medium's
 * velocity w = (u, v), eastward and northward, the way it MOVES:
 *
 *     a = w·T,   c = w·N,   g = a + sqrt(V² - c²),   V h = g T - w
 *
 * V is the speed through the medium, g the ground speed along the course, h the heading as a unit vector.
 * Bowditch, The American Practical Navigator (NGA Pub. No. 9), "Dead Reckoning", current sailing;
 * FAA-H-8083-25, chapter 16, "The wind triangle". Speeds in any one unit.
 */

/** What holds a course in a moving medium. */
export interface HeldTriangle {
  readonly holdable: true;
  /** Speed over the ground along the course. */
  readonly groundSpeed: number;
  /** The medium's component along the course, positive with the craft. */
  readonly along: number;
  /** The medium's component across the course, positive toward starboard. */
  readonly cross: number;
  /** Direction of the motion through the medium, degrees clockwise from true north, 0 <= h < 360. */
  readonly heading_deg: number;
  /** Heading minus course, degrees, -180 < crab <= 180, starboard positive. */
  readonly crab_deg: number;
}

/** Why a course cannot be held: |c| >= V, or the ground speed along it would not be above zero. */
type NotHoldableReason = "cross-track-component" | "ground-speed";

/** A course that cannot be held. */
export interface BrokenTriangle {
  readonly holdable: false;
  readonly reason: NotHoldableReason;
  readonly along: number;
  readonly cross: number;
}

/**
 * Ground speed and heading of a craft that holds a course at a given speed through the medium.
 *
 * @param given `course_deg` degrees clockwise from true north; `throughSpeed` above 0; `u`, `v` the medium's eastward and
 *   northward velocity, the way it moves, all in one unit of speed
 * @returns the triangle, or `holdable: false` with the reason
 * @throws InputError where a number is not finite or `throughSpeed` is not above 0
 * @see Bowditch, NGA Pub. No. 9, "Dead Reckoning"; FAA-H-8083-25, chapter 16
 * @example
 * solveTriangle({ course_deg: 90, throughSpeed: 5, u: 0, v: 3 }).groundSpeed // → 4
 */
export function solveTriangle(given: {
  readonly course_deg: number;
  readonly throughSpeed: number;
  readonly u: number;
  readonly v: number;
}): HeldTriangle | BrokenTriangle {
  const { course_deg, throughSpeed, u, v } = given;
  requireFinite(course_deg, "course_deg", "deg");
  requirePositive(throughSpeed, "throughSpeed", "");
  requireVelocity(throughSpeed, "throughSpeed");
  requireVelocity(u, "u");
  requireVelocity(v, "v");
  const along = alongComponent(u, v, sinDegrees(course_deg), cosDegrees(course_deg));
  const cross = crossComponent(u, v, sinDegrees(course_deg), cosDegrees(course_deg));
  if (Math.abs(cross) >= throughSpeed)
    return { holdable: false, reason: "cross-track-component", along, cross };
  const groundSpeed = groundSpeedAlong(throughSpeed, along, cross);
  if (!(groundSpeed > 0)) return { holdable: false, reason: "ground-speed", along, cross };
  const crab_deg = turnOf(alongThrough(throughSpeed, cross), -cross);
  return {
    holdable: true,
    groundSpeed,
    along,
    cross,
    heading_deg: wrapDirection(course_deg + crab_deg),
    crab_deg,
  };
}

/** What keeps a ground speed along a course. */
export interface ThroughTriangle {
  /** Speed through the medium, not below 0. */
  readonly throughSpeed: number;
  readonly along: number;
  readonly cross: number;
  /** Degrees, 0 <= h < 360; the course where the craft drifts (through speed 0). */
  readonly heading_deg: number;
  /** Degrees, -180 < crab <= 180, starboard positive. */
  readonly crab_deg: number;
  /** Whether the craft points against its course (h·T < 0), since the flow alone would carry it faster. */
  readonly stems: boolean;
}

/**
 * Speed through the medium, V = |g T - w|, and heading that keep a ground speed along a course.
 *
 * @param given `course_deg` degrees clockwise from true north; `groundSpeed` above 0; `u`, `v` the medium's velocity
 * @throws InputError where a number is not finite or `groundSpeed` is not above 0
 * @see Bowditch, NGA Pub. No. 9, "Dead Reckoning"
 * @example
 * throughSpeedFor({ course_deg: 90, groundSpeed: 4, u: 0, v: 3 }).throughSpeed // → 5
 */
export function throughSpeedFor(given: {
  readonly course_deg: number;
  readonly groundSpeed: number;
  readonly u: number;
  readonly v: number;
}): ThroughTriangle {
  const { course_deg, groundSpeed, u, v } = given;
  requireFinite(course_deg, "course_deg", "deg");
  requirePositive(groundSpeed, "groundSpeed", "");
  requireVelocity(groundSpeed, "groundSpeed");
  requireVelocity(u, "u");
  requireVelocity(v, "v");
  const along = alongComponent(u, v, sinDegrees(course_deg), cosDegrees(course_deg));
  const cross = crossComponent(u, v, sinDegrees(course_deg), cosDegrees(course_deg));
  const crab_deg = turnOf(groundSpeed - along, -cross);
  return {
    throughSpeed: Math.hypot(groundSpeed - along, cross),
    along,
    cross,
    heading_deg: wrapDirection(course_deg + crab_deg),
    crab_deg,
    stems: groundSpeed < along,
  };
}

/** a = w·T, the component of (u, v) along a course, positive with the craft. For inner loops. */
function alongComponent(u: number, v: number, sinCourse: number, cosCourse: number): number {
  return u * sinCourse + v * cosCourse;
}

/** c = w·N, the component of (u, v) across a course, positive toward starboard. For inner loops. */
function crossComponent(u: number, v: number, sinCourse: number, cosCourse: number): number {
  return u * cosCourse - v * sinCourse;
}

/** q = sqrt(V² - c²), the along-track part of the speed through the medium; 0 where |c| >= V. Never NaN. For inner loops. */
export function alongThrough(throughSpeed: number, cross: number): number {
  // The product keeps its digits where |c| is near V; sqrt(V·V) is V itself.
  const square = (throughSpeed - cross) * (throughSpeed + cross);
  return square > 0 ? Math.sqrt(square) : 0;
}

/**
 * g = a + sqrt(V² - c²), ground speed along the course; 0 where |c| >= V. The course can be held where the value is above 0,
 * and only there; a value below 0 is the speed at which the craft would be set back. Never NaN. For inner loops.
 */
export function groundSpeedAlong(throughSpeed: number, along: number, cross: number): number {
  const square = (throughSpeed - cross) * (throughSpeed + cross);
  return square > 0 ? along + Math.sqrt(square) : 0;
}

/**
 * Speed of a wind and the direction it comes FROM, from its components (the way the air moves).
 * A calm has direction 0.
 * @example
 * windFrom(10, 10).from_deg // → 225
 */
export function windFrom(u: number, v: number): { readonly speed: number; readonly from_deg: number } {
  requireVelocity(u, "u");
  requireVelocity(v, "v");
  return { speed: Math.hypot(u, v), from_deg: directionOf(-u, -v) };
}

/**
 * Drift (speed) and set (the direction TOWARD which the water moves) of a current, from its components.
 * Slack water has set 0.
 * @example
 * currentSet(10, 10).set_deg // → 45
 */
export function currentSet(u: number, v: number): { readonly drift: number; readonly set_deg: number } {
  requireVelocity(u, "u");
  requireVelocity(v, "v");
  return { drift: Math.hypot(u, v), set_deg: directionOf(u, v) };
}

/** A horizontal velocity: eastward and northward, the way the medium moves. */
export interface Components {
  readonly u: number;
  readonly v: number;
}

/**
 * Components of a wind of the given speed that comes FROM the given direction (degrees clockwise from true north).
 * @example
 * componentsFromWind(20, 270).u // → 20
 */
export function componentsFromWind(speed: number, from_deg: number): Components {
  requireNotNegative(speed, "wind speed", "");
  requireFinite(from_deg, "wind direction", "deg");
  return { u: 0 - speed * sinDegrees(from_deg), v: 0 - speed * cosDegrees(from_deg) };
}

/**
 * Components of a current of the given drift (speed) that sets TOWARD the given direction (degrees clockwise from true north).
 * @example
 * componentsFromCurrent(2, 180).v // → -2
 */
export function componentsFromCurrent(drift: number, set_deg: number): Components {
  requireNotNegative(drift, "drift of the current", "");
  requireFinite(set_deg, "set of the current", "deg");
  return { u: drift * sinDegrees(set_deg) + 0, v: drift * cosDegrees(set_deg) + 0 };
}
