import { beforeAll, describe, expect, it } from "vitest";
import type { Craft } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { rotorPower } from "../../src/craft/rotor.ts";
import { tablePower } from "../../src/craft/table.ts";
import type { Waypoint } from "../../src/estimate/route.ts";
import { craftOf, type Flow, gridField, routeOf, spaced, waypoint } from "../estimate/fixtures.ts";
import { expectAgreement, integrateByPeer, type PeerLeg } from "./peer-leg.ts";

/*
 * Whole legs against an integration by SciPy that shares nothing with ours (legs_by_scipy.py says how). The fields are invented;
 * they are known by their nodes alone, so that both sides interpolate.
 */

const cube = { model: "cube", speed: 5, power: 40_000 };
const cubeModel = cubePower({ referenceSpeed_m_s: 5, referencePower_W: 40_000 });
const ROWS: readonly (readonly [speed: number, rate: number])[] = [
  [0, 1200],
  [2, 3000],
  [4, 11_000],
  [6, 30_000],
  [7, 61_000],
  [10, 150_000],
];
const table = { model: "table", speeds: ROWS.map(([v]) => v), rates: ROWS.map(([, rate]) => rate) };
const tableModel = tablePower(
  "W",
  ROWS.map(([speed_m_s, rate]) => ({ speed_m_s, rate })),
);
const rotor = {
  model: "rotor",
  p0: 80,
  pi: 89,
  tip: 120,
  v0: 4.03,
  parasite: 0.5 * 0.6 * 1.225 * 0.05 * 0.503,
  efficiency: 0.8,
};
const rotorModel = rotorPower({
  bladeProfilePower_W: 80,
  inducedPower_W: 89,
  tipSpeed_m_s: 120,
  hoverInducedSpeed_m_s: 4.03,
  fuselageDragRatio: 0.6,
  solidity: 0.05,
  discArea_m2: 0.503,
  airDensity_kg_m3: 1.225,
  efficiency: 0.8,
  mass_kg: 2,
});
const windage = { frontalArea_m2: 7, dragCoefficient: 0.9, efficiency: 0.6, airDensity_kg_m3: 1.225 };

const boat = (more: Partial<Craft> = {}): Craft =>
  craftOf({ moves: "water", power: cubeModel, hotelPerSecond: 800, speeds: { min: 1, max: 12 }, ...more });
const drone = craftOf({ power: rotorModel, hotelPerSecond: 5, speeds: { min: 0, max: 30 } });

const wave = (x: number): number => Math.sin((x * Math.PI) / 180);
/** A rotating tidal stream over a steady drift. */
const tide: Flow = (lon, lat, hours) => [
  0.5 + 0.7 * wave(40 * lat + 29 * hours) + 0.2 * wave(70 * lon),
  0.3 * wave(55 * lon) + 0.6 * wave(30 * lat + 29 * hours + 80),
];
const breeze: Flow = (lon, lat, hours) => [
  6 + 3 * wave(60 * lon + 12 * hours),
  -4 + 2 * wave(50 * lat - 9 * hours),
];
const aloft: Flow = (lon, lat, hours, height) => [
  (4 + 3 * wave(300 * lon + 20 * hours)) * (1 + height / 300),
  2 * wave(250 * lat - 30 * hours) + height / 90,
];
const planetary: Flow = (lon, lat, hours) => [
  8 * wave(2 * lat + 30) + 4 * wave(3 * lon + 2 * hours),
  5 * wave(2 * lon + lat - 3 * hours),
];
const polar: Flow = (lon, lat, hours) => [
  3 + 4 * wave(lon + 5 * hours) + (90 - Math.abs(lat)) / 4,
  4 * wave(lon + 90) - 2,
];

const SOUND = {
  lon: [-7.3, -7.05, -6.9, -6.6, -6.45, -6.2, -5.8, -5.6],
  lat: [57.4, 57.7, 57.9, 58.2, 58.35, 58.7, 59],
};
const DAY = [-2, 0.7, 1.5, 3, 4.2, 6, 7.5, 9, 12, 15, 20];
const steadyTide = gridField("current", SOUND, tide);
const timedTide = gridField("current", { ...SOUND, hours: DAY }, tide);
const steadyBreeze = gridField("wind", SOUND, breeze);
const timedBreeze = gridField("wind", { ...SOUND, hours: [-3, 2, 5, 11, 24] }, breeze);
const FIELD_SITE = { lon: spaced(11, 11.12, 6), lat: spaced(46, 46.1, 5), height: [20, 60, 120, 200] };
const steadyAloft = gridField("wind", FIELD_SITE, aloft);
const timedAloft = gridField("wind", { ...FIELD_SITE, hours: [0, 0.1, 0.25, 0.3, 1] }, aloft);
const GLOBE = { lon: spaced(-180, 180, 48), lat: spaced(-90, 90, 24) };
const steadyGlobe = gridField("wind", GLOBE, planetary, { global: true });
const timedGlobe = gridField("wind", { ...GLOBE, hours: spaced(0, 60, 10) }, planetary, { global: true });
const ARCTIC = { lon: spaced(-60, 120, 18), lat: spaced(80, 90, 8) };
const steadyArctic = gridField("wind", ARCTIC, polar);
const timedArctic = gridField("wind", { ...ARCTIC, hours: spaced(0, 24, 6) }, polar);
const steadyAntarctic = gridField("wind", { lon: spaced(-60, 120, 18), lat: spaced(-90, -80, 8) }, polar);

type Place = readonly [lat: number, lon: number, more?: Partial<Waypoint>];
const between = ([lat1, lon1, more1]: Place, [lat2, lon2, more2]: Place) =>
  routeOf(waypoint("from", lat1, lon1, more1), waypoint("to", lat2, lon2, more2));
const rhumb = { path: "rhumb" } as const;
const SOUTHWEST: Place = [57.52, -7.21];
const NORTHEAST: Place = [58.83, -5.93];
const NORTHEAST_RHUMB: Place = [58.83, -5.93, rhumb];
const SLOW = { hold: "through-speed", speed_m_s: 4.4 } as const;

const water = (name: string, to: Place, fields: PeerLeg["fields"], more: Partial<PeerLeg> = {}): PeerLeg => ({
  name,
  route: between(SOUTHWEST, to),
  craft: boat(),
  pace: SLOW,
  power: cube,
  fields,
  ...more,
});
const air = (
  name: string,
  from: Place,
  to: Place,
  fields: PeerLeg["fields"],
  more: Partial<PeerLeg> = {},
): PeerLeg => ({
  name,
  route: between(from, to),
  craft: drone,
  pace: { hold: "through-speed", speed_m_s: 16 },
  power: rotor,
  fields,
  ...more,
});
const LOW: Place = [46.012, 11.013, { height_m: 35 }];
const HIGH: Place = [46.087, 11.104, { height_m: 160 }];
const HIGH_RHUMB: Place = [46.087, 11.104, { height_m: 160, path: "rhumb" }];
const withTable = { craft: boat({ power: tableModel }), power: table };
const withWindage = { craft: boat({ windage }), power: cube };

const LEGS: readonly PeerLeg[] = [
  water("on water, a geodesic in a steady current", NORTHEAST, [steadyTide]),
  water("on water, a rhumb line in a steady current", NORTHEAST_RHUMB, [steadyTide]),
  water("on water, due east along a parallel between grid lines", [57.52, -5.71, rhumb], [steadyTide]),
  water("on water, due east along a parallel that is a grid line", [57.7, -5.71, rhumb], [steadyTide], {
    route: between([57.7, -7.2], [57.7, -5.71, rhumb]),
  }),
  water("on water, a geodesic in a turning tide", NORTHEAST, [timedTide]),
  water("on water, a rhumb line in a turning tide", NORTHEAST_RHUMB, [timedTide]),
  water("on water, a speed-power table", NORTHEAST, [steadyTide], withTable),
  water("on water, windage in steady fields", NORTHEAST, [steadyTide, steadyBreeze], withWindage),
  water(
    "on water, windage in fields that change at different times",
    NORTHEAST_RHUMB,
    [timedTide, timedBreeze],
    {
      craft: boat({ windage, power: tableModel }),
      power: table,
    },
  ),
  water("on water, holding a ground speed", NORTHEAST, [steadyTide], {
    pace: { hold: "ground-speed", speed_m_s: 4.1 },
  }),
  water(
    "on water, holding a ground speed with windage in changing fields",
    NORTHEAST,
    [timedTide, timedBreeze],
    {
      ...withWindage,
      pace: { hold: "ground-speed", speed_m_s: 4.1 },
    },
  ),
  water("on water, holding a power with windage in steady fields", NORTHEAST, [steadyTide, steadyBreeze], {
    ...withWindage,
    pace: { hold: "power", power_W: 30_000 },
  }),
  water("on water, holding a power with windage in changing fields", NORTHEAST, [timedTide, timedBreeze], {
    ...withWindage,
    pace: { hold: "power", power_W: 30_000 },
  }),
  water("on water, at the least-energy pace in a steady current", NORTHEAST, [steadyTide], {
    craft: boat({ hotelPerSecond: 9000 }),
    pace: { hold: "least-energy" },
  }),
  water("on water, at the least-energy pace in a turning tide", NORTHEAST_RHUMB, [timedTide], {
    craft: boat({ hotelPerSecond: 9000 }),
    pace: { hold: "least-energy" },
  }),
  air("in the air, climbing through levels of a steady wind", LOW, HIGH, [steadyAloft]),
  air(
    "in the air, descending through levels of a steady wind on a rhumb line",
    HIGH,
    [46.012, 11.013, { height_m: 35, path: "rhumb" }],
    [steadyAloft],
  ),
  air("in the air, climbing through levels of a changing wind", LOW, HIGH_RHUMB, [timedAloft]),
  air("in the air, climbing at a ground speed", LOW, HIGH, [timedAloft], {
    pace: { hold: "ground-speed", speed_m_s: 13 },
  }),
  air(
    "in the air, nearly all the speed spent on a cross wind",
    [46.01, 11.01, { height_m: 60 }],
    [46.09, 11.015, { height_m: 60 }],
    [steadyAloft],
    {
      pace: { hold: "through-speed", speed_m_s: 8.75 },
    },
  ),
  air(
    "in the air, an ocean geodesic over the antimeridian in a steady wind",
    [35.5, 139.8],
    [37.6, -122.4],
    [steadyGlobe],
    {
      pace: { hold: "through-speed", speed_m_s: 70 },
    },
  ),
  air(
    "in the air, an ocean rhumb line over the antimeridian in a changing wind",
    [-18, 168],
    [-24, -163, rhumb],
    [timedGlobe],
    {
      pace: { hold: "through-speed", speed_m_s: 60 },
    },
  ),
  air("in the air, past the north pole in a steady wind", [81.3, -41], [83.2, 97], [steadyArctic], {
    pace: { hold: "through-speed", speed_m_s: 45 },
  }),
  air("in the air, past the north pole in a changing wind", [81.3, -41], [83.2, 97], [timedArctic], {
    pace: { hold: "through-speed", speed_m_s: 45 },
  }),
  air("in the air, a rhumb line near the south pole", [-83.1, -33], [-88.2, 71, rhumb], [steadyAntarctic], {
    pace: { hold: "through-speed", speed_m_s: 45 },
  }),
];

describe("whole legs against SciPy", () => {
  let answers: ReturnType<typeof integrateByPeer> = [];
  beforeAll(() => {
    answers = integrateByPeer(LEGS);
  }, 240_000);

  it("has an answer of the peer to every leg", () => {
    expect(answers).toHaveLength(LEGS.length);
  });

  LEGS.forEach((leg, n) => {
    it(`agrees, and within the bounds reported: ${leg.name}`, () => {
      expectAgreement(leg, answers[n] as (typeof answers)[number]);
    });
  });
});
