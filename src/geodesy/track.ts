/** Path of a leg: the shortest line on the ellipsoid, or the line of constant course (loxodrome). */
export type PathKind = "geodesic" | "rhumb";

/** Latitude and longitude in degrees on WGS84, north and east positive. */
export interface Position {
  readonly lat: number;
  readonly lon: number;
}

/** A place on a track. */
export interface TrackPoint {
  /** Latitude, degrees, -90..90. */
  readonly lat: number;
  /** Longitude, degrees, continuous along the track from the start's own longitude (not reduced to a turn). */
  readonly lon: number;
  /** True course of the track here, degrees clockwise from north, 0 <= course < 360. */
  readonly course: number;
}

/** A leg as a curve s → (φ, λ, θ), 0 ≤ s ≤ length, s in metres along it. */
export interface Track {
  readonly path: PathKind;
  readonly from: Position;
  readonly to: Position;
  /** Length on the ellipsoid, m. */
  readonly length: number;
  /** True course at the start and at the end, degrees, 0 <= course < 360. */
  readonly initialCourse: number;
  readonly finalCourse: number;
  /** The place s metres along the track. */
  at(s: number): TrackPoint;
}
