import { describe, expect, test } from "vitest";
import { type WhatIf, whatIfText } from "../../src/choose/what-if.ts";
import { whatIfResults, whatIfVariants, withWorst } from "../../src/choose/what-if-results.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import type { Field, Tile } from "../../src/field/field.ts";
import { craftOf, DEPARTURE, gridField, HOUR, routeOf, spaced, waypoint } from "../estimate/fixtures.ts";
import { type Case, caseOf, runOf } from "./error-fixtures.ts";

const PLAIN: WhatIf = {
  name: "as planned",
  wind: 1,
  current: 1,
  veer_deg: 0,
  speed_m_s: 0,
  consumption: 0,
  late_s: 0,
};

const shape = { lon: spaced(-6, 0, 12), lat: spaced(47, 52, 10), hours: spaced(-2, 60, 20) };
const current = gridField("current", shape, (lon, lat, h) => [
  0.8 * Math.sin(lon + h / 3),
  0.5 * Math.cos(lat - h / 5),
]);
const wind = gridField("wind", shape, (lon, lat, h) => [
  5 + Math.sin(lon * 2 + h / 4),
  4 * Math.cos(lat + h / 6),
]);
const gusty: Field = {
  ...wind,
  tiles: wind.tiles.map((tile) => ({
    ...tile,
    gusts: tile.slices.map((s) => new Float64Array(s.length / 2).fill(12)),
  })),
};

const boat = craftOf({
  moves: "water",
  power: cubePower({ referenceSpeed_m_s: 6, referencePower_W: 60_000 }),
  windage: { frontalArea_m2: 20, dragCoefficient: 0.9, efficiency: 0.6, airDensity_kg_m3: 1.225 },
  hotelPerSecond: 700,
  store: { unit: "J", usable: 6e9 },
});

const ROUTE = routeOf(
  waypoint("A", 48, -5),
  waypoint("B", 49.2, -3.5, { stay_s: 3600 }),
  waypoint("C", 50.7, -1.2, { path: "rhumb", speed_m_s: 5 }),
);

const given = caseOf(ROUTE, [current, gusty], { craft: boat, pace: { hold: "through-speed", speed_m_s: 6 } });

function one(base: Case, change: Partial<WhatIf>) {
  const [results] = whatIfResults([base.prepared], [base.conditions], [{ ...PLAIN, ...change }]);
  const result = results?.[0];
  if (result === undefined) throw new Error("no result");
  return result;
}

/** The whole field with its vectors changed, node by node. */
function mapped(field: Field, change: (u: number, v: number) => readonly [number, number]): Field {
  const tiles: Tile[] = field.tiles.map((tile) => ({
    ...tile,
    slices: tile.slices.map((slice) =>
      slice.map((_, i) => change(slice[i & ~1] as number, slice[i | 1] as number)[i & 1] as number),
    ),
  }));
  return { ...field, tiles };
}

function estimated(fields: readonly Field[], change: Partial<Case["conditions"]> = {}) {
  return estimateRoute(prepareRoute(ROUTE, fields), { ...given.conditions, fields, ...change }).estimate;
}

describe("a what-if", () => {
  test("that changes nothing is the estimate itself, bit for bit", () => {
    const { totals, arrival, status } = runOf(given).estimate;
    const same = one(given, {});
    expect([same.time_s, same.use, same.remaining, same.arrival, same.status]).toEqual([
      totals.time_s,
      totals.use,
      totals.remaining,
      arrival,
      status,
    ]);
  });

  test.each([
    ["the wind by a factor", { wind: 1.3 }, [1, 1.3, 0]],
    ["the wind veered", { veer_deg: 25 }, [1, 1, 25]],
    ["the wind backed and stronger", { wind: 1.5, veer_deg: -40 }, [1, 1.5, -40]],
    ["the current by a factor", { current: 0.6 }, [0.6, 1, 0]],
  ] as const)(
    "of %s is the estimate in the field changed as a whole",
    (_, change, [ofCurrent, ofWind, veer]) => {
      const angle = (veer * Math.PI) / 180;
      const fields = [
        mapped(current, (u, v) => [ofCurrent * u, ofCurrent * v]),
        mapped(gusty, (u, v) => [
          ofWind * (u * Math.cos(angle) + v * Math.sin(angle)),
          ofWind * (v * Math.cos(angle) - u * Math.sin(angle)),
        ]),
      ];
      const whole = estimated(fields);
      const found = one(given, change);
      // Products in another order.
      expect(Math.abs((found.time_s as number) / (whole.totals.time_s as number) - 1)).toBeLessThan(1e-13);
      expect(Math.abs((found.use as number) / (whole.totals.use as number) - 1)).toBeLessThan(1e-13);
    },
  );

  test("veers a wind from the north to one from the east by 90°", () => {
    const northerly = gridField("wind", { lon: [-1, 6], lat: [-1, 1] }, () => [0, -3]);
    const base = caseOf(routeOf(waypoint("A", 0, 0), waypoint("B", 0, 5)), [northerly]);
    const { track } = base.prepared.legs[0] as Case["prepared"]["legs"][number];
    // From the east it is against an eastbound craft: V - 3.
    expect(one(base, { veer_deg: 90 }).time_s).toBeCloseTo(track.length / 7, 6);
    expect(one(base, { veer_deg: -90 }).time_s).toBeCloseTo(track.length / 13, 6);
  });

  test("of extra consumption spends that share more, in the same time, stays included", () => {
    const { totals } = runOf(given).estimate;
    const more = one(given, { consumption: 0.1 });
    expect(more.time_s).toBe(totals.time_s);
    expect((more.use as number) / (totals.use as number)).toBeCloseTo(1.1, 12);
  });

  test("of a later departure is the estimate at that departure, bit for bit", () => {
    const later = estimated([current, gusty], { departure: DEPARTURE + HOUR });
    const late = one(given, { late_s: 3600 });
    expect([late.time_s, late.use, late.departure]).toEqual([
      later.totals.time_s,
      later.totals.use,
      "2027-05-04T07:00:00.000Z",
    ]);
  });

  test("of another speed changes the legs that name their own too", () => {
    const legs = routeOf(
      ...ROUTE.waypoints.map((each) => (each.speed_m_s === null ? each : { ...each, speed_m_s: 4.5 })),
    );
    const slower = caseOf(legs, [current, gusty], {
      craft: boat,
      pace: { hold: "through-speed", speed_m_s: 5.5 },
    });
    expect(one(given, { speed_m_s: -0.5 }).use).toBe(runOf(slower).estimate.totals.use);
  });

  test("of stronger gusts reaches the craft's gust limit", () => {
    const limited = { ...boat, limits: { ...boat.limits, gust_m_s: 15 } };
    const base = { ...given, conditions: { ...given.conditions, craft: limited } };
    expect(one(base, { wind: 1.2 }).status).toBe("caution");
    expect(one(base, { wind: 1.3 }).worst?.code).toBe("gust-limit");
  });

  test("that asks for a speed which the craft or the pace has not is one sentence", () => {
    expect(() => one(given, { name: "too slow", speed_m_s: -5 })).toThrow(
      'the what-if "too slow" keeps the speed above 0 and within the power model of Craft; found 0.0 m/s (0.0 kn)',
    );
    const least = caseOf(ROUTE, [current], {
      craft: { ...boat, speeds: { min: 2, max: 8 } },
      pace: { hold: "least-energy" },
    });
    expect(() => one(least, { name: "faster", speed_m_s: 1 })).toThrow(
      'the what-if "faster" changes a speed, which needs a pace that holds the through-speed or the ground-speed; found the pace "least-energy"',
    );
  });

  test("that stops on the way says how far it came", () => {
    const end = one(given, { late_s: 55 * 3600 });
    expect([end.status, end.time_s, end.worst?.code, end.reached?.leg]).toEqual([
      "stop",
      null,
      "outside-time",
      1,
    ]);
  });
});

describe("what-ifs of several routes", () => {
  const hovering = craftOf({ power: cubePower({ referenceSpeed_m_s: 6, referencePower_W: 60_000 }) });
  const routes = [
    routeOf(...ROUTE.waypoints.map((each) => ({ ...each, speed_m_s: null }))),
    routeOf(waypoint("E", 51.5, -1), waypoint("F", 47.5, -5.5), waypoint("G", 48, -0.5)),
  ];
  const cases = routes.map((route) =>
    caseOf(route, [gusty], { craft: hovering, pace: { hold: "through-speed", speed_m_s: 14 } }),
  );
  const stronger = { ...PLAIN, wind: 1.25, veer_deg: 15 };

  test("are those of each route alone, bit for bit", () => {
    const together = whatIfResults(
      cases.map(({ prepared }) => prepared),
      cases.map(({ conditions }) => conditions),
      [stronger],
    );
    cases.forEach((each, n) => {
      expect(together[n]?.[0]).toEqual(one(each, stronger));
    });
  });

  test("keep levels, gaps and tiles: figures and findings are those of the fields changed as a whole", () => {
    const levels = gridField("wind", { ...shape, height: [10, 100, 300] }, (lon, lat, h, height) => [
      2 + height / 100 + Math.sin(lon + h / 4),
      Math.cos(lat - h / 7),
    ]);
    const [low] = levels.tiles as [Tile];
    const masks = low.slices.map((slice) =>
      Uint8Array.from({ length: slice.length / 2 }, (_, n) => (n % 7 === 3 ? 1 : 0)),
    );
    const patch = gridField("wind", { ...shape, lon: spaced(-3, -1.5, 3), lat: spaced(48, 50, 4) }, () => [
      1, -6,
    ]);
    const field: Field = { ...levels, tiles: [...patch.tiles, { ...low, masks }] };
    const route = routeOf(
      waypoint("P", 48, -5, { height_m: 20 }),
      waypoint("Q", 50.5, -2.2, { height_m: 250, stay_s: 600 }),
      waypoint("R", 48.7, -1.1, { height_m: 60 }),
    );
    const base = caseOf(route, [field], { craft: hovering, pace: { hold: "through-speed", speed_m_s: 16 } });
    const whole = caseOf(route, [mapped(field, (u, v) => [1.5 * u, 1.5 * v])], {
      craft: hovering,
      pace: { hold: "through-speed", speed_m_s: 16 },
    });
    const { totals, status } = runOf(whole).estimate;
    const found = one(base, { wind: 1.5 });
    expect(Math.abs((found.use as number) / (totals.use as number) - 1)).toBeLessThan(1e-13);
    expect([found.status, found.worst?.code]).toEqual([status, "gap-filled"]);
  });

  test("of a craft that hovers meet the changed wind while it stays", () => {
    const angle = (15 * Math.PI) / 180;
    const whole = mapped(gusty, (u, v) => [
      1.25 * (u * Math.cos(angle) + v * Math.sin(angle)),
      1.25 * (v * Math.cos(angle) - u * Math.sin(angle)),
    ]);
    const [base] = cases as [Case, Case];
    const { use } = runOf({ ...base, conditions: { ...base.conditions, fields: [whole] } }).estimate.totals;
    // Products in another order.
    expect(Math.abs((one(base, stronger).use as number) / (use as number) - 1)).toBeLessThan(1e-13);
  });
});

describe("the worst of the what-ifs", () => {
  test("decides the route's status, and the finding says which", () => {
    const route = runOf(given).estimate;
    const short = { ...boat, store: { ...boat.store, usable: (route.totals.use as number) * 1.15 } };
    const base = {
      ...given,
      conditions: { ...given.conditions, craft: short, reserve: { kind: "share", share: 0.05 } as const },
    };
    const own = runOf(base).estimate;
    const whatIfs = [
      PLAIN,
      { ...PLAIN, name: "consumption +12 %", consumption: 0.12 },
      { ...PLAIN, name: "consumption +20 %", consumption: 0.2 },
    ];
    const [results] = whatIfResults([base.prepared], [base.conditions], whatIfs);
    const judged = withWorst(own, whatIfVariants(results ?? []));
    expect([own.status, judged.status]).toEqual(["clear", "stop"]);
    expect(judged.findings[0]?.code).toBe("store-empty");
    expect(judged.findings[0]?.message).toMatch(/^what if consumption \+20 % \(and 1 more\): leg 2, /);
    expect(judged.findings.slice(1)).toEqual(own.findings);
  });

  test("that is no worse than the route leaves it as it is", () => {
    const own = runOf(given).estimate;
    const [results] = whatIfResults([given.prepared], [given.conditions], [PLAIN]);
    expect(withWorst(own, whatIfVariants(results ?? []))).toBe(own);
  });
});

describe("a what-if without a name", () => {
  test.each([
    [{}, "as planned"],
    [{ wind: 1.2, late_s: 3600 }, "wind × 1.2, 1 h 00 min late"],
    [{ veer_deg: -20, current: 0.9 }, "wind backed 20°, current × 0.9"],
    [{ speed_m_s: -0.5144444444444445, consumption: 0.1 }, "0.5 m/s (1.0 kn) slower, consumption +10 %"],
  ])("is called by its changes", (change, text) => {
    const { name: _, ...plain } = PLAIN;
    expect(whatIfText({ ...plain, ...change })).toBe(text);
  });
});
