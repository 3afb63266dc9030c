import { describe, expect, test } from "vitest";
import { closeStretch, cover, feed, makeStretch } from "../../src/estimate/stretch.ts";
import { between, seeded } from "../seeded.ts";

/** Where a line through the points is above zero: each interval, by its own geometry. */
function positiveIntervals(places: readonly number[], margins: readonly number[]): [number, number][] {
  const found: [number, number][] = [];
  for (let n = 0; n + 1 < places.length; n += 1) {
    const [s, t] = [places[n] as number, places[n + 1] as number];
    const [a, b] = [margins[n] as number, margins[n + 1] as number];
    if (a <= 0 && b <= 0) continue;
    const zero = s + ((t - s) * a) / (a - b);
    const interval: [number, number] = [a > 0 ? s : zero, b > 0 ? t : zero];
    const last = found[found.length - 1];
    if (last !== undefined && last[1] === interval[0]) last[1] = interval[1];
    else found.push(interval);
  }
  return found;
}

describe("a stretch", () => {
  test("knows extent, distance and number of times of a margin that is a line between places", () => {
    const random = seeded(21);
    for (let n = 0; n < 500; n += 1) {
      const places = [0];
      for (let k = 0; k < 12; k += 1) places.push((places[k] as number) + between(random, 1, 100));
      const margins = places.map(() => between(random, -1, 1));
      const stretch = makeStretch();
      places.forEach((place, k) => {
        feed(stretch, place, margins[k] as number, 10 + (margins[k] as number));
      });
      closeStretch(stretch, places[12] as number);
      const intervals = positiveIntervals(places, margins);
      expect(stretch.times).toBe(intervals.length);
      if (intervals.length === 0) continue;
      expect(stretch.from).toBeCloseTo((intervals[0] as [number, number])[0], 9);
      expect(stretch.to).toBeCloseTo((intervals[intervals.length - 1] as [number, number])[1], 9);
      expect(stretch.touched).toBeCloseTo(
        intervals.reduce((sum, [from, to]) => sum + to - from, 0),
        9,
      );
      expect(stretch.peak).toBe(
        Math.max(0, ...margins.filter((margin) => margin > 0).map((margin) => 10 + margin)),
      );
    }
  });

  test("has nothing where the margin never is above zero, even where it touches zero", () => {
    const stretch = makeStretch();
    for (const [place, margin] of [
      [0, -1],
      [5, 0],
      [10, -2],
    ] as const)
      feed(stretch, place, margin, 7);
    closeStretch(stretch, 10);
    expect(stretch).toMatchObject({ from: -1, to: -1, touched: 0, times: 0, peak: 0 });
  });

  test("is open from the leg's start where the margin is above zero there, and is closed at its end", () => {
    const stretch = makeStretch();
    feed(stretch, 0, 1, 3);
    feed(stretch, 8, 2, 4);
    closeStretch(stretch, 9);
    expect(stretch).toMatchObject({ from: 0, to: 9, touched: 9, times: 1, peak: 4 });
  });

  test("takes whole spans that meet as one time and spans apart as two", () => {
    const stretch = makeStretch();
    cover(stretch, 10, 20);
    cover(stretch, 20, 30);
    expect(stretch).toMatchObject({ from: 10, to: 30, touched: 20, times: 1 });
    cover(stretch, 40, 45);
    expect(stretch).toMatchObject({ from: 10, to: 45, touched: 25, times: 2 });
  });

  test("takes spans less than a millimetre apart as one", () => {
    const stretch = makeStretch();
    cover(stretch, 0, 10);
    cover(stretch, 10.0009, 20);
    cover(stretch, 20.0011, 30);
    expect(stretch.times).toBe(2);
  });
});
