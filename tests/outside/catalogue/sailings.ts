import { componentsFromCurrent, currentSet } from "../../../src/craft/triangle.ts";
import { angleDifference, DEGREE } from "../../../src/geodesy/angle.ts";
import {
  type Ellipsoid,
  ellipsoid,
  meridianArc,
  meridionalParts,
  meridionalRadius,
  WGS84,
} from "../../../src/geodesy/ellipsoid.ts";
import { geodesicInverse, geodesicTrack } from "../../../src/geodesy/geodesic.ts";
import { rhumbDirect, rhumbInverse } from "../../../src/geodesy/rhumb.ts";
import type { Position, Track } from "../../../src/geodesy/track.ts";
import { fromUnit, toUnit } from "../../../src/units.ts";
import { type Answers, endsOf, given, listOf } from "./catalogue.ts";
import { rootBetween } from "./search.ts";

const nauticalMiles = (metres: number): number => toUnit(metres, "NM");

/** The handbooks' sphere: one minute of arc is one nautical mile. */
const SPHERE_60 = ellipsoid(fromUnit((60 * 180) / Math.PI, "NM"), 0);
/** Clarke 1880 as in Norie's tables, and Clarke 1866. */
const CLARKE_1880 = ellipsoid(6378249.145, 1 / 293.465);
const CLARKE_1866 = ellipsoid(6378206.4, 1 / 294.9786982);

/** The handbooks' Mercator sailing: the difference of latitude in minutes, as nautical miles, over the cosine of our course. */
function handbookDistance(shape: Ellipsoid, from: Position, to: Position): number {
  const { course } = rhumbInverse(shape, from, to);
  return (60 * Math.abs(to.lat - from.lat)) / Math.abs(Math.cos(course * DEGREE));
}

/** Where a track runs due east or west: the vertex of a great circle. */
function vertexOf(track: Track) {
  return track.at(rootBetween(0, track.length, (s) => Math.cos(track.at(s).course * DEGREE)));
}

/** The place of a track that is nearest a position: its distance along the track and the position's distance from it, right positive. */
function abeam(shape: Ellipsoid, track: Track, position: Position) {
  const ahead = (s: number): number => {
    const here = track.at(s);
    const bearing = geodesicInverse(shape, here, position).initialCourse;
    return Math.cos(angleDifference(here.course, bearing) * DEGREE);
  };
  const s = rootBetween(0, track.length, ahead);
  const { distance, initialCourse } = geodesicInverse(shape, track.at(s), position);
  const side = Math.sign(angleDifference(track.at(s).course, initialCourse));
  return { along: nauticalMiles(s), cross: side * nauticalMiles(distance) };
}

const wgs84 = (id: string) => {
  const { from, to } = endsOf(id);
  return {
    rhumb: rhumbInverse(WGS84, from, to),
    geodesic: geodesicInverse(WGS84, from, to),
    track: geodesicTrack(WGS84, from, to),
    circle: geodesicInverse(SPHERE_60, from, to),
    circleTrack: geodesicTrack(SPHERE_60, from, to),
    sphereRhumb: rhumbInverse(SPHERE_60, from, to),
    from,
    to,
  };
};

const sail03 = () => {
  const { lat1, lon1, course_deg, distance_nm } = given("SAIL-03");
  const from = { lat: lat1 as number, lon: lon1 as number };
  return rhumbDirect(WGS84, from, course_deg as number, fromUnit(distance_nm as number, "NM"));
};

const plane = () => {
  const { distance_nm, course_deg } = given("SAIL-05", "a");
  return componentsFromCurrent(distance_nm as number, course_deg as number);
};
const planeInverse = () => {
  const { north_nm, west_nm } = given("SAIL-05", "b");
  return currentSet(-(west_nm as number), north_nm as number);
};

const D = () => {
  const { lat, lon } = given("SAIL-11", "point_D");
  return abeam(SPHERE_60, wgs84("SAIL-11").circleTrack, { lat: lat as number, lon: lon as number });
};
const onCircle = (share: number) => {
  const { circleTrack } = wgs84("SAIL-11");
  return circleTrack.at(share * circleTrack.length);
};
const whereOnCircle = (of: "lat" | "lon", value: number) => {
  const { circleTrack } = wgs84("SAIL-11");
  return circleTrack.at(rootBetween(0, circleTrack.length, (s) => circleTrack.at(s)[of] - value));
};

export const sailings: Answers = {
  "SAIL-01": {
    rhumb_course_deg: { words: "course of the rhumb line", ours: () => wgs84("SAIL-01").rhumb.course },
    rhumb_distance_nm_wgs84: {
      words: "length of the rhumb line on WGS84",
      ours: () => nauticalMiles(wgs84("SAIL-01").rhumb.distance),

      printed: [538.7, 538.2],
    },
    handbook_method_distance_nm: {
      words: "the handbook's l sec C at our course",
      ours: () => handbookDistance(WGS84, endsOf("SAIL-01").from, endsOf("SAIL-01").to),
      printed: [538.7, 538.2],
    },
    geodesic_distance_nm: {
      words: "length of the geodesic",
      ours: () => nauticalMiles(wgs84("SAIL-01").geodesic.distance),
    },
    geodesic_initial_course_deg: {
      words: "initial course of the geodesic",
      ours: () => wgs84("SAIL-01").geodesic.initialCourse,
    },
    great_circle_distance_nm_sphere60: {
      words: "great circle on the handbooks' sphere",
      ours: () => nauticalMiles(wgs84("SAIL-01").circle.distance),
    },
  },
  "SAIL-03": {
    wgs84_rhumb_lat2_deg: { words: "latitude reached on the rhumb line", ours: () => sail03().lat },
    wgs84_rhumb_lon2_deg: { words: "longitude reached on the rhumb line", ours: () => sail03().lon },
  },
  "SAIL-05": {
    a_dlat_nm: { words: "northing of a plane run", ours: () => plane().v },
    a_departure_nm: { words: "departure of a plane run", ours: () => plane().u },
    b_course_deg: { words: "course of a northing and westing", ours: () => planeInverse().set_deg },
    b_distance_nm: { words: "distance of a northing and westing", ours: () => planeInverse().drift },
  },
  "SAIL-07": {
    sphere_distance_nm: {
      words: "great circle on the sphere",
      ours: () => nauticalMiles(wgs84("SAIL-07").circle.distance),
    },
    sphere_initial_course_deg: {
      words: "initial course on the sphere",
      ours: () => wgs84("SAIL-07").circle.initialCourse,
    },
    vertex_lat_deg: {
      words: "latitude of the vertex",
      ours: () => vertexOf(wgs84("SAIL-07").circleTrack).lat,
      printed: 37 + 30.2 / 60,
    },
    wgs84_geodesic_nm: {
      words: "geodesic on WGS84",
      ours: () => nauticalMiles(wgs84("SAIL-07").geodesic.distance),
    },
    wgs84_initial_course_deg: {
      words: "initial course on WGS84",
      ours: () => wgs84("SAIL-07").geodesic.initialCourse,
    },
  },
  "SAIL-08": {
    sphere_distance_nm: {
      words: "great circle on the sphere",
      ours: () => nauticalMiles(wgs84("SAIL-08").circle.distance),
    },
    vertex_lat_deg: {
      words: "latitude of the vertex",
      ours: () => vertexOf(wgs84("SAIL-08").circleTrack).lat,
      printed: 38 + 9.4 / 60,
    },
    vertex_lon_deg: {
      words: "longitude of the vertex",
      ours: () => vertexOf(wgs84("SAIL-08").circleTrack).lon,
      printed: -(28 + 18.2 / 60),
    },
    reverse_initial_course_deg: {
      words: "initial course of the way back",
      ours: () => {
        const { from, to } = endsOf("SAIL-08");
        return geodesicInverse(SPHERE_60, to, from).initialCourse;
      },
    },
    wgs84_geodesic_nm: {
      words: "geodesic on WGS84",
      ours: () => nauticalMiles(wgs84("SAIL-08").geodesic.distance),
    },
  },
  "SAIL-11": {
    sphere_distance_nm: {
      words: "great circle on the sphere",
      ours: () => nauticalMiles(wgs84("SAIL-11").circle.distance),
      printed: 2144,
    },
    sphere_initial_course_deg: {
      words: "initial course on the sphere",
      ours: () => wgs84("SAIL-11").circle.initialCourse,
      // 1.150035 rad; beside it the source rounds to whole degrees.
      printed: 1.150035 / DEGREE,
    },
    lat_at_111W_deg: {
      words: "latitude where the great circle crosses 111 W",
      ours: () => whereOnCircle("lon", -111).lat,
      printed: 36 + 24 / 60,
    },
    lon_at_36N_deg: {
      words: "longitude where the great circle crosses 36 N",
      ours: () => whereOnCircle("lat", 36).lon,
      printed: -(112 + 20 / 60),
    },
    point_40pct_lat: {
      words: "latitude two fifths along",
      ours: () => onCircle(0.4).lat,
      printed: 38 + 40.167 / 60,
    },
    point_40pct_lon: {
      words: "longitude two fifths along",
      ours: () => onCircle(0.4).lon,
      printed: -(101 + 37.57 / 60),
    },
    cross_track_D_nm: {
      words: "distance of a position off the track, right positive",
      ours: () => D().cross,
      printed: 7.4512,
    },
    along_track_D_nm: { words: "distance along the track abeam of a position", ours: () => D().along },
    sphere_rhumb_course_deg: {
      words: "course of the rhumb line on the sphere",
      ours: () => wgs84("SAIL-11").sphereRhumb.course,
      printed: 79.32,
    },
    sphere_rhumb_distance_nm: {
      words: "length of the rhumb line on the sphere",
      ours: () => nauticalMiles(wgs84("SAIL-11").sphereRhumb.distance),
    },
    wgs84_geodesic_m: { words: "geodesic on WGS84", ours: () => wgs84("SAIL-11").geodesic.distance },
    wgs84_initial_course_deg: {
      words: "initial course on WGS84",
      ours: () => wgs84("SAIL-11").geodesic.initialCourse,
    },
    wgs84_rhumb_m: { words: "rhumb line on WGS84", ours: () => wgs84("SAIL-11").rhumb.distance },
    wgs84_rhumb_course_deg: {
      words: "course of the rhumb line on WGS84",
      ours: () => wgs84("SAIL-11").rhumb.course,
    },
    wgs84_40pct_lat: {
      words: "latitude two fifths along the geodesic",
      ours: () => wgs84("SAIL-11").track.at(0.4 * wgs84("SAIL-11").track.length).lat,
    },
    wgs84_40pct_lon: {
      words: "longitude two fifths along the geodesic",
      ours: () => wgs84("SAIL-11").track.at(0.4 * wgs84("SAIL-11").track.length).lon,
    },
  },
  "SAIL-12": {
    dmp_clarke1880: {
      words: "difference of meridional parts on Clarke 1880",
      ours: () => {
        const { from, to } = endsOf("SAIL-12");
        return meridionalParts(CLARKE_1880, to.lat) - meridionalParts(CLARKE_1880, from.lat);
      },
    },
    handbook_distance_nm: {
      words: "the handbook's l sec C at our course on Clarke 1880",
      ours: () => handbookDistance(CLARKE_1880, endsOf("SAIL-12").from, endsOf("SAIL-12").to),
    },
    course_deg: {
      words: "course, east of north",
      ours: () => wgs84("SAIL-12").rhumb.course,
      printed: 37 + 8.23 / 60,
    },
    wgs84_rhumb_nm: {
      words: "rhumb line on WGS84",
      ours: () => nauticalMiles(wgs84("SAIL-12").rhumb.distance),
    },
  },
  "SAIL-13": {
    handbook_distance_nm: {
      words: "the handbook's l sec C at our course on Clarke 1880",
      ours: () => handbookDistance(CLARKE_1880, endsOf("SAIL-13").from, endsOf("SAIL-13").to),
    },
    course_deg: {
      words: "course westward across the antimeridian",
      ours: () => wgs84("SAIL-13").rhumb.course,
      printed: 292.555,
    },
    wgs84_rhumb_m: { words: "rhumb line on WGS84", ours: () => wgs84("SAIL-13").rhumb.distance },
  },
  "SAIL-15": {
    wgs84_eccentricity_minutes_of_equator: {
      words: "meridional parts of 45 degrees on WGS84",
      ours: () => meridionalParts(WGS84, 45),
      printed: 3013.648,
    },
    sphere: {
      words: "meridional parts of 45 degrees on a sphere",
      ours: () => meridionalParts(SPHERE_60, 45),
    },
    clarke1866: {
      words: "meridional parts of 45 degrees on Clarke 1866",
      ours: () => meridionalParts(CLARKE_1866, 45),
    },
    wrong_unit_value: {
      words: "the same counted in nautical miles, which they are not",
      ours: () => meridionalParts(WGS84, 45) * nauticalMiles((WGS84.a * DEGREE) / 60),
      printed: 3019.058271357,
    },
  },
  "SAIL-16": {
    metres: {
      words: "length of a minute of latitude",
      ours: () => listOf("SAIL-16", "lat_deg").map((lat) => (meridionalRadius(WGS84, lat) * DEGREE) / 60),
    },
    quarter_meridian_m: { words: "quarter meridian", ours: () => meridianArc(WGS84, 0, 90) },
    meridian_0_to_45_m: { words: "meridian from the equator to 45", ours: () => meridianArc(WGS84, 0, 45) },
  },
};
