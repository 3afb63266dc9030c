import { describe, expect, test } from "vitest";
import { fastestWithReserve, leastUseSpeed, paceCurve } from "../../src/choose/pace-curve.ts";
import type { Craft, Reserve } from "../../src/craft/craft.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import type { Field } from "../../src/field/field.ts";
import { DEPARTURE, gridField, spaced } from "../estimate/fixtures.ts";
import { boat, box, distance, east } from "./pace-fixtures.ts";

const KNOT = 1852 / 3600;
const head = (speed: number): Field => gridField("current", box, () => [-speed, 0]);

function conditionsOf(fields: readonly Field[], craft: Craft = boat, reserve: Reserve | null = null) {
  return { departure: DEPARTURE, craft, reserve, fields };
}

describe("time and use against speed", () => {
  test("are those of lone estimates, in the order given", () => {
    const fields = [head(0.5)];
    const prepared = prepareRoute(east, fields);
    const { points, storeUnit, usable } = paceCurve(prepared, conditionsOf(fields), [6, 3, 0.4]);
    expect([storeUnit, usable]).toEqual(["J", 1e12]);
    expect(points.map(({ speed_m_s }) => speed_m_s)).toEqual([6, 3, 0.4]);
    for (const point of points) {
      const pace = { hold: "through-speed", speed_m_s: point.speed_m_s ?? 0 } as const;
      const { estimate } = estimateRoute(prepared, { ...conditionsOf(fields), pace });
      expect([point.arrival, point.use, point.status]).toEqual([
        estimate.arrival,
        estimate.totals.use,
        estimate.status,
      ]);
    }
    expect(points[2]?.worst?.code).toBe("cannot-hold-track");
  });

  test("cover the craft's range in 33 even steps where no speeds are given", () => {
    const speeds = paceCurve(prepareRoute(east, []), conditionsOf([])).points.map(
      ({ speed_m_s }) => speed_m_s,
    );
    expect(speeds).toHaveLength(33);
    expect([speeds[0], speeds[16], speeds[32]]).toEqual([0.5, 6.25, 12]);
  });
});

describe("the speed of least use over the ground", () => {
  test("for P ~ V³ against a head current c is 1.5 c (ENE-07)", () => {
    const fields = [head(2 * KNOT)];
    const best = leastUseSpeed(prepareRoute(east, fields), conditionsOf(fields));
    // The place of a minimum is known to about the square root of the rounding error of the use.
    expect(Math.abs((best?.speed_m_s ?? 0) / KNOT - 3)).toBeLessThan(1e-6);
  });

  test("in a field that varies along the route is that of trying many speeds", () => {
    const fields = [gridField("current", box, (lon) => [-2.5 * Math.max(0, Math.sin(3 * lon)), 0.4])];
    const prepared = prepareRoute(east, fields);
    const best = leastUseSpeed(prepared, conditionsOf(fields));
    const all = paceCurve(prepared, conditionsOf(fields), spaced(2, 8, 3000)).points;
    const tried = all.reduce((a, b) => ((b.use ?? Infinity) < (a.use ?? Infinity) ? b : a));
    expect(best?.use).toBeLessThanOrEqual(tried.use ?? 0);
    expect(Math.abs((best?.speed_m_s ?? 0) - (tried.speed_m_s ?? 0))).toBeLessThan(0.002);
  });

  test("is the lowest speed where nothing speaks for haste, and none where no speed completes the route", () => {
    expect(leastUseSpeed(prepareRoute(east, []), conditionsOf([]))?.speed_m_s).toBe(0.5);
    const fields = [head(15)];
    expect(leastUseSpeed(prepareRoute(east, fields), conditionsOf(fields))).toBeNull();
  });
});

describe("the fastest speed that keeps the reserve", () => {
  // In still water the use is 160 V² D.
  const store = { unit: "J", usable: 160 * 5 ** 2 * distance } as const;
  const craft = { ...boat, store };

  test("spends just what is above it", () => {
    const best = fastestWithReserve(
      prepareRoute(east, []),
      conditionsOf([], craft, { kind: "share", share: 0.2 }),
    );
    expect(best?.speed_m_s).toBeCloseTo(Math.sqrt(0.8) * 5, 8);
    expect(best?.status).toBe("clear");
    expect((best?.remaining ?? 0) >= (best?.reserve ?? Infinity)).toBe(true);
  });

  test("holds a reserve of time at the rate of that speed", () => {
    // Use + reserve = 160 V³ (D/V + τ) = usable, solved here by bisection.
    const reserve = { kind: "time", time_s: 3600 } as const;
    const best = fastestWithReserve(prepareRoute(east, []), conditionsOf([], craft, reserve));
    let low = 1;
    let high = 5;
    for (let n = 0; n < 100; n += 1) {
      const middle = (low + high) / 2;
      if (160 * middle ** 3 * (distance / middle + 3600) > store.usable) high = middle;
      else low = middle;
    }
    expect(best?.speed_m_s).toBeCloseTo(low, 8);
  });

  test("is the highest of the range where the store is ample, and none where it is never enough", () => {
    expect(fastestWithReserve(prepareRoute(east, []), conditionsOf([]))?.speed_m_s).toBe(12);
    const empty = { ...craft, store: { unit: "J", usable: 1000 } as const };
    expect(fastestWithReserve(prepareRoute(east, []), conditionsOf([], empty))).toBeNull();
  });
});
