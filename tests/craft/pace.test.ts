import fc from "fast-check";
import { describe, expect, test } from "vitest";
import type { Craft } from "../../src/craft/craft.ts";
import { paceSolver } from "../../src/craft/pace.ts";
import {
  emptySolution,
  PACE_CANNOT_HOLD,
  PACE_OK,
  PACE_OUTSIDE_TABLE,
} from "../../src/craft/pace-solution.ts";
import { type PaceConditions, stillConditions } from "../../src/craft/propulsion.ts";
import { tablePower } from "../../src/craft/table.ts";
import { InputError } from "../../src/errors.ts";
import { aeroplane, barge, byVectors, craftWith, drone, tender, tenderTable, windage } from "./crafts.ts";

const flow = fc.double({ min: -6, max: 6, noNaN: true });
const wind = fc.double({ min: -25, max: 25, noNaN: true });
const conditions = fc.record({
  along: flow,
  cross: flow,
  windAlong: wind,
  windCross: wind,
  climbSlope: fc.double({ min: -0.3, max: 0.3, noNaN: true }),
});
const windy: Craft = { ...tender, windage };

function at(more: Partial<PaceConditions>): PaceConditions {
  return { ...stillConditions(), ...more };
}

describe("the pace through-speed", () => {
  test.each([
    ["tender with windage", windy, 5],
    ["drone", drone, 11],
    ["aeroplane", aeroplane, 20],
  ])("%s: gives the ground speed and rate that plain vectors give", (_, craft, speed) => {
    const solver = paceSolver(craft, { hold: "through-speed", speed_m_s: speed }, true);
    const solution = emptySolution();
    fc.assert(
      fc.property(conditions, (where) => {
        const truth = byVectors(craft, speed, where);
        expect(solver.solve(where, solution)).toBe(truth === null ? PACE_CANNOT_HOLD : PACE_OK);
        if (truth === null) return;
        expect(solution.throughSpeed).toBe(speed);
        expect(Math.abs(solution.groundSpeed - truth.groundSpeed)).toBeLessThanOrEqual(1e-14 * 30);
        // Two orders of the same sums, the largest part of which is the windage at 40 m/s.
        expect(Math.abs(solution.rate - truth.rate)).toBeLessThanOrEqual(1e-13 * (truth.rate + 1e5));
      }),
      { numRuns: 1000 },
    );
  });

  test("windage acts only where there is a wind field", () => {
    const solution = emptySolution();
    const where = at({ windAlong: -15 });
    paceSolver(windy, { hold: "through-speed", speed_m_s: 5 }, false).solve(where, solution);
    expect(solution.rate).toBe(tender.power.perSecond(5) + 800);
    paceSolver(windy, { hold: "through-speed", speed_m_s: 5 }, true).solve(where, solution);
    expect(solution.rate).toBeGreaterThan(tender.power.perSecond(5) + 800);
  });

  test("windage does not act on a craft in air", () => {
    const solution = emptySolution();
    paceSolver({ ...drone, windage }, { hold: "through-speed", speed_m_s: 9 }, true).solve(
      at({ windAlong: -9 }),
      solution,
    );
    expect(solution.rate).toBe(drone.power.perSecond(9) + 5);
  });

  test("in still air with a wind field of 0, windage costs nothing", () => {
    const solution = emptySolution();
    paceSolver(windy, { hold: "through-speed", speed_m_s: 5 }, true).solve(at({}), solution);
    expect(solution.rate).toBeCloseTo(tender.power.perSecond(5) + 800, 9);
  });

  test("says that the track cannot be held at |c| = V, and at g = 0", () => {
    const solver = paceSolver(tender, { hold: "through-speed", speed_m_s: 5 }, false);
    const solution = emptySolution();
    expect(solver.solve(at({ cross: 5 }), solution)).toBe(PACE_CANNOT_HOLD);
    expect(solver.solve(at({ cross: -5, along: 20 }), solution)).toBe(PACE_CANNOT_HOLD);
    expect(solver.solve(at({ along: -5 }), solution)).toBe(PACE_CANNOT_HOLD);
    expect(solver.solve(at({ along: -6 }), solution)).toBe(PACE_CANNOT_HOLD);
    expect(solution).toEqual({
      status: PACE_CANNOT_HOLD,
      throughSpeed: 5,
      groundSpeed: -1,
      rate: 0,
      stems: false,
    });
    expect(solver.solve(at({ cross: 4.999 }), solution)).toBe(PACE_OK);
  });

  test("says that a speed outside the rows has no rate", () => {
    const solver = paceSolver(tender, { hold: "through-speed", speed_m_s: 9.3 }, false);
    const solution = emptySolution();
    expect(solver.solve(at({}), solution)).toBe(PACE_OUTSIDE_TABLE);
    expect(solution.rate).toBe(0);
  });

  test.each([0, -3, Number.NaN, Number.POSITIVE_INFINITY])("refuses a speed of %d", (speed_m_s) => {
    expect(() => paceSolver(tender, { hold: "through-speed", speed_m_s }, false)).toThrow(InputError);
    expect(() => paceSolver(tender, { hold: "ground-speed", speed_m_s }, false)).toThrow(InputError);
    expect(() => paceSolver(tender, { hold: "power", power_W: speed_m_s }, false)).toThrow(InputError);
  });

  test("refuses windage on a fuel-rate model without a specific consumption", () => {
    const craft: Craft = { ...windy, power: { ...tenderTable, unit: "kg/s" }, storePerJoule: null };
    expect(() => paceSolver(craft, { hold: "through-speed", speed_m_s: 5 }, true)).toThrow(
      "windage needs a specific consumption where the power model is a fuel rate; found none",
    );
    expect(() => paceSolver(craft, { hold: "through-speed", speed_m_s: 5 }, false)).not.toThrow();
  });
});

describe("the pace ground-speed", () => {
  test("takes V = |g T - w|, from which through-speed gives g and the rate back", () => {
    const solution = emptySolution();
    const back = emptySolution();
    fc.assert(
      fc.property(conditions, fc.double({ min: 0.5, max: 5, noNaN: true }), (where, g) => {
        const status = paceSolver(windy, { hold: "ground-speed", speed_m_s: g }, true).solve(where, solution);
        const v = Math.hypot(g - where.along, where.cross);
        expect(Math.abs(solution.throughSpeed - v)).toBeLessThanOrEqual(1e-15 * 20);
        if (v > windy.power.max) expect(status).toBe(PACE_OUTSIDE_TABLE);
        expect(solution.stems).toBe(g < where.along && status === PACE_OK);
        if (status !== PACE_OK || g - where.along < 1e-2) return;
        const through = paceSolver(windy, { hold: "through-speed", speed_m_s: solution.throughSpeed }, true);
        expect(through.solve(where, back)).toBe(PACE_OK);
        // g = a + sqrt(V² - c²) magnifies the rounding of V by V/q, here at most 1,000.
        expect(Math.abs(back.groundSpeed - g)).toBeLessThanOrEqual(
          (1e-15 * v * v) / (g - where.along) + 1e-14,
        );
        expect(Math.abs(back.rate - solution.rate)).toBeLessThanOrEqual(1e-11 * (solution.rate + 1e5));
      }),
      { numRuns: 1000 },
    );
  });

  test("stems a flow that overtakes it, at the power of the speed that this takes", () => {
    const solution = emptySolution();
    const solver = paceSolver(tender, { hold: "ground-speed", speed_m_s: 2 }, false);
    expect(solver.solve(at({ along: 5 }), solution)).toBe(PACE_OK);
    expect(solution).toEqual({
      status: PACE_OK,
      throughSpeed: 3,
      groundSpeed: 2,
      rate: tender.power.perSecond(3) + 800,
      stems: true,
    });
  });

  test("drifts where the flow is the ground speed", () => {
    const solution = emptySolution();
    const solver = paceSolver(tender, { hold: "ground-speed", speed_m_s: 2 }, false);
    expect(solver.solve(at({ along: 2 }), solution)).toBe(PACE_OK);
    expect(solution).toMatchObject({ throughSpeed: 0, groundSpeed: 2, rate: 2000, stems: false });
  });

  test("has no rate for a wing that would have to fly at nothing", () => {
    const solution = emptySolution();
    const solver = paceSolver(aeroplane, { hold: "ground-speed", speed_m_s: 9 }, false);
    expect(solver.solve(at({ along: 9 }), solution)).toBe(PACE_OUTSIDE_TABLE);
  });
});

describe("the pace power", () => {
  const cases: [string, Craft, number[]][] = [
    ["barge", { ...barge, windage }, [2000, 30000, 90000]],
    ["tender", windy, [3000, 20000, 41000, 70000]],
    ["drone", drone, [160, 180, 260, 600]],
    ["aeroplane", aeroplane, [120, 200, 500]],
  ];

  test.each(cases)("%s: spends the power ordered, hotel load apart", (_, craft, powers) => {
    const solution = emptySolution();
    fc.assert(
      fc.property(conditions, fc.constantFrom(...powers), (where, power_W) => {
        const solver = paceSolver(craft, { hold: "power", power_W }, true);
        if (solver.solve(where, solution) !== PACE_OK) return;
        const { throughSpeed, groundSpeed, rate } = solution;
        expect(rate).toBe(power_W + craft.hotelPerSecond);
        const truth = byVectors(craft, throughSpeed, where);
        if (truth === null) throw new Error("a speed that was found must hold the track");
        // Rounding of V, times the slope of the power there (up to 100 kW per m/s with windage, over q near 0).
        const q = groundSpeed - where.along;
        expect(Math.abs(truth.rate - rate)).toBeLessThanOrEqual(
          (1e-10 * (1 + throughSpeed)) / Math.min(1, q),
        );
        expect(Math.abs(truth.groundSpeed - groundSpeed)).toBeLessThanOrEqual(1e-13 / Math.min(1, q));
      }),
      { numRuns: 600 },
    );
  });

  test.each(cases)("%s: takes the fastest speed that spends it, by brute force", (_, craft, powers) => {
    const solution = emptySolution();
    const range = craft.speeds as { min: number; max: number };
    fc.assert(
      fc.property(conditions, fc.constantFrom(...powers), (where, power_W) => {
        const status = paceSolver(craft, { hold: "power", power_W }, true).solve(where, solution);
        const balance = (v: number) => {
          const truth = byVectors(craft, v, where);
          return truth === null ? null : truth.rate - craft.hotelPerSecond - power_W;
        };
        let fastest: number | null = null;
        let above = balance(range.max);
        const steps = 1500;
        for (let i = steps - 1; i >= 0 && fastest === null && above !== null; i--) {
          const v = range.min + ((range.max - range.min) * i) / steps;
          const below = balance(v);
          if (below === null) break;
          if (below > 0 !== above > 0) fastest = v;
          above = below;
        }
        if (fastest !== null) {
          expect(status).toBe(PACE_OK);
          const piece = (range.max - range.min) / steps;
          // The solver may see a pair of roots that the grid steps over, never the reverse.
          expect(solution.throughSpeed).toBeGreaterThanOrEqual(fastest - 1e-9);
          if (solution.throughSpeed > fastest + piece + 1e-9)
            expect(Math.abs(balance(solution.throughSpeed) ?? 1)).toBeLessThan(1e-7);
        }
      }),
      { numRuns: 150 },
    );
  });

  test("any table and any power: takes the fastest speed that spends it, by brute force", () => {
    const solution = emptySolution();
    const steps = fc.array(
      fc.record({
        speed: fc.double({ min: 0.05, max: 3, noNaN: true }),
        rate: fc.double({ min: -4000, max: 9000, noNaN: true }),
      }),
      { minLength: 2, maxLength: 8 },
    );
    fc.assert(
      fc.property(
        steps,
        fc.double({ min: 1, max: 2e4, noNaN: true }),
        fc.boolean(),
        conditions,
        (given, power_W, blown, where) => {
          let speed = -(given[0]?.speed ?? 0);
          let rate = 1000;
          const rows = given.map((row) => {
            speed += row.speed;
            rate = Math.max(0, rate + row.rate);
            return { speed_m_s: speed, rate };
          });
          const craft = craftWith(tablePower("W", rows), {
            windage: blown ? windage : null,
            speeds: { min: 0, max: speed },
          });
          const status = paceSolver(craft, { hold: "power", power_W }, true).solve(where, solution);
          const balance = (v: number) => {
            const truth = byVectors(craft, v, where);
            return truth === null ? null : truth.rate - craft.hotelPerSecond - power_W;
          };
          const fastest = speed;
          let above = balance(fastest);
          for (let i = 999; i >= 0 && above !== null; i--) {
            const v = (fastest * i) / 1000;
            const below = balance(v);
            if (below === null) return;
            if (below > 0 !== above > 0) {
              expect(status).toBe(PACE_OK);
              expect(solution.throughSpeed).toBeGreaterThanOrEqual(v - 1e-9);
              return;
            }
            above = below;
          }
        },
      ),
      { numRuns: 400 },
    );
  });

  test("takes the faster of the two speeds of a wing", () => {
    const solution = emptySolution();
    const power_W = aeroplane.power.perSecond(30);
    paceSolver(aeroplane, { hold: "power", power_W }, false).solve(at({}), solution);
    expect(solution.throughSpeed).toBeCloseTo(30, 12);
  });

  test("finds both roots hidden between two nodes, near the least power of a wing", () => {
    const solution = emptySolution();
    let least = 10;
    for (let v = 10; v < 20; v += 1e-4)
      if (aeroplane.power.perSecond(v) < aeroplane.power.perSecond(least)) least = v;
    const power_W = aeroplane.power.perSecond(least) * (1 + 1e-6);
    const status = paceSolver(aeroplane, { hold: "power", power_W }, false).solve(at({}), solution);
    expect(status).toBe(PACE_OK);
    expect(solution.throughSpeed).toBeGreaterThan(least);
    expect(aeroplane.power.perSecond(solution.throughSpeed) / power_W).toBeCloseTo(1, 13);
  });

  test("keeps its speed where neither wind nor climb acts, and says what it cannot do", () => {
    const solver = paceSolver(barge, { hold: "power", power_W: 40000 }, true);
    const solution = emptySolution();
    expect(solver.solve(at({ along: 1.5, cross: 3 }), solution)).toBe(PACE_OK);
    expect(solution.throughSpeed).toBeCloseTo(5, 14);
    expect(solution.groundSpeed).toBeCloseTo(5.5, 14);
    expect(solver.solve(at({ cross: 5.5 }), solution)).toBe(PACE_CANNOT_HOLD);
    expect(solver.solve(at({ cross: 9 }), solution)).toBe(PACE_CANNOT_HOLD);
    expect(solver.solve(at({ along: -5.5 }), solution)).toBe(PACE_CANNOT_HOLD);
    expect(paceSolver(barge, { hold: "power", power_W: 1e9 }, true).solve(at({}), solution)).toBe(
      PACE_OUTSIDE_TABLE,
    );
    expect(paceSolver(barge, { hold: "power", power_W: 1 }, true).solve(at({}), solution)).toBe(
      PACE_OUTSIDE_TABLE,
    );
  });

  test("cannot hold the track in a head wind that takes all the power below |c|", () => {
    const weak: Craft = { ...barge, windage: { ...windage, frontalArea_m2: 60 } };
    const solution = emptySolution();
    const solver = paceSolver(weak, { hold: "power", power_W: 3000 }, true);
    expect(solver.solve(at({ cross: 2, windAlong: -25, windCross: 25 }), solution)).toBe(PACE_CANNOT_HOLD);
  });

  test("of a fuel-rate model is its shaft power by the specific consumption", () => {
    const perJoule = 6e-8;
    const craft: Craft = {
      ...tender,
      power: {
        ...tenderTable,
        unit: "kg/s",
        perSecond: (v) => tenderTable.perSecond(v) * perJoule,
        slope: (v) => tenderTable.slope(v) * perJoule,
      },
      storePerJoule: perJoule,
      hotelPerSecond: 1e-4,
    };
    const solution = emptySolution();
    paceSolver(craft, { hold: "power", power_W: tenderTable.perSecond(6) }, false).solve(at({}), solution);
    expect(solution.throughSpeed).toBeCloseTo(6, 12);
    expect(() => paceSolver({ ...craft, storePerJoule: null }, { hold: "power", power_W: 1 }, false)).toThrow(
      "the pace power needs a specific consumption where the power model is a fuel rate; found none",
    );
  });

  test.each([
    [null, "the paces power and least-energy need the craft's range of speeds; found none"],
    [{ min: 5, max: 3 }, "the craft's range of speeds ascends from 0 or more; found 5 to 3 m/s"],
    [{ min: -1, max: 3 }, "the craft's range of speeds ascends from 0 or more; found -1 to 3 m/s"],
    [
      { min: 0, max: Number.POSITIVE_INFINITY },
      "the craft's range of speeds ascends from 0 or more; found 0 to Infinity m/s",
    ],
    [{ min: 1, max: 20 }, "the craft's range of speeds lies within its power model's, 0 to"],
  ])("refuses the range of speeds %j", (speeds, message) => {
    expect(() => paceSolver({ ...tender, speeds }, { hold: "power", power_W: 9000 }, false)).toThrow(message);
    expect(() => paceSolver({ ...tender, speeds }, { hold: "least-energy" }, false)).toThrow(InputError);
  });
});

test("one solution object serves many solvers, and an answer does not depend on the one before", () => {
  const solution = emptySolution();
  const solver = paceSolver(
    craftWith(tenderTable, { windage, speeds: { min: 1, max: 9 } }),
    { hold: "least-energy" },
    true,
  );
  const first = at({ along: 1, cross: 0.4, windAlong: -8, windCross: 3 });
  solver.solve(first, solution);
  const before = { ...solution };
  solver.solve(at({ along: -2, cross: 2, windAlong: 20, windCross: -9 }), solution);
  paceSolver(tender, { hold: "ground-speed", speed_m_s: 1 }, false).solve(at({ along: 3 }), solution);
  solver.solve(first, solution);
  expect(solution).toEqual(before);
});
