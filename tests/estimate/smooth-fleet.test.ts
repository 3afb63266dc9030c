import { describe, expect, test } from "vitest";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import { reachOf, SmoothFleet } from "../../src/estimate/smooth-fleet.ts";
import { ABREAST } from "../../src/estimate/smooth-log.ts";
import type { Field } from "../../src/field/field.ts";
import { gridField, HOUR, routeOf, waypoint } from "./fixtures.ts";

const SPEED = 10;
/** A leg inside one cell. */
const route = routeOf(waypoint("A", 0.1, 0.1, { path: "rhumb" }), waypoint("B", 0.9, 0.9, { path: "rhumb" }));

interface Step {
  readonly to: number;
  readonly time: number;
  readonly since: number;
}

/** Takes a fleet over the leg's only panel; the steps of the first, and what the log says. */
function crossed(field: Field, departures: readonly number[], every_s: number | null) {
  const leg = prepareRoute(route, [field]).legs[0];
  if (leg === undefined) throw new Error("the route has no leg");
  expect(leg.panels.piece.length).toBe(1);
  const steps: Step[] = [];
  const taken = (n: number, to: number, time: number, since: number) => {
    if (n === 0) steps.push({ to, time, since });
  };
  const fleet = new SmoothFleet(field, departures, every_s, { taken });
  fleet.setOut({ leg, cells: leg.cells[0] ?? [], speed: SPEED, rate: 2, reach: reachOf(SPEED) });
  fleet.cross(0);
  return { steps, log: fleet.log, length: leg.track.length };
}

/** Wind along both axes by node: `slope` m/s a degree, from `calm`; in the slices from `changed` on `more` is added. */
function windOf(
  hours: readonly number[],
  slope: number,
  changed = Number.POSITIVE_INFINITY,
  more = 0,
): Field {
  const field = gridField("wind", { lon: [0, 1], lat: [0, 1], hours: [...hours] }, (lon, lat, hour) => {
    const value = slope * (lon * lat - 0.3) + (hour >= changed ? more : 0);
    return [value, value];
  });
  // From 1970 on, where a number of ms is precise to a billionth.
  return {
    ...field,
    tiles: field.tiles.map((tile) => ({ ...tile, times: Float64Array.from(hours, (hour) => hour * HOUR) })),
  };
}

describe("a fleet over a panel", () => {
  test("goes in one step where the medium is smooth, and tells of it", () => {
    const { steps, log, length } = crossed(windOf([-1, 30], 0.1), [0, HOUR], 60);
    expect(steps.map(({ to }) => to)).toEqual([length]);
    expect(log.legTime[0]).toBe(steps[0]?.time);
    expect(log.legUse[0]).toBe(2 * (steps[0]?.time as number));
    expect(Array.from(log.state)).toEqual([ABREAST, ABREAST]);
    // A wind that does not change with time.
    expect(log.legTime[1]).toBeCloseTo(log.legTime[0] as number, 9);
  });

  test("goes by halves where it is rougher, and by smaller steps only beyond that", () => {
    const lengths = (slope: number, every_s: number | null) => {
      const { steps, length } = crossed(windOf([-1, 60], slope), [0], every_s);
      return steps.map(({ to }, n) => (to - (steps[n - 1]?.to ?? 0)) / length);
    };
    expect(lengths(0.3, 60)).toEqual([0.5, 0.5]);
    expect(lengths(0.3, null)).toEqual([0.5, 0.5]);
    expect(lengths(3, 60).length).toBeGreaterThan(2);
  });

  test("who meets a valid time at the panel's middle goes on between the next two", () => {
    // Steady until the middle, so that the time there is known from a wind that stays so.
    const { steps } = crossed(windOf([-1, 60], 0.3), [0], 60);
    expect(steps.length).toBe(2);
    const met = (steps[0] as Step).time / 3600;
    const hours = [-1, met, met + 5, 60];
    const changing = windOf(hours, 0.3, met + 4, 1);
    const compared = crossed(changing, [0], 60);
    const lone = crossed(changing, [0], null);
    expect(Math.abs((compared.steps[0] as Step).time - 3600 * met)).toBeLessThan(1e-9);
    expect(compared.steps[1]?.since).toBeCloseTo(3600 * met, 9);
    // 1 m/s more in either direction within 5 hours: it is felt, alike on both ways.
    expect((compared.log.legTime[0] as number) / (steps[0] as Step).time).toBeLessThan(1.99);
    expect(compared.log.legTime[0]).toBeCloseTo(lone.log.legTime[0] as number, 6);
  });
});
