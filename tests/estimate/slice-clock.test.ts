import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { makeSliceClock, turnClock } from "../../src/estimate/slice-clock.ts";
import { DEPARTURE, HOUR } from "./fixtures.ts";

const HOURS = [-3, 0, 3, 4, 10];
const times = Float64Array.from(HOURS, (hours) => DEPARTURE + hours * HOUR);

describe("a slice clock", () => {
  test("turns to the slices around a moment, with the share of the way between them", () => {
    const clock = makeSliceClock(2);
    expect(turnClock(clock, 1, times, DEPARTURE, 3.5 * 3600)).toBe(true);
    expect(clock.slice[1]).toBe(2);
    expect(clock.from[1]).toBe(3 * 3600);
    expect(clock.until[1]).toBe(4 * 3600);
    expect(clock.perSecond[1]).toBe(1 / 3600);
    // The other departure's hands have not moved.
    expect([clock.slice[0], clock.until[0]]).toEqual([0, Number.NEGATIVE_INFINITY]);
  });

  test("is between the later two at a valid time itself, and a microsecond before it between the earlier", () => {
    for (const [hours, before, at] of [
      [0, 0, 1],
      [3, 1, 2],
      [4, 2, 3],
    ] as const) {
      const clock = makeSliceClock(1);
      expect(turnClock(clock, 0, times, DEPARTURE, hours * 3600 - 1e-6)).toBe(true);
      expect(clock.slice[0]).toBe(before);
      expect(turnClock(clock, 0, times, DEPARTURE, hours * 3600)).toBe(true);
      expect(clock.slice[0]).toBe(at);
    }
  });

  test("has no slices before the first valid time, nor from the last one on", () => {
    const turned = (hours: number) => turnClock(makeSliceClock(1), 0, times, DEPARTURE, hours * 3600);
    expect(turned(-3)).toBe(true);
    expect(turned(-3 - 1e-9)).toBe(false);
    expect(turned(10 - 1e-9)).toBe(true);
    expect(turned(10)).toBe(false);
    expect(turned(Number.NaN)).toBe(false);
    // One valid time alone is the first and the last.
    expect(turnClock(makeSliceClock(1), 0, times.subarray(1, 2), DEPARTURE, 0)).toBe(false);
  });

  test("holds for ever in a steady tile", () => {
    const clock = makeSliceClock(1);
    expect(turnClock(clock, 0, null, DEPARTURE, 1e9)).toBe(true);
    expect([clock.slice[0], clock.until[0]]).toEqual([0, Number.POSITIVE_INFINITY]);
  });

  test("finds, moment after moment, what a search from the start finds", () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -3 * 3600, max: 10 * 3600 - 1, noNaN: true }), { minLength: 1 }),
        fc.integer({ min: -HOUR, max: HOUR }),
        (moments, later) => {
          const clock = makeSliceClock(1);
          const departure = DEPARTURE + later;
          for (const moment of moments.sort((a, b) => a - b)) {
            const since = HOURS.map((hours) => (hours * HOUR - later) / 1000);
            const slice = since.findLastIndex((time) => time <= moment);
            const within = slice >= 0 && slice < HOURS.length - 1;
            expect(turnClock(clock, 0, times, departure, moment)).toBe(within);
            if (within) expect(clock.slice[0]).toBe(slice);
          }
        },
      ),
      { numRuns: 200, endOnFailure: true },
    );
  });
});
