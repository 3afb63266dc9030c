import type { Sweep } from "../../src/choose/sweep.ts";
import { makeSweep } from "../../src/choose/window.ts";
import { constantPower } from "../../src/craft/constant.ts";
import type { Craft } from "../../src/craft/craft.ts";
import type { Conditions } from "../../src/estimate/conditions.ts";
import { type PreparedRoute, prepareRoute } from "../../src/estimate/prepare.ts";
import type { Route, Waypoint } from "../../src/estimate/route.ts";
import type { Field } from "../../src/field/field.ts";
import { WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicInverse } from "../../src/geodesy/geodesic.ts";

/* The job of the benchmarks: five routes of 10 legs and 3,000 NM across a wind of 1440 × 721 × 40 values, 0.25° and 3-hourly. */

const [TIMES, LATS, LONS] = [40, 721, 1440];
const START = Date.UTC(2027, 4, 4);
const STEP_MS = 3 * 3600_000;
export const SPEED = 16;
const ROUTE_M = 3000 * 1852;
const LEGS = 10;

/** Waves: amplitude (m/s), per column, per slice and per row (radians), down to the 7 cells that a forecast resolves. peer.py has the same. */
const WAVES = [
  [4, 0.0262, 0.35, 0.03],
  [2, 0.11, -0.6, 0.09],
  [1, 0.9, 1.1, 0.7],
] as const;

/** Room for so many numbers; what threads share stands in shared memory. */
type Room = (length: number) => Float64Array;
const ownRoom: Room = (length) => new Float64Array(length);

/** The wind, made in place: u = Σ A sin(p i + w t) cos(q j), v = Σ A cos(p i - w t) sin(q j). */
export function oceanWind(room: Room = ownRoom): Field {
  const slices = Array.from({ length: TIMES }, (_, t) => slice(t, room));
  return {
    role: "wind",
    outside: "stop",
    tiles: [
      {
        files: [],
        lon: Float64Array.from({ length: LONS }, (_, i) => i / 4 - 180),
        lat: Float64Array.from({ length: LATS }, (_, j) => j / 4 - 90),
        height: null,
        times: Float64Array.from({ length: TIMES }, (_, t) => START + t * STEP_MS),
        slices,
        gusts: null,
        masks: slices.map(() => null),
        global: false,
        beyond: "stop",
      },
    ],
  };
}

function slice(t: number, room: Room): Float64Array {
  const values = room(2 * LATS * LONS);
  for (const [amplitude, p, w, q] of WAVES) {
    const east = Float64Array.from({ length: LONS }, (_, i) => amplitude * Math.sin(p * i + w * t));
    const north = Float64Array.from({ length: LONS }, (_, i) => amplitude * Math.cos(p * i - w * t));
    let n = 0;
    for (let j = 0; j < LATS; j += 1) {
      const cos = Math.cos(q * j);
      const sin = Math.sin(q * j);
      for (let i = 0; i < LONS; i += 1, n += 2) {
        values[n] = (values[n] as number) + (east[i] as number) * cos;
        values[n + 1] = (values[n + 1] as number) + (north[i] as number) * sin;
      }
    }
  }
  return values;
}

/** Five zigzag routes that bend to either side, each 3,000 NM long. */
function oceanRoutes(): Route[] {
  return [-2, -1, 0, 1, 2].map((bend) => {
    let scale = 1;
    for (let pass = 0; pass < 30; pass += 1) scale *= ROUTE_M / lengthOf(routeOf(bend, scale));
    return routeOf(bend, scale);
  });
}

function routeOf(bend: number, scale: number): Route {
  const waypoints = Array.from({ length: LEGS + 1 }, (_, n): Waypoint => {
    const lat = 47.3 + scale * (-1.7 * n + 0.8 * (n % 2) + 1.3 * bend * Math.sin((Math.PI * n) / LEGS));
    const place = { lat, lon: -8.1 - 5.9 * scale * n };
    return { name: `W${n}`, ...place, path: "geodesic", speed_m_s: null, height_m: null, stay_s: 0 };
  });
  return { name: `bend ${bend}`, waypoints };
}

function lengthOf({ waypoints }: Route): number {
  return waypoints
    .slice(1)
    .reduce((sum, to, n) => sum + geodesicInverse(WGS84, waypoints[n] as Waypoint, to).distance, 0);
}

const AIRSHIP: Craft = {
  name: "Airship",
  moves: "air",
  speed_m_s: SPEED,
  power: constantPower("W", 1e5),
  windage: null,
  speeds: null,
  hotelPerSecond: 0,
  storePerRate: 1,
  storePerJoule: 1,
  store: { unit: "J", usable: 1e12 },
  limits: {
    wind_m_s: null,
    gust_m_s: null,
    groundSpeed_m_s: null,
    opposedWind_m_s: 8,
    opposedCurrent_m_s: 0.5,
  },
};

/** The job's conditions at a departure in seconds after the first valid time. */
export function oceanConditions(wind: Field, departure_s: number): Conditions {
  return {
    departure: START + 1000 * departure_s,
    craft: AIRSHIP,
    pace: { hold: "through-speed", speed_m_s: SPEED },
    reserve: null,
    fields: [wind],
  };
}

/** 240 departures, 3 minutes apart. */
const EVERY_S = 180;
export const DEPARTURES_S = Float64Array.from({ length: 240 }, (_, n) => 600 + EVERY_S * n);

export interface Ocean {
  readonly wind: Field;
  readonly prepared: readonly PreparedRoute[];
  /** The same for comparing all departures. */
  readonly compared: readonly PreparedRoute[];
}

export function makeOcean(wind: Field = oceanWind()): Ocean {
  const prepared = oceanRoutes().map((route) => prepareRoute(route, [wind]));
  return { wind, prepared, compared: prepared.map((route) => ({ ...route, every_s: EVERY_S })) };
}

/** The job's departures and routes as a window that is worked out cell by cell. */
export function oceanSweep({ wind, compared }: Ocean): {
  readonly sweep: Sweep;
  readonly departures: readonly number[];
} {
  const conditions = oceanConditions(wind, DEPARTURES_S[0] as number);
  const sweep = makeSweep(compared, {
    ...conditions,
    title: "",
    routes: compared.map(({ route }) => route),
    land: null,
  });
  return { sweep, departures: Array.from(DEPARTURES_S, (departure) => START + 1000 * departure) };
}
