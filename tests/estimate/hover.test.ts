import { describe, expect, test } from "vitest";
import type { Craft } from "../../src/craft/craft.ts";
import { rotorPower } from "../../src/craft/rotor.ts";
import { tablePower } from "../../src/craft/table.ts";
import { makeFlow } from "../../src/estimate/flow.ts";
import { hover, plainStay, type Stay } from "../../src/estimate/hover.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import { makeStations } from "../../src/estimate/stations.ts";
import type { Field } from "../../src/field/field.ts";
import { sampleField } from "../../src/field/sample.ts";
import { craftOf, DEPARTURE, type Flow, gridField, routeOf, spaced, waypoint } from "./fixtures.ts";

/** Made-up small rotor: 168 W in hover, least power near 10 m/s. */
const power = rotorPower({
  bladeProfilePower_W: 80,
  inducedPower_W: 88,
  tipSpeed_m_s: 120,
  hoverInducedSpeed_m_s: 4,
  fuselageDragRatio: 0.6,
  solidity: 0.05,
  discArea_m2: 0.5,
  airDensity_kg_m3: 1.225,
});
const rotor = craftOf({ power, hotelPerSecond: 12, storePerRate: 1 });

const END = { lat: 50.37, lon: -4.41, height_m: 130 };
const shape = {
  lon: spaced(-5, -4, 4),
  lat: spaced(50, 51, 3),
  hours: [0, 1, 2.5, 4],
  height: [10, 100, 200],
};
/** Turns and grows with time, place and height, and dies away in between. */
const gusty: Flow = (lon, lat, hours, height) => [
  9 * Math.cos(1.7 * hours + lon) + height / 50,
  7 * Math.sin(2.1 * hours - lat) - height / 80,
];

function stay(craft: Craft, field: Field, start: number, seconds: number): Stay {
  const from = waypoint("A", 50.2, -4.8, { height_m: 130 });
  const leg = prepareRoute(routeOf(from, waypoint("B", END.lat, END.lon, { height_m: END.height_m })), [
    field,
  ]).legs[0];
  if (leg === undefined) throw new Error("the route has no leg");
  const flow = makeFlow(field, DEPARTURE);
  flow.cells = leg.cells[0] ?? [];
  flow.heights = leg.heights;
  return hover(craft, flow, leg, makeStations(), start, seconds);
}

function windSpeed(field: Field, seconds: number): number {
  const sample = sampleField(field, END.lat, END.lon, END.height_m, DEPARTURE + 1000 * seconds);
  if (sample.none !== null) throw new Error(sample.none);
  return Math.hypot(sample.u, sample.v);
}

/** Use and strongest wind by the midpoint rule on a fine grid of times, from the field and the power curve alone. */
function fineSum(field: Field, start: number, seconds: number): { use: number; strongest: number } {
  const steps = 200_000;
  let use = 0;
  let strongest = 0;
  for (let n = 0; n < steps; n += 1) {
    const speed = windSpeed(field, start + (seconds * (n + 0.5)) / steps);
    use += ((power.perSecond(speed) + 12) * seconds) / steps;
    strongest = Math.max(strongest, speed);
  }
  return { use, strongest };
}

describe("a rotor's stay in a changing wind", () => {
  test("costs what a fine sum over the time costs, across valid times, within its own bound", () => {
    const field = gridField("wind", shape, gusty);
    for (const [start, seconds] of [
      [0, 14_000],
      [1234.5, 4000],
      [3500, 200],
    ] as const) {
      const found = stay(rotor, field, start, seconds);
      const { use, strongest } = fineSum(field, start, seconds);
      expect(found.failure).toBeNull();
      // Found 4e-12 apart, most of it the midpoint rule's; the bound is at most 2.5e-12.
      expect(Math.abs(found.use - use) / use).toBeLessThan(1e-11);
      expect(found.useBound / use).toBeLessThan(5e-12);
      expect(found.maxWind).toBeLessThanOrEqual(strongest + 1e-4);
      expect(found.maxWind).toBeGreaterThan(0.999 * strongest);
      expect(found.edges).toEqual({ held: false, filled: false, zero: false });
    }
  });

  test("costs the sum of its parts", () => {
    const field = gridField("wind", shape, gusty);
    const whole = stay(rotor, field, 500, 12_000).use;
    const parts = stay(rotor, field, 500, 5000).use + stay(rotor, field, 5500, 7000).use;
    expect(Math.abs(whole - parts) / whole).toBeLessThan(1e-11);
  });

  test("costs the rate of the speed times the time in a steady wind", () => {
    const field = gridField("wind", { lon: [-5, -4], lat: [50, 51] }, () => [6, -8]);
    expect(stay(rotor, field, 0, 300).use).toBeCloseTo((power.perSecond(10) + 12) * 300, 6);
  });

  test("says that the last valid time was held, and costs what that wind costs", () => {
    const held = gridField("wind", { lon: [-5, -4], lat: [50, 51], hours: [0, 1] }, () => [6, -8], {
      beyond: "hold",
    });
    const found = stay(rotor, held, 3000, 1000);
    expect(found.edges.held).toBe(true);
    expect(found.use).toBeCloseTo((power.perSecond(10) + 12) * 1000, 6);
  });

  test("fails at the time at which the field ends", () => {
    const field = gridField("wind", { lon: [-5, -4], lat: [50, 51], hours: [0, 1] }, () => [6, -8]);
    expect(stay(rotor, field, 3000, 1000).failure).toEqual({
      code: "outside-time",
      time: 3600,
      windSpeed: 0,
    });
  });

  test("fails in a wind faster than the power table's rows", () => {
    const table = craftOf({
      power: tablePower("W", [
        { speed_m_s: 0, rate: 100 },
        { speed_m_s: 9, rate: 200 },
      ]),
    });
    const field = gridField("wind", { lon: [-5, -4], lat: [50, 51] }, () => [6, -8]);
    const { failure } = stay(table, field, 60, 300);
    expect(failure).toMatchObject({ code: "outside-power-table", time: 60 });
    expect(failure?.windSpeed).toBeCloseTo(10, 9);
  });
});

describe("a stay that the wind does not touch", () => {
  test("costs the hotel load in water, and nothing where there is none", () => {
    const boat = craftOf({ moves: "water", hotelPerSecond: 0.5 });
    expect(plainStay(boat, 600)).toMatchObject({ use: 300, useBound: 0, failure: null });
    expect(plainStay(boat, 0)).toMatchObject({ use: 0, failure: null });
  });

  test("costs a rotor its hover and its hotel load in still air", () => {
    expect(plainStay(rotor, 10).use).toBeCloseTo(1800, 9);
  });

  test("fails where the power table does not begin at rest", () => {
    const table = craftOf({
      power: tablePower("W", [
        { speed_m_s: 2, rate: 100 },
        { speed_m_s: 9, rate: 200 },
      ]),
    });
    expect(plainStay(table, 10).failure?.code).toBe("outside-power-table");
  });
});
