import { angleDifference } from "../../../src/geodesy/angle.ts";
import { cutAtAntimeridian, densify } from "../../../src/geodesy/drawn-line.ts";
import { WGS84 } from "../../../src/geodesy/ellipsoid.ts";
import { geodesicDirect, geodesicInverse } from "../../../src/geodesy/geodesic.ts";
import { makeTrack } from "../../../src/geodesy/make-track.ts";
import { rhumbDirect, rhumbInverse } from "../../../src/geodesy/rhumb.ts";
import type { PathKind } from "../../../src/geodesy/track.ts";
import { type Answers, caseOf, endsOf, type Figure, given } from "./catalogue.ts";

const inverse = (id: string, part?: string) => {
  const { from, to } = endsOf(id, part);
  return geodesicInverse(WGS84, from, to);
};
const rhumb = (id: string, part?: string) => {
  const { from, to } = endsOf(id, part);
  return rhumbInverse(WGS84, from, to);
};

const tenths = () => {
  const track = makeTrack(endsOf("GEOD-01").from, endsOf("GEOD-01").to, "geodesic");
  return Array.from({ length: 11 }, (_, n) => {
    const { lat, lon, course } = track.at((track.length * n) / 10);
    return [lat, lon, course];
  });
};

const everyTwoThousandKilometres = () => {
  const { from } = endsOf("GEOD-02");
  const course = given("GEOD-02").waypoint_azimuth_deg as number;
  return Array.from({ length: 11 }, (_, n) => {
    const { lat, lon } = rhumbDirect(WGS84, from, course, 2_000_000 * n);
    return [2_000_000 * n, lat, lon];
  });
};

const direct = () => {
  const { lat1, lon1, azi1_deg, s12_m } = given("GEOD-08");
  return geodesicDirect(
    WGS84,
    { lat: lat1 as number, lon: lon1 as number },
    azi1_deg as number,
    s12_m as number,
  );
};

type Row = readonly [
  lat1: number,
  lon1: number,
  azi1: number,
  lat2: number,
  lon2: number,
  azi2: number,
  s12: number,
];
const rows = () => caseOf("GEOD-11").expected.rows?.value as unknown as readonly Row[];
const solved = () =>
  rows().map(([lat1, lon1, , lat2, lon2]) =>
    geodesicInverse(WGS84, { lat: lat1, lon: lon1 }, { lat: lat2, lon: lon2 }),
  );
const column = (n: number) => (value: Figure) =>
  (value as unknown as readonly Row[]).map((row) => row[n] as number);
const reached = () => rows().map(([lat, lon, azi, , , , s]) => geodesicDirect(WGS84, { lat, lon }, azi, s));

/** Latitude where a drawn leg of GEOD-19 meets the antimeridian. */
function latitudeAt180(path: PathKind): number {
  const { from, to } = endsOf("GEOD-19");
  const points = densify(makeTrack(from, to, path));
  const parts = cutAtAntimeridian(points);
  const [lon, lat] = parts[0]?.at(-1) ?? [0, 0];
  if (parts.length !== 2 || lon !== 180) throw new Error("the line is not cut at the antimeridian");
  return lat;
}

const straightAt180 = () => {
  const { from, to } = endsOf("GEOD-19");
  const east = from.lon + angleDifference(from.lon, to.lon);
  return cutAtAntimeridian([from, { lat: to.lat, lon: east }])[0]?.[1]?.[1] as number;
};

export const geodesics: Answers = {
  "GEOD-01": {
    azi1_deg: {
      words: "initial course",
      ours: () => inverse("GEOD-01").initialCourse,
      printed: 3 + 18 / 60 + 29.9 / 3600,
    },
    azi2_deg: {
      words: "final course",
      ours: () => inverse("GEOD-01").finalCourse,
      printed: 177 + 29 / 60 + 9.2 / 3600,
    },
    s12_m: { words: "distance", ours: () => inverse("GEOD-01").distance },
    waypoints_lat_lon_azi: {
      words: "eleven places and courses along the track",
      ours: tenths,
      printed: null,
    },
  },
  "GEOD-02": {
    azi12_deg: {
      words: "course",
      ours: () => rhumb("GEOD-02").course,
      printed: 103 + 34 / 60 + 58.2 / 3600,
    },
    s12_m: { words: "distance", ours: () => rhumb("GEOD-02").distance },
    waypoints_s_lat_lon: {
      words: "places every 2000 km",
      ours: everyTwoThousandKilometres,
      printed: null,
    },
  },
  "GEOD-03": {
    azi1_deg: { words: "initial course", ours: () => inverse("GEOD-03").initialCourse },
    azi2_deg: { words: "final course", ours: () => inverse("GEOD-03").finalCourse },
    s12_m: { words: "distance", ours: () => inverse("GEOD-03").distance },
  },
  "GEOD-05": {
    s12_m: { words: "distance, nearly antipodal", ours: () => inverse("GEOD-05").distance },
    azi1_deg: { words: "initial course, nearly antipodal", ours: () => inverse("GEOD-05").initialCourse },
  },
  "GEOD-08": {
    lat2: { words: "latitude reached", ours: () => direct().lat },
    lon2: { words: "longitude reached", ours: () => direct().lon },
    azi2_deg: { words: "final course", ours: () => direct().course },
  },
  "GEOD-10": {
    azi1_deg: {
      words: "initial course of a five-metre line",
      ours: () => inverse("GEOD-10").initialCourse,
      printed: 77.04353354237,
    },
    s12_m: { words: "length of a five-metre line", ours: () => inverse("GEOD-10").distance },
  },
  "GEOD-11": {
    rows: [
      {
        words: "initial courses",
        ours: () => solved().map(({ initialCourse }) => initialCourse),
        part: column(2),
        printed: null,
      },
      {
        words: "final courses",
        ours: () => solved().map(({ finalCourse }) => finalCourse),
        part: column(5),
        printed: null,
      },
      {
        words: "distances",
        ours: () => solved().map(({ distance }) => distance),
        part: column(6),
        printed: null,
        toleranceInUnit: "1e-6 m",
      },
      {
        words: "latitudes reached by the direct problem",
        ours: () => reached().map(({ lat }) => lat),
        part: column(3),
        printed: null,
      },
      {
        words: "longitudes reached by the direct problem",
        ours: () => reached().map(({ lon }) => lon),
        part: column(4),
        printed: null,
        direction: true,
      },
      {
        words: "final courses by the direct problem",
        ours: () => reached().map(({ course }) => course),
        part: column(5),
        printed: null,
      },
    ],
  },
  "GEOD-13": {
    a_s12_m: {
      words: "distance over the antimeridian, longitudes of other turns",
      ours: () => inverse("GEOD-13", "a").distance,
    },
    a_azi1_deg: { words: "course over the antimeridian", ours: () => inverse("GEOD-13", "a").initialCourse },
    b_s12_m: {
      words: "distance between nearly antipodal places on the equator",
      ours: () => inverse("GEOD-13", "b").distance,
    },
    b_azi1_deg: {
      words: "course that leaves the equator",
      ours: () => inverse("GEOD-13", "b").initialCourse,
    },
    c_s12_m: { words: "distance between antipodes", ours: () => inverse("GEOD-13", "c").distance },
  },
  "GEOD-16": {
    a_azi_deg: {
      words: "course along a parallel over the antimeridian",
      ours: () => rhumb("GEOD-16", "a").course,
    },
    a_s_m: { words: "length along a parallel", ours: () => rhumb("GEOD-16", "a").distance },
    b_azi_deg: {
      words: "course west along the equator",
      ours: () => rhumb("GEOD-16", "b").course,
      direction: true,
    },
    b_s_m: { words: "length along the equator", ours: () => rhumb("GEOD-16", "b").distance },
    c_azi_deg: { words: "course nearly along a parallel", ours: () => rhumb("GEOD-16", "c").course },
    c_s_m: { words: "length nearly along a parallel", ours: () => rhumb("GEOD-16", "c").distance },
  },
  "GEOD-19": {
    geodesic_lat_deg: {
      words: "latitude where the drawn geodesic is cut at 180",
      ours: () => latitudeAt180("geodesic"),
    },
    rhumb_lat_deg: {
      words: "latitude where the drawn rhumb line is cut at 180",
      ours: () => latitudeAt180("rhumb"),
    },
    straight_lonlat_lat_deg: {
      words: "latitude where a chord straight in longitude and latitude is cut at 180",
      ours: straightAt180,
    },
  },
};
