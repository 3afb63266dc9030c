/**
 * Grids, and the two ways in which the recipes turn physics into numbers on them.
 */

/** Mean radius of the Earth R₁ of WGS84, km: (2 a + b) / 3. The demo fields need no ellipsoid. */
const EARTH_RADIUS_KM = 6371.0088;

/** Degrees to radians. */
export const RAD = Math.PI / 180;

/** Kilometres of one degree of latitude on that sphere. */
const DEGREE_KM = EARTH_RADIUS_KM * RAD;

/**
 * An axis of `count` nodes, free of accumulated rounding.
 * @param {number} first
 * @param {number} step
 * @param {number} count
 */
export const axis = (first, step, count) =>
  Array.from({ length: count }, (_, i) => round(first + i * step, 6));

/** @param {number} value @param {number} decimals */
const round = (value, decimals) => Math.round(value * 10 ** decimals) / 10 ** decimals;

/**
 * Plane coordinates about an origin: x km east, y km north (equirectangular; the demo areas are small or need no more).
 * @param {number} lat0 @param {number} lon0
 * @returns {(lat: number, lon: number) => { x: number, y: number }}
 */
export const planeAbout = (lat0, lon0) => (lat, lon) => ({
  x: (lon - lon0) * DEGREE_KM * Math.cos(lat0 * RAD),
  y: (lat - lat0) * DEGREE_KM,
});

/**
 * Velocity at a node from a stream function ψ on the sphere, by central differences over one grid step each way:
 * u = -∂ψ/∂φ / R, v = ∂ψ/∂λ / (R cos φ). Taken like this, the central-difference divergence
 * (δu/δλ + δ(v cos φ)/δφ) / (R cos φ) of the field on the grid is zero, not merely small.
 * @param {(lat: number, lon: number) => number} psi in km·m/s
 * @param {{ lat: number, lon: number, dLat: number, dLon: number }} node degrees
 * @returns {{ u: number, v: number }} m/s
 */
export function velocityFromStream(psi, { lat, lon, dLat, dLon }) {
  const north = psi(lat + dLat, lon) - psi(lat - dLat, lon);
  const east = psi(lat, lon + dLon) - psi(lat, lon - dLon);
  return {
    u: -north / (2 * dLat * DEGREE_KM),
    v: east / (2 * dLon * DEGREE_KM * Math.cos(lat * RAD)),
  };
}

/**
 * The direction that a velocity comes from, degrees clockwise from north in [0, 360), and its speed.
 * @param {{ u: number, v: number }} velocity
 */
export function polarFrom({ u, v }) {
  const from = Math.atan2(-u, -v) / RAD;
  return { speed: Math.hypot(u, v), from: (from + 360) % 360 };
}

/** Fixed decimals, and no negative zero. @param {number} value @param {number} decimals */
export function fixed(value, decimals) {
  const text = value.toFixed(decimals);
  return Number(text) === 0 ? (0).toFixed(decimals) : text;
}

/** `2027-05-04T06:00Z`, ISO 8601 to the minute. @param {number} ms since 1970 */
export const isoMinutes = (ms) => `${new Date(ms).toISOString().slice(0, 16)}Z`;

/** `2027-05-04T06:00:00Z`. @param {number} ms since 1970 */
export const isoSeconds = (ms) => `${new Date(ms).toISOString().slice(0, 19)}Z`;

/**
 * A CSV file's text: notes, header, rows; line feeds, one at the end.
 * @param {string[]} notes @param {string[]} header @param {string[][]} rows @param {string} separator
 */
export function csv(notes, header, rows, separator = ",") {
  const lines = [...notes.map((note) => `# ${note}`), header.join(separator)];
  for (const row of rows) lines.push(row.join(separator));
  return `${lines.join("\n")}\n`;
}

/** Notes that open every demo field. @param {string} what */
export const notesFor = (what) => [
  what,
  "Invented data for demonstration: no forecast, no real waters, not for any passage or flight.",
  "Made by data/demo/recipe.mjs of Legwork. Licence: CC0 1.0.",
];
