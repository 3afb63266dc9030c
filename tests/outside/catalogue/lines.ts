import { climbPower } from "../../../src/craft/consumption.ts";
import { rotorPower } from "../../../src/craft/rotor.ts";
import type { RouteRun } from "../../../src/estimate/estimate-route.ts";
import type { Route } from "../../../src/estimate/route.ts";
import { sinCosDegrees } from "../../../src/geodesy/angle.ts";
import {
  type Ellipsoid,
  ellipsoid,
  meridionalRadius,
  transverseRadius,
  WGS84,
} from "../../../src/geodesy/ellipsoid.ts";
import { makeTrack } from "../../../src/geodesy/make-track.ts";
import type { PathKind, Position, Track } from "../../../src/geodesy/track.ts";
import { fromUnit, toUnit } from "../../../src/units.ts";
import { craftOf, estimateOf, gridField, routeOf, spaced, waypoint } from "../../estimate/fixtures.ts";
import { equatorLeg, flown, flownOn } from "../legs.ts";
import { type Answers, caseOf, endsOf, given, listOf } from "./catalogue.ts";

/** A figure that is made once for all the quantities of a case. */
function once<T>(make: () => T): () => T {
  let made: { readonly value: T } | null = null;
  return () => {
    made ??= { value: make() };
    return made.value;
  };
}

const straight = (from: Position, to: Position, path: PathKind): Route =>
  routeOf(waypoint("from", from.lat, from.lon), waypoint("to", to.lat, to.lon, { path }));
const integral = (run: RouteRun): number => run.estimate.totals.wind?.alongTrackIntegral_m2_s as number;
const time = (run: RouteRun): number => run.estimate.totals.time_s as number;
const cosine = (lat: number): number => sinCosDegrees(lat).cos;

type Vector = (lon: number, lat: number) => readonly [number, number];

/** What a line that is cut into many legs adds up to. */
interface Pieces {
  integral: number;
  time: number;
  leastAlong: number;
  greatestAlong: number;
}

/*
 * A wind that no grid carries exactly (LINE-01 and LINE-04): the line is cut into many legs, each with a grid of its own close
 * around it, so fine that what the straight lines between nodes leave is below the case's tolerance. One grid of that step for
 * the whole line would have 10^9 nodes: both lines pass 2.5° from the pole, where each node's east and north turn apart.
 */
function cutIntoLegs(track: Track, speed: number, flow: Vector): Pieces {
  const sums = { integral: 0, time: 0, leastAlong: Number.POSITIVE_INFINITY, greatestAlong: 0 };
  let a = track.at(0);
  for (let s = 0; s < track.length; ) {
    const shrink = cosine(a.lat);
    s = Math.min(s + LEG_M * shrink, track.length);
    const b = track.at(s);
    const grid = { lon: axisAround(a.lon, b.lon, STEP), lat: axisAround(a.lat, b.lat, STEP * shrink) };
    const field = gridField("wind", grid, flow);
    const leg = flown(straight(a, b, track.path), { speed, fields: [field] });
    sums.integral += integral(leg);
    sums.time += time(leg);
    for (const along of leg.profile.along_m_s) {
      sums.leastAlong = Math.min(sums.leastAlong, along);
      sums.greatestAlong = Math.max(sums.greatestAlong, along);
    }
    a = b;
  }
  return sums;
}
/** Length of a leg at the equator, m; legs and steps of latitude shrink toward the pole as the parallels do. */
const LEG_M = 6000;
/** Step between nodes, degrees of longitude, and at the equator of latitude: h²/12 of the second derivatives is left. */
const STEP = 0.0018;

function axisAround(x: number, y: number, step: number): number[] {
  const low = Math.min(x, y) - step / 3;
  const high = Math.max(x, y) + step / 3;
  return spaced(low, high, Math.max(1, Math.ceil((high - low) / step)));
}

/** LINE-01: the air turns with the Earth's axis, u = W N cos φ. */
const rotation: Vector = (_, lat) => {
  const perRadius = (given("LINE-01").u0_equator_ms as number) / WGS84.a;
  return [perRadius * transverseRadius(WGS84, lat) * cosine(lat), 0];
};
const rotatingGeodesic = (back: boolean) => {
  const { from, to } = endsOf("LINE-01");
  const speed = given("LINE-01").tas_ms as number;
  const track = makeTrack(back ? to : from, back ? from : to, "geodesic");
  return cutIntoLegs(track, speed, rotation);
};
const rotatingOut = once(() => rotatingGeodesic(false));
const rotatingBack = once(() => rotatingGeodesic(true));
/** The rhumb line keeps below 41° of latitude, where three meridians carry this wind: one leg on one grid. */
const rotatingRhumb = once(() => {
  const { from, to } = endsOf("LINE-01");
  const grid = { lon: [-80, 20, 120], lat: spaced(1.3, 40.7, 112_571) };
  const terms = { speed: given("LINE-01").tas_ms as number, fields: [gridField("wind", grid, rotation)] };
  return flown(straight(from, to, "rhumb"), terms).estimate.totals.wind;
});

/** LINE-03: once around a parallel in three rhumb legs, in u = U cos φ given on its own grid line. */
function circulation(shape: Ellipsoid, lat: number): number {
  const speed = given("LINE-03").U_ms as number;
  const grid = { lon: spaced(0, 360, 6), lat: [lat - 5, lat, lat + 5] };
  const field = gridField("wind", grid, (_, at) => [speed * cosine(at), 0], { global: true });
  const around = [0, 120, 240, 360].map((lon) => waypoint(`${lon}`, lat, lon, { path: "rhumb" }));
  return integral(flownOn(shape, routeOf(...around), { speed: 100, fields: [field] }));
}
const parallels = (shape: Ellipsoid) => listOf("LINE-03", "lat_deg").map((lat) => circulation(shape, lat));
const LINE_03_SPHERE = ellipsoid(given("LINE-03").R_sphere_m as number, 0);

/** LINE-04: the gradient of f = F0 sin φ cos 2λ. */
const gradient: Vector = (lon, lat) => {
  const scale = given("LINE-04").F0 as number;
  const { sin, cos } = sinCosDegrees(lat);
  const twice = sinCosDegrees(2 * lon);
  const perLon = -2 * scale * sin * twice.sin;
  return [
    perLon / (transverseRadius(WGS84, lat) * cos),
    (scale * cos * twice.cos) / meridionalRadius(WGS84, lat),
  ];
};
const alongGradient = (path: PathKind): number => {
  const { from, to } = endsOf("LINE-04");
  return cutIntoLegs(makeTrack(from, to, path), 100, gradient).integral;
};

/** LINE-04 again, by way of the meridian of the start and the parallel of the destination, on grid lines that follow them. */
function alongDetour(): number {
  const { from, to } = endsOf("LINE-04");
  const corner = { lat: to.lat, lon: from.lon };
  const meridian = gridField(
    "wind",
    { lon: [from.lon - 1, from.lon, from.lon + 1], lat: spaced(to.lat, from.lat, 20_000) },
    gradient,
  );
  const parallel = gridField(
    "wind",
    { lon: spaced(from.lon, to.lon, 100_000), lat: [to.lat - 1, to.lat, to.lat + 1] },
    gradient,
  );
  const south = flown(straight(from, corner, "geodesic"), { speed: 100, fields: [meridian] });
  const east = flown(straight(corner, to, "rhumb"), { speed: 100, fields: [parallel] });
  return integral(south) + integral(east);
}

/** LINE-06 and LINE-07: ten degrees of the equator, where the grid's straight lines are the wind itself. */
const equator = (flow: (lon: number) => readonly [number, number]) =>
  flown(straight({ lat: 0, lon: 0 }, { lat: 0, lon: 10 }, "geodesic"), {
    speed: 50,
    fields: [gridField("wind", { lon: [0, 4, 10], lat: [-1, 0, 1] }, flow)],
  });

/** LINE-09: the sine as straight lines between times five seconds apart. */
const tidal = once(() => {
  const { V_kn, amplitude_kn, period_h, distance_nm } = given("LINE-09") as Record<string, number>;
  const hours = spaced(0, 13, 9360);
  const stream = gridField("wind", { lon: [0, 2], lat: [-1, 1], hours }, (_lon, _lat, hour) => [
    fromUnit((amplitude_kn as number) * Math.sin((2 * Math.PI * hour) / (period_h as number)), "kn"),
    0,
  ]);
  const terms = { speed: fromUnit(V_kn as number, "kn") };
  return equatorLeg(fromUnit(distance_nm as number, "NM"), { ...terms, fields: [stream] }).estimate.totals;
});

/** LINE-12 on its own sphere: u = u0 cos φ at 100 m/s. */
const williamson = (to: Position) => {
  const a = given("LINE-12").a_m as number;
  const u0 = caseOf("LINE-12").expected.u0_ms?.value as number;
  const field = gridField("wind", { lon: [-100, 0, 100], lat: spaced(-1, 90, 45_500) }, (_, lat) => [
    u0 * cosine(lat),
    0,
  ]);
  return time(
    flownOn(ellipsoid(a, 0), straight({ lat: 0, lon: 0 }, to, "geodesic"), { speed: 100, fields: [field] }),
  );
};

/** LINE-14: what a climb costs above the same leg flown level, by three different ways over the ground. */
function climbEnergy(path: PathKind, detour: boolean): number {
  const { mass_kg, climb_m } = given("LINE-14");
  // All but no power in level flight, so that the difference keeps its digits.
  const power = rotorPower({
    bladeProfilePower_W: 0,
    inducedPower_W: 1e-9,
    tipSpeed_m_s: 100,
    hoverInducedSpeed_m_s: 4,
    fuselageDragRatio: 0,
    solidity: 0.05,
    discArea_m2: 0.5,
    airDensity_kg_m3: 1.225,
    mass_kg: mass_kg as number,
  });
  const use = (climb: number): number => {
    const start = waypoint("low", 50, 7, { height_m: 20 });
    const middle = waypoint("half", 50.02, 7.2, { height_m: 20 + 0.3 * climb, path });
    const end = waypoint("high", 50.1, 7.1, { height_m: 20 + climb, path });
    const route = detour ? routeOf(start, middle, end) : routeOf(start, end);
    return estimateOf(route, { craft: craftOf({ power }) }).estimate.totals.use as number;
  };
  if (climbPower(craftOf({ power }), -1) !== 0) throw new Error("a descent gives something back");
  return use(climb_m as number) - use(0);
}
const climbs = () => [
  climbEnergy("geodesic", false),
  climbEnergy("rhumb", false),
  climbEnergy("geodesic", true),
];
/** The one of the climbs that is farthest from the expected energy. */
const worstClimb = () => climbs().reduce((a, b) => (Math.abs(a - 9806.65) > Math.abs(b - 9806.65) ? a : b));

export const lines: Answers = {
  "LINE-01": {
    along_track_component_ms: [
      { words: "least along-track component on the geodesic", ours: () => rotatingOut().leastAlong },
      { words: "greatest along-track component on the geodesic", ours: () => rotatingOut().greatestAlong },
    ],
    line_integral_m2_s: {
      words: "line integral along the geodesic",
      ours: () => rotatingOut().integral,
    },
    time_JFK_SIN_s: { words: "time out along the geodesic", ours: () => rotatingOut().time },
    time_SIN_JFK_s: { words: "time back along the geodesic", ours: () => rotatingBack().time },
    rhumb_line_integral_m2_s: {
      words: "line integral along the rhumb line",
      ours: () => rotatingRhumb()?.alongTrackIntegral_m2_s as number,
    },
    rhumb_mean_component_ms: {
      words: "mean along-track component on the rhumb line",
      ours: () => rotatingRhumb()?.meanAlongTrack_m_s as number,
    },
  },
  "LINE-03": {
    sphere_circulation_m2_s: {
      words: "circulation around three parallels of a sphere",
      ours: () => parallels(LINE_03_SPHERE),
    },
    wgs84_circulation_m2_s: {
      words: "circulation around three parallels of WGS84",
      ours: () => parallels(WGS84),
    },
    cap_integral_of_curl_40N_sphere: {
      words: "circulation around 40 N, which is the curl's flux through the cap",
      ours: () => circulation(LINE_03_SPHERE, 40),
    },
  },
  "LINE-04": {
    line_integral: [
      { words: "line integral of a gradient along the geodesic", ours: () => alongGradient("geodesic") },
      { words: "line integral of a gradient along the rhumb line", ours: () => alongGradient("rhumb") },
      {
        words: "line integral of a gradient along a meridian and a parallel",
        ours: alongDetour,
      },
    ],
  },
  "LINE-06": {
    time_s: {
      words: "time in a tail wind that rises along the leg",
      ours: () => time(equator((lon) => [-5 + 2 * lon, 0])),
    },
    wrong_time_if_mean_wind_used_s: {
      words: "time in the leg's mean wind everywhere, which is another",
      ours: () => time(equator(() => [5, 0])),
    },
  },
  "LINE-07": {
    time_s: {
      words: "time in a cross wind that rises along the leg",
      ours: () => time(equator((lon) => [0, 3 * lon])),
    },
    wrong_time_if_midpoint_wind_used_s: {
      words: "time in the midpoint's wind everywhere, which is another",
      ours: () => time(equator(() => [0, 15])),
    },
    final_wca_deg: {
      words: "crab at the end, which is the greatest",
      ours: () => equator((lon) => [0, 3 * lon]).estimate.legs[0]?.crab_deg?.max as number,
    },
  },
  "LINE-09": {
    time_h: { words: "time in a tidal stream", ours: () => toUnit(tidal().time_s as number, "h") },
    no_stream_h: { words: "time in still water", ours: () => toUnit(tidal().still.time_s, "h") },
  },
  "LINE-12": {
    equator_90deg_east_s: {
      words: "a quarter of the equator, eastward",
      ours: () => williamson({ lat: 0, lon: 90 }),
    },
    equator_90deg_west_s: {
      words: "a quarter of the equator, westward",
      ours: () => williamson({ lat: 0, lon: -90 }),
    },
    meridian_equator_to_pole_s: {
      words: "the equator to the pole along a meridian",
      ours: () => williamson({ lat: 90, lon: 0 }),
    },
  },
  "LINE-14": {
    energy_J: { words: "climb by three ways over the ground, the farthest off", ours: worstClimb },
    energy_Wh: {
      words: "the same in watt-hours",
      ours: () => toUnit(worstClimb(), "Wh"),
    },
  },
};
