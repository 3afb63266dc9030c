import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type DepartureWindow, windowDepartures } from "../../src/choose/departure-window.ts";
import { refineWindow } from "../../src/choose/refine.ts";
import { makeSweep, sweepCell, windowCells } from "../../src/choose/window.ts";
import { isPossible, summariseWindow } from "../../src/choose/window-summary.ts";
import type { Craft, Pace } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { tablePower } from "../../src/craft/table.ts";
import { type EstimateInput, estimate, prepareRoutes } from "../../src/estimate/estimate.ts";
import type { Route } from "../../src/estimate/route.ts";
import type { Field } from "../../src/field/field.ts";
import { craftOf, DEPARTURE, gridField, HOUR, spaced, waypoint } from "../estimate/fixtures.ts";

const PERIOD = 12.42;
const box = { lon: spaced(-2, 3, 10), lat: spaced(-2, 2, 8), hours: spaced(-6, 72, 78) };

/** A tidal stream along the equator that turns and grows toward the east. */
function tide(amplitude: number): Field {
  return gridField("current", box, (lon, lat, hours) => {
    const phase = Math.sin((2 * Math.PI * hours) / PERIOD + 0.7 * lon);
    return [amplitude * phase, 0.2 * amplitude * Math.cos(phase + lat)];
  });
}

const boat = craftOf({
  moves: "water",
  power: cubePower({ referenceSpeed_m_s: 5, referencePower_W: 20_000 }),
  speeds: { min: 2, max: 8 },
  hotelPerSecond: 500,
  store: { unit: "J", usable: 6e8 },
});

const routes: readonly Route[] = [
  {
    name: "South",
    waypoints: [waypoint("A", 0, 0), waypoint("B", -0.3, 0.3, { stay_s: 600 }), waypoint("C", 0, 0.7)],
  },
  {
    name: "North",
    waypoints: [
      waypoint("A", 0, 0),
      waypoint("D", 0.4, 0.3, { speed_m_s: 4 }),
      waypoint("C", 0, 0.7, { stay_s: 60 }),
    ],
  },
];

function inputOf(more: Partial<EstimateInput> = {}): EstimateInput {
  return {
    title: "",
    departure: DEPARTURE,
    craft: boat,
    pace: { hold: "through-speed", speed_m_s: 5 },
    reserve: { kind: "share", share: 0.2 },
    fields: [tide(1.5)],
    routes,
    land: null,
    ...more,
  };
}

const day: DepartureWindow = { from: DEPARTURE, to: DEPARTURE + 24 * HOUR, every_s: 3600, speeds_m_s: null };

function sweepOf(input: EstimateInput) {
  return makeSweep(prepareRoutes(input), input);
}

describe("a cell of a window", () => {
  const paces: fc.Arbitrary<{ pace: Pace; speed: number | null }> = fc.oneof(
    fc.record({
      pace: fc.constant<Pace>({ hold: "through-speed", speed_m_s: 5 }),
      speed: fc.option(fc.double({ min: 2, max: 8, noNaN: true })),
    }),
    fc.record({
      pace: fc.constant<Pace>({ hold: "ground-speed", speed_m_s: 4 }),
      speed: fc.option(fc.double({ min: 2, max: 6, noNaN: true })),
    }),
    fc.record({ pace: fc.constant<Pace>({ hold: "power", power_W: 15_000 }), speed: fc.constant(null) }),
  );

  test("equals a lone estimate to the last bit", () => {
    fc.assert(
      fc.property(
        paces,
        fc.integer({ min: -7 * 3600, max: 71 * 3600 }),
        fc.double({ min: 0, max: 3, noNaN: true }),
        ({ pace, speed }, after, amplitude) => {
          // Own speeds are no part of a pace that chooses its speed.
          const chosen = pace.hold === "power" ? routes.slice(0, 1) : routes;
          const input = inputOf({ pace, fields: [tide(amplitude)], routes: chosen });
          const departure = DEPARTURE + 1000 * after;
          const window = {
            from: departure,
            to: departure,
            every_s: 60,
            speeds_m_s: speed === null ? null : [speed],
          };
          const cells = [...windowCells(sweepOf(input), window)];
          const alone = speed === null ? pace : ({ ...pace, speed_m_s: speed } as Pace);
          const { estimate: lone } = estimate({ ...input, departure, pace: alone });
          expect(cells).toHaveLength(chosen.length);
          lone.routes.forEach((route, n) => {
            const cell = cells[n];
            if (cell === undefined) throw new Error("a cell is missing");
            expect(cell.status).toBe(route.status);
            expect([cell.route, cell.departure, cell.arrival]).toEqual([
              route.name,
              route.departure,
              route.arrival,
            ]);
            expect(cell.time_s).toBe(route.totals.time_s);
            expect(cell.use).toBe(route.totals.use);
            expect(cell.remaining).toBe(route.totals.remaining);
            expect(cell.reserve).toBe(route.reserve);
            expect(cell.worst === null).toBe(route.status === "clear");
            if (cell.worst !== null)
              expect(route.findings).toContainEqual(expect.objectContaining(cell.worst));
            if (cell.passage_s !== null && cell.arrival !== null)
              expect(Math.abs(Date.parse(cell.arrival) - departure - 1000 * cell.passage_s)).toBeLessThan(1);
          });
        },
      ),
      { numRuns: 40 },
    );
  });

  test("is worked out only when it, or one of the 256 departures with it, is asked for", () => {
    const input = inputOf();
    let asked = 0;
    const counted: Craft = {
      ...boat,
      get hotelPerSecond() {
        asked += 1;
        return 500;
      },
    };
    const cells = windowCells(sweepOf({ ...input, craft: counted }), { ...day, every_s: 225 });
    expect(asked).toBe(0);
    cells.next();
    const once = asked;
    for (let n = 1; n < 256 * routes.length; n += 1) cells.next();
    expect(asked).toBe(once);
    cells.next();
    expect(asked).toBeGreaterThan(once);
  });

  test("a leg that names its own speed keeps it in a sweep of speeds", () => {
    const own: Route = {
      name: "Own",
      waypoints: [waypoint("A", 0, 0), waypoint("B", 0, 0.5, { speed_m_s: 4 })],
    };
    const cells = [
      ...windowCells(sweepOf(inputOf({ routes: [own] })), { ...day, to: DEPARTURE, speeds_m_s: [3, 6] }),
    ];
    expect(cells.map(({ speed_m_s }) => speed_m_s)).toEqual([3, 6]);
    expect(cells[0]?.time_s).toBe(cells[1]?.time_s);
  });
});

describe("a window", () => {
  test("has every departure, route and speed in that order, both ends included", () => {
    const window = { ...day, to: DEPARTURE + 2.5 * HOUR, speeds_m_s: [4, 5] };
    const cells = [...windowCells(sweepOf(inputOf()), window)];
    expect(windowDepartures(window)).toEqual([0, 1, 2].map((n) => DEPARTURE + n * HOUR));
    expect(cells.map(({ departure, route, speed_m_s }) => [Date.parse(departure), route, speed_m_s])).toEqual(
      [0, 1, 2].flatMap((n) =>
        ["South", "North"].flatMap((route) => [4, 5].map((speed) => [DEPARTURE + n * HOUR, route, speed])),
      ),
    );
  });

  test.each<[string, Partial<DepartureWindow>, RegExp]>([
    [
      "that ends before it begins",
      { to: DEPARTURE - 1 },
      /^a window of departures does not end before it begins; found 2027-05-04T06:00Z to 2027-05-04T05:59:59.999Z$/,
    ],
    ["of NaN", { from: Number.NaN, to: DEPARTURE }, /Invalid time value|does not end/],
    ["without a step", { every_s: 0 }, /^the step of a window of departures is at least 1 s; found 0 s$/],
    ["of a backward step", { every_s: -60 }, /at least 1 s; found -60 s$/],
    [
      "of too many cells",
      { every_s: 1 },
      /^a window has at most 100000 cells .* found 2 × 86401 × 1 = 172802: take a longer step or a shorter window$/,
    ],
    ["without a speed", { speeds_m_s: [] }, /^the speeds of a window are one or more; found none$/],
    [
      "with a speed twice",
      { speeds_m_s: [4, 5, 4] },
      /^the speeds of a window differ; found 4\.0 m\/s \(7\.8 kn\) twice$/,
    ],
    ["with a speed of 0", { speeds_m_s: [0] }, /found 0\.0 m\/s/],
  ])("%s is refused in one sentence", (_, change, message) => {
    expect(() => windowCells(sweepOf(inputOf()), { ...day, ...change })).toThrow(message);
  });

  test("of speeds outside the power table, or beside a pace that holds none, is refused", () => {
    const power = tablePower("W", [
      { speed_m_s: 1, rate: 1000 },
      { speed_m_s: 6, rate: 9000 },
    ]);
    const table = sweepOf(inputOf({ craft: { ...boat, power } }));
    expect(() => windowCells(table, { ...day, speeds_m_s: [5, 7] })).toThrow(
      "a speed of a window lies within the power model of Craft, 1.0 m/s (1.9 kn) to 6.0 m/s (11.7 kn); found 7.0 m/s (13.6 kn)",
    );
    const held = sweepOf(inputOf({ pace: { hold: "least-energy" } }));
    expect(() => windowCells(held, { ...day, speeds_m_s: [5] })).toThrow(
      'speeds to try belong to a pace that holds a through-speed or a ground-speed; found the pace "least-energy"',
    );
  });
});

describe("the summary of a window", () => {
  const input = inputOf({ fields: [tide(3.2)], pace: { hold: "through-speed", speed_m_s: 3 } });
  const window = { ...day, to: DEPARTURE + 70 * HOUR, speeds_m_s: [3, 4.5] };
  const cells = [...windowCells(sweepOf(input), window)];
  const summary = summariseWindow(cells);
  const possible = cells.filter(isPossible);

  test("has cells that can be done and cells that cannot, or it would show nothing", () => {
    expect(possible.length).toBeGreaterThan(10);
    expect(cells.length - possible.length).toBeGreaterThan(10);
  });

  test("names the best by time, by use and by latest departure, none of them a stop", () => {
    const { best } = summary;
    // Figures within 1e-12 of each other are equal.
    const shortest = Math.min(...possible.map(({ passage_s }) => passage_s ?? Infinity));
    const least = Math.min(...possible.map(({ use }) => use ?? Infinity));
    expect(Math.abs((best.time?.passage_s ?? 0) / shortest - 1)).toBeLessThan(1.1e-12);
    expect(Math.abs((best.use?.use ?? 0) / least - 1)).toBeLessThan(1.1e-12);
    expect(best.latest?.departure).toBe(
      possible
        .map(({ departure }) => departure)
        .sort()
        .at(-1),
    );
    expect(summary.possible).toBe(possible.length);
  });

  test("says what stops the departure after the latest", () => {
    const { latest, closedBy } = summary.best;
    const after = cells.find(
      (cell) =>
        cell.route === latest?.route &&
        cell.speed_m_s === latest.speed_m_s &&
        Date.parse(cell.departure) === Date.parse(latest.departure) + HOUR,
    );
    expect(after?.status).toBe("stop");
    expect(closedBy).toEqual(after?.worst);
  });

  test("counts per route why the others cannot be done", () => {
    for (const route of summary.routes) {
      const refused = route.refused.reduce((sum, { cells: count }) => sum + count, 0);
      expect(refused + route.possible).toBe(route.cells);
      for (const { code, from, to, message } of route.refused) {
        const first = cells.find(
          (cell) => cell.route === route.route && cell.departure === from && cell.worst?.code === code,
        );
        expect(first?.worst?.message).toBe(message);
        expect(from <= to).toBe(true);
      }
    }
    const codes = new Set(summary.routes.flatMap(({ refused }) => refused.map(({ code }) => code)));
    expect(codes).toContain("cannot-hold-track");
    expect(codes).toContain("outside-time");
  });

  test("in a steady field takes the first departure of equals, whatever the rounding", () => {
    const steady = gridField("current", { lon: box.lon, lat: box.lat }, () => [0.7, 0.1]);
    const still = [...windowCells(sweepOf(inputOf({ fields: [steady] })), day)];
    expect(summariseWindow(still).best.time?.departure).toBe("2027-05-04T06:00:00.000Z");
    expect(summariseWindow(still).best.use?.departure).toBe("2027-05-04T06:00:00.000Z");
  });

  test("of no cells has no best", () => {
    expect(summariseWindow([])).toEqual({
      cells: 0,
      possible: 0,
      best: { time: null, use: null, latest: null, closedBy: null },
      routes: [],
    });
  });
});

describe("a refined window", () => {
  test("finds the best minute of all by time, by use and by latest departure", () => {
    const input = inputOf({ fields: [tide(1.5)], routes: routes.slice(0, 1) });
    const sweep = sweepOf(input);
    const window = { ...day, to: DEPARTURE + 72 * HOUR };
    const refined = refineWindow(sweep, window, [...windowCells(sweep, window)]);
    const all = [...windowCells(sweep, { ...window, every_s: 60 })];
    const best = summariseWindow(all).best;
    expect(best.time).not.toBeNull();
    expect(refined.best).toEqual(best);
    expect(refined.routes[0]?.best).toEqual(best);
    expect(best.closedBy?.code).toBe("outside-time");
    expect(Number(best.time?.departure.slice(14, 16))).not.toBe(0);
  });

  test("in a steady stream leaves at the first minute of the forecast, whatever the last bits say", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 20, max: 200 }),
        fc.integer({ min: 0, max: 59 }),
        fc.integer({ min: 1, max: 600 }),
        fc.nat(1_000_000),
        (every, odd, opens, seed) => {
          // As another engine's sines may leave it: the same stream at every hour, but for the last bits.
          const bits = (hours: number) => 1 + Number.EPSILON * ((seed * (7 + hours)) % 5);
          const hours = spaced(opens / 60, 72, 40);
          const steady = gridField("current", { ...box, hours }, (_lon, _lat, hour) => [
            0.7 * bits(hour),
            0.1,
          ]);
          const sweep = sweepOf(inputOf({ fields: [steady] }));
          const window = {
            from: DEPARTURE + 1000 * odd,
            to: DEPARTURE + 20 * HOUR,
            every_s: 60 * every,
            speeds_m_s: [5, 3],
          };
          const refined = refineWindow(sweep, window, [...windowCells(sweep, window)]);
          const first = { departure: new Date(DEPARTURE + 60_000 * opens).toISOString() };
          expect(refined.best.time).toMatchObject({ ...first, speed_m_s: 5 });
          expect(refined.best.use).toMatchObject({ ...first, speed_m_s: 3 });
          for (const { best } of refined.routes)
            expect([best.time, best.use]).toEqual([
              expect.objectContaining(first),
              expect.objectContaining(first),
            ]);
        },
      ),
      { numRuns: 10, endOnFailure: true },
    );
  });

  test("is never worse than its cells, and its cells equal lone ones", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.5, max: 3, noNaN: true }),
        fc.integer({ min: 20, max: 200 }),
        fc.integer({ min: 0, max: 59 }),
        (amplitude, every, odd) => {
          const input = inputOf({ fields: [tide(amplitude)] });
          const sweep = sweepOf(input);
          const window = {
            from: DEPARTURE + 1000 * odd,
            to: DEPARTURE + 20 * HOUR,
            every_s: 60 * every,
            speeds_m_s: [3, 5],
          };
          const cells = [...windowCells(sweep, window)];
          const coarse = summariseWindow(cells).best;
          const fine = refineWindow(sweep, window, cells).best;
          if (coarse.time === null || fine.time === null || coarse.use === null || fine.use === null) return;
          // Of equals, which may differ by 1e-12, an earlier one may be the finer.
          expect(fine.time.passage_s).toBeLessThanOrEqual((coarse.time.passage_s ?? 0) * (1 + 1.1e-12));
          expect(fine.use.use).toBeLessThanOrEqual((coarse.use.use ?? 0) * (1 + 1.1e-12));
          expect((fine.latest?.departure ?? "") >= (coarse.latest?.departure ?? "")).toBe(true);
          const prepared = sweep.prepared.find(({ route }) => route.name === fine.use?.route);
          if (prepared === undefined) throw new Error("a route is missing");
          expect(sweepCell(sweep, prepared, Date.parse(fine.use.departure), fine.use.speed_m_s)).toEqual(
            fine.use,
          );
        },
      ),
      { numRuns: 8 },
    );
  });
});
