import { describe, expect, test } from "vitest";
import type { TrackCell } from "../../src/choose/cell.ts";
import { fieldRates, STILL } from "../../src/choose/field-rates.ts";
import { COMPONENTS } from "../../src/choose/local-sensitivity.ts";
import { sensitivities } from "../../src/choose/sensitivity.ts";
import { trackCells } from "../../src/choose/track-cells.ts";
import type { Pace } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { rotorPower } from "../../src/craft/rotor.ts";
import { mediumRole, type PreparedLeg } from "../../src/estimate/prepare.ts";
import type { Field, FieldRole } from "../../src/field/field.ts";
import { craftOf, DEPARTURE, gridField, routeOf, spaced, waypoint } from "../estimate/fixtures.ts";
import { type Case, caseOf, plusField, runOf } from "./error-fixtures.ts";

const SHAPE = { lon: spaced(-6, 0, 6), lat: spaced(47, 52, 5), hours: spaced(-2, 160, 54) };

const base = (role: FieldRole, size: number): Field =>
  gridField(role, SHAPE, (lon, lat, hours) => [
    size * (1 + Math.sin(lon + hours / 4)),
    size * Math.cos(lat * 2 - hours / 5),
  ]);

/** An error of 1 m/s or so that varies in place and time. */
const error = (role: FieldRole): Field =>
  gridField(role, SHAPE, (lon, lat, hours) => [
    Math.cos(lon * 1.3 + lat + hours / 9),
    Math.sin(lat * 1.7 - hours / 7),
  ]);

const ROUTE = routeOf(
  waypoint("A", 48, -5),
  waypoint("B", 49.2, -3.5, { stay_s: 5400 }),
  waypoint("C", 50.7, -1.2, { path: "rhumb" }),
  waypoint("D", 49.1, -4.4),
);

const boat = craftOf({
  moves: "water",
  power: cubePower({ referenceSpeed_m_s: 6, referencePower_W: 60_000 }),
  windage: { frontalArea_m2: 20, dragCoefficient: 0.9, efficiency: 0.6, airDensity_kg_m3: 1.225 },
  speeds: { min: 2, max: 9 },
  hotelPerSecond: 800,
});

const drone = craftOf({
  power: rotorPower({
    bladeProfilePower_W: 79.86,
    inducedPower_W: 88.63,
    tipSpeed_m_s: 120,
    hoverInducedSpeed_m_s: 4.03,
    fuselageDragRatio: 0.6,
    solidity: 0.05,
    discArea_m2: 0.503,
    airDensity_kg_m3: 1.225,
  }),
  speeds: { min: 4, max: 25 },
});

/** δT and δU by the sensitivities, for an error of each role, up to the end of each leg. */
function predicted({ prepared, conditions }: Case, errors: ReadonlyMap<FieldRole, Field>) {
  const run = runOf({ prepared, conditions });
  const cells = trackCells(prepared, conditions, run.profile, { length_m: 4000, time_s: 60 });
  if (cells === null) throw new Error("no cells");
  const found = sensitivities(cells);
  const medium = mediumRole(conditions.craft);
  let time = 0;
  let use = 0;
  const legs = found.delayAtLegEnd.map(() => ({ time: 0, use: 0 }));
  cells.forEach((cell, n) => {
    const leg = prepared.legs[cell.leg - 1] as PreparedLeg;
    [errors.get(medium), errors.get("wind")].forEach((field, pair) => {
      const { along, cross } = field === undefined ? STILL : meanError(field, leg, cell);
      const at = n * COMPONENTS + 2 * pair;
      time += (found.time[at] as number) * along + (found.time[at + 1] as number) * cross;
      use += (found.use[at] as number) * along + (found.use[at + 1] as number) * cross;
    });
    legs[cell.leg - 1] = { time, use };
  });
  // What the parts up to a leg's end come to there, not at the route's end.
  return legs.map((sum, n) => {
    const end = found.delayAtLegEnd[n] as { time: number; use: number };
    return { time: sum.time / end.time, use: sum.use - (end.use / end.time) * sum.time };
  });
}

/** Mean of the error over a cell, by the cell's own two points. */
function meanError(field: Field, leg: PreparedLeg, cell: TrackCell) {
  let along = 0;
  let cross = 0;
  for (const share of [0.5 - Math.sqrt(1 / 12), 0.5 + Math.sqrt(1 / 12)]) {
    const s = cell.from + share * (cell.to - cell.from);
    const time = cell.time + (share - 0.5) * cell.duration;
    const rates = fieldRates(field, leg, s, DEPARTURE + 1000 * time) ?? STILL;
    along += rates.along / 2;
    cross += rates.cross / 2;
  }
  return { along, cross };
}

/** δT and δU at every leg's end per unit of the error, by central differences of true estimates. */
function differences(given: Case, errors: ReadonlyMap<FieldRole, Field>) {
  const size = 1e-3;
  const ends = [size, -size].map((by) => {
    const fields = given.conditions.fields.map((field) => {
      const added = errors.get(field.role);
      return added === undefined ? field : plusField(field, added, by);
    });
    const { estimate } = runOf({ ...given, conditions: { ...given.conditions, fields } });
    let time = 0;
    let use = 0;
    return estimate.legs.map((leg) => {
      time += leg.time_s as number;
      use += leg.use as number;
      return { time, use };
    });
  });
  return (ends[0] ?? []).map((upper, n) => ({
    time: (upper.time - (ends[1]?.[n]?.time as number)) / (2 * size),
    use: (upper.use - (ends[1]?.[n]?.use as number)) / (2 * size),
  }));
}

/*
 * Tolerances, relative: the two-point rule leaves some 1e-6 on cells of 4 km and 60 s; more where the integrand has a corner:
 * 1.5e-5 where the drone's speed over the ground meets the least of its power curve, 6.2e-5 where least energy meets an end of
 * the craft's range of speeds.
 */
const AIR: [string, Pace, number][] = [
  ["a held through-speed", { hold: "through-speed", speed_m_s: 14 }, 3e-6],
  ["a held ground speed", { hold: "ground-speed", speed_m_s: 12 }, 2e-5],
  ["least energy", { hold: "least-energy" }, 3e-6],
];
const WATER: [string, Pace, number][] = [
  ["a held through-speed", { hold: "through-speed", speed_m_s: 6 }, 1e-6],
  ["a held ground speed", { hold: "ground-speed", speed_m_s: 5 }, 1e-6],
  ["a held power", { hold: "power", power_W: 70_000 }, 1e-6],
  ["least energy", { hold: "least-energy" }, 7e-5],
];

function expectClose(given: Case, errors: ReadonlyMap<FieldRole, Field>, within: number): void {
  const found = predicted(given, errors);
  const wanted = differences(given, errors);
  const scale = (of: "time" | "use") => Math.max(...wanted.map((each) => Math.abs(each[of])), 1e-9);
  wanted.forEach(({ time, use }, n) => {
    expect(Math.abs((found[n]?.time as number) - time) / scale("time")).toBeLessThan(within);
    expect(Math.abs((found[n]?.use as number) - use) / scale("use")).toBeLessThan(within);
  });
}

describe("sensitivities of time and use", () => {
  test.each(AIR)(
    "under %s in the air equal differences of true estimates, hovering included",
    (_, pace, within) => {
      const given = caseOf(ROUTE, [base("wind", 3)], { craft: drone, pace });
      expectClose(given, new Map([["wind", error("wind")]]), within);
    },
  );

  test.each(WATER)("of the current under %s equal differences of true estimates", (_, pace, within) => {
    const given = caseOf(ROUTE, [base("current", 0.8), base("wind", 5)], { craft: boat, pace });
    expectClose(given, new Map([["current", error("current")]]), within);
  });

  test.each(WATER)(
    "of the wind through windage under %s equal differences of true estimates",
    (_, pace, within) => {
      const given = caseOf(ROUTE, [base("current", 0.8), base("wind", 5)], { craft: boat, pace });
      expectClose(given, new Map([["wind", error("wind")]]), within);
    },
  );

  test("in a steady uniform along-track wind are -L/g² for the time and -P L/g² for the use", () => {
    const still = gridField("wind", { lon: [-1, 11], lat: [-1, 1] }, () => [2, 0]);
    const { prepared, conditions } = caseOf(routeOf(waypoint("A", 0, 0), waypoint("B", 0, 10)), [still]);
    const cells = trackCells(prepared, conditions, runOf({ prepared, conditions }).profile, {
      length_m: 1e5,
      time_s: 1e9,
    });
    const found = sensitivities(cells ?? []);
    const length = prepared.legs[0]?.track.length as number;
    const sum = (of: Float64Array, j: number) =>
      of.reduce((total, value, n) => total + (n % COMPONENTS === j ? value : 0), 0);
    // Central differences of 1 mm/s leave 1e-9.
    expect(sum(found.time, 0) / (-length / 144)).toBeCloseTo(1, 7);
    expect(sum(found.use, 0) / ((-length / 144) * 1000)).toBeCloseTo(1, 7);
    expect(Math.abs(sum(found.time, 1))).toBeLessThan(1e-6);
    expect(sum(found.timeEastNorth, 0)).toBeCloseTo(sum(found.time, 0), 6);
  });
});
