import { describe, expect, test } from "vitest";
import type { Profile, RouteEstimate } from "../../web/core.ts";
import { barsEnd, costBar } from "../../web/ledger/cost-bar.ts";
import { bestOf } from "../../web/ledger/ledger-best.ts";
import { legAt } from "../../web/leg-table/LegTable.tsx";
import { courseText } from "../../web/leg-table/leg-columns.ts";
import { keyTarget } from "../../web/ribbon/Ribbon.tsx";
import { ribbonRuns } from "../../web/ribbon/ribbon-runs.ts";
import { tileOrigin } from "../../web/shell/tile-policy.ts";

function route(still: number, along: number | null, cross: number | null, more: object = {}): RouteEstimate {
  return {
    status: "clear",
    arrival: new Date((still + (along ?? 0) + (cross ?? 0)) * 1000).toISOString(),
    totals: {
      still: { time_s: still, use: 0 },
      penalty: { alongTime_s: along, crossTime_s: cross },
      use: still,
      remaining: 1000 - still,
    },
    ...more,
  } as unknown as RouteEstimate;
}

describe("the stacked bar", () => {
  test("ends its solid part at the time of the route, whatever the signs", () => {
    for (const [still, along, cross] of [
      [100, 20, 5],
      [100, -20, 5],
      [100, -20, -1],
      [100, 0, 0],
    ] as const) {
      const parts = costBar(route(still, along, cross));
      const solid = parts.filter(({ kind }) => kind !== "gain").at(-1);
      expect(solid?.to).toBe(still + along + cross);
      expect(parts.map(({ from }) => from)).toEqual([0, ...parts.slice(0, -1).map(({ to }) => to)]);
    }
  });

  test("shows what a following flow saved behind it", () => {
    expect(costBar(route(100, -20, 5)).at(-1)).toEqual({ kind: "gain", from: 85, to: 105 });
    expect(barsEnd([route(100, -20, 5), null, route(90, 1, 1)])).toBe(105);
  });

  test("is the still part alone where the route was not run to its end", () => {
    expect(costBar(route(100, null, null))).toEqual([{ kind: "still", from: 0, to: 100 }]);
  });
});

describe("the best of a column", () => {
  test("is the earliest, the thriftiest, the fullest", () => {
    const best = bestOf([route(100, 0, 0), route(90, 0, 0), null]);
    expect([...best.arrival]).toEqual([1]);
    expect([...best.use]).toEqual([1]);
    expect([...best.remaining]).toEqual([1]);
  });

  test("is never a route that ends in a stop, and is no mark without a rival", () => {
    expect([...bestOf([route(100, 0, 0), route(90, 0, 0, { status: "stop" })]).use]).toEqual([0]);
    expect(bestOf([route(100, 0, 0)]).use.size).toBe(0);
    expect([...bestOf([route(90, 0, 0), route(90, 0, 0)]).use]).toEqual([0, 1]);
  });
});

describe("figures of a ribbon and of a leg", () => {
  test("join neighbours of one class, and leave out stays", () => {
    const profile = {
      along_m_s: Float64Array.of(1, 1, 1, 1, -1, -1),
      distance_m: Float64Array.of(0, 10, 20, 20, 30, 40),
    } as unknown as Profile;
    const runs = ribbonRuns(profile, profile.distance_m, 1);
    expect(runs).toEqual([
      { from: 0, to: 20, classNumber: 10 },
      { from: 20, to: 30, classNumber: 5 },
      { from: 30, to: 40, classNumber: 0 },
    ]);
  });

  test("are reached by keys within the ribbon's ends", () => {
    expect(keyTarget("ArrowLeft", false, 0, 100)).toBe(0);
    expect(keyTarget("ArrowRight", true, 50, 100)).toBeCloseTo(50.1, 12);
    expect(keyTarget("PageUp", false, 95, 100)).toBe(100);
    expect(keyTarget("a", false, 50, 100)).toBeNull();
  });

  test("belong to the leg that a distance lies on", () => {
    const drawing = {
      lat: new Float64Array(3),
      lon: new Float64Array(3),
      distance_m: Float64Array.of(0, 50, 100),
      waypoints: Int32Array.of(0, 1, 2),
      profile: null,
    };
    expect([0, 49, 50, 99, 100].map((place) => legAt(drawing, place))).toEqual([1, 1, 2, 2, 2]);
  });

  test("have courses of three figures", () => {
    expect(courseText(7.4)).toBe("007");
    expect(courseText(359.6)).toBe("000");
    expect(courseText(null)).toBe("–");
  });
});

describe("the policy for the user's own tiles", () => {
  test("allows their origin alone", () => {
    expect(tileOrigin("https://tiles.example.org/{z}/{x}/{y}.png")).toBe("https://tiles.example.org");
    expect(tileOrigin("https://{s}.example.org/{z}")).toBe("https://a.example.org");
    expect(tileOrigin("javascript:alert(1)")).toBeNull();
    expect(tileOrigin("")).toBeNull();
  });
});
