import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { CellTrials } from "../../src/choose/cell-trials.ts";
import { errorSpread } from "../../src/choose/error-spread.ts";
import type { ForecastError } from "../../src/choose/forecast-error.ts";
import { runSteps } from "../../src/choose/steps.ts";
import { sureWindow } from "../../src/choose/sure-window.ts";
import { withUncertainty } from "../../src/choose/uncertain-estimate.ts";
import { makeSweep, windowCells } from "../../src/choose/window.ts";
import type { WindowCell } from "../../src/choose/window-cell.ts";
import type { Craft } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { tablePower } from "../../src/craft/table.ts";
import { type EstimateInput, estimatePrepared, prepareRoutes } from "../../src/estimate/estimate.ts";
import { estimateRoute } from "../../src/estimate/estimate-route.ts";
import type { Route } from "../../src/estimate/route.ts";
import { craftOf, DEPARTURE, gridField, HOUR, routeOf, spaced, waypoint } from "../estimate/fixtures.ts";

const wind = gridField(
  "wind",
  { lon: spaced(-1, 2, 6), lat: spaced(-1, 1, 4), hours: spaced(-6, 40, 46) },
  (lon, lat, h) => [4 * Math.sin(h / 4 + lon) - 1, 2 * Math.cos(h / 5 + lat)],
);
const drone = (usable: number): Craft =>
  craftOf({
    moves: "air",
    power: cubePower({ referenceSpeed_m_s: 15, referencePower_W: 1000 }),
    store: { unit: "J", usable },
  });
const route: Route = routeOf(waypoint("A", 0, 0), waypoint("B", 0.2, 0.3), waypoint("C", 0, 0.6));
const ERROR: ForecastError = { role: "wind", speed_m_s: 1.5, length_m: 60_000, time_s: 10_800 };

function inputOf(usable: number, more: Partial<EstimateInput> = {}): EstimateInput {
  return {
    title: "",
    departure: DEPARTURE,
    craft: drone(usable),
    pace: { hold: "through-speed", speed_m_s: 15 },
    reserve: { kind: "share", share: 0.2 },
    fields: [wind],
    routes: [route],
    land: null,
    ...more,
  };
}

function answerOf(input: EstimateInput, confidence?: number, errors: readonly ForecastError[] = [ERROR]) {
  const prepared = prepareRoutes(input);
  const asked = { whatIfs: [], errors, members: [], confidence };
  const { estimate } = withUncertainty(estimatePrepared(prepared, input), prepared, input, asked);
  const [own] = estimate.routes;
  if (own === undefined) throw new Error("no route");
  return own;
}

const unsure = ({ findings }: ReturnType<typeof answerOf>) =>
  findings.filter(({ code }) => code === "reserve-unsure");

/** Stores that are a little more or less than enough. */
const stores = fc.double({ min: 6e6, max: 7.5e6, noNaN: true });
const shares = fc.double({ min: 0.01, max: 0.999, noNaN: true });

describe("the probability with which a reserve has to hold", () => {
  test("raised never turns a stop into clear", () => {
    const seen = { stop: 0, clear: 0 };
    fc.assert(
      fc.property(stores, shares, shares, (usable, one, other) => {
        const input = inputOf(usable);
        const low = answerOf(input, Math.min(one, other)).status;
        const high = answerOf(input, Math.max(one, other)).status;
        if (low === "stop") expect(high).toBe("stop");
        seen[high === "stop" ? "stop" : "clear"] += 1;
      }),
      { numRuns: 60, endOnFailure: true },
    );
    expect(Math.min(seen.stop, seen.clear)).toBeGreaterThan(0);
  });

  test("is a stop exactly where the one found is below it, and says both", () => {
    const input = inputOf(6.8e6);
    const found = answerOf(input).spread?.reserveHolds as number;
    expect(found).toBeGreaterThan(0.5);
    expect(found).toBeLessThan(0.99);
    expect(answerOf(input, found).status).toBe("clear");
    const above = found * (1 + 1e-12);
    const told = answerOf(input, above);
    expect(told.status).toBe("stop");
    expect(unsure(told)).toHaveLength(1);
    expect(answerOf(input, 0.995).findings[0]).toMatchObject({
      code: "reserve-unsure",
      severity: "stop",
      leg: null,
      message: `the reserve holds with a probability of ${Math.floor(1000 * found) / 10} % under the stated forecast error, and the plan asks for 99.5 %`,
    });
    expect(told.spread?.confidence).toBe(above);
  });

  test("is that the store lasts where the plan names no reserve", () => {
    const found = answerOf(inputOf(5.5e6, { reserve: null }), 0.9999999);
    expect(found.findings[0]?.message).toMatch(/^the store lasts with a probability of \d/);
  });

  test("asked for, changes no figure, and left out changes nothing", () => {
    const input = inputOf(6.8e6);
    const plain = answerOf(input);
    const { spread, status: _s, findings: _f, ...rest } = answerOf(input, 0.999);
    const { spread: before, status: _t, findings: _g, ...same } = plain;
    expect(rest).toEqual(same);
    expect(spread).toEqual({ ...before, confidence: 0.999 });
    expect(plain.spread).not.toHaveProperty("confidence");
  });

  test("says nothing where the route breaks its reserve or ends short, which says more, nor where no error acts", () => {
    expect(unsure(answerOf(inputOf(6.2e6), 0.9))).toEqual([]);
    expect(answerOf(inputOf(6.2e6), 0.9).status).toBe("stop");
    const far = inputOf(6.8e6, { routes: [routeOf(waypoint("A", 0, 0), waypoint("B", 0, 5))] });
    expect(unsure(answerOf(far, 0.9))).toEqual([]);
    const other = answerOf(inputOf(6.8e6), 0.999, [{ ...ERROR, role: "current" }]);
    expect([other.spread, other.status]).toEqual([null, "clear"]);
  });

  test("is a stop where the probability cannot be worked out, along the edge of what the pace can hold", () => {
    // In a calm the speed over the ground is the fastest of the table; any headwind would ask for more.
    const power = tablePower("W", [
      { speed_m_s: 1, rate: 500 },
      { speed_m_s: 10, rate: 900 },
    ]);
    const calm = gridField("wind", { lon: [-1, 2], lat: [-1, 1] }, () => [0, 0]);
    const pace = { hold: "ground-speed", speed_m_s: 10 } as const;
    const input = inputOf(2e7, { craft: { ...drone(2e7), power }, pace, fields: [calm] });
    expect(answerOf(input).status).toBe("clear");
    const found = answerOf(input, 0.5);
    expect(found.arrival).not.toBeNull();
    expect(found.spread).toBeNull();
    expect(found.status).toBe("stop");
    expect(found.findings[0]?.message).toBe(
      "along the edge of its field or of what its pace can hold, the probability that the reserve holds is not known, and the plan asks for 50 %",
    );
  });
});

describe("a window with a confidence", () => {
  const window = { from: DEPARTURE, to: DEPARTURE + 20 * HOUR, every_s: 3600, speeds_m_s: null };
  const whatIf = {
    name: "Cold",
    wind: 1,
    current: 1,
    veer_deg: 0,
    speed_m_s: 0,
    consumption: 0.03,
    late_s: 0,
  };

  function windowOf(confidence: number | undefined, whatIfs = [whatIf]) {
    const input = inputOf(6.8e6);
    const sweep = makeSweep(prepareRoutes(input), input);
    const cells = [...windowCells(sweep, window)];
    const trials = new CellTrials(sweep, { whatIfs, errors: [ERROR], members: [], confidence });
    const sure = runSteps(
      sureWindow(sweep, trials, { window, cells, minutes: null, inTime: null, paces: null }),
    );
    const chance = (cell: WindowCell): number => {
      const prepared = sweep.prepared[0];
      if (prepared === undefined) throw new Error("no route");
      const given = { ...sweep.conditions, departure: Date.parse(cell.departure) };
      const run = estimateRoute(prepared, given);
      return errorSpread(prepared, given, run, [ERROR])?.spread.reserveHolds ?? 0;
    };
    return { sure, cells, chance };
  }

  test("has for its bests the first of each ranking whose reserve holds with it", () => {
    for (const confidence of [0.6, 0.8, 0.95]) {
      const { sure, cells, chance } = windowOf(confidence, []);
      const held = cells.filter((cell) => cell.status !== "stop" && chance(cell) >= confidence);
      expect(held.length).toBeGreaterThan(0);
      const { time, use, latest } = sure.best.sure;
      expect(time?.passage_s).toBe(Math.min(...held.map(({ passage_s }) => passage_s as number)));
      expect(use?.use).toBe(Math.min(...held.map((cell) => cell.use as number)));
      expect(latest?.departure).toBe(held.at(-1)?.departure);
      expect(sure).toMatchObject({ members: 0, whatIfs: 0, confidence });
    }
  });

  test("says of a plain best that it is the stated error that breaks it, unless a what-if does", () => {
    const { sure } = windowOf(0.999, []);
    const { latest } = sure.best.plain;
    expect(latest?.status).not.toBe("stop");
    expect(latest?.sure).toMatchObject({
      status: "stop",
      decidedBy: { member: null, whatIf: null, error: true },
      worst: { code: "reserve-unsure" },
      asBad: 0,
    });
    expect(latest?.sure.reserveHolds).toBeLessThan(0.999);
    const cold = windowOf(0.999, [{ ...whatIf, consumption: 0.5 }]).sure.best;
    expect(cold.plain.latest?.sure.decidedBy).toEqual({ member: null, whatIf: "Cold" });
    expect(cold.sure.latest).toBeNull();
  });

  test("closes after the latest with what the stated error says of the next", () => {
    const { sure, cells, chance } = windowOf(0.95, []);
    const { latest, closedBy } = sure.best.sure;
    const next = cells[cells.findIndex(({ departure }) => departure === latest?.departure) + 1];
    expect(next?.status).not.toBe("stop");
    expect(chance(next as WindowCell)).toBeLessThan(0.95);
    expect(closedBy?.code).toBe("reserve-unsure");
  });

  test("decides nothing where none is asked for", () => {
    const { sure } = windowOf(undefined, []);
    expect(sure).not.toHaveProperty("confidence");
    expect(sure.best.sure).toEqual(sure.best.plain);
  });
});
