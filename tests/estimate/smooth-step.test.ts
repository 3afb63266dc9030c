import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { PAIR } from "../../src/estimate/smooth-pair.ts";
import {
  guessDistance,
  type Lanes,
  lateDistance,
  makeLanes,
  NOT_SMOOTH,
  smoothTimes,
} from "../../src/estimate/smooth-step.ts";
import {
  type Component,
  expectClose,
  isWithinReach,
  marched,
  none,
  numbers,
  pairOf,
  randomMedium,
  SPEED,
  timeTo,
  type Way,
} from "./smooth-media.ts";

/** One lane over a stretch of this length, m, with the step taken. */
function stepOver(along: Component, cross: Component, { length, perSecond = 0, share = 0 }: Way): Lanes {
  const lanes = makeLanes(1);
  lanes.half[0] = length / 2;
  lanes.perSecond[0] = perSecond;
  lanes.share[0] = share;
  smoothTimes(pairOf(along, cross), 0, 0, SPEED, lanes, 0, 1);
  return lanes;
}

describe("a smooth step over a medium with a closed form", () => {
  test("still: T = L/V", () => {
    expectClose(stepOver(none, none, { length: 1234 }).time[0] as number, 123.4, 4e-16);
  });

  test("uniform along the track: T = L/(V + a), with cross-track L/(a + sqrt(V² - c²))", () => {
    const lanes = stepOver(
      () => -2,
      () => 6,
      { length: 6000 },
    );
    expectClose(lanes.time[0] as number, 1000, 4e-16);
  });

  test("linear in distance: T = ln(g(L)/g(0))/g'", () => {
    for (const share of [-0.02, 0.03, 0.1]) {
      const change = share * SPEED;
      const lanes = stepOver((x) => 1 + (change * (x + 1)) / 2, none, { length: 5000 });
      const exact = (Math.log((SPEED + 1 + change) / (SPEED + 1)) * 5000) / change;
      expectClose(lanes.time[0] as number, exact, 2e-13);
    }
  });

  test("growing with time alike everywhere: (V + a) T + a' T²/2 = L", () => {
    for (const growth of [-2e-4, 1e-5, 5e-4]) {
      const lanes = stepOver((_x, share) => 2 + share * growth * 3600, none, {
        length: 5000,
        perSecond: 1 / 3600,
        share: 0.25,
      });
      const start = SPEED + 2 + 0.25 * growth * 3600;
      const exact = (2 * 5000) / (start + Math.sqrt(start * start + 2 * growth * 5000));
      expectClose(lanes.time[0] as number, exact, 2e-13);
    }
  });

  test("pure crosswind growing with time: ∫ sqrt(V² - (c' t)²) dt = L", () => {
    for (const growth of [1e-4, 5e-4, 1.5e-3]) {
      const lanes = stepOver(none, (_x, share) => share * growth * 3600, {
        length: 5000,
        perSecond: 1 / 3600,
      });
      // ½ (t sqrt(V² - c²) + V²/c' asin(c/V)), c = c' t.
      const distance = (time: number) => {
        const cross = growth * time;
        const across = (SPEED * SPEED * Math.asin(cross / SPEED)) / growth;
        return (time * Math.sqrt(SPEED * SPEED - cross * cross) + across) / 2;
      };
      expectClose(lanes.time[0] as number, timeTo(5000, distance), 2e-12);
    }
  });
});

describe("a smooth step", () => {
  test("is refused where the medium turns about within it, is no number, or is faster than the craft", () => {
    const refused = (along: Component, cross: Component, way: Way) =>
      expect(stepOver(along, cross, way).time[0]).toBe(NOT_SMOOTH);
    refused((x) => 3 * Math.sin(4 * x), none, { length: 1000 });
    refused(none, (x) => 5 * x * x * x, { length: 1000 });
    refused((_x, share) => 8 * share, none, { length: 1e5, perSecond: 1 / 3600 });
    refused(() => Number.NaN, none, { length: 1000 });
    refused(none, () => 11, { length: 1000 });
    // A quarter of it has no third Legendre coefficient to speak of, but a fourth one.
    refused((x) => 0.02 * (35 * x ** 4 - 30 * x * x + 3), none, { length: 1000 });
  });

  test("takes each lane as if it were alone, by a pair of its own or a shared one", () => {
    fc.assert(
      fc.property(
        fc.array(
          fc.record({
            length: fc.double({ min: 1, max: 20000, noNaN: true }),
            perSecond: fc.double({ min: 0, max: 1e-3, noNaN: true }),
            share: fc.double({ min: 0, max: 1, noNaN: true }),
          }),
          { minLength: 1, maxLength: 9 },
        ),
        (ways) => {
          const along: Component = (x, share) => 2 + x / 3 - share * (1 + 0.2 * x * x);
          const cross: Component = (x, share) => share * 3 - 0.1 * x;
          const pair = pairOf(along, cross);
          const pairs = new Float64Array(PAIR * ways.length);
          ways.forEach((_, n) => {
            pairs.set(pair, n * PAIR);
          });
          const [shared, own] = [makeLanes(ways.length), makeLanes(ways.length)];
          for (const lanes of [shared, own])
            ways.forEach(({ length, perSecond, share }, n) => {
              lanes.half[n] = length / 2;
              lanes.perSecond[n] = perSecond;
              lanes.share[n] = share;
            });
          smoothTimes(pair, 0, 0, SPEED, shared, 0, ways.length);
          smoothTimes(pairs, 0, PAIR, SPEED, own, 0, ways.length);
          const alone = ways.map((way) => stepOver(along, cross, way).time[0]);
          expect(Array.from(shared.time)).toEqual(alone);
          expect(Array.from(own.time)).toEqual(alone);
        },
      ),
      { numRuns: 100, endOnFailure: true },
    );
  });

  test("that passes has the time of a thousand steps of Runge and Kutta's, but for one in a few hundred", () => {
    const next = numbers(7);
    const errors: number[] = [];
    for (let n = 0; n < 1500; n += 1) {
      const rough = 10 ** (-1.65 + 1.35 * next()) * SPEED;
      const { along, cross } = randomMedium(next, rough);
      if (!isWithinReach(along, cross)) continue;
      const way = { length: 8000, perSecond: 1e-4, share: 0.45 * (1 + next()) };
      const time = stepOver(along, cross, way).time[0] as number;
      if (time === NOT_SMOOTH || way.share + way.perSecond * time > 1) continue;
      const exact = marched(along, cross, way);
      errors.push(Math.abs(time - exact) / exact);
    }
    errors.sort((a, b) => a - b);
    expect(errors.length).toBeGreaterThan(200);
    expect(errors[Math.floor(0.97 * errors.length)]).toBeLessThan(4e-12);
    expect(errors.at(-1)).toBeLessThan(2e-11);
  });

  test("tells where it had come to, and how slow it was at its end", () => {
    const change = 0.5;
    const lanes = stepOver((x) => (change * (x + 1)) / 2, none, { length: 5000 });
    const time = lanes.time[0] as number;
    expect(guessDistance(lanes, 0, time)).toBeCloseTo(5000, 6);
    // s = (e^(g' t) - 1) V/g' after a time t.
    const perMetre = change / 5000;
    for (const share of [0, 0.3, 0.7]) {
      const exact = (Math.expm1(perMetre * share * time) * SPEED) / perMetre;
      expect(Math.abs(guessDistance(lanes, 0, share * time) - exact)).toBeLessThan(0.02);
    }
    expectClose(lanes.end[0] as number, 1 / (SPEED + change), 1e-8);
    // V + a' T at the end where it grows with time, after T as above.
    const growing = stepOver((_x, part) => part, none, { length: 5000, perSecond: 5e-4 });
    expectClose(growing.end[0] as number, 1 / Math.sqrt(SPEED * SPEED + 2 * 5e-4 * 5000), 1e-8);
  });

  test("tells where it was shortly before its end, or would be after it", () => {
    const change = 0.5;
    const perMetre = change / 5000;
    const lanes = stepOver((x) => (change * (x + 1)) / 2, none, { length: 5000 });
    const time = lanes.time[0] as number;
    for (const late of [-1e-4 * time, 1e-5 * time, 1e-4 * time]) {
      const exact = 5000 - (Math.expm1(perMetre * (time - late)) * SPEED) / perMetre;
      // Half a metre at most, by a slowness at the end that is right to 1e-8 or so.
      expect(Math.abs(lateDistance(lanes, 0, late) - exact)).toBeLessThan(1e-8);
    }
  });
});
