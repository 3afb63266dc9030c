/**
 * Scenario 3: an ocean passage across the antimeridian, with a moving low and the free jet of a western boundary current.
 */
import {
  axis,
  csv,
  fixed,
  isoMinutes,
  isoSeconds,
  notesFor,
  planeAbout,
  RAD,
  velocityFromStream,
} from "./grid.mjs";
import { mirroredNormals, smoothRandom } from "./seeded.mjs";

const ORIGIN = { lat: 36, lon: 150 };
const plane = planeAbout(ORIGIN.lat, ORIGIN.lon);

/**
 * The jet: ψ = -U λ tanh((y - y_c(x)) / (λ / cos α)), α the slope of its axis y_c (Bower, J. Phys. Oceanography 21, 1991,
 * 173-180, eq. 1). It runs east, meanders, and weakens and widens as it goes. km and m/s.
 */
const JET = {
  speed: 1.75,
  halfWidth: 62,
  widening: 0.022,
  spread: 4200,
  meander: 75,
  wavelength: 1050,
  meanderReach: 2600,
  rise: 0.03,
};

/** @param {number} x km */
function jetAxis(x) {
  return (
    JET.rise * x +
    JET.meander * Math.exp(-x / JET.meanderReach) * Math.sin((2 * Math.PI * x) / JET.wavelength - 0.6)
  );
}

/** @param {number} seed @returns {(lat: number, lon: number) => number} ψ in km·m/s, lon in 0..360 */
function currentStream(seed) {
  const eddies = smoothRandom(seed + 3, { shortest: 240, longest: 600, slope: 0.12 });
  return (lat, lon) => {
    const { x, y } = plane(lat, lon);
    const slope = (jetAxis(x + 1) - jetAxis(x - 1)) / 2;
    const width = (JET.halfWidth + JET.widening * Math.max(x, 0)) * Math.hypot(1, slope);
    const transport = JET.speed * JET.halfWidth * Math.exp(-x / JET.spread);
    return -transport * Math.tanh((y - jetAxis(x)) / width) + eddies(x, y);
  };
}

const CURRENT_STEP = { dLat: 0.25, dLon: 0.5 };

/** @param {number} seed @returns {string} */
export function oceanCurrent(seed) {
  const psi = currentStream(seed);
  const rows = [];
  for (const lat of axis(45.5, -CURRENT_STEP.dLat, 63)) {
    for (const lon of axis(150, CURRENT_STEP.dLon, 101)) {
      const { u, v } = velocityFromStream(psi, { lat, lon, ...CURRENT_STEP });
      rows.push([`${lat}`, `${lon > 180 ? lon - 360 : lon}`, fixed(u, 3), fixed(v, 3)]);
    }
  }
  const what =
    "Mean current of an invented ocean week; components in m/s, the way the water moves; steady, north to south.";
  return csv(notesFor(what), ["latitude", "longitude", "u [m/s]", "v [m/s]"], rows);
}

/**
 * The low: a Gaussian pressure deficit that travels. Its gradient wind V solves V²/r + f V = (∂p/∂r)/ρ (Holton & Hakim, An
 * Introduction to Dynamic Meteorology, 2013, section 3.2.5); friction slows it at the surface and turns it inward, across
 * the isobars toward the centre.
 */
const LOW = {
  deficit: 2800,
  radius: 400,
  deepening: 0.1,
  surfaceShare: 0.72,
  inflow: 18,
  lat: 36.9,
  lon: 149,
  east: 9.3,
  north: 0.5,
};
const AIR_DENSITY = 1.22;
const START = Date.UTC(2027, 10, 3, 0);

/** @param {number} hours since START @param {typeof LOW} low */
function lowCentre(hours, low) {
  const lat = low.lat + (low.north * hours * 3.6) / 111.195;
  const lon = low.lon + (low.east * hours * 3.6) / (111.195 * Math.cos(low.lat * RAD));
  return { lat, lon };
}

/**
 * Surface wind of the low, m/s.
 * @param {number} lat @param {number} lon @param {number} hours since START @param {typeof LOW} low
 * @returns {{ u: number, v: number }}
 */
function lowWind(lat, lon, hours, low) {
  const centre = lowCentre(hours, low);
  const { x, y } = planeAbout((lat + centre.lat) / 2, centre.lon)(lat, lon);
  const north = y + ((lat + centre.lat) / 2 - centre.lat) * 111.195;
  const r = Math.max(Math.hypot(x, north), 1);
  // The low deepens for three days, then fills.
  const depth = low.deficit * (1 - LOW.deepening * ((hours - 72) / 48) ** 2);
  const gradient =
    (((Math.max(depth, 0) * r) / LOW.radius ** 2) * Math.exp(-0.5 * (r / LOW.radius) ** 2)) / 1000; // Pa/m
  const f = 2 * 7.2921e-5 * Math.sin(lat * RAD);
  const half = (f * r * 1000) / 2;
  const speed = LOW.surfaceShare * (Math.sqrt(half ** 2 + (r * 1000 * gradient) / AIR_DENSITY) - half);
  // Anticlockwise in the northern hemisphere: a quarter turn left of outward, then turned inward.
  const direction = Math.atan2(north, x) + Math.PI / 2 + LOW.inflow * RAD;
  return { u: speed * Math.cos(direction), v: speed * Math.sin(direction) };
}

/** Westerlies that strengthen toward the north, under the low. @param {number} lat */
const westerlies = (lat) => 1.5 + 2.5 * Math.exp(-(((lat - 42) / 9) ** 2));

const WIND_AXES = { lat: axis(27, 1.5, 16), lon: axis(148.5, 1.5, 35) };

/**
 * Hours since START, both included, every six hours.
 * @typedef {{ from: number, to: number }} Span
 * A member's low, and its own weather as a stream function: it grows over four days to its full strength.
 * @typedef {{ low: typeof LOW, weather: (x: number, y: number) => number }} Sway
 */

/** @type {Sway} */
const CONTROL = { low: LOW, weather: () => 0 };

/**
 * @param {number} seed @param {Span} span @param {number[]} latitudes @param {Sway} sway
 * @returns {[number, number, number, number, number][]} ms, lat, lon, u, v
 */
function windNodes(seed, { from, to }, latitudes, sway) {
  const weather = smoothRandom(seed + 4, { shortest: 1200, longest: 3000, slope: 1.6 });
  /** @type {[number, number, number, number, number][]} */
  const rows = [];
  for (let hours = from; hours <= to; hours += 6) {
    const grown = Math.min(hours / 96, 1);
    const psi = (/** @type {number} */ lat, /** @type {number} */ lon) => {
      const { x, y } = plane(lat, lon);
      return weather(x - 25 * hours, y) + grown * sway.weather(x - 25 * hours, y);
    };
    for (const lat of latitudes) {
      for (const lon of WIND_AXES.lon) {
        const low = lowWind(lat, lon, hours, sway.low);
        const other = velocityFromStream(psi, { lat, lon, dLat: 1.5, dLon: 1.5 });
        rows.push([START + hours * 3600e3, lat, lon, westerlies(lat) + low.u + other.u, low.v + other.v]);
      }
    }
  }
  return rows;
}

/** @param {number} seed @param {Span} span @returns {string} */
export function oceanWind(seed, span) {
  const rows = windNodes(seed, span, WIND_AXES.lat, CONTROL).map(([time, lat, lon, u, v]) => [
    isoSeconds(time),
    `${lat}`,
    `${lon}`,
    fixed(u, 2),
    fixed(v, 2),
  ]);
  const what =
    "Wind of an invented ocean week at 10 m, with a travelling low; components in m/s, the way the air moves.";
  return csv(notesFor(what), ["time", "lat", "lon", "eastward_wind", "northward_wind"], rows);
}

/**
 * A member other than the control, 1 to 4, between 30 and 46.5 degrees north. Standard deviations: 15 % of the low's deficit,
 * 0.7 m/s of its travel east and 0.4 m/s north, 0.4 degrees of its first latitude; 0.8 m/s of each component after four days
 * of weather of its own.
 * @param {number} seed @param {number} member
 */
export function oceanWindMember(seed, member) {
  const rows = mirroredNormals(seed + 7, { pairs: 2, numbers: 4 });
  const [deficit = 0, east = 0, north = 0, lat = 0] = rows[member] ?? [];
  const low = {
    ...LOW,
    deficit: LOW.deficit * (1 + 0.15 * deficit),
    east: LOW.east + 0.7 * east,
    north: LOW.north + 0.4 * north,
    lat: LOW.lat + 0.4 * lat,
  };
  const weather = smoothRandom(seed + 10 * member, { shortest: 1200, longest: 3000, slope: 0.8 });
  const latitudes = WIND_AXES.lat.slice(2, 14);
  const nodes = windNodes(seed, { from: 0, to: 216 }, latitudes, { low, weather });
  return csv(
    notesFor(
      `Wind of an invented ocean week at 10 m, member ${member}; components in m/s, the way the air moves.`,
    ),
    ["time", "lat", "lon", "u", "v"],
    nodes.map(([time, y, x, u, v]) => [isoMinutes(time), `${y}`, `${x}`, fixed(u, 1), fixed(v, 1)]),
  );
}

/** A 9,000 dwt ship; the reasoning behind each figure is in data/README.md. */
export const SHIP = {
  name: "Multi-purpose ship, 120 m",
  moves: "water",
  speed: "13 kn",
  power: { model: "cube", reference: { speed: "13 kn", power: "3000 kW" } },
  windage: { frontalArea: "420 m2", dragCoefficient: 0.8, efficiency: "65 %" },
  speeds: { min: "8 kn", max: "14.5 kn" },
  hotel: "350 kW",
  store: { capacity: "185 t", usable: "92 %", specificConsumption: "195 g/kWh" },
  limits: { wind: "25 m/s", groundSpeed: "5 kn" },
};

export const OCEAN_PLAN = {
  format: "legwork-plan/1",
  title: "Autumn passage, west to east",
  departure: "2027-11-03T06:00:00Z",
  craft: { file: "ship.craft.json" },
  pace: { hold: "through-speed", speed: "13 kn" },
  reserve: "25 t",
  fields: [
    { role: "wind", file: "ocean-wind-1.csv" },
    { role: "wind", file: "ocean-wind-2.csv" },
    { role: "current", file: "ocean-current.csv" },
  ],
  routes: [
    {
      name: "Great circle",
      path: "geodesic",
      waypoints: [
        { name: "Departure", lat: "37°00.0'N", lon: "152°30.0'E" },
        { name: "Antimeridian", lat: "40°51.2'N", lon: 180 },
        { name: "Arrival", lat: "40°00.0'N", lon: "164°00.0'W" },
      ],
    },
    {
      name: "Down the stream",
      path: "rhumb",
      waypoints: [
        { name: "Departure", lat: "37°00.0'N", lon: "152°30.0'E" },
        { name: "Crest", lat: 36.6, lon: 154.5 },
        { name: "Trough", lat: 35.85, lon: 159 },
        { name: "Second crest", lat: 36.6, lon: 165.5 },
        { name: "Second trough", lat: 36.5, lon: 171 },
        { name: "Stream end", lat: 36.95, lon: 179 },
        { name: "Arrival", lat: "40°00.0'N", lon: "164°00.0'W", path: "geodesic" },
      ],
    },
  ],
};
