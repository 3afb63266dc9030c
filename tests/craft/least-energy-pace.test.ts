import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { constantPower } from "../../src/craft/constant.ts";
import type { Craft } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { paceSolver } from "../../src/craft/pace.ts";
import { emptySolution, PACE_CANNOT_HOLD, PACE_OK } from "../../src/craft/pace-solution.ts";
import { type PaceConditions, stillConditions } from "../../src/craft/propulsion.ts";
import { tablePower } from "../../src/craft/table.ts";
import { bestGlideSpeed } from "../../src/craft/wing-performance.ts";
import { aeroplane, byVectors, craftWith, drone, KNOT, tender, windage } from "./crafts.ts";

const solution = emptySolution();

function leastEnergy(craft: Craft, where: Partial<PaceConditions>, windKnown = true): number {
  return paceSolver(craft, { hold: "least-energy" }, windKnown).solve(
    { ...stillConditions(), ...where },
    solution,
  );
}

/** Least energy per metre over a fine grid of V, with each bracket of three refined by golden section on the value. */
function bruteForce(craft: Craft, where: PaceConditions, steps: number): number {
  const { min, max } = craft.speeds as { min: number; max: number };
  const cost = (v: number) => {
    const found = byVectors(craft, v, where);
    return found === null ? Number.POSITIVE_INFINITY : found.rate / found.groundSpeed;
  };
  const speeds = Array.from({ length: steps + 1 }, (_, i) => min + ((max - min) * i) / steps);
  const costs = speeds.map(cost);
  let best = Math.min(...costs);
  for (let i = 0; i <= steps; i++) {
    const here = costs[i] as number;
    if (here > best * 1.001 || here > (costs[i - 1] ?? here) || here > (costs[i + 1] ?? here)) continue;
    let low = speeds[Math.max(0, i - 1)] as number;
    let high = speeds[Math.min(steps, i + 1)] as number;
    for (let k = 0; k < 60; k++) {
      const third = (high - low) * 0.381966;
      if (cost(low + third) < cost(high - third)) high -= third;
      else low += third;
    }
    best = Math.min(best, cost(0.5 * (low + high)));
  }
  return best;
}

/** Numbers with six decimals: nobody measures a flow of 5e-324 m/s. */
const within = (min: number, max: number) =>
  fc.double({ min, max, noNaN: true }).map((value) => Math.round(value * 1e6) / 1e6);

const conditions = fc.record({
  along: within(-4, 4),
  cross: within(-4, 4),
  windAlong: within(-25, 25),
  windCross: within(-25, 25),
  climbSlope: within(-0.3, 0.3),
});

const bumpy = tablePower("W", [
  { speed_m_s: 0.5, rate: 900 },
  { speed_m_s: 2, rate: 1500 },
  { speed_m_s: 2.2, rate: 9000 },
  { speed_m_s: 5, rate: 9500 },
  { speed_m_s: 5.3, rate: 26000 },
  { speed_m_s: 9, rate: 27000 },
  { speed_m_s: 10, rate: 90000 },
]);

describe("the pace least-energy", () => {
  test.each<[string, Craft]>([
    ["tender, a table with a hump", tender],
    ["tender with windage", { ...tender, windage }],
    ["a table of steps, with several minima", craftWith(bumpy, { speeds: { min: 0.5, max: 10 } })],
    ["steps and windage", craftWith(bumpy, { windage, speeds: { min: 0.5, max: 10 }, hotelPerSecond: 100 })],
    [
      "barge without hotel load",
      craftWith(cubePower({ referenceSpeed_m_s: 5, referencePower_W: 40000 }), { hotelPerSecond: 0 }),
    ],
    ["drone", drone],
    ["aeroplane", aeroplane],
  ])("%s: no speed in the range costs less per metre, by brute force", (_, craft) => {
    const solver = paceSolver(craft, { hold: "least-energy" }, true);
    fc.assert(
      fc.property(conditions, (where) => {
        const best = bruteForce(craft, where, 1200);
        const status = solver.solve(where, solution);
        expect(status).toBe(Number.isFinite(best) ? PACE_OK : PACE_CANNOT_HOLD);
        if (status !== PACE_OK) return;
        const { min, max } = craft.speeds as { min: number; max: number };
        expect(solution.throughSpeed).toBeGreaterThanOrEqual(min);
        expect(solution.throughSpeed).toBeLessThanOrEqual(max);
        // The value is flat at its minimum: what is left is the rounding of J itself, and of windage in another order.
        expect(solution.rate / solution.groundSpeed).toBeLessThanOrEqual(best * (1 + 1e-12) + 1e-300);
        const truth = byVectors(craft, solution.throughSpeed, where);
        // At V = |c| the track is held by the flow alone: the limit, which the plain triangle refuses.
        if (truth === null)
          expect(solution.throughSpeed).toBeCloseTo(Math.max(min, Math.abs(where.cross)), 12);
        else expect(Math.abs(truth.rate - solution.rate)).toBeLessThanOrEqual(1e-9 * (truth.rate + 1));
      }),
      { numRuns: 120 },
    );
  });

  test("any table, any hotel load, any flow: no speed in the range costs less per metre, by brute force", () => {
    const steps = fc.array(
      fc.record({
        speed: fc.double({ min: 0.05, max: 3, noNaN: true }),
        rate: fc.oneof(fc.constant(0), within(-4000, 9000)),
      }),
      { minLength: 2, maxLength: 8 },
    );
    const hotel = fc.oneof(fc.constant(0), within(0, 3000));
    fc.assert(
      fc.property(steps, hotel, fc.boolean(), conditions, (given, hotelPerSecond, windy, where) => {
        let speed = -(given[0]?.speed ?? 0);
        let rate = 1000;
        const rows = given.map((row) => {
          speed += row.speed;
          rate = Math.max(0, rate + row.rate);
          return { speed_m_s: speed, rate };
        });
        const craft = craftWith(tablePower("W", rows), {
          hotelPerSecond,
          windage: windy ? windage : null,
          speeds: { min: 0, max: speed },
        });
        const best = bruteForce(craft, where, 1200);
        const status = leastEnergy(craft, where);
        // Without hotel load or rate at rest, the cheapest way through a still medium is not to go.
        const restIsFree = hotelPerSecond === 0 && rows[0]?.rate === 0 && where.along <= 0;
        if (!restIsFree) expect(status).toBe(Number.isFinite(best) ? PACE_OK : PACE_CANNOT_HOLD);
        // Windage is a difference of parts of up to 1e5 W, so that what is left of it keeps 1e-10 W.
        const slack = windy ? 1e-10 / Math.min(1, solution.groundSpeed) : 1e-300;
        if (status === PACE_OK)
          expect(solution.rate / solution.groundSpeed).toBeLessThanOrEqual(best * (1 + 1e-12) + slack);
      }),
      { numRuns: 400 },
    );
  });

  test("of the cube law against a current of c takes 1.5 c: 3 kn against 2 kn", () => {
    const craft = craftWith(cubePower({ referenceSpeed_m_s: 5, referencePower_W: 1000 }), {
      hotelPerSecond: 0,
      speeds: { min: 0.1, max: 10 },
    });
    expect(leastEnergy(craft, { along: -2 * KNOT })).toBe(PACE_OK);
    expect(Math.abs(solution.throughSpeed / (3 * KNOT) - 1)).toBeLessThanOrEqual(4e-16);
  });

  test("of the cube law with hotel load H in still water takes (H / 2k)^(1/3)", () => {
    const craft = craftWith(cubePower({ referenceSpeed_m_s: 1, referencePower_W: 50 }), {
      hotelPerSecond: 800,
      speeds: { min: 0.1, max: 10 },
    });
    leastEnergy(craft, {});
    expect(Math.abs(solution.throughSpeed / 2 - 1)).toBeLessThanOrEqual(4e-16);
  });

  test("of a wing without hotel load in still air is its best glide speed", () => {
    leastEnergy({ ...aeroplane, hotelPerSecond: 0 }, {});
    const glide = bestGlideSpeed({
      mass_kg: 12,
      wingArea_m2: 0.7,
      zeroLiftDrag: 0.03,
      inducedFactor: 0.05,
      airDensity_kg_m3: 1.225,
    });
    expect(Math.abs(solution.throughSpeed / glide - 1)).toBeLessThanOrEqual(1e-15);
  });

  test("of a constant rate is the fastest speed, and of no rate at all, too", () => {
    for (const rate of [250, 0]) {
      const craft = craftWith(constantPower("W", rate), { hotelPerSecond: 0 });
      for (const along of [-3, 0, 3]) {
        expect(leastEnergy(craft, { along, cross: 1 })).toBe(PACE_OK);
        expect(solution.throughSpeed).toBe(7);
      }
    }
  });

  test("of a power in proportion to V in still water, where every speed costs the same, is the fastest", () => {
    const craft = craftWith(
      tablePower("W", [
        { speed_m_s: 1, rate: 1000 },
        { speed_m_s: 8, rate: 8000 },
      ]),
      { hotelPerSecond: 0, speeds: { min: 1, max: 8 } },
    );
    leastEnergy(craft, {});
    expect(solution.rate / solution.groundSpeed).toBeCloseTo(1000, 10);
  });

  test("lets a following current carry a craft whose own way is not worth its price", () => {
    const craft = craftWith(cubePower({ referenceSpeed_m_s: 5, referencePower_W: 40000 }), {
      hotelPerSecond: 0,
      speeds: { min: 0, max: 7 },
    });
    expect(leastEnergy(craft, { along: 2 })).toBe(PACE_OK);
    expect(solution).toMatchObject({ throughSpeed: 0, groundSpeed: 2, rate: 0 });
    // Across the track it must keep up with |c|, where a little more way is almost free.
    expect(leastEnergy(craft, { along: 2, cross: 1.5 })).toBe(PACE_OK);
    expect(solution.throughSpeed).toBeGreaterThan(1.5);
    expect(solution.throughSpeed).toBeLessThan(1.7);
    expect(leastEnergy({ ...craft, speeds: { min: 2, max: 7 } }, { along: 2, cross: 0 })).toBe(PACE_OK);
    expect(solution).toMatchObject({ throughSpeed: 2, groundSpeed: 4 });
  });

  test("cannot go where not to go is free, and goes where the range does not begin at 0", () => {
    const craft = craftWith(cubePower({ referenceSpeed_m_s: 5, referencePower_W: 40000 }), {
      hotelPerSecond: 0,
      speeds: { min: 0, max: 7 },
    });
    expect(leastEnergy(craft, {})).toBe(PACE_CANNOT_HOLD);
    expect(solution).toMatchObject({ groundSpeed: 0, rate: 0 });
    expect(leastEnergy({ ...craft, hotelPerSecond: 1 }, {})).toBe(PACE_OK);
    expect(leastEnergy({ ...craft, speeds: { min: 2, max: 7 } }, {})).toBe(PACE_OK);
    expect(solution.throughSpeed).toBe(2);
  });

  test("says that no speed of the range holds the track", () => {
    expect(leastEnergy(tender, { cross: 18 * KNOT })).toBe(PACE_CANNOT_HOLD);
    expect(leastEnergy(tender, { along: -18 * KNOT })).toBe(PACE_CANNOT_HOLD);
    expect(leastEnergy(tender, { along: -100, cross: 3 })).toBe(PACE_CANNOT_HOLD);
    expect(solution.rate).toBe(0);
    expect(leastEnergy(tender, { along: -18 * KNOT + 0.01 })).toBe(PACE_OK);
  });

  test("takes the one speed of a range that has only one", () => {
    expect(leastEnergy({ ...tender, speeds: { min: 4, max: 4 } }, { along: 1 })).toBe(PACE_OK);
    expect(solution.throughSpeed).toBe(4);
  });

  test("with a wind that drives the craft by itself takes the fastest speed that costs nothing", () => {
    const craft = craftWith(cubePower({ referenceSpeed_m_s: 5, referencePower_W: 4000 }), {
      hotelPerSecond: 0,
      windage,
      speeds: { min: 0, max: 7 },
    });
    expect(leastEnergy(craft, { windAlong: 10 })).toBe(PACE_OK);
    expect(solution.rate).toBe(0);
    const faster = { ...stillConditions(), windAlong: 10 };
    expect(byVectors(craft, solution.throughSpeed * (1 + 1e-12), faster)?.rate).toBeGreaterThan(0);
  });

  test.each<[string, Craft, number]>([
    ["drone", drone, 12],
    ["aeroplane", aeroplane, 9],
    [
      "windy barge",
      craftWith(cubePower({ referenceSpeed_m_s: 5, referencePower_W: 40000 }), {
        windage,
        speeds: { min: 0.5, max: 7 },
      }),
      0.9,
    ],
  ])("%s: its speed is smooth along a smooth flow, to rounding", (_, craft, size) => {
    const solver = paceSolver(craft, { hold: "least-energy" }, true);
    const speeds: number[] = [];
    const n = 400;
    for (let i = 0; i <= n; i++) {
      const s = (2 * i) / n;
      const where = {
        along: size * 0.3 * Math.sin(s) - 0.2,
        cross: size * 0.5 * Math.cos(1.3 * s),
        windAlong: -6 + s,
        windCross: 4 * Math.sin(s),
        climbSlope: 0,
      };
      if (solver.solve(where, solution) !== PACE_OK) throw new Error("the track can be held");
      speeds.push(solution.throughSpeed);
    }
    // Sixth differences of a smooth function at this step are below rounding; noise of e shows up as up to 64 e.
    let differences = speeds;
    for (let order = 0; order < 6; order++)
      differences = differences.slice(1).map((v, i) => v - (differences[i] as number));
    expect(Math.max(...differences.map(Math.abs)) / (speeds[0] as number)).toBeLessThan(64 * 1e-14);
  });
});
