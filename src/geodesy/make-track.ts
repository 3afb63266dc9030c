import { type Ellipsoid, WGS84 } from "./ellipsoid.ts";
import { geodesicTrack } from "./geodesic.ts";
import { rhumbTrack } from "./rhumb.ts";
import type { PathKind, Position, Track } from "./track.ts";

/**
 * The track of a leg on WGS84.
 *
 * @throws InputError if a latitude is not in -90..90 or a longitude is not finite
 *
 * @example
 * makeTrack({ lat: 58, lon: -6 }, { lat: 59, lon: -6 }, "rhumb").length // → 111386.4132
 */
export function makeTrack(from: Position, to: Position, path: PathKind): Track {
  return makeTrackOn(WGS84, from, to, path);
}

/**
 * The track of a leg on any ellipsoid; see {@link makeTrack}.
 *
 * @throws InputError as {@link makeTrack} does
 *
 * @example
 * makeTrackOn(ellipsoid(6371000, 0), { lat: 0, lon: 0 }, { lat: 0, lon: 90 }, "geodesic").length // → 10007543.398
 */
export function makeTrackOn(ellipsoid: Ellipsoid, from: Position, to: Position, path: PathKind): Track {
  return path === "geodesic" ? geodesicTrack(ellipsoid, from, to) : rhumbTrack(ellipsoid, from, to);
}
