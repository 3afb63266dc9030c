import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { errorSpread } from "../../src/choose/error-spread.ts";
import type { ForecastError } from "../../src/choose/forecast-error.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { routeOutcome } from "../../src/estimate/route-outcomes.ts";
import type { Field } from "../../src/field/field.ts";
import { WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicInverse } from "../../src/geodesy/geodesic.ts";
import { craftOf, gridField, routeOf, spaced, waypoint } from "../estimate/fixtures.ts";
import { type Case, caseOf, plusField, runOf } from "./error-fixtures.ts";
import { cholesky, deviationOf, normals, sampleOf } from "./gaussian.ts";

function spreadOf(given: Case, errors: readonly ForecastError[]) {
  const answer = errorSpread(given.prepared, given.conditions, runOf(given), errors);
  if (answer === null) throw new Error("no spread");
  return answer;
}

const WIND: ForecastError = { role: "wind", speed_m_s: 0.5, length_m: 100_000, time_s: 7200 };

describe("the exact cases of the spread", () => {
  const straight = routeOf(waypoint("A", 0, 0), waypoint("B", 0, 5));
  const calm = gridField("wind", { lon: [-1, 6], lat: [-1, 1] }, () => [0, 0]);
  const length = geodesicInverse(WGS84, { lat: 0, lon: 0 }, { lat: 0, lon: 5 }).distance;

  test("with errors all alike along the track, the time's spread is σ L/V² and the use's that times the power", () => {
    const { spread } = spreadOf(caseOf(straight, [calm]), [{ ...WIND, length_m: 1e12, time_s: 1e12 }]);
    // Beside this the distances in correlation lengths are 1e-6.
    expect(spread.time_s / ((0.5 * length) / 100)).toBeCloseTo(1, 5);
    expect(spread.use / ((1000 * 0.5 * length) / 100)).toBeCloseTo(1, 5);
  });

  test("on a straight track it is the double integral of exp(-|x - x'|) in closed form", () => {
    const { spread } = spreadOf(caseOf(straight, [calm]), [WIND]);
    // The equator's great circle on the mean sphere is 0.11 % shorter than the ellipsoid's.
    const x = length * (6371008.7714 / 6378137 / WIND.length_m + 1 / (10 * WIND.time_s));
    const mean = (2 * (x - 1 + Math.exp(-x))) / (x * x);
    expect(spread.time_s / (((0.5 * length) / 100) * Math.sqrt(mean))).toBeCloseTo(1, 5);
  });

  test("out and back in errors that do not change in time, the errors along cancel to first order", () => {
    const back = routeOf(waypoint("A", 0, 0), waypoint("B", 0, 2), waypoint("C", 0, 0.0001));
    const { spread } = spreadOf(caseOf(back, [calm]), [{ ...WIND, time_s: 1e12 }]);
    const [out] = spread.legs;
    expect(spread.time_s / (out?.time_s as number)).toBeLessThan(0.02);
    expect(spread.legs[1]?.time_s).toBeCloseTo(out?.time_s as number, 0);
  });

  test("twice the error is twice every deviation", () => {
    const given = caseOf(straight, [calm]);
    const once = spreadOf(given, [WIND]).spread;
    const twice = spreadOf(given, [{ ...WIND, speed_m_s: 1 }]).spread;
    for (const key of ["time_s", "use", "remaining", "margin"] as const)
      expect(twice[key] / once[key]).toBeCloseTo(2, 12);
  });

  test("the parts along the track add up to the variances", () => {
    const { spread, profile } = spreadOf(caseOf(straight, [calm]), [WIND]);
    const sum = (parts: Float64Array) => parts.reduce((so, part) => so + part, 0);
    expect(sum(profile.timeVariance) / spread.time_s ** 2).toBeCloseTo(1, 12);
    expect(sum(profile.useVariance) / spread.use ** 2).toBeCloseTo(1, 12);
  });

  test("cells half as long change nothing by more than one in a thousand", () => {
    const given = caseOf(straight, [swirl]);
    const coarse = spreadOf(given, [WIND]).spread;
    const tiny: ForecastError = { role: "wind", speed_m_s: 0, length_m: 50_000, time_s: 3600 };
    const fine = spreadOf(given, [WIND, tiny]).spread;
    expect(fine.time_s / coarse.time_s).toBeCloseTo(1, 3);
    expect(fine.use / coarse.use).toBeCloseTo(1, 3);
  });
});

const swirl = gridField(
  "wind",
  { lon: spaced(-1, 6, 7), lat: [-1, 1], hours: spaced(0, 30, 10) },
  (lon, _, hours) => [3 * Math.sin(lon + hours / 3), 2 * Math.cos(lon * 2 - hours / 4)],
);

describe("the spread against a Monte Carlo of true estimates in random fields", () => {
  const SAMPLES = 1200;
  // The deviation of a sampled deviation is 1/sqrt(2 n) = 2.0 % of it: four of those, and 1 % for the grid's own smoothing.
  const WITHIN = 0.092;

  /** The case with a store that leaves one deviation of the margin above the reserve: it holds with Φ(1) = 0.8413. */
  function withOneDeviation(given: Case, errors: readonly ForecastError[]): Case {
    const { craft } = given.conditions;
    const { use, reserve } = routeOutcome(given.prepared, given.conditions);
    const { margin } = spreadOf(given, errors).spread;
    const store = { ...craft.store, usable: (use as number) + (reserve as number) + margin };
    return { ...given, conditions: { ...given.conditions, craft: { ...craft, store } } };
  }

  interface Outcome {
    readonly time: number;
    readonly use: number;
    readonly holds: boolean;
    readonly legs: readonly { readonly time: number; readonly use: number }[];
  }

  function simulated(given: Case, added: (n: number) => readonly Field[], count: number): Outcome[] {
    return Array.from({ length: count }, (_, n) => {
      const errors = added(n);
      const fields = given.conditions.fields.map((field, index) =>
        plusField(field, errors[index] as Field, 1),
      );
      const conditions = { ...given.conditions, fields };
      const { estimate } = estimateRoute(given.prepared, conditions);
      const { totals, reserve } = estimate;
      return {
        time: totals.time_s as number,
        use: totals.use as number,
        holds: (totals.remaining as number) >= (reserve as number),
        legs: estimate.legs.map((leg) => ({ time: leg.time_s as number, use: leg.use as number })),
      };
    });
  }

  function compare(given: Case, errors: readonly ForecastError[], outcomes: readonly Outcome[]): void {
    const { spread } = spreadOf(given, errors);
    const ratio = (values: number[], predicted: number) => deviationOf(values) / predicted - 1;
    expect(
      Math.abs(
        ratio(
          outcomes.map(({ time }) => time),
          spread.time_s,
        ),
      ),
    ).toBeLessThan(WITHIN);
    expect(
      Math.abs(
        ratio(
          outcomes.map(({ use }) => use),
          spread.use,
        ),
      ),
    ).toBeLessThan(WITHIN);
    spread.legs.forEach((leg, n) => {
      const times = outcomes.map(({ legs }) => legs[n]?.time as number);
      const uses = outcomes.map(({ legs }) => legs[n]?.use as number);
      expect(Math.abs(ratio(times, leg.time_s))).toBeLessThan(WITHIN);
      expect(Math.abs(ratio(uses, leg.use))).toBeLessThan(WITHIN);
    });
    const share = outcomes.filter(({ holds }) => holds).length / outcomes.length;
    // Four deviations of a share of n are at most 4 · 0.37/sqrt(n) = 4.2 %; the mean moves in second order besides.
    expect(Math.abs(share - spread.reserveHolds)).toBeLessThan(0.05);
    expect(spread.reserveHolds).toBeCloseTo(0.8413, 4);
  }

  test("along a parallel in a wind that changes, errors correlated in place and time, a reserve in time", () => {
    const hours = spaced(0, 16, 8);
    const lons = spaced(-0.1, 4.1, 14);
    const shape = { lon: lons, lat: [-1, 1], hours };
    const wind = gridField("wind", shape, (lon, _, h) => [
      2 * Math.sin(lon + h / 3),
      1.5 * Math.cos(lon * 2 - h / 4),
    ]);
    const error: ForecastError = { role: "wind", speed_m_s: 0.4, length_m: 150_000, time_s: 5 * 3600 };
    const given = caseOf(
      routeOf(waypoint("A", 0, 0), waypoint("B", 0, 1.5, { stay_s: 1800 }), waypoint("C", 0, 4)),
      [wind],
      { reserve: { kind: "time", time_s: 3600 } },
    );
    const stored = withOneDeviation(given, [error]);
    const nodes = hours.flatMap((h) => lons.map((lon) => ({ h, lon })));
    const metres = (6371008.7714 * Math.PI) / 180;
    const root = cholesky(nodes.length, (i, j) => {
      const [a, b] = [nodes[i] as { h: number; lon: number }, nodes[j] as { h: number; lon: number }];
      const apart =
        (Math.abs(a.lon - b.lon) * metres) / error.length_m + (Math.abs(a.h - b.h) * 3600) / error.time_s;
      return error.speed_m_s ** 2 * Math.exp(-apart);
    });
    const normal = normals(20270504);
    const added = () => {
      const u = sampleOf(root, normal);
      const v = sampleOf(root, normal);
      // The same on both parallels, so that no value between them is smoothed.
      const at = (lon: number, h: number) => lons.indexOf(lon) + hours.indexOf(h) * lons.length;
      return [gridField("wind", shape, (lon, _, h) => [u[at(lon, h)] as number, v[at(lon, h)] as number])];
    };
    compare(stored, [error], simulated(stored, added, SAMPLES));
  });

  test("around a bent route of a boat, errors of current and wind besides each other", () => {
    const shape = { lon: spaced(-0.2, 1.6, 12), lat: spaced(49.9, 51.1, 12) };
    const current = gridField("current", shape, (lon, lat) => [
      0.4 * Math.sin(3 * lat),
      0.3 * Math.cos(4 * lon),
    ]);
    const wind = gridField("wind", shape, (lon, lat) => [5 + lon, 3 * Math.sin(lat * 4)]);
    const errors: ForecastError[] = [
      { role: "current", speed_m_s: 0.05, length_m: 60_000, time_s: 1e12 },
      { role: "wind", speed_m_s: 0.4, length_m: 90_000, time_s: 1e12 },
    ];
    const boat = craftOf({
      moves: "water",
      power: cubePower({ referenceSpeed_m_s: 6, referencePower_W: 60_000 }),
      windage: { frontalArea_m2: 25, dragCoefficient: 0.9, efficiency: 0.6, airDensity_kg_m3: 1.225 },
    });
    const given = caseOf(
      routeOf(waypoint("A", 50, 0), waypoint("B", 50.9, 0.4), waypoint("C", 50.2, 1.4)),
      [current, wind],
      {
        craft: boat,
        pace: { hold: "through-speed", speed_m_s: 5 },
        reserve: { kind: "amount", amount: 2e8 },
      },
    );
    const stored = withOneDeviation(given, errors);
    const nodes = shape.lat.flatMap((lat) => shape.lon.map((lon) => ({ lat, lon })));
    const distances = nodes.map((a) => nodes.map((b) => geodesicInverse(WGS84, a, b).distance));
    const roots = errors.map(({ speed_m_s, length_m }) =>
      cholesky(nodes.length, (i, j) => speed_m_s ** 2 * Math.exp(-(distances[i]?.[j] as number) / length_m)),
    );
    const normal = normals(20270505);
    const added = () =>
      errors.map(({ role }, n) => {
        const u = sampleOf(roots[n] as Float64Array[], normal);
        const v = sampleOf(roots[n] as Float64Array[], normal);
        const at = (lon: number, lat: number) =>
          shape.lat.indexOf(lat) * shape.lon.length + shape.lon.indexOf(lon);
        return gridField(role, shape, (lon, lat) => [u[at(lon, lat)] as number, v[at(lon, lat)] as number]);
      });
    compare(stored, errors, simulated(stored, added, SAMPLES));
  });
});

const speedy = craftOf({ power: cubePower({ referenceSpeed_m_s: 10, referencePower_W: 1000 }) });

describe("the probability that the reserve holds", () => {
  const straight = routeOf(waypoint("A", 0, 0), waypoint("B", 0, 3));

  test("never rises with the error where the margin is above 0, and never falls where it is below", () => {
    const { prepared, conditions } = caseOf(straight, [swirl]);
    const use = routeOutcome(prepared, conditions).use as number;
    fc.assert(
      fc.property(
        fc.double({ min: 0.5, max: 1.5, noNaN: true }),
        fc.double({ min: 0, max: 3, noNaN: true }),
        fc.double({ min: 0, max: 3, noNaN: true }),
        (fill, one, other) => {
          const given = caseOf(straight, [swirl], {
            craft: craftOf({ store: { unit: "J", usable: use * fill } }),
          });
          const chance = (speed_m_s: number) => spreadOf(given, [{ ...WIND, speed_m_s }]).spread.reserveHolds;
          const less = chance(Math.min(one, other));
          const more = chance(Math.max(one, other));
          if (fill >= 1) expect(more).toBeLessThanOrEqual(less);
          else expect(more).toBeGreaterThanOrEqual(less);
        },
      ),
      { numRuns: 40 },
    );
  });

  test("tells no weakest place for the arrival where the craft holds its speed over the ground", () => {
    const held = caseOf(straight, [swirl], { pace: { hold: "ground-speed", speed_m_s: 9 }, craft: speedy });
    const { weakest, time_s, use } = spreadOf(held, [WIND]).spread;
    expect([weakest.time, time_s]).toEqual([null, 0]);
    expect(weakest.use?.leg).toBe(1);
    expect(use).toBeGreaterThan(0);
  });

  test("there is no spread of a route that stops on the way, nor of errors that do not act", () => {
    const given = caseOf(routeOf(waypoint("A", 0, 0), waypoint("B", 0, 9)), [swirl]);
    expect(errorSpread(given.prepared, given.conditions, runOf(given), [WIND])).toBeNull();
    const other = caseOf(straight, [swirl]);
    expect(
      errorSpread(other.prepared, other.conditions, runOf(other), [{ ...WIND, role: "current" }]),
    ).toBeNull();
  });
});
