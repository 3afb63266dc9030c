import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { ArrivalWindow } from "../../src/choose/arrival-window.ts";
import { estimateArriving } from "../../src/choose/arriving-estimate.ts";
import { CellTrials } from "../../src/choose/cell-trials.ts";
import type { DecidedRoute } from "../../src/choose/decided.ts";
import { runSteps } from "../../src/choose/steps.ts";
import { foundBests, testedBests } from "../../src/choose/sure-bests.ts";
import { type UncertaintyAsked, withUncertainty } from "../../src/choose/uncertain-estimate.ts";
import { makeSweep, sweepCell, windowCells } from "../../src/choose/window.ts";
import { windowCell } from "../../src/choose/window-cell.ts";
import { constantPower } from "../../src/craft/constant.ts";
import type { Craft } from "../../src/craft/craft.ts";
import { tablePower } from "../../src/craft/table.ts";
import { type EstimateInput, prepareRoutes } from "../../src/estimate/estimate.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import type { ArrivalSolution } from "../../src/estimate/result.ts";
import { DEPARTURE, gridField, HOUR, spaced } from "../estimate/fixtures.ts";
import { between, craft, DISTANCE, ROUTE, SHAPE, stream, whatIf } from "./arrival-fixtures.ts";

/** Every member with more stream along the craft than the one before. */
const tide = (member: number, strength = 0.5, more = -0.025) =>
  gridField("current", SHAPE, (lon, _, h) => [
    strength * Math.sin(h / 3 + lon + member / 3) + more * member,
    0.1,
  ]);

/** Against half a metre a second. */
const AGAINST = stream(-0.5);

function inputOf(more: Partial<EstimateInput> = {}): EstimateInput {
  const pace = { hold: "through-speed", speed_m_s: 5 } as const;
  const base = { title: "", departure: DEPARTURE, craft, pace, reserve: null, land: null };
  return { ...base, fields: [AGAINST], routes: [ROUTE], ...more };
}

const askedOf = (more: Partial<UncertaintyAsked>): UncertaintyAsked => ({
  whatIfs: [],
  errors: [],
  members: [],
  ...more,
});

function answerOf(wanted: ArrivalWindow, asked: UncertaintyAsked, input = inputOf()): DecidedRoute {
  const prepared = prepareRoutes(input);
  const answer = estimateArriving(prepared, input, wanted, asked);
  const [route] = withUncertainty(answer, prepared, input, asked).estimate.routes;
  if (route === undefined) throw new Error("no route");
  return route;
}

/** The solution that the route is at, and the cheapest by the plain estimate. */
function solved({ arrive }: DecidedRoute): {
  readonly taken: ArrivalSolution;
  readonly plain: ArrivalSolution;
} {
  const taken = arrive?.solutions[arrive.chosen ?? -1];
  const plain = arrive?.solutions[arrive.cheapest ?? -1];
  if (taken === undefined || plain === undefined) throw new Error("no solution");
  return { taken, plain };
}

const SPAN = between(6.5, 7);
/** Over the ground, to take so many hours. */
const madeGood = (hours: number): number => DISTANCE / (hours * 3600);

describe("the cheapest speed that arrives in a span in everything that the plan names", () => {
  const STRONGER = whatIf("Stronger", { current: 1.2 });
  const WEAKER = whatIf("Weaker", { current: 0.8 });

  test("is in a uniform stream the speed over the ground for the latest time and the strongest stream", () => {
    // 4.417 m/s over the ground and 0.6 m/s against: without the change it arrives after 6.85 h, in the weaker stream after 6.70 h.
    const route = answerOf(SPAN, askedOf({ whatIfs: [STRONGER, WEAKER] }));
    const { taken, plain } = solved(route);
    // The arrival is found to a microsecond of 7 h: 2e-10 of the speed.
    expect(taken.speed_m_s).toBeCloseTo(madeGood(7) + 0.6, 8);
    expect(plain.speed_m_s).toBeCloseTo(madeGood(7) + 0.5, 8);
    expect(route.arrive).toMatchObject({ chosen: 1, cheapest: 0, holds: true });
    expect(route.whatIf?.map(({ arrival }) => arrival)[0]).toBe("2027-05-04T13:00:00.000Z");
    expect([route.status, route.arrival]).toEqual(["clear", taken.arrival]);
  });

  test("is said with what stops the cheapest by the plain estimate", () => {
    const { findings, arrive } = answerOf(SPAN, askedOf({ whatIfs: [STRONGER] }));
    const late_min = Math.round((DISTANCE / (madeGood(7) - 0.1) - 7 * 3600) / 60);
    const wanted = "asked for: between 2027-05-04 12:30 UTC and 2027-05-04 13:00 UTC";
    const stopped = `what if Stronger: it arrives 2027-05-04 13:10 UTC, ${late_min} min too late`;
    expect(findings.map(({ code }) => code)).toEqual(["pace-found"]);
    expect(findings[0]?.message).toBe(
      `5.0 m/s (9.8 kn) through the medium arrives 2027-05-04 12:51 UTC, after 6 h 51 min (${wanted}), the cheapest found that holds in all that the plan names; the cheapest by the plain estimate, 4.9 m/s (9.6 kn), does not: ${stopped}`,
    );
    expect(arrive?.reason).toBe(`${stopped}; ${wanted}`);
  });

  test("is the plain estimate's own where that holds, and nothing else changes", () => {
    const asked = askedOf({ whatIfs: [WEAKER] });
    const input = inputOf();
    const told = answerOf(SPAN, asked);
    const before = estimateArriving(prepareRoutes(input), input, SPAN).estimate.routes[0];
    expect(told.arrive).toEqual({ ...before?.arrive, cheapest: 0, holds: true });
    expect(told.totals).toEqual(before?.totals);
    expect(told.findings[0]?.message).toMatch(
      / \(asked for: between .*\), and holds in all that the plan names$/,
    );
  });

  test("lies at the early end where going faster is cheaper", () => {
    // At one power at every speed the fastest is the cheapest: in the weaker stream it may not be there before 6.5 h, to within a second.
    const steady: Craft = { ...craft, power: constantPower("W", 20_000) };
    const { taken, plain } = solved(
      answerOf(SPAN, askedOf({ whatIfs: [STRONGER, WEAKER] }), inputOf({ craft: steady })),
    );
    const earliest = DISTANCE / (6.5 * 3600 - 1) + 0.4;
    expect(Math.abs(taken.speed_m_s / earliest - 1)).toBeLessThan(1e-7);
    expect(plain.speed_m_s).toBeCloseTo(madeGood(6.5) + 0.5, 8);
  });

  test("is found where all arrive together for ten seconds alone, a ninetieth of a step of the plain search", () => {
    // The last is 20 min behind and the first 10 min less ten seconds ahead, of 30 min.
    const asked = askedOf({
      whatIfs: [whatIf("Late", { late_s: 1200 }), whatIf("Early", { late_s: -590 })],
    });
    const route = answerOf(SPAN, asked);
    expect(solved(route).taken.speed_m_s).toBeCloseTo(madeGood(7 - 1 / 3) + 0.5, 8);
    expect(route.status).toBe("clear");
  });

  test("arrives by the latest time with the probability asked for and not much more", () => {
    const errors = [{ role: "current", speed_m_s: 0.1, length_m: 60_000, time_s: 10_800 }] as const;
    const route = answerOf(between(6, 7), askedOf({ errors, confidence: 0.9 }));
    const before_s = 7 * 3600 - (Date.parse(route.arrival as string) - DEPARTURE) / 1000;
    // Abramowitz & Stegun, Handbook of Mathematical Functions, table 26.5: Φ(1.28155) = 0.9. Arrivals are told to the millisecond.
    expect(Math.abs(before_s / (route.spread?.arrival_s as number) - 1.28155)).toBeLessThan(1e-5);
    expect(route.spread?.arrivalHolds).toBeGreaterThanOrEqual(0.9);
    expect(route.status).toBe("clear");
    expect(route.arrive?.reason).toMatch(/^under the stated forecast error it arrives by .* 50 %, and /);
  });

  test("is before a member's wind is above the craft's limit, where that is sooner than any member is late", () => {
    // 2 m/s more every hour, and 13 m/s after 6.5 h.
    const rising = gridField("wind", SHAPE, (_lon, _lat, h) => [0, 2 * h]);
    const calm = gridField("wind", SHAPE, () => [0, 0]);
    const limited: Craft = { ...craft, limits: { ...craft.limits, wind_m_s: 13 } };
    const members = [calm, rising].map((wind, member) => ({ member, fields: [AGAINST, wind] }));
    const input = inputOf({ craft: limited, fields: [AGAINST, calm] });
    const route = answerOf(between(6, 7), askedOf({ members, whatIfs: [STRONGER] }), input);
    // The edge is halved to a ten-millionth, from the side that holds.
    const off = solved(route).taken.speed_m_s / (madeGood(6.5) + 0.5) - 1;
    expect(off).toBeGreaterThanOrEqual(0);
    expect(off).toBeLessThan(1e-7);
    expect([route.status, route.arrive?.chosen, route.arrive?.cheapest]).toEqual(["clear", 1, 0]);
  });

  test("keeps to what-ifs that the craft's power model allows, where the plain one does not", () => {
    const rows = [4.9, 6, 8].map((speed) => ({ speed_m_s: speed, rate: speed ** 3 }));
    const narrow: Craft = { ...craft, power: tablePower("W", rows), speeds: { min: 4.9, max: 8 } };
    const asked = askedOf({ whatIfs: [whatIf("Slower", { speed_m_s: -0.1 })] });
    const input = inputOf({ craft: narrow });
    const prepared = prepareRoutes(input);
    const plain = estimateArriving(prepared, input, SPAN);
    const [route] = withUncertainty(plain, prepared, input, asked).estimate.routes;
    expect(route?.whatIf?.[0]).toMatchObject({
      status: "stop",
      departure: route?.departure,
      arrival: null,
      use: null,
      reached: null,
      worst: { code: "outside-power-table" },
    });
    expect([route?.status, route?.findings[0]?.message]).toEqual([
      "stop",
      'what if Slower: the what-if "Slower" keeps the speed above 0 and within the power model of Craft; found 4.8 m/s (9.4 kn)',
    ]);
    expect(solved(answerOf(SPAN, asked, input)).taken.speed_m_s).toBeCloseTo(madeGood(7) + 0.6, 8);
  });
});

describe("a span in which no speed holds in everything", () => {
  test("is estimated as without, with the stop and what stops the nearest", () => {
    const asked = askedOf({
      whatIfs: [whatIf("Late", { late_s: 1200 }), whatIf("Early", { late_s: -1200 })],
    });
    const input = inputOf();
    const prepared = prepareRoutes(input);
    const before = withUncertainty(estimateArriving(prepared, input, SPAN), prepared, input, asked);
    const { arrive, findings, ...route } = answerOf(SPAN, asked);
    const { arrive: was, findings: told, ...same } = before.estimate.routes[0] as DecidedRoute;
    expect(route).toEqual(same);
    expect(arrive).toEqual({ ...was, cheapest: 0, holds: false, reason: arrive?.reason });
    expect(findings.map(({ code }) => code)).toEqual(told.map(({ code }) => code));
    expect(findings[1]?.message).toMatch(
      /^4\.9 m\/s .*, after 7 h 00 min \(asked for: between 2027-05-04 12:30 UTC and 2027-05-04 13:00 UTC\); no speed was found that arrives then and holds in all that the plan names: the slowest that is in time in all of it, 5\.1 m\/s \(10\.0 kn\), does not: what if Early: it arrives 2027-05-04 12:20 UTC, 10 min too early$/,
    );
  });

  test("closes a window after the last departure that has one, with the speed that was judged", () => {
    const asked = askedOf({ whatIfs: [whatIf("Late", { late_s: 1200 })] });
    const input = inputOf();
    const window = { from: DEPARTURE, to: DEPARTURE + 3 * HOUR, every_s: 900, speeds_m_s: null };
    const sweep = makeSweep(prepareRoutes(input), input, SPAN, asked);
    const cells = [...windowCells(sweep, window)];
    const trials = new CellTrials(sweep, asked, window);
    const { sure } = runSteps(testedBests(trials, runSteps(foundBests(trials, cells)), cells));
    // At 8 m/s less the stream it takes 4 h 07 min: 20 min late it is there by 13:00 when it was to leave by 08:32.
    expect(sure.latest?.departure.slice(11, 16)).toBe("08:30");
    expect(sure.closedBy?.message).toMatch(
      /^no speed was found that arrives then and holds in all that the plan names; at the cheapest by the plain estimate, 7\.8 m\/s \(15\.1 kn\): what if Late: it arrives 2027-05-04 13:20 UTC, 20 min too late/,
    );
  });

  test("names the fastest where one is never in time", () => {
    const { arrive } = answerOf(SPAN, askedOf({ whatIfs: [whatIf("Late", { late_s: 2400 })] }));
    expect(arrive).toMatchObject({ chosen: 0, cheapest: 0, holds: false });
    expect(arrive?.reason).toMatch(
      /^the fastest that arrives then, 5\.3 m\/s \(10\.2 kn\), does not: what if Late: it arrives 2027-05-04 13:10 UTC, 10 min too late;/,
    );
  });

  test("names the reserve where going faster breaks it", () => {
    const { taken } = solved(answerOf(SPAN, askedOf({ whatIfs: [whatIf("Late", { late_s: 1200 })] })));
    const { use } = solved(answerOf(SPAN, askedOf({ whatIfs: [whatIf("Late", { late_s: 0 })] }))).taken;
    const short: Craft = { ...craft, store: { unit: "J", usable: 0.5 * (use + taken.use) } };
    const asked = askedOf({ whatIfs: [whatIf("Late", { late_s: 1200 })] });
    const { status, arrive } = answerOf(SPAN, asked, inputOf({ craft: short }));
    expect([status, arrive?.holds]).toEqual(["stop", false]);
    expect(arrive?.reason).toMatch(
      /^the slowest that is in time in all of it, .*: the store runs empty here/,
    );
  });
});

describe("a speed found for an arrival with nothing to hold in", () => {
  const input = inputOf({ fields: [tide(0)] });
  const prepared = prepareRoutes(input);
  const errors = [{ role: "current", speed_m_s: 0.1, length_m: 60_000, time_s: 10_800 }] as const;
  const members = [0, 1, 2].map((member) => ({ member, fields: [tide(member)] }));

  test("is the same to the last key: without members, what-ifs and confidence", () => {
    const plain = estimateArriving(prepared, input, SPAN);
    expect(estimateArriving(prepared, input, SPAN, askedOf({}))).toEqual(plain);
    expect(estimateArriving(prepared, input, SPAN, askedOf({ errors }))).toEqual(plain);
    expect(estimateArriving(prepared, input, SPAN, askedOf({ confidence: 0.9 }))).toEqual(plain);
    expect(JSON.stringify(plain)).not.toMatch(/"cheapest"|"holds"/);
  });

  test("is the same to the last key: at one moment", () => {
    const moment = { notBefore: SPAN.notAfter, notAfter: SPAN.notAfter };
    const asked = askedOf({ errors, members, confidence: 0.9, whatIfs: [whatIf("Late", { late_s: 600 })] });
    expect(estimateArriving(prepared, input, moment, asked)).toEqual(
      estimateArriving(prepared, input, moment),
    );
  });

  test("is refused as before where the span ends before it begins", () => {
    const { notBefore, notAfter } = SPAN;
    const turned = { notBefore: notAfter, notAfter: notBefore as number };
    expect(() => estimateArriving(prepared, input, turned, askedOf({ members }))).toThrow(
      "an arrival's notBefore is not after its notAfter; found 2027-05-04T13:00Z and 2027-05-04T12:30Z",
    );
  });

  test("leaves a route that no speed arrives with as it was", () => {
    const never = between(0.1, 0.2);
    const plain = estimateArriving(prepared, input, never).estimate.routes[0];
    const { arrive, ...route } = estimateArriving(prepared, input, never, askedOf({ members })).estimate
      .routes[0] as DecidedRoute;
    expect(arrive).toEqual({ ...plain?.arrive, cheapest: null, holds: false });
    expect({ ...route, arrive: plain?.arrive }).toEqual(plain);
  });
});

describe("held against trying all speeds", () => {
  const ERRORS = [{ role: "current", speed_m_s: 0.1, length_m: 60_000, time_s: 10_800 }] as const;
  const tried = spaced(2, 8, 120);

  test("holds in every trial, is never cheaper than the plain one, and no speed that holds is cheaper", () => {
    const seen = { plain: 0, faster: 0, none: 0 };
    const double = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    fc.assert(
      fc.property(
        double(5, 9),
        double(0.3, 4),
        double(0, 1.2),
        double(-1500, 1500),
        double(0.05, 0.6),
        double(0, 30_000),
        double(-0.2, 0.2),
        fc.option(double(0.55, 0.97), { nil: undefined }),
        (from, wide, strength, late_s, share, hotelPerSecond, more, confidence) => {
          const wanted = between(from, from + wide);
          const input = inputOf({ fields: [tide(0, strength)], reserve: { kind: "share", share } });
          const small = {
            ...input,
            craft: { ...craft, hotelPerSecond, store: { unit: "J", usable: 1.6e9 } as const },
          };
          const members = [0, 1, 2].map((member) => ({ member, fields: [tide(member, strength, more)] }));
          const whatIfs = [whatIf("Shifted", { late_s })];
          const asked = askedOf({ members, whatIfs, errors: ERRORS, confidence });
          const route = answerOf(wanted, asked, small);
          if (route.arrive?.chosen === null) return;
          const { taken, plain } = solved(route);
          const sweep = makeSweep(prepareRoutes(small), small, wanted);
          const trials = new CellTrials(sweep, asked);
          const cellAt = (speed: number) =>
            windowCell(sweep.prepared[0] as never, sweep.conditions, DEPARTURE, speed);
          const isInSpan = (arrival: string | null) =>
            arrival !== null &&
            Date.parse(arrival) >= (wanted.notBefore as number) &&
            Date.parse(arrival) <= wanted.notAfter;
          const held = tried
            .map(cellAt)
            .filter((cell) => isInSpan(cell.arrival) && runSteps(trials.holds(cell, wanted.notAfter)));
          expect(route.status !== "stop").toBe(route.arrive?.holds);
          if (route.arrive?.holds !== true) {
            expect(held).toEqual([]);
            seen.none += 1;
            return;
          }
          expect(runSteps(trials.holds(cellAt(taken.speed_m_s)))).toBe(true);
          for (const { member, fields } of members) {
            const pace = { hold: "through-speed", speed_m_s: taken.speed_m_s } as const;
            const conditions = { ...sweep.conditions, fields, pace };
            const { estimate } = estimateRoute(prepareRoute(ROUTE, fields), conditions);
            expect([member, estimate.status === "stop"]).toEqual([member, false]);
            const arrival = Date.parse(estimate.arrival as string);
            expect(arrival).toBeLessThanOrEqual(wanted.notAfter + 1000);
            expect(arrival).toBeGreaterThanOrEqual((wanted.notBefore as number) - 1000);
          }
          expect(plain.use).toBeLessThanOrEqual(taken.use);
          for (const { use } of held) expect(use).toBeGreaterThanOrEqual(taken.use * (1 - 1e-7));
          seen[plain === taken ? "plain" : "faster"] += 1;
        },
      ),
      { numRuns: 60, endOnFailure: true },
    );
    expect(Math.min(seen.plain, seen.faster, seen.none)).toBeGreaterThan(0);
  });
});

describe("a window's cells", () => {
  const members = [0, 1, 2].map((member) => ({ member, fields: [tide(member)] }));
  const errors = [{ role: "current", speed_m_s: 0.05, length_m: 60_000, time_s: 10_800 }] as const;
  const asked = askedOf({ members, errors, confidence: 0.8, whatIfs: [whatIf("Delay", { late_s: 300 })] });
  const wanted = between(20, 22);

  test("are the estimate at their departure to the last bit, whatever was worked out before", () => {
    const input = inputOf({ fields: [tide(0)] });
    const sweep = makeSweep(prepareRoutes(input), input, wanted, asked);
    const window = { from: DEPARTURE + 8 * HOUR, to: DEPARTURE + 17 * HOUR, every_s: 7200, speeds_m_s: null };
    const cells = [...windowCells(sweep, window)];
    const trials = new CellTrials(sweep, asked, window);
    let held = 0;
    for (const cell of [...cells].reverse()) {
      const departure = Date.parse(cell.departure);
      const prepared = sweep.prepared[0] as (typeof sweep.prepared)[number];
      expect(sweepCell(sweep, prepared, departure, null)).toEqual(cell);
      const route = answerOf(wanted, asked, { ...input, departure });
      const { taken, plain } = solved(route);
      expect(cell.speed_m_s).toBe(taken.speed_m_s);
      const { totals, arrival } = route;
      expect([cell.arrival, cell.time_s, cell.use, cell.remaining]).toEqual([
        arrival,
        totals.time_s,
        totals.use,
        totals.remaining,
      ]);
      expect(runSteps(trials.holds(cell))).toBe(route.arrive?.holds);
      expect(runSteps(trials.sure(cell)).status).toBe(route.status);
      if (plain !== taken) held += 1;
    }
    expect(held).toBeGreaterThan(2);
  });
});
