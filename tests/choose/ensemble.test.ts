import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { ensembleResult, memberRun, memberVariants } from "../../src/choose/ensemble.ts";
import { quantiles } from "../../src/choose/quantiles.ts";
import { withWorst } from "../../src/choose/what-if-results.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import type { RouteEstimate } from "../../src/estimate/result.ts";
import type { Field } from "../../src/field/field.ts";
import { craftOf, gridField, routeOf, spaced, waypoint } from "../estimate/fixtures.ts";
import { caseOf, runOf } from "./error-fixtures.ts";

const ROUTE = routeOf(waypoint("A", 0, 0), waypoint("B", 0.5, 2, { stay_s: 900 }), waypoint("C", 0, 4));
const SHAPE = { lon: spaced(-1, 5, 6), lat: [-1, 0, 1], hours: spaced(0, 60, 15) };

const windOf = (member: number, shape = SHAPE): Field =>
  gridField("wind", shape, (lon, lat, h) => [
    -4 + member + Math.sin(lon * member + h / 5),
    Math.cos(lat * 3 + member - h / 4),
  ]);

const CASE = caseOf(ROUTE, [windOf(1)], {
  craft: craftOf({ store: { unit: "J", usable: 5e7 } }),
  reserve: { kind: "share", share: 0.1 },
});

const runsOf = (numbers: readonly number[]) =>
  numbers.map((member) => memberRun(CASE.prepared, CASE.conditions, { member, fields: [windOf(member)] }));

describe("a member of an ensemble", () => {
  test("is to the last bit the estimate on its own fields, on the same axes or on others", () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 9 }), fc.boolean(), (member, finer) => {
        const field = windOf(member, finer ? { ...SHAPE, lon: spaced(-1, 5, 11) } : SHAPE);
        const alone = estimateRoute(prepareRoute(ROUTE, [field]), { ...CASE.conditions, fields: [field] });
        const run = memberRun(CASE.prepared, CASE.conditions, { member, fields: [field] });
        expect(run.estimate).toEqual(alone.estimate);
      }),
      { numRuns: 20 },
    );
  });
});

describe("what an ensemble comes to", () => {
  test("is the quantiles of its members' figures, per leg and for the route", () => {
    const numbers = [0, 1, 2, 3, 4, 5];
    const runs = runsOf(numbers);
    const result = ensembleResult(runs);
    expect(result.members).toEqual(numbers);
    expect(result.time_s).toEqual(quantiles(runs.map(({ estimate }) => estimate.totals.time_s as number)));
    expect(result.legs[0]?.use).toEqual(
      quantiles(runs.map(({ estimate }) => estimate.legs[0]?.use as number)),
    );
    expect(result.arrival?.max).toBe(
      runs
        .map(({ estimate }) => estimate.arrival as string)
        .sort()
        .at(-1),
    );
    expect([result.count, result.legs.length]).toEqual([6, 2]);
  });

  test("names the members that break the reserve, and those that do not arrive, and counts both against it", () => {
    const calm = windOf(6);
    const tooStrong = gridField("wind", SHAPE, () => [-20, 0]);
    const against = gridField("wind", SHAPE, () => [-0.6, 0]);
    const runs = [calm, tooStrong, against, calm].map((field, n) =>
      memberRun(CASE.prepared, CASE.conditions, { member: 10 * n, fields: [field] }),
    );
    const result = ensembleResult(runs);
    expect(result.doesNotArrive).toEqual([10]);
    expect(result.breaksReserve).toEqual([20]);
    expect(result.reserveHolds).toBe(0.5);
    expect([result.count, result.legs[0]?.count]).toEqual([3, 3]);
  });

  test("has no quantiles where no member arrives", () => {
    const tooStrong = gridField("wind", SHAPE, () => [-20, 0]);
    const result = ensembleResult([
      memberRun(CASE.prepared, CASE.conditions, { member: 0, fields: [tooStrong] }),
    ]);
    expect([result.time_s, result.arrival, result.legs[1]?.use, result.reserveHolds]).toEqual([
      null,
      null,
      null,
      0,
    ]);
  });

  test("decides the route's status by its worst member, which the finding names", () => {
    const own = runOf(CASE).estimate;
    const against = memberRun(CASE.prepared, CASE.conditions, {
      member: 7,
      fields: [gridField("wind", SHAPE, () => [-0.6, 0])],
    });
    const calm = memberRun(CASE.prepared, CASE.conditions, { member: 1, fields: [windOf(6)] });
    const better: RouteEstimate = { ...own, status: "clear", findings: [] };
    const judged = withWorst(better, memberVariants([calm, against]));
    expect(judged.status).toBe("stop");
    expect(judged.findings[0]?.code).toBe("reserve-broken");
    expect(judged.findings[0]?.message).toMatch(/^member 7: leg 2, /);
  });
});
