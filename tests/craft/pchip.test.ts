import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { Pchip } from "../../src/craft/pchip.ts";
import { InputError } from "../../src/errors.ts";

const points = fc
  .array(
    fc.tuple(
      fc.double({ min: 0.01, max: 10, noNaN: true }),
      fc.oneof(fc.constant(0), fc.double({ min: -100, max: 100, noNaN: true })),
    ),
    { minLength: 2, maxLength: 12 },
  )
  .map((steps) => {
    let x = 0;
    let y = 0;
    return steps.map(([dx, dy]) => {
      x += dx;
      y += dy;
      return [x, y] as const;
    });
  });

const curve = (rows: readonly (readonly [number, number])[]) =>
  new Pchip(
    rows.map(([x]) => x),
    rows.map(([, y]) => y),
  );

describe("Pchip", () => {
  test("passes through its points, bit by bit", () => {
    fc.assert(
      fc.property(points, (rows) => {
        const p = curve(rows);
        for (const [x, y] of rows) expect(p.value(x)).toBe(y + 0);
      }),
      { numRuns: 500 },
    );
  });

  test("stays between the ordinates of its interval, so it is monotone where the points are", () => {
    fc.assert(
      fc.property(points, (rows) => {
        const p = curve(rows);
        for (let k = 0; k + 1 < rows.length; k++) {
          const [x0, y0] = rows[k] as readonly [number, number];
          const [x1, y1] = rows[k + 1] as readonly [number, number];
          // Rounding of a cubic whose coefficients are a few times the ordinates.
          const slack = 1e-14 * (Math.abs(y0) + Math.abs(y1) + 1);
          let before = y0;
          for (let i = 1; i < 20; i++) {
            const y = p.value(x0 + ((x1 - x0) * i) / 20);
            if (y1 >= y0) expect(y).toBeGreaterThanOrEqual(before - slack);
            if (y1 <= y0) expect(y).toBeLessThanOrEqual(before + slack);
            before = y;
          }
          if (y1 >= y0) expect(before).toBeLessThanOrEqual(y1 + slack);
          if (y1 <= y0) expect(before).toBeGreaterThanOrEqual(y1 - slack);
        }
      }),
      { numRuns: 500 },
    );
  });

  test("and its derivative are continuous across the points", () => {
    fc.assert(
      fc.property(points, (rows) => {
        const p = curve(rows);
        for (let k = 1; k + 1 < rows.length; k++) {
          const [x0, y0] = rows[k - 1] as readonly [number, number];
          const [x, y] = rows[k] as readonly [number, number];
          const secant = Math.abs(y - y0) / (x - x0);
          // Slopes are at most three secants, so the second derivative is at most 18 secants over the interval.
          const step = 1e-12 * (x - x0);
          const size = 1e-300 + 1e-15 * (Math.abs(y) + Math.abs(y0)) + 4e-16 * x * 3 * secant;
          expect(Math.abs(p.value(x - step) - y)).toBeLessThanOrEqual(3 * secant * step + size);
          const turn = (18 * secant * (step + 4e-16 * x)) / (x - x0);
          expect(Math.abs(p.derivative(x - step) - p.derivative(x))).toBeLessThanOrEqual(
            1e-300 + turn + 1e-14 * secant,
          );
        }
      }),
      { numRuns: 500 },
    );
  });

  test("has the derivative of its value (central difference)", () => {
    const p = new Pchip([0, 1, 2.5, 4, 7], [0, 2, 3, 9, 9.5]);
    for (const x of [0.3, 1.2, 2, 3.1, 5.5]) {
      const h = 1e-5;
      // Second-order difference: h² of the third derivative (below 10) and rounding over h.
      expect(Math.abs(p.derivative(x) - (p.value(x + h) - p.value(x - h)) / (2 * h))).toBeLessThan(2e-9);
    }
  });

  test("through two points is the straight line", () => {
    const p = new Pchip([2, 6], [10, 50]);
    expect(p.value(3)).toBe(20);
    expect(p.derivative(2)).toBe(10);
    expect(p.derivative(6)).toBe(10);
  });

  test("through points on a line is that line", () => {
    const p = new Pchip([0, 1, 3, 7], [1, 3, 7, 15]);
    for (const x of [0, 0.5, 2, 4, 6.9, 7]) expect(p.value(x)).toBeCloseTo(1 + 2 * x, 14);
  });

  test("is flat at a turn of the points", () => {
    const p = new Pchip([0, 1, 2], [0, 5, 1]);
    expect(p.derivative(1)).toBe(0);
    expect(p.value(1)).toBe(5);
  });

  test.each([
    [[1], [1]],
    [[], []],
    [
      [1, 2],
      [1, 2, 3],
    ],
    [
      [1, 1],
      [1, 2],
    ],
    [
      [2, 1],
      [1, 2],
    ],
    [
      [1, Number.NaN],
      [1, 2],
    ],
    [
      [1, 2],
      [1, Number.POSITIVE_INFINITY],
    ],
  ])("refuses the points %j, %j", (x, y) => {
    expect(() => new Pchip(x, y)).toThrow(InputError);
  });
});
