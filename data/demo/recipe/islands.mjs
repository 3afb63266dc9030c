/**
 * Scenario 1: a battery workboat among islands, a rotating tidal stream, a sea breeze.
 *
 * The islands are invented and lie in open ocean, so that no real coast is near. x is km east, y km north of ORIGIN.
 */
import {
  axis,
  csv,
  fixed,
  isoMinutes,
  isoSeconds,
  notesFor,
  planeAbout,
  polarFrom,
  RAD,
  velocityFromStream,
} from "./grid.mjs";
import { mirroredNormals, smoothRandom } from "./seeded.mjs";

const ORIGIN = { lat: 53.55, lon: -13.6 };
const plane = planeAbout(ORIGIN.lat, ORIGIN.lon);
const KNOT = 1852 / 3600;

/**
 * Ellipses: centre and semi-axes in km, `turn` in degrees anticlockwise.
 * @type {{ name: string, x: number, y: number, a: number, b: number, turn: number }[]}
 */
const ISLANDS = [
  { name: "Vessay", x: -6.2, y: -0.5, a: 3.6, b: 8.4, turn: -4 },
  { name: "Orrin", x: 5.6, y: 1.2, a: 3.4, b: 8.2, turn: 6 },
  { name: "The Calf", x: 12.5, y: -15.5, a: 2.4, b: 1.7, turn: 20 },
  { name: "Tarn Skerry", x: -14.6, y: 13.4, a: 2.2, b: 1.6, turn: 35 },
];

/**
 * Square of the elliptical radius about an island: 1 on its coast.
 * @param {typeof ISLANDS[number]} island @param {number} x @param {number} y
 */
function radiusSquared({ x: x0, y: y0, a, b, turn }, x, y) {
  const cos = Math.cos(turn * RAD);
  const sin = Math.sin(turn * RAD);
  const along = ((x - x0) * cos + (y - y0) * sin) / a;
  const across = ((y - y0) * cos - (x - x0) * sin) / b;
  return along ** 2 + across ** 2;
}

/** @param {number} lat @param {number} lon */
function onIsland(lat, lon) {
  const { x, y } = plane(lat, lon);
  return ISLANDS.some((island) => radiusSquared(island, x, y) <= 1);
}

/**
 * A stream function that is constant along every coast, so that nothing flows through one: the open-sea function blended
 * with each island's constant by the weights q = 1/(r² - 1). For one round island in a uniform stream this is the textbook
 * potential flow round a cylinder, ψ = U y (1 - a²/r²) (Batchelor, An Introduction to Fluid Dynamics, 1967, section 6.6).
 * @param {(x: number, y: number) => number} open
 * @returns {(x: number, y: number) => number}
 */
function roundIslands(open) {
  const constants = ISLANDS.map(({ x, y }) => open(x, y));
  return (x, y) => {
    const psi = open(x, y);
    let weights = 0;
    let pull = 0;
    for (const [i, island] of ISLANDS.entries()) {
      const r2 = radiusSquared(island, x, y);
      if (r2 <= 1) return constants[i];
      weights += 1 / (r2 - 1);
      pull += (constants[i] - psi) / (r2 - 1);
    }
    return psi + pull / (1 + weights);
  };
}

/**
 * The tide: one constituent, M2 (period 12.42 h), as a tidal ellipse: `along` runs with the major axis, which lies
 * `AXIS_TURN` degrees from north, `across` a quarter period later with the minor (Pugh & Woodworth, Sea-Level Science,
 * 2014, chapter 6). The stream is strongest in the shallows about the islands and weaker to seaward.
 */
const M2_HOURS = 12.42;
const TIDE = {
  peak: 0.86,
  seaward: 0.26,
  width: 9,
  minorShare: 0.3,
  axisTurn: -6,
  southGoingPeak: Date.UTC(2027, 4, 4, 12, 15),
};

/** ψ of the stream along the major axis at its peak toward the north, km·m/s. @param {number} x @param {number} y */
function majorStream(x, y) {
  const across = x * Math.cos(TIDE.axisTurn * RAD) + y * Math.sin(TIDE.axisTurn * RAD);
  return (
    TIDE.peak * (TIDE.seaward * across + (1 - TIDE.seaward) * TIDE.width * Math.tanh(across / TIDE.width))
  );
}

/** ψ of the stream along the minor axis at its peak toward the east. @param {number} x @param {number} y */
function minorStream(x, y) {
  const along = y * Math.cos(TIDE.axisTurn * RAD) - x * Math.sin(TIDE.axisTurn * RAD);
  return -TIDE.minorShare * TIDE.peak * along;
}

/**
 * ψ of the whole current at an instant. The sense of rotation is clockwise, as it is over most open shelves of the northern hemisphere.
 * @param {number} seed of the steady residual eddies
 * @returns {(ms: number) => (lat: number, lon: number) => number}
 */
function currentStream(seed) {
  const major = roundIslands(majorStream);
  const minor = roundIslands(minorStream);
  const residual = roundIslands(smoothRandom(seed, { shortest: 14, longest: 40, slope: 0.07 }));
  return (ms) => {
    const phase = (2 * Math.PI * (ms - TIDE.southGoingPeak)) / (M2_HOURS * 3600e3);
    return (lat, lon) => {
      const { x, y } = plane(lat, lon);
      return -Math.cos(phase) * major(x, y) - Math.sin(phase) * minor(x, y) + residual(x, y);
    };
  };
}

const STEP = { dLat: 0.0125, dLon: 0.02 };
const CURRENT_AXES = {
  times: axis(7, 1, 13).map((hour) => Date.UTC(2027, 4, 4, hour)),
  lat: axis(53.3, STEP.dLat, 41),
  lon: axis(-14, STEP.dLon, 41),
};

/** @param {number} seed @returns {string} */
export function islandsCurrent(seed) {
  const streamAt = currentStream(seed);
  const rows = [];
  for (const time of CURRENT_AXES.times) {
    const psi = streamAt(time);
    for (const lat of CURRENT_AXES.lat) {
      for (const lon of CURRENT_AXES.lon) {
        const { u, v } = velocityFromStream(psi, { lat, lon, ...STEP });
        const dry = onIsland(lat, lon);
        rows.push([isoMinutes(time), `${lat}`, `${lon}`, dry ? "" : fixed(u, 3), dry ? "" : fixed(v, 3)]);
      }
    }
  }
  const notes = [
    ...notesFor(
      "Tidal stream among invented islands; components in m/s, the way the water moves; empty cells are land.",
    ),
  ];
  return csv(
    notes,
    ["time", "latitude", "longitude", "eastward_sea_water_velocity", "northward_sea_water_velocity"],
    rows,
  );
}

/**
 * Sea breeze over a coast to the east, as the periodic answer of air to a daily pressure force with friction k and the
 * Earth's rotation f: dW/dt + (k + i f) W = F₀ (m + (1 - m) cos Ω(t - t₀)), W = u + i v (Haurwitz, J. Meteorology 4, 1947, 1-8);
 * the mean share m stands for the day's heating being stronger than the night's cooling. It blows onshore in the afternoon and veers.
 */
const BREEZE = {
  force: 2.3e-3,
  mean: 0.3,
  friction: 0.9e-4,
  forcePeak: Date.UTC(2027, 4, 4, 14, 30),
  reach: 45,
  coast: 30,
};
const DAY_RATE = (2 * Math.PI) / 86400;
const CORIOLIS = 2 * 7.2921e-5 * Math.sin(ORIGIN.lat * RAD);

/**
 * How a member's wind differs from the control's: the force behind the breeze, its hour, the wind that it comes on top of.
 * @typedef {{ force: number, laterHours: number, u: number, v: number }} Sway
 */
const CONTROL = { force: 1, laterHours: 0, u: 0, v: 0 };

/** @param {number} instant ms @param {Sway} sway @returns {{ u: number, v: number }} m/s at the coast */
function breezeAt(instant, sway) {
  const ms = instant - sway.laterHours * 3600e3;
  const angle = (DAY_RATE * (ms - BREEZE.forcePeak)) / 1000;
  // F₀ m / (k + i f)
  const steady = (sway.force * BREEZE.force * BREEZE.mean) / Math.hypot(BREEZE.friction, CORIOLIS);
  const steadyTurn = -Math.atan2(CORIOLIS, BREEZE.friction);
  let u = steady * Math.cos(steadyTurn);
  let v = steady * Math.sin(steadyTurn);
  for (const sign of [1, -1]) {
    // ½ F₀ (1 - m) e^{± iΩτ} / (k + i (f ± Ω))
    const imaginary = CORIOLIS + sign * DAY_RATE;
    const size =
      (0.5 * sway.force * BREEZE.force * (1 - BREEZE.mean)) / Math.hypot(BREEZE.friction, imaginary);
    const turn = sign * angle - Math.atan2(imaginary, BREEZE.friction);
    u += size * Math.cos(turn);
    v += size * Math.sin(turn);
  }
  return { u, v };
}

const WIND_AXES = {
  times: axis(6, 1, 15).map((hour) => Date.UTC(2027, 4, 4, hour)),
  lat: axis(53.9, -0.05, 15), // north to south
  lon: axis(345.8, 0.1, 12), // 0..360
};
const BACKGROUND = { u: 1, v: 1.6 };

/** @param {number} seed @param {Sway} sway @returns {string[][]} time, lat, lon, speed, from, gust */
function windRows(seed, sway) {
  const ripple = smoothRandom(seed + 1, { shortest: 25, longest: 70, slope: 0.35 });
  const rows = [];
  for (const time of WIND_AXES.times) {
    const breeze = breezeAt(time, sway);
    for (const lat of WIND_AXES.lat) {
      for (const lon of WIND_AXES.lon) {
        const { x } = plane(lat, lon - 360);
        const share = Math.exp((x - BREEZE.coast) / BREEZE.reach);
        const drift = ((time - BREEZE.forcePeak) / 3600e3) * 6;
        const eddy = velocityFromStream((p, l) => ripple(plane(p, l - 360).x - drift, plane(p, l - 360).y), {
          lat,
          lon,
          dLat: 0.05,
          dLon: 0.1,
        });
        const { speed, from } = polarFrom({
          u: BACKGROUND.u + sway.u + share * breeze.u + eddy.u,
          v: BACKGROUND.v + sway.v + share * breeze.v + eddy.v,
        });
        // Gust factor over the sea by day: common practice.
        const gust = 1.32 * speed + 0.4;
        rows.push([
          isoSeconds(time),
          fixed(lat, 2),
          fixed(lon, 1),
          fixed(speed / KNOT, 1),
          fixed(from, 0),
          fixed(gust / KNOT, 1),
        ]);
      }
    }
  }
  return rows;
}

const WIND_HEADER = [
  "time",
  "lat",
  "lon",
  "wind_speed [kn]",
  "wind_from_direction [deg]",
  "wind_speed_of_gust [kn]",
];

/** @param {number} seed @returns {string} */
export function islandsWind(seed) {
  return csv(
    notesFor("Sea breeze over invented islands at 10 m; knots, and degrees that the wind blows from."),
    WIND_HEADER,
    windRows(seed, CONTROL),
  );
}

/**
 * Seven members of the same wind. Standard deviations: a quarter of the force behind the breeze, an hour, and 1 m/s of each
 * component of the wind that it comes on top of.
 * @param {number} seed
 */
export function islandsWindMembers(seed) {
  const sways = mirroredNormals(seed + 5, { pairs: 3, numbers: 4 }).map(
    ([force = 0, later = 0, u = 0, v = 0]) => ({ force: 1 + 0.25 * force, laterHours: later, u, v }),
  );
  return csv(
    notesFor("Sea breeze over invented islands, seven members; member 0 is the wind of islands-wind.csv."),
    ["member", ...WIND_HEADER],
    sways.flatMap((sway, member) => windRows(seed, sway).map((row) => [`${member}`, ...row])),
  );
}

/** A boat of 14 t; the reasoning behind each figure is in data/README.md. */
export const WORKBOAT = {
  name: "Battery workboat, 12 m",
  moves: "water",
  speed: "8 kn",
  power: {
    model: "table",
    rows: [
      { speed: "0 kn", rate: "0.3 kW" },
      { speed: "3 kn", rate: "1.6 kW" },
      { speed: "5 kn", rate: "5.6 kW" },
      { speed: "6 kn", rate: "9.8 kW" },
      { speed: "7 kn", rate: "16 kW" },
      { speed: "8 kn", rate: "26 kW" },
      { speed: "9 kn", rate: "44 kW" },
      { speed: "10 kn", rate: "72 kW" },
    ],
  },
  windage: { frontalArea: "13 m2", dragCoefficient: 0.9, efficiency: "55 %" },
  speeds: { min: "4 kn", max: "9.5 kn" },
  hotel: "1.2 kW",
  store: { capacity: "120 kWh", usable: "85 %" },
  limits: {
    wind: "14 m/s",
    gust: "18 m/s",
    groundSpeed: "3 kn",
    opposedWind: "6 m/s",
    opposedCurrent: "0.5 m/s",
  },
};

/** Position of plane coordinates, to 4 decimals. @param {number} x @param {number} y */
const at = (x, y) => ({
  lat: Number((ORIGIN.lat + y / 111.195).toFixed(4)),
  lon: Number((ORIGIN.lon + x / (111.195 * Math.cos(ORIGIN.lat * RAD))).toFixed(4)),
});

const PIER = { name: "Pier buoy", ...at(-4.2, -16) };
const LIGHT = { name: "North light", ...at(-4.4, 16) };

export const ISLANDS_PLAN = {
  format: "legwork-plan/1",
  title: "Stores for the north light",
  departure: "2027-05-04T11:00:00Z",
  craft: { file: "workboat.craft.json" },
  pace: { hold: "through-speed", speed: "8 kn" },
  reserve: "20 %",
  fields: [
    { role: "current", file: "islands-current.csv" },
    { role: "wind", file: "islands-wind.csv" },
  ],
  routes: [
    {
      name: "Sound",
      waypoints: [
        PIER,
        { name: "Sound south", ...at(-0.6, -9) },
        { name: "Sound north", ...at(-0.2, 9.5) },
        LIGHT,
      ],
    },
    {
      name: "West about",
      waypoints: [
        PIER,
        { name: "Vessay foot", ...at(-10.6, -8) },
        { name: "Vessay head", ...at(-11.2, 5.5) },
        LIGHT,
      ],
    },
    {
      name: "East about",
      path: "rhumb",
      waypoints: [
        PIER,
        { name: "Orrin foot", ...at(8, -10) },
        { name: "Orrin east", ...at(11, 0.5) },
        { name: "Orrin head", ...at(8, 12) },
        LIGHT,
      ],
    },
  ],
};
