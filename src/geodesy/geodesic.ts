import geographiclib from "geographiclib-geodesic";
import { angleDifference, normaliseCourse, unroll } from "./angle.ts";
import type { Ellipsoid } from "./ellipsoid.ts";
import { requireFinite, requirePosition } from "./position.ts";
import type { Position, Track, TrackPoint } from "./track.ts";
import { endAt, trackPoint } from "./track-ends.ts";

const { Geodesic } = geographiclib;
type Solver = InstanceType<typeof Geodesic.Geodesic>;

/** What a sample of a line needs: no reduced length, scale or area, and a longitude that is not brought back. */
const PLACE = Geodesic.LATITUDE | Geodesic.LONGITUDE | Geodesic.AZIMUTH | Geodesic.LONG_UNROLL;
const LINE = Geodesic.STANDARD | Geodesic.DISTANCE_IN;

/** Solution of the inverse geodesic problem. */
export interface GeodesicInverse {
  /** Length of the shortest line, m. */
  readonly distance: number;
  /** True course at the start and at the end, degrees, 0 <= course < 360; at a pole, counted from its given longitude. */
  readonly initialCourse: number;
  readonly finalCourse: number;
}

/**
 * The shortest line between two positions: C. F. F. Karney, "Algorithms for geodesics", J. Geodesy 87 (2013), 43-55.
 * Of two that are equally short (positions on opposite meridians), the one that sets out north or eastward as the
 * longitude difference +180 has it. Between coincident positions the length is 0 and so are the courses.
 *
 * @throws InputError if a latitude is not in -90..90 or a longitude is not finite
 *
 * @example
 * geodesicInverse(WGS84, { lat: 0, lon: 0 }, { lat: 0, lon: 180 }).distance // → 20003931.459
 */
export function geodesicInverse(ellipsoid: Ellipsoid, from: Position, to: Position): GeodesicInverse {
  requirePosition(from, "start");
  requirePosition(to, "destination");
  const { lon1, lon2 } = eastward(from.lon, to.lon);
  const { s12, azi1, azi2 } = solver(ellipsoid).Inverse(from.lat, lon1, to.lat, lon2);
  const distance = s12 as number;
  if (distance === 0) return { distance, initialCourse: 0, finalCourse: 0 };
  const initialCourse = normaliseCourse(azi1 as number);
  const finalCourse = normaliseCourse(azi2 as number);
  return { distance, initialCourse, finalCourse };
}

/**
 * The place `distance` metres from a position along the geodesic that leaves it on the given true course.
 * Its longitude is continuous along the line from the start's own.
 *
 * @param course degrees clockwise from north
 * @param distance m; negative is backward
 * @throws InputError if the position is not one, or the course or distance is not finite
 *
 * @example
 * geodesicDirect(WGS84, { lat: 0, lon: 170 }, 90, 2226389.8159).lon // → 190
 */
export function geodesicDirect(
  ellipsoid: Ellipsoid,
  from: Position,
  course: number,
  distance: number,
): TrackPoint {
  requirePosition(from, "start");
  requireFinite(course, "course");
  requireFinite(distance, "distance");
  const place = solver(ellipsoid).Direct(from.lat, from.lon, course, distance, PLACE);
  return trackPoint(place.lat2 as number, place.lon2 as number, normaliseCourse(place.azi2 as number));
}

/**
 * The shortest line between two positions as a track. Its ends come back exactly as given (the destination's longitude
 * by the whole turns that continue the line), and along a meridian longitude and course are exact: both jump by half a
 * turn where the line crosses a pole. At a pole that is an end, the course is counted from the longitude given for it.
 *
 * @throws InputError if a latitude is not in -90..90 or a longitude is not finite
 *
 * @example
 * geodesicTrack(WGS84, { lat: 0, lon: 359 }, { lat: 0, lon: 2 }).at(111319.4908).lon // → 360
 */
export function geodesicTrack(ellipsoid: Ellipsoid, from: Position, to: Position): Track {
  const { distance: length, initialCourse, finalCourse } = geodesicInverse(ellipsoid, from, to);
  const { lon1, lon2, turn } = eastward(from.lon, to.lon);
  const line = solver(ellipsoid).InverseLine(from.lat, lon1, to.lat, lon2, LINE);
  const meridian = meridianOf(from, to, initialCourse);

  function sample(s: number): TrackPoint {
    const place = line.Position(s, PLACE);
    const lat = place.lat2 as number;
    const lon = (place.lon2 as number) + turn;
    if (meridian === undefined) return trackPoint(lat, lon, normaliseCourse(place.azi2 as number));
    // The series leave some 1e-14 of a degree of longitude, which would cross the edge of a grid.
    const isBeyond = meridian.crossesPole && Math.abs(lon - meridian.lon) > 90;
    return isBeyond
      ? trackPoint(lat, meridian.lon + 180, 180 - meridian.course)
      : trackPoint(lat, meridian.lon, meridian.course);
  }

  const start = trackPoint(from.lat, from.lon, initialCourse);
  const end = trackPoint(to.lat, unroll(to.lon, sample(length).lon), finalCourse);
  function at(s: number): TrackPoint {
    const place = endAt(s, length);
    if (place === "inside") return sample(s);
    return place === "start" ? start : end;
  }
  return { path: "geodesic", from, to, length, initialCourse, finalCourse, at };
}

/** The meridian on which a line begins, if it is one, and the course there. */
interface Meridian {
  readonly lon: number;
  readonly course: number;
  readonly crossesPole: boolean;
}

function meridianOf(from: Position, to: Position, initialCourse: number): Meridian | undefined {
  if (Math.abs(from.lat) === 90) {
    return { lon: unroll(to.lon, from.lon), course: from.lat > 0 ? 180 : 0, crossesPole: false };
  }
  if (initialCourse !== 0 && initialCourse !== 180) return undefined;
  const crossesPole = Math.abs(to.lat) !== 90 && Math.abs(angleDifference(from.lon, to.lon)) > 90;
  return { lon: from.lon, course: initialCourse, crossesPole };
}

function solver({ a, f }: Ellipsoid): Solver {
  const common = Geodesic.WGS84;
  return a === common.a && f === common.f ? common : new Geodesic.Geodesic(a, f);
}

/** Longitudes for the solver, and what to add to its answers: it turns west where the difference is exactly -180. */
function eastward(from: number, to: number): { lon1: number; lon2: number; turn: number } {
  if (angleDifference(from, to) === 180) return { lon1: 0, lon2: 180, turn: from };
  return { lon1: from, lon2: to, turn: 0 };
}
