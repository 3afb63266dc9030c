import { describe, expect, test } from "vitest";
import {
  addDirection,
  directionSpread,
  makeDirectionRange,
  startDirection,
} from "../../src/estimate/direction-range.ts";
import { between, seeded } from "../seeded.ts";

const RADIANS = Math.PI / 180;

/** The spread of directions (degrees) with weights, kept around a reference. */
function spreadOf(reference: number, directions: readonly number[], weights: readonly number[]) {
  const range = makeDirectionRange();
  startDirection(range, Math.sin(reference * RADIANS), Math.cos(reference * RADIANS));
  directions.forEach((direction, n) => {
    addDirection(range, Math.sin(direction * RADIANS), Math.cos(direction * RADIANS), weights[n] as number);
  });
  return directionSpread(range);
}

const wrapped = (degrees: number) => degrees - 360 * Math.round(degrees / 360);

describe("a range of directions", () => {
  test("has the mean, least and greatest of directions spread over up to 170°, whatever the reference among them", () => {
    const random = seeded(31);
    let worst = 0;
    for (let n = 0; n < 2000; n += 1) {
      const centre = between(random, -360, 360);
      const width = between(random, 0, 170);
      const one = () => centre + width * between(random, -0.5, 0.5);
      const directions = Array.from({ length: 9 }, one);
      const weights = directions.map(() => between(random, 0.1, 1));
      const sum = (of: (radians: number) => number) =>
        directions.reduce((so, direction, k) => so + (weights[k] as number) * of(direction * RADIANS), 0);
      const mean = Math.atan2(sum(Math.sin), sum(Math.cos)) / RADIANS;
      const off = directions.map((direction) => wrapped(direction - mean));
      const found = spreadOf(one(), directions, weights);
      worst = Math.max(
        worst,
        Math.abs(wrapped(found.mean - mean)),
        Math.abs(found.min - (found.mean + Math.min(...off))),
        Math.abs(found.max - (found.mean + Math.max(...off))),
      );
    }
    // An arc sine near 90° knows its angle to the square root of the rounding: 1.2e-6°; found 4e-8°.
    expect(worst).toBeLessThan(2e-7);
  });

  test("goes round behind the reference: directions at 91°..179° on either side come back as they went in", () => {
    for (const off of [91, 120, 150, 179, -91, -120, -150, -179]) {
      const { mean, min, max } = spreadOf(10, [10 + off], [1]);
      for (const value of [mean, min, max]) expect(wrapped(value - 10 - off)).toBeCloseTo(0, 9);
    }
  });

  test("orders directions by their angle from the reference all the way round", () => {
    const { mean, min, max } = spreadOf(0, [-100, 20, 100], [1, 50, 1]);
    expect(min - mean).toBeCloseTo(-100 - mean, 9);
    expect(max - mean).toBeCloseTo(100 - mean, 9);
  });

  test("forgets everything when it starts afresh", () => {
    const range = makeDirectionRange();
    addDirection(range, 1, 0, 1);
    startDirection(range, 0, 1);
    addDirection(range, Math.sin(0.1), Math.cos(0.1), 2);
    const { mean, min, max } = directionSpread(range);
    for (const value of [mean, min, max]) expect(value).toBeCloseTo(0.1 / RADIANS, 12);
  });
});
