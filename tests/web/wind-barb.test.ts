import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { currentArrow } from "../../web/chart/current-arrow.ts";
import { feathersOf, windBarb } from "../../web/chart/wind-barb.ts";

/*
 * Symbols after WMO-No. 485, attachment on plotted symbols: half barb 5 kn, full barb 10 kn, pennant 50 kn, the shaft toward
 * where the wind comes from. Bins as the OGC Met Ocean working group lists them for WMO's wind symbols.
 */

describe("the feathers of a wind barb", () => {
  test.each([
    [0, 2, { pennants: 0, full: 0, half: 0 }],
    [3, 7, { pennants: 0, full: 0, half: 1 }],
    [8, 12, { pennants: 0, full: 1, half: 0 }],
    [13, 17, { pennants: 0, full: 1, half: 1 }],
    [18, 22, { pennants: 0, full: 2, half: 0 }],
    [48, 52, { pennants: 1, full: 0, half: 0 }],
    [63, 67, { pennants: 1, full: 1, half: 1 }],
    [98, 102, { pennants: 2, full: 0, half: 0 }],
  ])("from %i to %i kn are those of the bin", (least, most, feathers) => {
    for (let speed = least; speed <= most; speed += 1) expect(feathersOf(speed)).toEqual(feathers);
  });

  test("add up to the speed rounded to 5 kn", () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 200, noNaN: true }), (speed) => {
        const { pennants, full, half } = feathersOf(speed);
        expect(Math.abs(50 * pennants + 10 * full + 5 * half - speed)).toBeLessThanOrEqual(2.5);
        expect(full).toBeLessThan(5);
        expect(half).toBeLessThan(2);
      }),
      { numRuns: 300 },
    );
  });
});

describe("a wind barb", () => {
  const tip = (from: number) => windBarb(10, from, false, 20).strokes[0]?.[1] ?? [0, 0];

  test("has its shaft toward where the wind comes from", () => {
    // px: x to the right is east, y down is south; tolerance of a sine in double precision.
    for (const [from, x, y] of [
      [0, 0, -20],
      [90, 20, 0],
      [180, 0, 20],
      [270, -20, 0],
    ] as const) {
      expect(tip(from)[0]).toBeCloseTo(x, 9);
      expect(tip(from)[1]).toBeCloseTo(y, 9);
    }
  });

  test("of a west wind has its barbs to the north in the northern hemisphere, to the south in the southern", () => {
    // Seen along a west wind, which goes east, the left hand is north.
    const barbEnd = (southern: boolean) => windBarb(10, 270, southern, 20).strokes[1]?.[1]?.[1] ?? 0;
    expect(barbEnd(false)).toBeLessThan(-5);
    expect(barbEnd(true)).toBeGreaterThan(5);
  });

  test("has its barbs left of the way the wind goes in the north, right in the south, from every direction", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 360, noNaN: true }),
        fc.double({ min: 3, max: 150, noNaN: true }),
        fc.boolean(),
        (from, speed, southern) => {
          const { strokes, fills } = windBarb(speed, from, southern, 20);
          const angle = (from * Math.PI) / 180;
          const along = [-Math.sin(angle), Math.cos(angle)] as const;
          // With y down, the left of (x, y) is (y, -x).
          const left = [along[1], -along[0]] as const;
          const ends = [...strokes.slice(1).map((stroke) => stroke[1]), ...fills.map((fill) => fill[1])];
          expect(ends.length).toBeGreaterThan(0);
          for (const end of ends) {
            const aside = (end?.[0] ?? 0) * left[0] + (end?.[1] ?? 0) * left[1];
            if (southern) expect(aside).toBeLessThan(0);
            else expect(aside).toBeGreaterThan(0);
          }
        },
      ),
      { numRuns: 200 },
    );
  });

  test("of 5 kn has its half barb in from the end of the shaft", () => {
    const [shaft, half] = windBarb(5, 0, false, 20).strokes;
    expect(half?.[0]?.[1]).toBeGreaterThan(shaft?.[1]?.[1] ?? 0);
  });

  test("of a calm is a circle without a shaft", () => {
    expect(windBarb(2, 123, false, 20)).toEqual({ strokes: [], fills: [], calm: 3.5 });
  });
});

describe("a current arrow", () => {
  test("points to where the water sets, centred on its place", () => {
    const { strokes, fills } = currentArrow(90, 20);
    expect(fills[0]?.[0]?.[0]).toBeCloseTo(10, 9);
    expect(fills[0]?.[0]?.[1]).toBeCloseTo(0, 9);
    expect(strokes[0]?.[0]?.[0]).toBeCloseTo(-10, 9);
  });

  test("of still water is a dot", () => {
    expect(currentArrow(0, 0)).toEqual({ strokes: [], fills: [], calm: 1 });
  });
});
