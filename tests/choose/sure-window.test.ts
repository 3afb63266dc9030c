import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { CellTrials } from "../../src/choose/cell-trials.ts";
import type { DepartureWindow } from "../../src/choose/departure-window.ts";
import type { ForecastError } from "../../src/choose/forecast-error.ts";
import { latestInTime } from "../../src/choose/in-time.ts";
import { fastestWithReserve } from "../../src/choose/pace-curve.ts";
import type { BestBy } from "../../src/choose/rank.ts";
import { refineRoutes } from "../../src/choose/refine.ts";
import { routePaces } from "../../src/choose/route-paces.ts";
import { runSteps } from "../../src/choose/steps.ts";
import type { SureCell } from "../../src/choose/sure.ts";
import { type SureWindow, sureWindow } from "../../src/choose/sure-window.ts";
import { type UncertaintyAsked, withUncertainty } from "../../src/choose/uncertain-estimate.ts";
import type { WhatIf } from "../../src/choose/what-if.ts";
import { makeSweep, windowCells } from "../../src/choose/window.ts";
import type { WindowCell } from "../../src/choose/window-cell.ts";
import { summariseWindow } from "../../src/choose/window-summary.ts";
import type { Craft, Pace } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import type { Conditions } from "../../src/estimate/conditions.ts";
import { type EstimateInput, estimatePrepared, prepareRoutes } from "../../src/estimate/estimate.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import type { Route } from "../../src/estimate/route.ts";
import type { Field } from "../../src/field/field.ts";
import { craftOf, DEPARTURE, gridField, HOUR, spaced, waypoint } from "../estimate/fixtures.ts";

const SHAPE = { lon: spaced(-1, 2, 6), lat: spaced(-1, 1, 4), hours: spaced(-6, 60, 66) };

/** A wind that turns with the hours, each member in its own way, times a factor. */
const windOf = (member: number, factor = 1): Field =>
  gridField("wind", SHAPE, (lon, lat, h) => [
    factor * (5 * Math.sin(h / 4 + 0.4 * member + lon) - 1),
    factor * 3 * Math.cos(h / 5 - 0.3 * member + lat),
  ]);

const drone = (factor = 1): Craft =>
  craftOf({
    name: "Drone",
    moves: "air",
    power: cubePower({ referenceSpeed_m_s: 15, referencePower_W: 1000 * factor }),
    hotelPerSecond: 100 * factor,
    store: { unit: "J", usable: 9.3e6 },
  });

const routes: readonly Route[] = [
  { name: "South", waypoints: [waypoint("A", 0, 0), waypoint("B", -0.3, 0.3), waypoint("C", 0, 0.6)] },
  {
    name: "North",
    waypoints: [waypoint("A", 0, 0), waypoint("D", 0.3, 0.3, { stay_s: 300 }), waypoint("C", 0, 0.6)],
  },
];

const PACE: Pace = { hold: "through-speed", speed_m_s: 15 };
const day: DepartureWindow = { from: DEPARTURE, to: DEPARTURE + 14 * HOUR, every_s: 3600, speeds_m_s: null };
const AS_PLANNED = { wind: 1, current: 1, veer_deg: 0, speed_m_s: 0, consumption: 0, late_s: 0 };
const whatIfOf = (name: string, change: Partial<WhatIf>): WhatIf => ({ name, ...AS_PLANNED, ...change });
const ERROR: ForecastError = { role: "wind", speed_m_s: 1.5, length_m: 60_000, time_s: 10_800 };

function inputOf(more: Partial<EstimateInput> = {}): EstimateInput {
  return {
    title: "",
    departure: DEPARTURE,
    craft: drone(),
    pace: PACE,
    reserve: { kind: "share", share: 0.2 },
    fields: [windOf(0)],
    routes,
    land: null,
    ...more,
  };
}

const membersOf = (numbers: readonly number[]) =>
  numbers.map((member) => ({ member, fields: [windOf(member)] }));

function answerOf(
  asked: Partial<UncertaintyAsked>,
  {
    input = inputOf(),
    window = day,
    refine = false,
    chooseSpeed = false,
  }: { input?: EstimateInput; window?: DepartureWindow; refine?: boolean; chooseSpeed?: boolean } = {},
) {
  const sweep = makeSweep(prepareRoutes(input), input);
  const whole = { whatIfs: [], errors: [], members: [], ...asked };
  const cells = [...windowCells(sweep, window)];
  const minutes = refine ? refineRoutes(sweep, window, cells) : null;
  const inTime = latestInTime(sweep, window);
  const summary = summariseWindow(cells);
  const paces = chooseSpeed ? routePaces(sweep, summary) : null;
  const steps = sureWindow(sweep, new CellTrials(sweep, whole), {
    window,
    cells,
    minutes,
    inTime,
    paces,
  });
  let count = 0;
  const counted = (function* () {
    for (;;) {
      const { done, value } = steps.next();
      if (done === true) return value;
      count += 1;
      yield;
    }
  })();
  const sure: SureWindow = runSteps(counted);
  return { sure, cells, steps: count, summary, minutes, inTime, paces };
}

/** Conditions of a cell under each member and what-if, made by hand: no part of what decides is used. */
function conditionsBesides(
  cell: WindowCell,
  { members, whatIfs }: Pick<UncertaintyAsked, "members" | "whatIfs">,
): Conditions[] {
  const base: Conditions = {
    departure: Date.parse(cell.departure),
    craft: drone(),
    pace: { hold: "through-speed", speed_m_s: cell.speed_m_s ?? 15 },
    reserve: { kind: "share", share: 0.2 },
    fields: [windOf(0)],
  };
  return [
    base,
    ...members.map(({ member }) => ({ ...base, fields: [windOf(member)] })),
    ...whatIfs.map(({ wind, speed_m_s, consumption, late_s }) => ({
      ...base,
      departure: base.departure + 1000 * late_s,
      craft: drone(1 + consumption),
      pace: { hold: "through-speed", speed_m_s: (cell.speed_m_s ?? 15) + speed_m_s } as const,
      fields: [windOf(0, wind)],
    })),
  ];
}

function holdsByHand(cell: WindowCell, asked: Pick<UncertaintyAsked, "members" | "whatIfs">): boolean {
  const route = routes.find(({ name }) => name === cell.route) as Route;
  return conditionsBesides(cell, asked).every(
    (conditions) =>
      estimateRoute(prepareRoute(route, conditions.fields), conditions).estimate.status !== "stop",
  );
}

/** By how much one figure is above another; none where rounding may have made the difference. */
const above = (a: number, b: number): number => (Math.abs(a - b) <= 2e-12 * Math.abs(b) ? 0 : a - b);

/** Whether one cell ranks before another. */
const RANKED: Record<BestBy, (a: WindowCell, b: WindowCell) => number> = {
  time: (a, b) => above(a.passage_s as number, b.passage_s as number),
  use: (a, b) => above(a.use as number, b.use as number),
  latest: (a, b) => Date.parse(b.departure) - Date.parse(a.departure),
};

const ALL: readonly BestBy[] = ["time", "use", "latest"];
const plainOf = (cell: SureCell | null) => {
  if (cell === null) return null;
  const { sure: _, ...rest } = cell;
  return rest;
};

describe("the sure bests of a window", () => {
  const asks = fc.record({
    members: fc
      .uniqueArray(fc.integer({ min: 0, max: 6 }), { maxLength: 4 })
      .map((numbers) => membersOf(numbers.sort())),
    whatIfs: fc
      .uniqueArray(
        fc.constantFrom(
          whatIfOf("Stronger", { wind: 1.2 }),
          whatIfOf("Slower", { speed_m_s: -1 }),
          whatIfOf("Cold", { consumption: 0.08 }),
          whatIfOf("Late", { late_s: 5400 }),
        ),
        { maxLength: 3, selector: ({ name }) => name },
      )
      .map((all) => [...all]),
  });

  test("hold in every member and what-if estimated by hand, and no cell that ranks before them does", () => {
    fc.assert(
      fc.property(asks, fc.constantFrom(null, [13, 16]), (asked, speeds_m_s) => {
        const window = { ...day, speeds_m_s };
        const { sure, cells } = answerOf(asked, { window });
        const held = cells.filter((cell) => holdsByHand(cell, asked));
        for (const { best, own } of [
          { best: sure.best.sure, own: held },
          ...sure.routes.map((each) => ({
            best: each.sure,
            own: held.filter(({ route }) => route === each.route),
          })),
        ]) {
          for (const by of ALL) {
            const first = [...own].sort(RANKED[by])[0];
            expect(best[by] === null).toBe(first === undefined);
            if (best[by] === null || first === undefined) continue;
            expect(own).toContainEqual(plainOf(best[by]));
            expect(RANKED[by](best[by], first)).toBe(0);
          }
        }
      }),
      { numRuns: 25, endOnFailure: true },
    );
  }, 60_000);

  test("and the plain ones have the status, the cause and the shares that an estimate of their departure gives", () => {
    fc.assert(
      fc.property(asks, fc.constantFrom(undefined, 0.9, 0.999), (asked, confidence) => {
        const whole = { ...asked, errors: [ERROR], confidence };
        const { sure } = answerOf(whole);
        for (const best of sure.routes.flatMap(({ plain, sure: own }) => [plain, own])) {
          for (const by of ALL) {
            const cell = best[by];
            if (cell === null) continue;
            const alone = inputOf({
              departure: Date.parse(cell.departure),
              routes: routes.filter(({ name }) => name === cell.route),
            });
            const prepared = prepareRoutes(alone);
            const { estimate } = withUncertainty(estimatePrepared(prepared, alone), prepared, alone, whole);
            const [route] = estimate.routes;
            expect(cell.sure.status).toBe(route?.status);
            expect(cell.sure.reserveHolds).toBe(route?.spread?.reserveHolds ?? null);
            expect(cell.sure.ensemble?.reserveHolds).toBe(route?.ensemble?.reserveHolds);
            expect(cell.sure.ensemble?.breaksReserve).toEqual(route?.ensemble?.breaksReserve);
            const { member, whatIf, error } = cell.sure.decidedBy;
            const label = member !== null ? `member ${member}` : whatIf !== null ? `what if ${whatIf}` : null;
            if (error) expect(route?.findings[0]).toMatchObject(cell.sure.worst ?? {});
            else if (label === null) expect(cell.sure.status).toBe(cell.status);
            else
              expect(route?.findings[0]?.message).toMatch(new RegExp(`^${label}( \\(and \\d+ more\\))?: `));
          }
        }
      }),
      { numRuns: 20, endOnFailure: true },
    );
  }, 60_000);

  test("are the plain ones where those hold, and the plain ones are the summary's", () => {
    const { sure, summary } = answerOf({ members: membersOf([0]) });
    for (const by of ALL) {
      expect(plainOf(sure.best.plain[by])).toEqual(summary.best[by]);
      expect(sure.best.sure[by]).toEqual(sure.best.plain[by]);
      expect(sure.best.plain[by]?.sure.decidedBy).toEqual({ member: null, whatIf: null });
    }
    expect(sure.best.sure.closedBy).toEqual(summary.best.closedBy);
  });

  test("are none where a what-if breaks every departure, each tried once", () => {
    const asked = {
      members: membersOf([0, 1, 2]),
      whatIfs: [whatIfOf("Cold", { consumption: 0.01 }), whatIfOf("Frozen", { consumption: 2 })],
    };
    const { sure, summary, steps } = answerOf(asked);
    expect(summary.possible).toBeGreaterThan(20);
    for (const by of ALL) {
      expect(sure.best.sure[by]).toBeNull();
      expect(sure.best.plain[by]?.sure).toMatchObject({
        status: "stop",
        decidedBy: { member: null, whatIf: "Frozen" },
        worst: { code: "store-empty" },
      });
    }
    expect(sure.best.sure.closedBy).toBeNull();
    // One step a departure, those of the first before the one that breaks it, and the whole test of each route's plain bests.
    const whole = 5 + 1;
    expect(steps).toBeLessThanOrEqual(summary.possible + whole + 2 * 3 * whole);
  });

  test("are closed by what stops the next departure, be it what-if or member, and it is named", () => {
    const { sure, cells } = answerOf({
      whatIfs: [whatIfOf("Cold", { consumption: 0.1 })],
      members: membersOf([0, 3]),
    });
    const { latest, closedBy } = sure.best.sure;
    const next = cells.find(
      ({ route, departure }) =>
        route === latest?.route && Date.parse(departure) === Date.parse(latest.departure) + HOUR,
    );
    expect(latest).not.toBeNull();
    expect(next?.status).not.toBe("stop");
    expect(closedBy?.severity).toBe("stop");
    expect(closedBy?.message).toMatch(/^(what if Cold|member 3)/);
  });

  test("pass over a speed at which a what-if cannot be ordered, and refuse one that the plan's own pace does not allow", () => {
    const craft = { ...drone(), power: { ...drone().power, min: 10, max: 16 } };
    const input = inputOf({ craft, routes: routes.slice(0, 1) });
    const whatIfs = [whatIfOf("Faster", { speed_m_s: 1 })];
    const window = { ...day, speeds_m_s: [12, 16] };
    const { sure } = answerOf({ whatIfs }, { input, window });
    expect(sure.best.plain.time?.speed_m_s).toBe(16);
    expect(sure.best.plain.time?.sure.worst).toMatchObject({
      code: "outside-power-table",
      message:
        'the what-if "Faster" keeps the speed above 0 and within the power model of Drone; found 17.0 m/s (33.0 kn)',
    });
    expect(sure.best.sure.time?.speed_m_s).toBe(12);
    const own = { ...input, pace: { hold: "through-speed", speed_m_s: 16 } as const };
    expect(() => answerOf({ whatIfs }, { input: own })).toThrow(
      'the what-if "Faster" keeps the speed above 0 and within the power model of Drone; found 17.0 m/s (33.0 kn)',
    );
  });
});

describe("the sure bests to the minute", () => {
  const asked = {
    members: membersOf([0, 2, 5]),
    whatIfs: [whatIfOf("Cold", { consumption: 0.08 }), whatIfOf("Late", { late_s: 1800 })],
  };

  test("hold, are never worse than those of the window, and no minute that was tried ranks before them and holds", () => {
    const { sure, minutes } = answerOf(asked, { refine: true });
    const tried = (minutes ?? []).flatMap((each) => each.tried);
    const held = tried.filter((cell) => cell.status !== "stop" && holdsByHand(cell, asked));
    expect(tried.length).toBeGreaterThan(60);
    for (const by of ALL) {
      const best = sure.refined?.best.sure[by] as SureCell;
      const coarse = sure.best.sure[by] as SureCell;
      expect(held).toContainEqual(plainOf(best));
      expect(RANKED[by](best, coarse)).toBeLessThanOrEqual(0);
      for (const cell of held) expect(RANKED[by](best, cell)).toBeLessThanOrEqual(0);
    }
  });

  test("find the last minute at which the departure still holds", () => {
    const { sure } = answerOf(asked, { refine: true });
    const latest = sure.refined?.best.sure.latest as SureCell;
    const plain = sure.refined?.best.plain.latest as SureCell;
    expect(Date.parse(latest.departure)).toBeLessThan(Date.parse(plain.departure));
    const at = (cell: SureCell, minutes: number) => ({
      ...cell,
      departure: new Date(Date.parse(cell.departure) + 60_000 * minutes).toISOString(),
    });
    expect(holdsByHand(latest, asked)).toBe(true);
    expect(holdsByHand(at(latest, 1), asked)).toBe(false);
  });
});

describe("the fastest speed that holds", () => {
  const ranged = { ...drone(), speeds: { min: 8, max: 22 } };
  const input = inputOf({ craft: ranged });
  const window = { ...day, speeds_m_s: [13, 15] };
  const asked = {
    members: membersOf([0, 2, 5]),
    whatIfs: [whatIfOf("Cold", { consumption: 0.08 }), whatIfOf("Late", { late_s: 1800 })],
  };

  test("keeps the reserve in every member and what-if, at the departure of least use that does; a billionth faster does not", () => {
    const { sure, paces } = answerOf(asked, { input, window, chooseSpeed: true });
    expect(sure.paces?.map(({ route }) => route)).toEqual(["South", "North"]);
    for (const [index, { route, fastest, sureFastest }] of (sure.paces ?? []).entries()) {
      const own = sure.routes.find((each) => each.route === route);
      const held = sureFastest as SureCell;
      expect(plainOf(fastest)).toEqual(paces?.[index]?.fastest);
      expect(held.departure).toBe(own?.sure.use?.departure);
      expect(held.sure.status).not.toBe("stop");
      expect(holdsByHand(held, asked)).toBe(true);
      const faster = { ...held, speed_m_s: (held.speed_m_s as number) * (1 + 1.1e-9) };
      expect(holdsByHand(faster, asked)).toBe(false);
      expect(held.speed_m_s).toBeGreaterThan(own?.sure.use?.speed_m_s as number);
    }
  });

  test("is the fastest of the plain estimate where that holds, without a search", () => {
    const alone = { members: membersOf([0]), whatIfs: [whatIfOf("Warm", { consumption: -0.1 })] };
    const { sure, paces, steps } = answerOf(alone, { input, window, chooseSpeed: true });
    for (const [index, { fastest, sureFastest }] of (sure.paces ?? []).entries()) {
      expect(sureFastest).toBe(fastest);
      expect(plainOf(sureFastest)).toEqual(paces?.[index]?.fastest);
    }
    expect(steps).toBeLessThan(60);
  });

  test("is, of one what-if that only spends more, the fastest of a craft that does", () => {
    const { sure } = answerOf(
      { whatIfs: [whatIfOf("Cold", { consumption: 0.3 })] },
      { input, window, chooseSpeed: true },
    );
    for (const { sureFastest } of sure.paces ?? []) {
      const route = routes.find(({ name }) => name === sureFastest?.route) as Route;
      const cold = { ...drone(1.3), speeds: ranged.speeds };
      const conditions = {
        departure: Date.parse(sureFastest?.departure as string),
        craft: cold,
        reserve: { kind: "share", share: 0.2 } as const,
        fields: [windOf(0)],
      };
      const expected = fastestWithReserve(prepareRoute(route, [windOf(0)]), conditions)?.speed_m_s as number;
      expect(Math.abs((sureFastest?.speed_m_s as number) / expected - 1)).toBeLessThan(1.1e-9);
    }
  });

  test("is none where a what-if breaks every speed", () => {
    const frozen = { whatIfs: [whatIfOf("Frozen", { consumption: 20 })] };
    const { sure } = answerOf(frozen, { input, window, chooseSpeed: true });
    for (const { fastest, sureFastest } of sure.paces ?? []) {
      expect(fastest?.sure.status).toBe("stop");
      expect(sureFastest).toBeNull();
    }
    expect(sure.paces).toHaveLength(2);
  });
});

describe("the latest departure that arrives in time", () => {
  const arriveBy = DEPARTURE + 20 * HOUR;
  const asked = { members: membersOf([0, 4]), whatIfs: [whatIfOf("Late", { late_s: 3600 })] };

  test("does so in every member and what-if, and a minute later does not", () => {
    const input = inputOf({ craft: { ...drone(), store: { unit: "J", usable: 2e7 } } });
    const { sure, inTime } = answerOf(asked, { input, window: { ...day, arriveBy } });
    for (const [index, own] of (sure.inTime ?? []).entries()) {
      expect(plainOf(own.plain)).toEqual(inTime?.routes[index]?.latest);
      expect(own.plain?.sure).toMatchObject({
        status: "stop",
        worst: {
          code: "arrival-missed",
          message: expect.stringMatching(/^it arrives .* UTC, \d+ \w+ after .* UTC$/),
        },
      });
      const arrivals = (departure: number) => {
        const cell = { ...(own.sure as SureCell), departure: new Date(departure).toISOString() };
        const route = routes.find(({ name }) => name === cell.route) as Route;
        return conditionsBesides(cell, asked).map((conditions) =>
          Date.parse(
            estimateRoute(prepareRoute(route, conditions.fields), conditions).estimate.arrival as string,
          ),
        );
      };
      const departure = Date.parse(own.sure?.departure as string);
      expect(Math.max(...arrivals(departure))).toBeLessThanOrEqual(arriveBy);
      expect(Math.max(...arrivals(departure + 60_000))).toBeGreaterThan(arriveBy);
    }
    expect(sure.inTime).toHaveLength(2);
  });

  test("is none where none holds", () => {
    const whatIfs = [whatIfOf("Frozen", { consumption: 3 })];
    const { sure, inTime } = answerOf({ whatIfs }, { window: { ...day, arriveBy } });
    expect(inTime?.routes.some(({ latest }) => latest !== null)).toBe(true);
    expect(sure.inTime?.map((own) => own.sure)).toEqual([null, null]);
  });
});
