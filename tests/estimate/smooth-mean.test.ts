import { describe, expect, test } from "vitest";
import { SmoothMean } from "../../src/estimate/smooth-mean.ts";
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
  type Way,
} from "./smooth-media.ts";

const SHARES = [0, 0.013, 0.25, 0.5, 0.77, 0.999];

/** The mean over a stretch; `null` where there is none. */
function meanOver(along: Component, cross: Component, { length, perSecond = 0 }: Way): SmoothMean | null {
  const mean = new SmoothMean();
  return mean.lay(pairOf(along, cross), 0, SPEED, length, perSecond) ? mean : null;
}

describe("the mean ground speed over a stretch", () => {
  test("in a steady uniform medium is that at any moment: L/(V + a), with cross-track L/(a + sqrt(V² - c²))", () => {
    const mean = meanOver(
      () => -2,
      () => 6,
      { length: 6000, perSecond: 1e-4 },
    );
    for (const share of SHARES) expectClose(mean?.time(share), 1000, 4e-16);
  });

  test("in one that grows with time alike everywhere: (V + a) T + a' T²/2 = L", () => {
    for (const growth of [1e-6, 5e-5, -4e-4]) {
      const perSecond = 1 / 3600;
      const mean = meanOver((_x, share) => 2 + share * growth * 3600, none, { length: 5000, perSecond });
      for (const share of SHARES) {
        const start = SPEED + 2 + share * growth * 3600;
        const exact = (2 * 5000) / (start + Math.sqrt(start * start + 2 * growth * 5000));
        // What a polynomial may miss.
        expectClose(mean?.time(share), exact, 5e-12);
      }
    }
  });

  test("is that of a thousand steps of Runge and Kutta's from that moment on, but for a few in a thousand", () => {
    const next = numbers(11);
    const errors: number[] = [];
    for (let n = 0; n < 4000; n += 1) {
      const { along, cross } = randomMedium(next, 10 ** (-1.65 + 1.35 * next()) * SPEED);
      const way = { length: 8000, perSecond: 1e-4, share: 0.45 * (1 + next()) };
      const mean = isWithinReach(along, cross) ? meanOver(along, cross, way) : null;
      if (mean === null) continue;
      errors.push(Math.abs(mean.time(way.share) / marched(along, cross, way) - 1));
    }
    errors.sort((a, b) => a - b);
    expect(errors.length).toBeGreaterThan(300);
    expect(errors[Math.floor(0.99 * errors.length)]).toBeLessThan(1e-11);
    expect(errors.at(-1)).toBeLessThan(2e-11);
  });

  test("is not taken for smoother than it is where the ground speed would end not far beyond the valid times", () => {
    // The speed rises from 4.8 to 6.4 m/s: it would end 7 half intervals before their middle. Since it varies along the stretch, its mean has
    // a little of the pole there: after four coefficients that fall by 10 or more each, the last two are 2e-8 and 5e-9, and the next is not less.
    const along: Component = (x, share) => 0.02 * x - 4.703894775378671 + 1.143584664929955 * share;
    const cross: Component = (x, share) => 0.02 * x - 2.983077339763165 + 2.814497253935162 * share;
    const way = { length: 2221.9368040412373, perSecond: 0.0001045934077395295 };
    expect(meanOver(along, cross, way)).toBeNull();
  });

  test("does not depend on what was laid before", () => {
    const growing: Component = (x, share) => 1 + 0.1 * x + 0.2 * share;
    const strong: Component = (_x, share) => share;
    const fresh = meanOver(growing, none, { length: 5000, perSecond: 1e-4 });
    const used = new SmoothMean();
    expect(used.lay(pairOf(strong, strong), 0, SPEED, 900, 1e-4)).toBe(true);
    expect(used.lay(pairOf(growing, none), 0, SPEED, 5000, 1e-4)).toBe(true);
    for (const share of SHARES) expect(used.time(share)).toBe(fresh?.time(share));
  });

  test("is not there where a step is too rough, or it turns about between the valid times", () => {
    expect(meanOver((x) => 3 * Math.sin(4 * x), none, { length: 1000, perSecond: 1e-4 })).toBeNull();
    // From -0.85 to 0.85 of the speed across the track: the ground speed is a half circle.
    expect(meanOver(none, (_x, share) => 17 * (share - 0.5), { length: 100, perSecond: 1e-5 })).toBeNull();
    expect(meanOver(() => Number.NaN, none, { length: 1000, perSecond: 1e-4 })).toBeNull();
  });
});
