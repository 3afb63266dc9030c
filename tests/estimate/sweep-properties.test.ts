import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { Conditions } from "../../src/estimate/conditions.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import type { Route, Waypoint } from "../../src/estimate/route.ts";
import type { RouteOutcome } from "../../src/estimate/route-outcome.ts";
import { routeOutcome, routeOutcomes } from "../../src/estimate/route-outcomes.ts";
import { sweepRoute } from "../../src/estimate/route-sweep.ts";
import { type Field, NODE_FILLED, NODE_MISSING } from "../../src/field/field.ts";
import { craftOf, DEPARTURE, type Flow, gridField, HOUR, routeOf, spaced, waypoint } from "./fixtures.ts";

/** A number -1..1 that hangs on the whole numbers given and on nothing else. */
function noise(...whole: number[]): number {
  let hash = 2166136261;
  for (const value of whole) {
    hash = Math.imul(hash ^ Math.round(value), 16777619);
    hash = Math.imul(hash ^ (hash >>> 15), 2246822519);
    hash ^= hash >>> 13;
  }
  return (hash >>> 0) / 2 ** 31 - 1;
}

/** Media at a strength of 1, by node; the last is a tidal stream that turns within any long panel. */
const MEDIA: Record<string, (cell: number) => Flow> = {
  noise: () => (lon, lat, hours) => [
    noise(lon * 1e6, lat * 1e6, hours * 1e3, 1) / 1.5,
    noise(lon * 1e6, lat * 1e6, hours * 1e3, 2) / 1.5,
  ],
  shear: (cell) => (lon, lat, hours) => [
    Math.sin(lon / cell + hours) / 1.5,
    Math.cos(lat / cell - hours) / 1.5,
  ],
  swell: (cell) => (lon, lat, hours) => [
    Math.sin(lon / cell / 4 + hours / 9) / 1.5,
    Math.cos(lat / cell / 5 - hours / 7) / 1.5,
  ],
  tide: () => (lon, lat, hours) => [
    0.9 * Math.sin((2 * Math.PI * hours) / 12.42 + lon),
    0.3 * Math.cos((2 * Math.PI * hours) / 12.42 + lat),
  ],
};

/** Masks with a node in fifty of this state. */
function specks(slices: number, nodes: number, state: number): Uint8Array[] {
  return Array.from({ length: slices }, (_, slice) =>
    Uint8Array.from({ length: nodes }, (_unused, node) => (noise(slice, node, 3) > 0.96 ? state : 0)),
  );
}

const situation = fc.record({
  medium: fc.constantFrom(...Object.keys(MEDIA)),
  speed_m_s: fc.constantFrom(0.8, 3, 12, 30),
  strength: fc.double({ min: 0, max: 0.95, noNaN: true }),
  cell: fc.constantFrom(0.05, 0.25, 2.5),
  hours: fc.constantFrom(0, 0.25, 1, 3, 720),
  /** Length of a leg in cells: from millimetres to several cells. */
  cells: fc.constantFrom(1e-7, 1e-4, 0.1, 1, 2.5),
  bearings: fc.array(fc.constantFrom(0, 37, 90, 141, 180, 233, 270), { minLength: 1, maxLength: 3 }),
  path: fc.constantFrom("geodesic" as const, "rhumb" as const),
  stay_s: fc.constantFrom(0, 0, 0.001, 3600),
  /** West end of the grid: across the seam the grid goes round the world. */
  seam: fc.boolean(),
  heights: fc.constantFrom(null, null, [10, 60] as const, [100, 350] as const),
  state: fc.constantFrom(0, 0, NODE_FILLED, NODE_MISSING),
  nested: fc.constantFrom("none", "none", "steady", "once", "hourly"),
  beyond: fc.constantFrom("stop" as const, "hold" as const),
  outside: fc.constantFrom("stop" as const, "zero" as const),
  limit: fc.constantFrom(null, 0.5, 1),
  /** Each by a valid time and ms after it: none may depend on who goes beside whom. */
  departures: fc.array(
    fc.tuple(fc.integer({ min: -1, max: 6 }), fc.constantFrom(0, 0, 1, -1, 0.25, -0.25, 0.5, 1234, 777_777)),
    { minLength: 1, maxLength: 8 },
  ),
  /** Step of the departures compared: between none and all valid times are many. */
  every_s: fc.constantFrom(null, 1, 200, 1e5),
});
type Situation = typeof situation extends fc.Arbitrary<infer T> ? T : never;

function fieldOf(given: Situation): Field {
  const { cell, heights, medium } = given;
  const strength = given.strength * given.speed_m_s;
  const unit = (MEDIA[medium] as (cell: number) => Flow)(cell);
  const flow: Flow = (lon, lat, hours, height) => {
    const [u, v] = unit(lon, lat, hours, height);
    const part = strength * (heights === null ? 1 : 0.5 + height / 600);
    return [part * u, part * v];
  };
  const lat = spaced(40 - 2 * cell, 40 + 6 * cell, 8);
  const lon = given.seam ? spaced(-180, 180, 144) : spaced(179 - 2 * cell, 179 + 6 * cell, 8);
  const hours = given.hours === 0 ? {} : { hours: spaced(-given.hours, 40 * given.hours, 41) };
  const height = heights === null ? {} : { height: [10, 100, 300] };
  const shape = { lon, lat, ...hours, ...height };
  const nodes = lon.length * lat.length * (heights === null ? 1 : 3);
  const { beyond, outside, state } = given;
  const masks = state === 0 ? {} : { masks: specks(given.hours === 0 ? 1 : 42, nodes, state) };
  const field = gridField("current", shape, flow, { beyond, outside, ...masks });
  if (given.nested === "none") return field;
  const inner = { lon: spaced(179, 179 + cell, 5), lat: spaced(40, 40 + cell, 7), ...height };
  const times = { steady: {}, once: { hours: [0] }, hourly: { hours: spaced(-1, 30, 31) } }[given.nested];
  return { ...field, tiles: [...gridField("current", { ...inner, ...times }, flow).tiles, ...field.tiles] };
}

function routeIn({ cell, cells, bearings, path, stay_s, heights }: Situation): Route {
  const at = (n: number) => (heights === null ? {} : { height_m: heights[n % 2] as number });
  const waypoints: Waypoint[] = [waypoint("W0", 40 + 0.3 * cell, 179 + 0.4 * cell, at(0))];
  bearings.forEach((bearing, n) => {
    const { lat, lon } = waypoints[n] as Waypoint;
    const along = cell * cells;
    const north = lat + along * Math.cos((bearing * Math.PI) / 180);
    const east = lon + along * Math.sin((bearing * Math.PI) / 180);
    waypoints.push(waypoint(`W${n + 1}`, north, east, { path, stay_s, ...at(n + 1) }));
  });
  return routeOf(...waypoints);
}

function conditionsIn({ speed_m_s, limit, strength }: Situation, fields: readonly Field[]): Conditions {
  const plain = craftOf({ moves: "water" });
  const least = limit === null ? null : speed_m_s * (1 - limit * strength);
  return {
    departure: DEPARTURE,
    craft: { ...plain, limits: { ...plain.limits, groundSpeed_m_s: least } },
    pace: { hold: "through-speed", speed_m_s },
    reserve: { kind: "time", time_s: 60 },
    fields,
  };
}

describe("a departure has the same bits in company, alone and in full", () => {
  test("in rough fields, tidal streams, nested tiles, between levels, across the seam, on legs of millimetres, at and around valid times", () => {
    let swept = 0;
    fc.assert(
      fc.property(situation, (given) => {
        const field = fieldOf(given);
        const prepared = { ...prepareRoute(routeIn(given), [field]), every_s: given.every_s };
        const conditions = conditionsIn(given, [field]);
        const when = given.departures.map(([slice, ms]) => DEPARTURE + slice * given.hours * HOUR + ms);
        const outcomes = routeOutcomes(prepared, conditions, when);
        swept += sweepRoute(prepared, conditions, when).filter((outcome) => outcome !== null).length;
        when.forEach((departure, n) => {
          const alone = { ...conditions, departure };
          const outcome = outcomes[n] as RouteOutcome;
          expect(outcome).toEqual(routeOutcome(prepared, alone));
          const { estimate } = estimateRoute(prepared, alone);
          const { time_s, use, remaining } = estimate.totals;
          expect([outcome.time_s, outcome.use, outcome.remaining]).toEqual([time_s, use, remaining]);
          expect(outcome.reached ?? undefined).toEqual(estimate.reached);
          expect(outcome.findings).toEqual(estimate.findings.filter(({ code }) => code !== "no-variation"));
        });
      }),
      { numRuns: 250, endOnFailure: true },
    );
    expect(swept).toBeGreaterThan(60);
  });

  test("that come to the end of a panel, after a stay of a year, so near to a valid time that rounding decides whether it is met", () => {
    // The moments are told from 1970 on, so that valid times are precise; a year after the departure a second is, to 7 billionths.
    const axis = spaced(-1.5, 1.5, 6);
    const route = routeOf(
      waypoint("A", -0.7, -0.6),
      waypoint("B", 0.3, 0.5, { stay_s: 4e7 }),
      waypoint("C", 0.9, 1.3),
    );
    const conditionsOn = (field: Field): Conditions => ({
      departure: 0,
      craft: craftOf({ moves: "water" }),
      pace: { hold: "through-speed", speed_m_s: 10 },
      reserve: null,
      fields: [field],
    });
    const metAt = (second: number): Field => {
      const hours = [-1, second / 3600, second / 3600 + 3, second / 3600 + 7];
      const field = gridField("current", { lon: axis, lat: axis, hours }, (lon, lat, hour) => [
        2 * Math.sin(lon + (hour > second / 3600 + 1 ? 1 : 0)),
        2 * Math.cos(lat),
      ]);
      const times = Float64Array.from(hours, (hour) => hour * HOUR);
      return { ...field, tiles: field.tiles.map((tile) => ({ ...tile, times })) };
    };
    const estimateOn = (field: Field) =>
      estimateRoute({ ...prepareRoute(route, [field]), every_s: 60 }, conditionsOn(field));
    const moments = Array.from(estimateOn(metAt(5e7)).profile.time_s).filter((time) => time > 4e7);
    for (const moment of moments.slice(0, -1)) {
      for (let billionths = -20; billionths <= 20; billionths += 1) {
        const field = metAt(moment + billionths * 1e-9);
        const prepared = { ...prepareRoute(route, [field]), every_s: 60 };
        const outcome = sweepRoute(prepared, conditionsOn(field), [0])[0];
        expect(outcome?.time_s).toBe(estimateOn(field).estimate.totals.time_s);
      }
    }
  });

  test("five hundred of them, in no order and many twice", () => {
    const field = gridField(
      "current",
      { lon: spaced(-1, 2, 12), lat: spaced(-1, 2, 12), hours: spaced(-3, 60, 63) },
      (lon, lat, hours) => [1.2 * Math.sin(hours / 2 + lon), 0.5 * Math.cos(hours / 3 + lat)],
    );
    const route = routeOf(waypoint("A", 0, 0), waypoint("B", 1, 1.3));
    const prepared = { ...prepareRoute(route, [field]), every_s: 60 };
    const conditions: Conditions = {
      departure: DEPARTURE,
      craft: craftOf({ moves: "water" }),
      pace: { hold: "through-speed", speed_m_s: 3 },
      reserve: null,
      fields: [field],
    };
    const when = Array.from({ length: 500 }, (_, n) => DEPARTURE + ((n * 7919) % 331) * 60_000);
    const outcomes = sweepRoute(prepared, conditions, when);
    const inOrder = [...new Set(when)].sort((a, b) => a - b);
    const times = new Map(
      sweepRoute(prepared, conditions, inOrder).map((outcome, n) => [inOrder[n], outcome]),
    );
    expect(outcomes.every((outcome) => outcome !== null)).toBe(true);
    when.forEach((departure, n) => {
      expect(outcomes[n]).toEqual(times.get(departure));
    });
  });
});

/** The same medium by nodes three times as dense and valid times twice: linear between, so that nothing but the steps differs. */
function finer(flow: Flow, cell: number, hours: number): Flow {
  const floor = (value: number, by: number) => Math.floor(value / by + 1e-9) * by;
  return (lon, lat, hour, height) => {
    const [west, south, before] = [floor(lon, cell), floor(lat, cell), floor(hour, hours)];
    const [x, y, t] = [(lon - west) / cell, (lat - south) / cell, (hour - before) / hours];
    const sum = [0, 0];
    for (const [east, wx] of [
      [0, 1 - x],
      [1, x],
    ] as const)
      for (const [up, wy] of [
        [0, 1 - y],
        [1, y],
      ] as const)
        for (const [later, wt] of [
          [0, 1 - t],
          [1, t],
        ] as const) {
          const node = flow(west + east * cell, south + up * cell, before + later * hours, height);
          sum[0] = (sum[0] as number) + wx * wy * wt * node[0];
          sum[1] = (sum[1] as number) + wx * wy * wt * node[1];
        }
    return sum as [number, number];
  };
}

describe("the true error", () => {
  test("is below the bound, and the bound below 1e-10 of the time: against the general steps on a finer cut of the same medium", () => {
    fc.assert(
      fc.property(
        fc.constantFrom("noise", "shear", "swell"),
        fc.constantFrom(3, 12),
        fc.double({ min: 0.1, max: 0.6, noNaN: true }),
        fc.constantFrom(0.25, 2.5),
        fc.constantFrom(1, 3, 12),
        fc.integer({ min: 0, max: 20_000 }),
        fc.integer({ min: 0, max: 359 }),
        fc.constantFrom(null, 60),
        (medium, speed_m_s, share, cell, hours, seconds, bearing, every_s) => {
          const unit = (MEDIA[medium] as (cell: number) => Flow)(cell);
          const flow: Flow = (...place) => {
            const [u, v] = unit(...place);
            return [share * speed_m_s * u, share * speed_m_s * v];
          };
          const steps = Math.ceil((6 * 1.5 * cell * 111) / (speed_m_s * 0.4 * 3.6) / hours) + 8;
          const shape = (dense: number, denser: number) => ({
            lon: spaced(-3 * cell, 3 * cell, 6 * dense),
            lat: spaced(-3 * cell, 3 * cell, 6 * dense),
            hours: spaced(-hours, (steps - 1) * hours, steps * denser),
          });
          const [sin, cos] = [Math.sin(bearing), Math.cos(bearing)];
          const route = routeOf(
            waypoint("A", -1.1 * cell * cos, -1.1 * cell * sin),
            waypoint("B", 1.3 * cell * cos, 1.2 * cell * sin),
          );
          const smooth = gridField("current", shape(1, 1), flow);
          const dense = gridField("current", shape(3, 2), finer(flow, cell, hours));
          // Beside a second field no smooth step is taken.
          const calm = gridField("wind", { lon: [-180, 180], lat: [-80, 80] }, () => [0, 0]);
          const [own, other] = [[smooth], [dense, calm]].map((fields) => {
            const conditions: Conditions = {
              departure: DEPARTURE + 1000 * seconds,
              craft: craftOf({ moves: "water" }),
              pace: { hold: "through-speed", speed_m_s },
              reserve: null,
              fields,
            };
            return estimateRoute({ ...prepareRoute(route, fields), every_s }, conditions).estimate.totals;
          });
          const time = own?.time_s as number;
          const bounds = (own?.error?.time_s as number) + (other?.error?.time_s as number);
          expect(Math.abs(time - (other?.time_s as number))).toBeLessThanOrEqual(bounds);
          expect(own?.error?.time_s as number).toBeLessThan(1e-10 * time);
        },
      ),
      { numRuns: 60, endOnFailure: true },
    );
  });

  test("does not grow with the tides of a week: a late start is made up for by the next turn of the stream", () => {
    // The same stream everywhere, linear between the hours: s = V T + Σ of trapezia, so that the time of the length follows from the last hour.
    const stream = (hour: number) => 1.2 * Math.sin((2 * Math.PI * hour) / 12.42);
    const hours = spaced(-1, 200, 201);
    const field = gridField("current", { lon: [-1, 20], lat: [-1, 1], hours }, (_lon, _lat, hour) => [
      stream(hour),
      0,
    ]);
    const prepared = prepareRoute(routeOf(waypoint("A", 0, 0), waypoint("B", 0, 13)), [field]);
    const conditions: Conditions = {
      departure: DEPARTURE,
      craft: craftOf({ moves: "water" }),
      pace: { hold: "through-speed", speed_m_s: 2.5 },
      reserve: null,
      fields: [field],
    };
    const { time_s, use, error } = estimateRoute(prepared, conditions).estimate.totals;
    let left = prepared.legs[0]?.track.length as number;
    let hour = 0;
    const gone = () => 3600 * (2.5 + (stream(hour) + stream(hour + 1)) / 2);
    for (; left > gone(); hour += 1) left -= gone();
    const rise = (stream(hour + 1) - stream(hour)) / 3600;
    const speed = 2.5 + stream(hour);
    const exact = 3600 * hour + (2 * left) / (speed + Math.sqrt(speed * speed + 2 * rise * left));
    expect(exact).toBeGreaterThan(6 * 86400);
    expect(Math.abs((time_s as number) - exact)).toBeLessThan(error?.time_s as number);
    expect(error?.time_s as number).toBeLessThan(1e-11 * exact);
    expect(error?.use as number).toBeLessThan(1e-10 * (use as number));
  });

  test("does not feel how far apart the valid times are: a month, met in an hour's leg", () => {
    // u = 0 until the valid time, then rising to 13 m/s in 30 days: (V T) + ½ u' (T - t)² = L, in a month's interval each.
    const rate = 13 / (720 * 3600);
    const wind = gridField(
      "wind",
      { lon: [-1, 2], lat: [-1, 1], hours: [-720, 0.5, 720.5] },
      (_lon, _lat, hours) => [hours > 1 ? 13 : 0, 0],
    );
    const route = routeOf(waypoint("A", 0, 0), waypoint("B", 0, 0.6));
    const prepared = prepareRoute(route, [wind]);
    const conditions: Conditions = {
      departure: DEPARTURE,
      craft: craftOf(),
      pace: { hold: "through-speed", speed_m_s: 15 },
      reserve: null,
      fields: [wind],
    };
    const outcome = sweepRoute(prepared, conditions, [DEPARTURE])[0] as RouteOutcome;
    const rest = (prepared.legs[0]?.track.length as number) - 15 * 1800;
    const exact = 1800 + (2 * rest) / (15 + Math.sqrt(225 + 2 * rate * rest));
    expect(Math.abs((outcome.time_s as number) - exact) / exact).toBeLessThan(1e-12);
  });

  test("of what is met along the way is none either where a craft sets out just before a valid time", () => {
    // The shortest time that a departure can tell is a quarter of a microsecond: not half of one of a micrometre's way.
    const field = gridField(
      "current",
      { lon: [-1, 1], lat: [-1, 1], hours: [-1, 0, 3] },
      (_lon, _lat, hours) => [hours === 0 ? 1 : 0, 0],
    );
    const prepared = prepareRoute(routeOf(waypoint("A", 0, 0), waypoint("B", 0, 0.001)), [field]);
    for (const before of [0, 2 ** -12, 2 ** -11, 0.5]) {
      const conditions: Conditions = {
        departure: DEPARTURE - before,
        craft: craftOf({ moves: "water" }),
        pace: { hold: "through-speed", speed_m_s: 0.5 },
        reserve: null,
        fields: [field],
      };
      const { estimate, profile } = estimateRoute(prepared, conditions);
      const { time_s, error } = estimate.totals;
      // u = 1 + t/3600 up to the valid time, 1 - t/10,800 from there: 1.5 t - t²/21,600 = what is left of the length.
      const early = before / 1000;
      const left = (prepared.legs[0]?.track.length as number) - early * (1.5 - early / 7200);
      const after = (2 * left) / (1.5 + Math.sqrt(2.25 - (2 * left) / 10_800));
      expect(Math.abs((time_s as number) - early - after)).toBeLessThan(1e-10);
      expect(error?.time_s as number).toBeLessThan(1e-10 * (time_s as number));
      const last = profile.groundSpeed_m_s.at(-1) as number;
      expect(Math.abs(last - (1.5 - after / 10_800))).toBeLessThan(1e-12);
    }
  });
});
