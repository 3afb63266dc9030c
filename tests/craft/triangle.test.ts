import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { cosDegrees, sinDegrees } from "../../src/craft/direction.ts";
import {
  alongThrough,
  componentsFromCurrent,
  componentsFromWind,
  currentSet,
  groundSpeedAlong,
  solveTriangle,
  throughSpeedFor,
  windFrom,
} from "../../src/craft/triangle.ts";
import { InputError } from "../../src/errors.ts";

const speed = fc.double({ min: 0.01, max: 300, noNaN: true });
const component = fc.double({ min: -100, max: 100, noNaN: true });
const course = fc.double({ min: -720, max: 720, noNaN: true });

describe("solveTriangle", () => {
  test("closes: V h + w = g T, to rounding", () => {
    fc.assert(
      fc.property(course, speed, component, component, (course_deg, throughSpeed, u, v) => {
        const found = solveTriangle({ course_deg, throughSpeed, u, v });
        if (!found.holdable) return;
        const { groundSpeed: g, heading_deg: h } = found;
        // The heading passes through degrees, which costs an ulp of 360°: 1e-15 of a turn in radians, times the speeds.
        const size = 4e-15 * (throughSpeed + Math.abs(u) + Math.abs(v));
        expect(Math.abs(throughSpeed * sinDegrees(h) + u - g * sinDegrees(course_deg))).toBeLessThanOrEqual(
          size,
        );
        expect(Math.abs(throughSpeed * cosDegrees(h) + v - g * cosDegrees(course_deg))).toBeLessThanOrEqual(
          size,
        );
        expect(g).toBeGreaterThan(0);
        expect(h).toBeGreaterThanOrEqual(0);
        expect(h).toBeLessThan(360);
      }),
      { numRuns: 3000 },
    );
  });

  test("either holds the course with g > 0 and |c| < V, or says which of the two fails", () => {
    fc.assert(
      fc.property(course, speed, component, component, (course_deg, throughSpeed, u, v) => {
        const found = solveTriangle({ course_deg, throughSpeed, u, v });
        const tooMuchCross = Math.abs(found.cross) >= throughSpeed;
        if (found.holdable) expect(tooMuchCross).toBe(false);
        else expect(found.reason).toBe(tooMuchCross ? "cross-track-component" : "ground-speed");
      }),
      { numRuns: 2000 },
    );
  });

  test("a wind along the track adds to or takes from the speed exactly", () => {
    for (const [u, expected] of [
      [3, 13],
      [-3, 7],
      [0, 10],
    ] as const) {
      const found = solveTriangle({ course_deg: 90, throughSpeed: 10, u, v: 0 });
      expect(found).toMatchObject({ holdable: true, groundSpeed: expected, heading_deg: 90, crab_deg: 0 });
    }
  });

  test("out and back in a steady stream takes 2 L V / (V² - w²), always more than in still water", () => {
    const out = solveTriangle({ course_deg: 0, throughSpeed: 6, u: 0, v: 2 });
    const back = solveTriangle({ course_deg: 180, throughSpeed: 6, u: 0, v: 2 });
    if (!out.holdable || !back.holdable) throw new Error("both can be held");
    expect(1 / out.groundSpeed + 1 / back.groundSpeed).toBeCloseTo((2 * 6) / (36 - 4), 15);
    expect(1 / out.groundSpeed + 1 / back.groundSpeed).toBeGreaterThan(2 / 6);
  });

  test("a pure crosswind leaves sqrt(V² - c²), crabbing into it", () => {
    // 3-4-5 triangle; a wind that moves north pushes a craft on an easterly course to port, so it heads to starboard.
    const found = solveTriangle({ course_deg: 90, throughSpeed: 5, u: 0, v: 3 });
    if (!found.holdable) throw new Error("can be held");
    expect(found.groundSpeed).toBe(4);
    expect(found.cross).toBe(-3);
    expect(found.crab_deg).toBeCloseTo((Math.asin(3 / 5) * 180) / Math.PI, 12);
    expect(found.heading_deg).toBeCloseTo(90 + found.crab_deg, 12);
  });

  test("the four cases that cannot be held are reported as such (E. Williams, Aviation Formulary, Wind Triangles)", () => {
    const abeam = componentsFromWind(10, 90);
    const abeamMore = componentsFromWind(10.0001, 90);
    const ahead = componentsFromWind(10, 0);
    const aheadMore = componentsFromWind(10.0001, 0);
    const on = { course_deg: 0, throughSpeed: 10 };
    expect(solveTriangle({ ...on, ...abeamMore })).toMatchObject({
      holdable: false,
      reason: "cross-track-component",
    });
    expect(solveTriangle({ ...on, ...abeam })).toMatchObject({
      holdable: false,
      reason: "cross-track-component",
    });
    expect(solveTriangle({ ...on, ...ahead })).toMatchObject({ holdable: false, reason: "ground-speed" });
    expect(solveTriangle({ ...on, ...aheadMore })).toMatchObject({ holdable: false, reason: "ground-speed" });
  });

  test("turning course and medium together turns the heading and nothing else", () => {
    fc.assert(
      fc.property(course, speed, component, component, (turn, throughSpeed, u, v) => {
        const before = solveTriangle({ course_deg: 0, throughSpeed, u, v });
        const s = sinDegrees(turn);
        const c = cosDegrees(turn);
        const after = solveTriangle({ course_deg: turn, throughSpeed, u: u * c + v * s, v: v * c - u * s });
        if (!before.holdable || !after.holdable) return;
        // Near |c| = V the root magnifies rounding; there the tolerance is that of the square.
        const q = alongThrough(throughSpeed, before.cross);
        const tolerance = (1e-14 * (throughSpeed + Math.abs(u) + Math.abs(v)) ** 2) / Math.max(q, 1e-7);
        expect(Math.abs(after.groundSpeed - before.groundSpeed)).toBeLessThanOrEqual(tolerance);
      }),
      { numRuns: 2000 },
    );
  });

  test.each([
    [{ course_deg: Number.NaN }, "course_deg is a finite number; found NaN deg"],
    [{ course_deg: Number.POSITIVE_INFINITY }, "course_deg is a finite number; found Infinity deg"],
    [{ throughSpeed: 0 }, "throughSpeed is a finite number above 0; found 0"],
    [{ throughSpeed: -4 }, "throughSpeed is a finite number above 0; found -4"],
    [{ throughSpeed: Number.NaN }, "throughSpeed is a finite number above 0; found NaN"],
    [{ throughSpeed: 1e200 }, "throughSpeed is a finite number of at most 1e+150; found 1e+200"],
    [{ u: Number.NaN }, "u is a finite number of at most 1e+150; found NaN"],
    [{ v: Number.NEGATIVE_INFINITY }, "v is a finite number of at most 1e+150; found -Infinity"],
  ])("refuses %j", (fault, message) => {
    const given = { course_deg: 10, throughSpeed: 5, u: 1, v: 1, ...fault };
    expect(() => solveTriangle(given)).toThrow(new InputError(message));
  });

  test("the greatest and least speeds accepted give finite figures", () => {
    for (const throughSpeed of [1e-150, 1e150])
      for (const u of [0, 1e-200, 1e150, -1e150]) {
        const found = solveTriangle({ course_deg: 33, throughSpeed, u, v: 0 });
        for (const value of Object.values(found))
          if (typeof value === "number") expect(value).toSatisfy(Number.isFinite);
      }
  });
});

describe("throughSpeedFor", () => {
  test("and solveTriangle are inverses where the craft does not point against its course", () => {
    fc.assert(
      fc.property(course, speed, component, component, (course_deg, groundSpeed, u, v) => {
        const through = throughSpeedFor({ course_deg, groundSpeed, u, v });
        const q = groundSpeed - through.along;
        if (through.stems || q < 1e-3) return;
        const back = solveTriangle({ course_deg, throughSpeed: through.throughSpeed, u, v });
        if (!back.holdable) throw new Error("a speed that was found must hold the course");
        // g = a + sqrt(V² - c²): rounding of V is magnified by V/q.
        const tolerance = 4e-16 * (through.throughSpeed ** 2 / q + Math.abs(through.along) + groundSpeed);
        expect(Math.abs(back.groundSpeed - groundSpeed)).toBeLessThanOrEqual(tolerance);
        expect(Math.abs(back.crab_deg - through.crab_deg)).toBeLessThanOrEqual(
          (tolerance / through.throughSpeed + 1e-14) * 60 * (1 + through.throughSpeed / q),
        );
      }),
      { numRuns: 3000 },
    );
  });

  test("says that it stems the flow where the flow alone is faster", () => {
    const found = throughSpeedFor({ course_deg: 0, groundSpeed: 2, u: 0, v: 5 });
    expect(found).toMatchObject({ throughSpeed: 3, stems: true, heading_deg: 180, crab_deg: 180 });
  });

  test("drifts where the flow is the ground speed, with its course as the heading", () => {
    const found = throughSpeedFor({ course_deg: 0, groundSpeed: 5, u: 0, v: 5 });
    expect(found).toMatchObject({ throughSpeed: 0, stems: false, heading_deg: 0, crab_deg: 0 });
  });

  test.each([0, -1, Number.NaN, Number.POSITIVE_INFINITY])("refuses a ground speed of %d", (groundSpeed) => {
    expect(() => throughSpeedFor({ course_deg: 0, groundSpeed, u: 0, v: 0 })).toThrow(InputError);
  });
});

describe("groundSpeedAlong", () => {
  test("is above 0 exactly where the track can be held, and never NaN", () => {
    const any = fc.double({ min: -1e100, max: 1e100, noNaN: true });
    fc.assert(
      fc.property(any, any, any, (v, along, cross) => {
        const g = groundSpeedAlong(Math.abs(v), along, cross);
        expect(Number.isNaN(g)).toBe(false);
        if (Math.abs(cross) >= Math.abs(v)) expect(g).toBe(0);
      }),
      { numRuns: 2000 },
    );
  });

  test("keeps its digits where the cross-track component is near the speed", () => {
    // V - c is exact here; sqrt(V² - c²) by squares would have lost half the digits.
    const v = 10;
    const c = 10 - 2 ** -40;
    expect(groundSpeedAlong(v, 0, c)).toBeCloseTo(Math.sqrt(2 ** -40 * (20 - 2 ** -40)), 20);
  });
});

describe("directions", () => {
  test("a wind that moves north-east comes from 225, a current sets to 45 (MetPy, wind_direction)", () => {
    expect(windFrom(10, 10).from_deg).toBe(225);
    expect(currentSet(10, 10).set_deg).toBe(45);
  });

  test("the four cardinal points are exact", () => {
    const cases = [
      [0, -1, 0],
      [-1, 0, 90],
      [0, 1, 180],
      [1, 0, 270],
    ] as const;
    for (const [u, v, from] of cases) {
      expect(windFrom(u, v)).toEqual({ speed: 1, from_deg: from });
      expect(currentSet(-u, -v)).toEqual({ drift: 1, set_deg: from });
      expect(componentsFromWind(1, from)).toEqual({ u: u + 0, v: v + 0 });
    }
  });

  test("a calm has direction 0, whatever the signs of its zeros", () => {
    for (const u of [0, -0])
      for (const v of [0, -0]) {
        expect(windFrom(u, v)).toEqual({ speed: 0, from_deg: 0 });
        expect(currentSet(u, v)).toEqual({ drift: 0, set_deg: 0 });
      }
  });

  test("turn into components and back, 0 <= direction < 360", () => {
    fc.assert(
      fc.property(speed, course, (size, direction) => {
        const wind = componentsFromWind(size, direction);
        const back = windFrom(wind.u, wind.v);
        expect(Math.abs(back.speed - size)).toBeLessThanOrEqual(4e-16 * size);
        expect(back.from_deg).toBeGreaterThanOrEqual(0);
        expect(back.from_deg).toBeLessThan(360);
        // An ulp of 360° in and out of radians.
        expect(Math.abs(sinDegrees(back.from_deg - direction))).toBeLessThanOrEqual(3e-15);
        const current = componentsFromCurrent(size, direction);
        expect(current.u + wind.u).toBe(0);
        expect(current.v + wind.v).toBe(0);
      }),
      { numRuns: 3000 },
    );
  });

  test("a direction a hair west of north stays below 360", () => {
    expect(currentSet(-1e-20, 1).set_deg).toBe(0);
  });

  test.each([Number.NaN, Number.POSITIVE_INFINITY, -1])("refuse a wind speed of %d", (value) => {
    expect(() => componentsFromWind(value, 0)).toThrow(InputError);
    expect(() => componentsFromCurrent(value, 0)).toThrow(InputError);
  });

  test.each([Number.NaN, Number.POSITIVE_INFINITY])("refuse a direction of %d", (value) => {
    expect(() => componentsFromWind(1, value)).toThrow(InputError);
    expect(() => componentsFromCurrent(1, value)).toThrow(InputError);
    expect(() => windFrom(value, 0)).toThrow(InputError);
    expect(() => currentSet(0, value)).toThrow(InputError);
  });
});
