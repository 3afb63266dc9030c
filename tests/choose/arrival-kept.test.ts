import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { arrivalChance, arrivalMiss, heldToArrival } from "../../src/choose/arrival-kept.ts";
import type { ArrivalWindow } from "../../src/choose/arrival-window.ts";
import { estimateArriving } from "../../src/choose/arriving-estimate.ts";
import { CellTrials } from "../../src/choose/cell-trials.ts";
import type { DecidedRoute } from "../../src/choose/decided.ts";
import { runSteps } from "../../src/choose/steps.ts";
import { type UncertaintyAsked, withUncertainty } from "../../src/choose/uncertain-estimate.ts";
import { makeSweep, sweepCell } from "../../src/choose/window.ts";
import { type EstimateInput, estimatePrepared, prepareRoutes } from "../../src/estimate/estimate.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import { DEPARTURE, gridField, HOUR } from "../estimate/fixtures.ts";
import { between, craft, DISTANCE, ROUTE, SHAPE, stream, whatIf } from "./arrival-fixtures.ts";

const tide = (member: number) =>
  gridField("current", SHAPE, (lon, _, h) => [0.5 * Math.sin(h / 3 + lon + member) - member / 40, 0.1]);

function inputOf(more: Partial<EstimateInput> = {}): EstimateInput {
  const pace = { hold: "through-speed", speed_m_s: 5 } as const;
  const base = { title: "", departure: DEPARTURE, craft, pace, reserve: null, land: null };
  return { ...base, fields: [stream(0)], routes: [ROUTE], ...more };
}

function decidedOf(
  wanted: ArrivalWindow | null,
  more: Partial<UncertaintyAsked>,
  input: EstimateInput = inputOf(),
): DecidedRoute {
  const prepared = prepareRoutes(input);
  const answer =
    wanted === null ? estimatePrepared(prepared, input) : estimateArriving(prepared, input, wanted);
  const asked = { whatIfs: [], errors: [], members: [], ...more };
  const [route] = withUncertainty(answer, prepared, input, asked).estimate.routes;
  if (route === undefined) throw new Error("no route");
  return route;
}

const membersOf = (...streams: readonly number[]) =>
  streams.map((u, member) => ({ member, fields: [stream(u)] }));
const at = (hours: number): ArrivalWindow => {
  const moment = DEPARTURE + hours * HOUR;
  return { notBefore: moment, notAfter: moment };
};
/** Going slower is cheaper, so that the craft without a stream is there at the end of the span. */
const SPAN = between(6.5, 7);
const speedFor = (hours: number): number => DISTANCE / (hours * 3600);
const passage = (speed: number): number => DISTANCE / speed;

describe("an arrival asked for, under members and what-ifs", () => {
  test("is missed by the passage in a uniform stream less the one asked for", () => {
    const late_s = passage(speedFor(7) - 0.1) - 7 * 3600;
    const { whatIf: found } = decidedOf(at(7), { whatIfs: [whatIf("Slower", { speed_m_s: -0.1 })] });
    // Arrivals are told to the millisecond.
    expect(Math.abs((found?.[0]?.arrivalMiss_s ?? 0) - late_s)).toBeLessThan(2e-3);
  });

  test("at one moment is kept by being there by then, and decides nothing", () => {
    const {
      status,
      ensemble,
      whatIf: found,
      findings,
    } = decidedOf(at(7), {
      members: membersOf(0, 0.3, -0.1, -0.2),
      whatIfs: [whatIf("Late", { late_s: 1800 }), whatIf("Faster", { speed_m_s: 0.5 })],
    });
    expect(ensemble).toMatchObject({ arrivalHolds: 0.5, arrivesEarly: [], arrivesLate: [2, 3] });
    expect(found?.map(({ arrivalMiss_s }) => arrivalMiss_s)).toEqual([1800, 0]);
    expect(found?.map(({ status: each }) => each)).toEqual(["clear", "clear"]);
    expect([status, findings.map(({ code }) => code)]).toEqual(["clear", ["pace-found"]]);
  });

  test("in a span is a stop in a member outside it, which the finding names with by how much", () => {
    const late_min = Math.round((passage(speedFor(7) - 0.1) - 7 * 3600) / 60);
    const { status, ensemble, findings } = decidedOf(SPAN, { members: membersOf(0, 0.1, 1, -0.1) });
    expect(ensemble).toMatchObject({ arrivalHolds: 0.5, arrivesEarly: [2], arrivesLate: [3] });
    expect(status).toBe("stop");
    expect(findings[0]).toMatchObject({ code: "arrival-missed", severity: "stop", leg: null });
    expect(findings[0]?.message).toBe(
      `member 3 (and 1 more): it arrives 2027-05-04 13:10 UTC, ${late_min} min too late; asked for: between 2027-05-04 12:30 UTC and 2027-05-04 13:00 UTC`,
    );
  });

  test("in a span is a stop in a what-if that leaves later, and its row says so", () => {
    const {
      status,
      whatIf: found,
      findings,
    } = decidedOf(SPAN, {
      whatIfs: [whatIf("Delay", { late_s: 600 }), whatIf("Early", { late_s: -600 })],
    });
    expect(found?.map(({ status: each, worst }) => [each, worst?.code])).toEqual([
      ["stop", "arrival-missed"],
      ["clear", undefined],
    ]);
    expect(status).toBe("stop");
    expect(findings[0]?.message).toMatch(
      /^what if Delay: it arrives 2027-05-04 13:10 UTC, 10 min too late; asked for: between /,
    );
  });

  test("is kept to within a second", () => {
    expect(decidedOf(SPAN, { whatIfs: [whatIf("A", { late_s: 0.9 })] }).status).toBe("clear");
    expect(decidedOf(SPAN, { whatIfs: [whatIf("A", { late_s: 1.1 })] }).status).toBe("stop");
  });

  test("leaves what a member already is a stop for as it was, and counts one that does not arrive against it", () => {
    const { ensemble, findings } = decidedOf(SPAN, { members: membersOf(0, -6) });
    expect(ensemble).toMatchObject({ arrivalHolds: 0.5, arrivesLate: [], doesNotArrive: [1] });
    expect(findings[0]?.code).toBe("cannot-hold-track");
  });

  test("leaves no trace where the pace says how fast, or nothing is asked beside it", () => {
    const held = decidedOf(null, { members: membersOf(0, -1), whatIfs: [whatIf("A", { late_s: 9 })] });
    const told = JSON.stringify([held.ensemble, held.whatIf, held.findings]);
    expect(told).not.toMatch(/arrivalHolds|arrives|arrivalMiss|arrival-missed/);
    const input = inputOf();
    const plain = estimateArriving(prepareRoutes(input), input, SPAN).estimate.routes[0];
    expect(decidedOf(SPAN, {})).toEqual(plain);
  });

  test("is judged by each member's own estimate at the speed found", () => {
    const seen = { kept: 0, missed: 0 };
    fc.assert(
      fc.property(
        fc.double({ min: 5, max: 12, noNaN: true }),
        fc.double({ min: 0.2, max: 2, noNaN: true }),
        (from, wide) => {
          const wanted = between(from, from + wide);
          const input = inputOf({ fields: [tide(0)] });
          const members = [0, 1, 2, 3].map((member) => ({ member, fields: [tide(member)] }));
          const { arrive, ensemble } = decidedOf(wanted, { members }, input);
          const speed_m_s = arrive?.solutions[arrive.chosen ?? -1]?.speed_m_s;
          if (speed_m_s === undefined) throw new Error("no speed found");
          const pace = { hold: "through-speed", speed_m_s } as const;
          const late: number[] = [];
          const early: number[] = [];
          for (const { member, fields } of members) {
            const conditions = { departure: DEPARTURE, craft, reserve: null, fields, pace };
            const { arrival } = estimateRoute(prepareRoute(ROUTE, fields), conditions).estimate;
            const moment = Date.parse(arrival as string);
            if (moment > wanted.notAfter + 1000) late.push(member);
            else if (moment < (wanted.notBefore as number) - 1000) early.push(member);
          }
          expect(ensemble?.arrivesLate).toEqual(late);
          expect(ensemble?.arrivesEarly).toEqual(early);
          const missed = late.length + early.length;
          expect(ensemble?.arrivalHolds).toBe((4 - missed) / 4);
          seen[missed === 0 ? "kept" : "missed"] += 1;
        },
      ),
      { numRuns: 40, endOnFailure: true },
    );
    expect(seen.missed).toBeGreaterThan(0);
  });

  test("in a wider span is never a stop where it was none in a narrower one", () => {
    const ms = fc.integer({ min: 0, max: 10_000_000 });
    const clear = { status: "clear", worst: null } as const;
    fc.assert(
      fc.property(ms, ms, ms, ms, ms, (arrival, one, other, before, after) => {
        const narrow = { notBefore: Math.min(one, other), notAfter: Math.max(one, other) + 1 };
        const wide = { notBefore: narrow.notBefore - before, notAfter: narrow.notAfter + after };
        if (heldToArrival(clear, arrival, narrow).status === "clear")
          expect(heldToArrival(clear, arrival, wide)).toBe(clear);
        expect(Math.abs(arrivalMiss(arrival, wide))).toBeLessThanOrEqual(
          Math.abs(arrivalMiss(arrival, narrow)),
        );
        expect(arrivalChance(arrival, 60, wide)).toBeGreaterThanOrEqual(arrivalChance(arrival, 60, narrow));
      }),
      { numRuns: 500, endOnFailure: true },
    );
  });
});

describe("the probability of an arrival under a stated error", () => {
  const ERROR = { role: "current", speed_m_s: 0.2, length_m: 60_000, time_s: 10_800 } as const;

  test("is the normal distribution's of its standard deviation: a half at the moment itself", () => {
    const { spread, status } = decidedOf(at(7), { errors: [ERROR], confidence: 0.9 });
    // The speed is found to a microsecond of some minutes of deviation, and the arrival told to the millisecond.
    expect(spread?.arrivalHolds).toBeCloseTo(0.5, 5);
    expect(status).toBe("clear");
    // Abramowitz & Stegun, Handbook of Mathematical Functions, table 26.1: Φ(1) = 0.841344746, Φ(2) = 0.977249868.
    const asked = { notBefore: null, notAfter: 600_000 };
    expect(arrivalChance(300_000, 300, asked)).toBeCloseTo(0.841344746, 9);
    expect(arrivalChance(0, 300, asked)).toBeCloseTo(0.977249868, 9);
    expect(arrivalChance(600_500, 0, asked)).toBe(1);
    expect(arrivalChance(602_000, 0, asked)).toBe(0);
  });

  test("below the confidence asked for is a stop in a span, and says both", () => {
    const { status, findings, spread } = decidedOf(SPAN, { errors: [ERROR], confidence: 0.9 });
    expect(spread?.arrivalHolds).toBeCloseTo(0.5, 5);
    expect([status, findings[0]?.code]).toEqual(["stop", "arrival-missed"]);
    expect(findings[0]?.message).toMatch(
      /^under the stated forecast error it arrives by 2027-05-04 13:00 UTC with a probability of (50|49\.9) %, and the plan asks for 90 %$/,
    );
    expect(decidedOf(SPAN, { errors: [ERROR], confidence: 0.4 }).status).toBe("clear");
    expect(decidedOf(SPAN, { errors: [ERROR] }).status).toBe("clear");
  });
});

describe("a window's cells found for an arrival", () => {
  const whatIfs = [whatIf("Delay", { late_s: 300 })];
  const members = [0, 1].map((member) => ({ member, fields: [tide(member)] }));
  const errors = [{ role: "current", speed_m_s: 0.05, length_m: 60_000, time_s: 10_800 }] as const;
  const wanted = between(20, 22);

  test("hold and are decided as the estimate at their departure is", () => {
    const asked = { whatIfs, errors, members, confidence: 0.4 };
    const seen = new Set<string>();
    for (const hours of [4, 5, 5.5, 6, 9, 12, 17]) {
      const departure = DEPARTURE + hours * HOUR;
      const input = inputOf({ departure, fields: [tide(0)] });
      const sweep = makeSweep(prepareRoutes(input), input, wanted);
      const trials = new CellTrials(sweep, asked);
      const cell = sweepCell(sweep, sweep.prepared[0] as (typeof sweep.prepared)[number], departure, null);
      const sure = runSteps(trials.sure(cell));
      const route = decidedOf(wanted, asked, input);
      expect(sure.status).toBe(route.status);
      seen.add(`${sure.status} ${sure.worst?.code}`);
      expect(runSteps(trials.holds(cell))).toBe(route.status !== "stop");
      if (sure.decidedBy.member !== null)
        expect(route.findings[0]?.message).toContain(sure.worst?.message ?? "nothing");
    }
    expect([...seen]).toEqual(["stop arrival-missed", "clear undefined"]);
  });

  test("at speeds that the window names keep no arrival", () => {
    const input = inputOf();
    const sweep = makeSweep(prepareRoutes(input), input, between(7, 7.1));
    const asked = { whatIfs, errors: [], members: [] };
    const cell = sweepCell(sweep, sweep.prepared[0] as (typeof sweep.prepared)[number], DEPARTURE, 4);
    const named = new CellTrials(sweep, asked, { speeds_m_s: [4] });
    expect(runSteps(named.sure(cell)).status).toBe("clear");
  });
});
