import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { Craft, Limits } from "../../src/craft/craft.ts";
import type { Conditions } from "../../src/estimate/conditions.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import type { Route } from "../../src/estimate/route.ts";
import type { RouteOutcome } from "../../src/estimate/route-outcome.ts";
import { routeOutcome, routeOutcomes } from "../../src/estimate/route-outcomes.ts";
import { sweepRoute } from "../../src/estimate/route-sweep.ts";
import { type Field, NODE_FILLED, NODE_MISSING } from "../../src/field/field.ts";
import { craftOf, DEPARTURE, gridField, HOUR, routeOf, spaced, waypoint } from "./fixtures.ts";

const box = { lon: spaced(-2, 8, 20), lat: spaced(-3, 5, 16), hours: spaced(-3, 60, 21) };

function swell(strength: number, more: Parameters<typeof gridField>[3] = {}): Field {
  return gridField(
    "wind",
    box,
    (lon, lat, hours) => [
      strength * Math.sin(lon + hours / 5),
      strength * Math.cos(1.3 * lat - hours / 7) * Math.cos(lon / 3),
    ],
    more,
  );
}

const bent = routeOf(waypoint("A", 0, 0), waypoint("B", 2, 3, { path: "rhumb" }), waypoint("C", 1, 6));
const departures = Array.from({ length: 40 }, (_, n) => DEPARTURE + n * 17 * 60_000);

function limitedCraft(limits: Partial<Limits>, more: Partial<Craft> = {}): Craft {
  const plain = craftOf();
  return { ...plain, ...more, limits: { ...plain.limits, ...limits } };
}

function conditionsOf(field: Field, craft: Craft = craftOf()): Conditions {
  return {
    departure: DEPARTURE,
    craft,
    pace: { hold: "through-speed", speed_m_s: 14 },
    reserve: null,
    fields: [field],
  };
}

/** The departures together, and how many of them went through as a sweep. */
function together(
  route: Route,
  conditions: Conditions,
  when: readonly number[] = departures,
  every_s: number | null = null,
) {
  const prepared = { ...prepareRoute(route, conditions.fields), every_s };
  const swept = sweepRoute(prepared, conditions, when).filter((outcome) => outcome !== null).length;
  return { prepared, swept, outcomes: routeOutcomes(prepared, conditions, when) };
}

/** Every departure has the bits of the full estimate made for it alone, whether or not many are compared. */
function expectLone(route: Route, conditions: Conditions, when: readonly number[] = departures): number {
  const swept = [null, 60].map((every_s) => expectLoneEvery(every_s, route, conditions, when));
  expect(swept[1]).toBe(swept[0]);
  return swept[0] as number;
}

function expectLoneEvery(
  every_s: number | null,
  route: Route,
  conditions: Conditions,
  when: readonly number[],
): number {
  const { prepared, swept, outcomes } = together(route, conditions, when, every_s);
  when.forEach((departure, n) => {
    const alone = { ...conditions, departure };
    const { estimate } = estimateRoute(prepared, alone);
    const outcome = outcomes[n] as RouteOutcome;
    expect(outcome).toEqual(routeOutcome(prepared, alone));
    expect(outcome.status).toBe(estimate.status);
    expect(outcome.time_s).toBe(estimate.totals.time_s);
    expect(outcome.use).toBe(estimate.totals.use);
    expect(outcome.remaining).toBe(estimate.totals.remaining);
    expect(outcome.reserve).toBe(estimate.reserve);
    expect(outcome.reached ?? undefined).toEqual(estimate.reached);
    expect(outcome.findings).toEqual(estimate.findings.filter(({ code }) => code !== "no-variation"));
    if (outcome.arrival !== null)
      expect(new Date(Math.round(outcome.arrival)).toISOString()).toBe(estimate.arrival);
  });
  return swept;
}

describe("departures worked out together", () => {
  test("have the bits of lone estimates, whatever the field, the speed and the company", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 14, noNaN: true }),
        fc.double({ min: 6, max: 25, noNaN: true }),
        fc.uniqueArray(fc.integer({ min: -4 * 3600, max: 62 * 3600 }), { minLength: 1, maxLength: 12 }),
        (strength, speed_m_s, after) => {
          const conditions = conditionsOf(swell(strength));
          const pace = { hold: "through-speed", speed_m_s } as const;
          // In no order at all: nothing may depend on who goes beside whom.
          const when = after.map((seconds) => DEPARTURE + 1000 * seconds);
          expectLone(bent, { ...conditions, pace }, when);
        },
      ),
      { numRuns: 60, endOnFailure: true },
    );
  });

  test("all go through where there is nothing to find", () => {
    expect(expectLone(bent, conditionsOf(swell(3)))).toBe(departures.length);
  });

  test("those that meet the end of the field are worked out alone, with its finding", () => {
    const late = departures.map((departure) => departure + 38 * HOUR);
    const swept = expectLone(bent, conditionsOf(swell(3)), late);
    expect(swept).toBeGreaterThan(0);
    expect(swept).toBeLessThan(late.length);
  });

  test("a wind limit that some node exceeds is watched alone", () => {
    const conditions = conditionsOf(swell(6), limitedCraft({ wind_m_s: 8 }));
    expectLone(bent, conditions);
    const { outcomes } = together(bent, conditions);
    expect(outcomes.some(({ findings }) => findings.some(({ code }) => code === "wind-limit"))).toBe(true);
    // No node is faster than √2 times 6 m/s: a higher limit cannot be met.
    expect(together(bent, conditionsOf(swell(6), limitedCraft({ wind_m_s: 8.5 }))).swept).toBe(
      departures.length,
    );
  });

  test("a least ground speed that the wind could undercut is watched alone", () => {
    const conditions = conditionsOf(swell(6), limitedCraft({ groundSpeed_m_s: 9 }));
    expectLone(bent, conditions);
    const { outcomes } = together(bent, conditions);
    expect(outcomes.some(({ findings }) => findings.some(({ code }) => code === "slow-over-ground"))).toBe(
      true,
    );
    expect(together(bent, conditionsOf(swell(6), limitedCraft({ groundSpeed_m_s: 5 }))).swept).toBe(
      departures.length,
    );
  });

  test("gusts, filled and missing nodes, and what is beyond the levels are never passed over", () => {
    const nodes = box.lon.length * box.lat.length;
    const mask = (state: number) => box.hours.map(() => new Uint8Array(nodes).fill(state));
    expect(together(bent, conditionsOf(swell(3), limitedCraft({ gust_m_s: 20 }))).swept).toBe(0);
    for (const state of [NODE_FILLED, NODE_MISSING]) {
      const conditions = conditionsOf(swell(3, { masks: mask(state) }));
      expect(expectLone(bent, conditions, departures.slice(0, 3))).toBe(0);
    }
    const levels = gridField("wind", { ...box, height: [10, 100] }, (lon) => [lon / 4, 1]);
    const high = (height_m: number) =>
      routeOf(waypoint("A", 0, 0, { height_m }), waypoint("B", 1, 2, { height_m }));
    expect(expectLone(high(150), conditionsOf(levels), departures.slice(0, 3))).toBe(0);
    expect(expectLone(high(60), conditionsOf(levels), departures.slice(0, 3))).toBe(3);
  });

  test("a store that runs low is told where it does", () => {
    const craft = craftOf({ store: { unit: "J", usable: 6e7 } });
    const conditions: Conditions = {
      ...conditionsOf(swell(3), craft),
      reserve: { kind: "share", share: 0.1 },
    };
    const swept = expectLone(bent, conditions);
    expect(swept).toBeGreaterThan(0);
    expect(swept).toBeLessThan(departures.length);
  });

  test("a steady field, a field in two tiles with times of their own and a hold beyond the end", () => {
    const steady = gridField("wind", { lon: box.lon, lat: box.lat }, (lon, lat) => [lon / 3, lat / 2]);
    expect(expectLone(bent, conditionsOf(steady))).toBe(departures.length);
    const fine = gridField(
      "wind",
      { lon: spaced(1, 3, 9), lat: spaced(0, 3, 13), hours: spaced(-3, 55, 58) },
      (lon, lat, hours) => [lon + Math.sin(hours), lat / 2],
    );
    const nested: Field = { ...fine, tiles: [...fine.tiles, ...swell(3).tiles] };
    expect(expectLone(bent, conditionsOf(nested))).toBe(departures.length);
    const held = conditionsOf(swell(3, { beyond: "hold" }));
    const late = departures.map((departure) => departure + 38 * HOUR);
    expect(expectLone(bent, held, late)).toBeLessThan(late.length);
  });

  test("a boat in a tidal stream, with stays in harbour and legs at speeds of their own", () => {
    const stream = gridField("current", box, (lon, lat, hours) => [
      1.5 * Math.sin((2 * Math.PI * hours) / 12.42 + lon),
      0.4 * Math.cos(lat + hours / 2),
    ]);
    const route = routeOf(
      waypoint("A", 0, 0),
      waypoint("B", 0.2, 0.5, { stay_s: 5400, speed_m_s: 3 }),
      waypoint("C", 0, 1, { stay_s: 600 }),
    );
    const craft = craftOf({ moves: "water", hotelPerSecond: 40 });
    const conditions: Conditions = {
      ...conditionsOf(stream, craft),
      pace: { hold: "through-speed", speed_m_s: 4 },
      reserve: { kind: "time", time_s: 3600 },
    };
    expect(expectLone(route, conditions)).toBe(departures.length);
  });

  test("near a pole and where the stream comes close to the speed, the other way is gone", () => {
    const north = gridField(
      "wind",
      { lon: spaced(-20, 20, 8), lat: spaced(80, 89, 9), hours: box.hours },
      (lon, _lat, hours) => [2 + Math.sin(lon + hours), 1],
    );
    const polar = routeOf(waypoint("A", 84, -5), waypoint("B", 86, 8));
    expect(expectLone(polar, conditionsOf(north), departures.slice(0, 5))).toBe(0);
    const fast = { ...conditionsOf(swell(9)), pace: { hold: "through-speed", speed_m_s: 9.2 } } as const;
    expectLone(bent, fast, departures.slice(0, 10));
  });

  test("a wind that comes to its limit at a valid time, and no further, is not above it", () => {
    // 1 and 3 m/s turn about, every 3 hours: the limit is met a dozen times on the way.
    const shape = { lon: box.lon, lat: box.lat, hours: spaced(-3, 60, 21) };
    const wind = gridField("wind", shape, (_lon, _lat, hours) => [hours % 2 === 0 ? 1 : 3, 0]);
    const conditions = conditionsOf(wind, limitedCraft({ wind_m_s: 3 }));
    expect(expectLone(bent, conditions)).toBe(departures.length);
    const { outcomes } = together(bent, conditions);
    expect(outcomes.every(({ findings }) => findings.length === 0)).toBe(true);
  });

  test("a ground speed exactly at its least, or below it by rounding, is watched alone", () => {
    for (const [lat, lon] of [
      [0, 3],
      [3, 0],
      [2, 1],
    ] as const) {
      const norm = Math.hypot(lat, lon);
      const wind = gridField("wind", box, () => [(-6 * lon) / norm, (-6 * lat) / norm]);
      const ahead = routeOf(waypoint("A", 0, 0), waypoint("B", lat, lon));
      const limits = { groundSpeed_m_s: 8 };
      expect(expectLone(ahead, conditionsOf(wind, limitedCraft(limits)), departures.slice(0, 2))).toBe(0);
    }
  });

  test("a tile of one valid time alone is never in force", () => {
    const once = gridField("wind", { ...box, hours: [0] }, () => [5, 0]);
    const field: Field = { ...once, tiles: [...once.tiles, ...swell(3).tiles] };
    expect(expectLone(bent, conditionsOf(field), departures.slice(0, 3))).toBe(0);
    const { outcomes } = together(bent, conditionsOf(field), departures.slice(0, 1));
    expect(outcomes[0]?.time_s).toBeCloseTo(
      together(bent, conditionsOf(swell(3)), departures.slice(0, 1)).outcomes[0]?.time_s as number,
      6,
    );
  });

  test("a second field stops, limits and turns by its own valid times", () => {
    const current = gridField("current", { lon: box.lon, lat: box.lat }, () => [0.5, 0]);
    const hourly = (last: number, strength: number) =>
      gridField("wind", { ...box, hours: spaced(0, last, last) }, (_lon, _lat, hours) => [
        hours % 2 === 0 ? strength : -strength,
        0,
      ]);
    const boat = limitedCraft({ wind_m_s: 10 }, { moves: "water" });
    const fields = (last: number) => ({
      ...conditionsOf(current, boat),
      fields: [current, hourly(last, 10)],
    });
    expect(expectLone(bent, fields(60), departures.slice(0, 3))).toBe(0);
    const through = together(bent, fields(60), departures.slice(0, 1)).outcomes[0];
    // One on each leg, and no wind above the limit.
    expect(through?.findings.map(({ code }) => code)).toEqual(Array(2).fill("wind-against-current"));
    const stopped = together(bent, fields(5), departures.slice(0, 1)).outcomes[0];
    expect(stopped?.findings.map(({ code }) => code)).toContain("outside-time");
    expect(stopped?.reached?.time_s).toBeCloseTo(5 * 3600, 6);
  });

  test("paces and craft whose speed or rate depends on the fields are left to lone estimates", () => {
    const prepared = prepareRoute(bent, [swell(3)]);
    const conditions = conditionsOf(swell(3));
    const held = { ...conditions, pace: { hold: "ground-speed", speed_m_s: 9 } } as const;
    expect(sweepRoute(prepared, held, departures).every((outcome) => outcome === null)).toBe(true);
    const none = { ...conditions, fields: [] };
    expect(sweepRoute(prepareRoute(bent, []), none, departures)[0]).toBeNull();
    expectLone(bent, held, departures.slice(0, 3));
    const hovering = routeOf(waypoint("A", 0, 0), waypoint("B", 1, 1, { stay_s: 60 }), waypoint("C", 2, 2));
    expect(expectLone(hovering, conditions, departures.slice(0, 3))).toBe(0);
  });

  test("none for no departures", () => {
    expect(together(bent, conditionsOf(swell(3)), []).outcomes).toEqual([]);
  });
});

describe("a smooth step", () => {
  const east = (hours: number) => routeOf(waypoint("A", 0, 0), waypoint("B", 0, hours / 10));

  test("is exact where the wind grows alike everywhere: s = V t + ∫ w dt", () => {
    // Kinked at the valid times: w = 0, 6, 3 m/s at 0, 3 and 9 hours, for a leg of about 11 hours at 10 m/s.
    const shape = { lon: spaced(-1, 6, 14), lat: [-1, 1], hours: [0, 3, 9, 30] };
    const values: Record<number, number> = { 0: 0, 3: 6, 9: 3, 30: 3 };
    const wind = gridField("wind", shape, (_lon, _lat, hours) => [values[hours] as number, 0]);
    const route = east(36);
    const conditions = { ...conditionsOf(wind), pace: { hold: "through-speed", speed_m_s: 10 } as const };
    const lone = together(route, conditions, [DEPARTURE]);
    const compared = together(route, conditions, [DEPARTURE], 600);
    const { prepared } = lone;
    expect([lone.swept, compared.swept]).toEqual([1, 1]);
    const length = prepared.legs[0]?.track.length as number;
    // 10 t + ∫ w: after 3 h 108 km + 32.4 km, after 9 h 324 km + 32.4 km + 97.2 km = 453.6 km; 13 m/s from there.
    expect(length).toBeLessThan(453_600);
    // Between 3 and 9 h: s = 140,400 + 16 τ - (3 / 21,600) τ² / 2.
    const curvature = 3 / 21_600;
    const rest = length - 140_400;
    const exact = 3 * 3600 + (16 - Math.sqrt(256 - 2 * curvature * rest)) / curvature;
    // 30 panels of 1e-14 each, and two valid times met to a millionth of their interval.
    for (const { outcomes } of [lone, compared])
      expect(Math.abs((outcomes[0]?.time_s as number) - exact) / exact).toBeLessThan(2e-12);
  });

  test("stays within the bound that the full estimate reports, on the same wind on a finer grid", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 8, noNaN: true }),
        fc.integer({ min: 0, max: 30 }),
        (strength, hour) => {
          const shape = (steps: number) => ({
            lon: spaced(-2, 8, steps),
            lat: spaced(-3, 5, steps),
            hours: box.hours,
          });
          // Linear in space, so that a finer grid is the same field cut into shorter panels.
          const flow = (lon: number, lat: number, hours: number) =>
            [(strength * (lon + Math.sin(hours))) / 9, (strength * lat) / 9] as const;
          const departure = DEPARTURE + hour * HOUR;
          const [coarse, fine] = [10, 160].map((steps) => {
            const field = gridField("wind", shape(steps), flow);
            return estimateRoute(prepareRoute(bent, [field]), { ...conditionsOf(field), departure }).estimate
              .totals;
          });
          const apart = Math.abs((coarse?.time_s as number) - (fine?.time_s as number));
          expect(apart).toBeLessThanOrEqual((coarse?.error?.time_s ?? 0) + (fine?.error?.time_s ?? 0));
        },
      ),
      { numRuns: 40, endOnFailure: true },
    );
  });
});
