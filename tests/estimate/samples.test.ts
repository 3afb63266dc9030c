import { describe, expect, test } from "vitest";
import { placeOfUse, Samples } from "../../src/estimate/samples.ts";
import { between, seeded } from "../seeded.ts";

/** A made-up account of use along a leg: a cubic that rises everywhere, so that the interpolation between samples is exact. */
const useAt = (s: number) => 2 * s + 3 * s * s + 0.25 * s * s * s;
const slopeAt = (s: number) => 2 + 6 * s + 0.75 * s * s;

function addLeg(samples: Samples, leg: number, places: readonly number[], before: number): void {
  places.forEach((place, n) => {
    samples.leg.push(leg);
    samples.place.push(place);
    samples.time.push(place);
    samples.use.push(before + useAt(place));
    samples.usePerMetre.push(slopeAt(place));
    samples.usePerMetreBefore.push(slopeAt(places[Math.max(0, n - 1)] as number));
  });
}

describe("the place at which an amount is spent", () => {
  test("is where a cubic account has spent it, between samples at random places", () => {
    const random = seeded(41);
    for (let n = 0; n < 200; n += 1) {
      const samples = new Samples(false);
      const places = [0, 1, 2, 3].map((k) => k + between(random, 0, 0.9)).map((s, k) => (k === 0 ? 0 : s));
      addLeg(samples, 1, places, 0);
      const s = between(random, 0.001, places[3] as number);
      const found = placeOfUse(samples, useAt(s));
      expect(found?.leg).toBe(1);
      expect(found?.at).toBeCloseTo(s, 12);
    }
  });

  test("counts from the start of the leg that it is on", () => {
    const samples = new Samples(false);
    addLeg(samples, 1, [0, 2], 0);
    addLeg(samples, 2, [0, 1, 2], useAt(2));
    const found = placeOfUse(samples, useAt(2) + useAt(1.5));
    expect(found?.leg).toBe(2);
    expect(found?.at).toBeCloseTo(1.5, 12);
  });

  test("is the end of the leg where a stay spends it", () => {
    const samples = new Samples(false);
    addLeg(samples, 1, [0, 2], 0);
    samples.addStay(100, useAt(2) + 50, 0.5);
    expect(placeOfUse(samples, useAt(2) + 20)).toEqual({ leg: 1, at: 2 });
  });

  test("is nowhere where no more than the amount is spent", () => {
    const samples = new Samples(false);
    addLeg(samples, 1, [0, 2], 0);
    expect(placeOfUse(samples, useAt(2))).toBeNull();
    expect(placeOfUse(samples, useAt(2) + 1)).toBeNull();
  });

  test("is the start where more than the amount is spent from the first", () => {
    const samples = new Samples(false);
    addLeg(samples, 1, [0, 2], 5);
    expect(placeOfUse(samples, 1)).toEqual({ leg: 1, at: 0 });
  });
});
