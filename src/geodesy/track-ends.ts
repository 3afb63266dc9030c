import type { TrackPoint } from "./track.ts";

/** Sums of panel lengths may pass an end of a track by this much, m, and mean the end. */
const END_SLACK = 1e-6;

/**
 * Which end of a track of the given length s means, or `inside`. The ends are then returned as given, to the last bit:
 * a waypoint on the edge of a grid stays on it.
 *
 * @throws RangeError if s is not a number within the track (more than a micrometre beyond an end)
 */
export function endAt(s: number, length: number): "start" | "end" | "inside" {
  if (s > 0 && s < length) return "inside";
  if (s <= 0 && s >= -END_SLACK) return "start";
  if (s >= length && s <= length + END_SLACK) return "end";
  throw new RangeError(`a place on this track is 0..${length} m along it; asked for ${s}`);
}

/** A place with every -0 turned into 0. */
export function trackPoint(lat: number, lon: number, course: number): TrackPoint {
  return { lat: lat + 0, lon: lon + 0, course };
}
