import { expect, test } from "vitest";
import type { DecidedRoute } from "../../web/core.ts";
import { alongAxis, errorBetween, membersBetween, onArrival } from "../../web/ribbon/spread-between.ts";

const ROUTE = {
  usable: 100,
  legs: [{ remaining: 80 }, { remaining: 50 }],
  spread: { legs: [{ remaining: 1 }, { remaining: 2 }] },
  ensemble: { legs: [{ remaining: { p10: 78, p50: 80, p90: 81 } }, { remaining: null }] },
} as unknown as DecidedRoute;

test("what is left under a stated error lies between its 10 % and 90 % quantiles, 1.281552 deviations to either side", () => {
  const [first, second] = errorBetween(ROUTE);
  // R: qnorm(c(0.1, 0.9), 80, 1) is 78.71845 81.28155.
  expect(first?.low).toBeCloseTo(78.71845, 4);
  expect(first?.high).toBeCloseTo(81.28155, 4);
  expect(second?.high).toBeCloseTo(52.5631, 4);
});

test("among members it is the members' own quantiles, as far as any comes", () => {
  expect(membersBetween(ROUTE)).toEqual([{ low: 78, high: 81 }, null]);
  expect(onArrival(ROUTE, membersBetween(ROUTE))).toBeNull();
  expect(onArrival(ROUTE, errorBetween(ROUTE))?.low).toBeCloseTo(47.4369, 4);
});

test("a band begins with what is aboard at the start, and ends where nothing more is known", () => {
  const ends = [0, 10, 30];
  expect(alongAxis(ROUTE, ends, membersBetween(ROUTE))).toEqual([
    { at: 0, low: 100, high: 100 },
    { at: 10, low: 78, high: 81 },
  ]);
  expect(alongAxis(ROUTE, ends, errorBetween(ROUTE)).map(({ at }) => at)).toEqual(ends);
  expect(alongAxis({ ...ROUTE, spread: null }, ends, errorBetween({ ...ROUTE, spread: null }))).toEqual([]);
});
