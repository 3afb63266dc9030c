/**
 * Scenario 2: a survey drone over a dry plain of the southern hemisphere, wind on three heights, out and back.
 */
import {
  axis,
  csv,
  fixed,
  isoSeconds,
  notesFor,
  planeAbout,
  polarFrom,
  RAD,
  velocityFromStream,
} from "./grid.mjs";
import { mirroredNormals, smoothRandom } from "./seeded.mjs";

const HOME = { lat: -28.62, lon: 134.3 };
const plane = planeAbout(HOME.lat, HOME.lon);

/**
 * Logarithmic wind profile over rough ground, w(z) = w₁₀ ln(z/z₀) / ln(10/z₀) (Stull, An Introduction to Boundary Layer
 * Meteorology, 1988, section 9.7), turning with height: backing in the southern hemisphere, as the Ekman spiral does.
 */
const PROFILE = { roughness: 0.3, fromAtTen: 75, turnPerHundred: -7 };
/** The ten-metre wind strengthens through the morning as the ground heats: m/s at the first time, and per hour. */
const RISE = { start: 4.5, perHour: 0.5 };
/**
 * What the night leaves behind: a low-level jet, cut off from the ground, that the day's mixing wears down before the first
 * time (Stull 1988, section 12.5). m/s at 120 m for each hour before it; it grows with the logarithm of the height above 10 m.
 */
const JET_PER_HOUR = 2.4;

const FIRST = Date.UTC(2027, 8, 14, 0, 30);

const AXES = {
  steps: axis(0, 1, 7), // half-hours after FIRST
  height: [10, 60, 120],
  lat: axis(-28.72, 0.015, 14),
  lon: axis(134.2, 0.015, 18),
};

/** The members' part of the plain: around both routes, nodes of the same grid; from before the night's jet has gone. */
const MEMBER_AXES = {
  steps: axis(-5, 1, 10),
  height: AXES.height,
  lat: AXES.lat.slice(4, 12),
  lon: AXES.lon.slice(5, 16),
};

/**
 * How a member's wind differs from the control's: its strength, its direction, the hour of its rise.
 * @typedef {{ strength: number, veer: number, laterHours: number }} Sway
 */
const CONTROL = { strength: 1, veer: 0, laterHours: 0 };

/** @param {number} height m @param {number} step half-hours after FIRST @param {Sway} sway @returns {{ u: number, v: number }} */
function meanWind(height, step, sway) {
  const hours = step / 2 - sway.laterHours;
  const profile = Math.log(height / PROFILE.roughness) / Math.log(10 / PROFILE.roughness);
  const jet = (JET_PER_HOUR * Math.max(-hours, 0) * Math.log(height / 10)) / Math.log(12);
  const speed = sway.strength * ((RISE.start + RISE.perHour * hours) * profile + jet);
  const turn = PROFILE.fromAtTen + (PROFILE.turnPerHundred * (height - 10)) / 100;
  const from = (turn + sway.veer) * RAD;
  return { u: -speed * Math.sin(from), v: -speed * Math.cos(from) };
}

/** @param {number} seed @param {typeof AXES} axes @param {Sway} sway @returns {string[][]} as HEADER */
function windRows(seed, axes, sway) {
  // Eddies of the rolling ground, carried with the wind; without divergence, as the mean wind is.
  const ground = smoothRandom(seed + 2, { shortest: 5, longest: 16, slope: 0.4 });
  const rows = [];
  for (const step of axes.steps) {
    const time = FIRST + step * 1800e3;
    for (const height of axes.height) {
      const mean = meanWind(height, step, sway);
      const drift = { x: 0.4 * 1.8 * step * mean.u, y: 0.4 * 1.8 * step * mean.v }; // km: 0.4 of the way in half an hour
      const psi = (/** @type {number} */ lat, /** @type {number} */ lon) => {
        const { x, y } = plane(lat, lon);
        return ground(x - drift.x, y - drift.y);
      };
      for (const lat of axes.lat) {
        for (const lon of axes.lon) {
          const eddy = velocityFromStream(psi, { lat, lon, dLat: 0.015, dLon: 0.015 });
          const { speed, from } = polarFrom({ u: mean.u + eddy.u, v: mean.v + eddy.v });
          // Gusts are relatively stronger near the ground: common practice.
          const gust = speed * (height < 50 ? 1.5 : 1.3);
          rows.push([
            fixed(lon, 3),
            fixed(lat, 3),
            `${height}`,
            isoSeconds(time),
            fixed(from, 0),
            fixed(speed, 2),
            fixed(gust, 1),
          ]);
        }
      }
    }
  }
  return rows;
}

const HEADER = ["lon", "lat", "height", "time", "direction_from", "speed", "gust"];

/** @param {number} seed @returns {string} */
export function surveyWind(seed) {
  return csv(
    notesFor(
      "Wind over an invented plain at three heights; m/s, and degrees that the wind blows from; tab-separated.",
    ),
    HEADER,
    windRows(seed, AXES, CONTROL),
    "\t",
  );
}

/**
 * Seven members of the same wind. Standard deviations: 8 % of its strength, 8° of its direction, 20 minutes.
 * @param {number} seed
 */
export function surveyWindMembers(seed) {
  const sways = mirroredNormals(seed + 6, { pairs: 3, numbers: 3 }).map(
    ([strength = 0, veer = 0, later = 0]) => ({
      strength: 1 + 0.08 * strength,
      veer: 8 * veer,
      laterHours: later / 3,
    }),
  );
  return csv(
    notesFor(
      "Wind over an invented plain, seven members, from the early morning on; member 0 is the wind of survey-wind.csv.",
    ),
    ["member", ...HEADER],
    sways.flatMap((sway, member) => windRows(seed, MEMBER_AXES, sway).map((row) => [`${member}`, ...row])),
    "\t",
  );
}

/** Six rotors of 0.46 m, 8.5 kg with payload; the reasoning behind each figure is in data/README.md. */
export const DRONE = {
  name: "Survey drone, six rotors, 8.5 kg",
  moves: "air",
  speed: "15 m/s",
  power: {
    model: "rotor",
    bladeProfilePower: "171 W",
    inducedPower: "536 W",
    tipSpeed: "110 m/s",
    hoverInducedSpeed: "5.84 m/s",
    fuselageDragRatio: 0.6,
    solidity: 0.07,
    discArea: "0.997 m2",
    airDensity: "1.225 kg/m3",
    efficiency: "80 %",
    mass: "8.5 kg",
  },
  speeds: { min: "5 m/s", max: "20 m/s" },
  hotel: "40 W",
  store: { capacity: "550 Wh", usable: "85 %" },
  limits: { wind: "12 m/s", gust: "15 m/s", groundSpeed: "3 m/s" },
};

/** @param {number} x km east @param {number} y km north of home */
const at = (x, y) => ({
  lat: Number((HOME.lat + y / 111.195).toFixed(5)),
  lon: Number((HOME.lon + x / (111.195 * Math.cos(HOME.lat * RAD))).toFixed(5)),
});

const PAD = at(0, 0);
const MAST = at(9.8, 2.7);
const BEND = at(4.8, 2.5);

export const SURVEY_PLAN = {
  format: "legwork-plan/1",
  title: "Mast inspection, out and back",
  departure: "2027-09-14T01:15:00Z",
  craft: { file: "drone.craft.json" },
  pace: { hold: "through-speed", speed: "15 m/s" },
  reserve: "8 min",
  fields: [{ role: "wind", file: "survey-wind.csv" }],
  routes: [
    {
      name: "High, straight",
      waypoints: [
        { name: "Pad", ...PAD, height: "10 m" },
        { name: "Climb", ...at(0.48, 0.13), height: "120 m" },
        { name: "Mast", ...MAST, height: "120 m", stay: "4 min" },
        { name: "Descent", ...at(0.48, 0.13), height: "120 m" },
        { name: "Pad", ...PAD, height: "10 m" },
      ],
    },
    {
      name: "Low, round the homestead",
      waypoints: [
        { name: "Pad", ...PAD, height: "10 m" },
        { name: "Climb", ...at(0.25, 0.16), height: "60 m" },
        { name: "Bend", ...BEND, height: "60 m" },
        { name: "Mast", ...MAST, height: "60 m", stay: "4 min" },
        { name: "Bend", ...BEND, height: "60 m" },
        { name: "Descent", ...at(0.25, 0.16), height: "60 m" },
        { name: "Pad", ...PAD, height: "10 m" },
      ],
    },
  ],
};
