import { describe, expect, test } from "vitest";
import { InputError } from "../../src/errors.ts";
import { estimatePlan } from "../../src/plan/estimate-plan.ts";
import {
  addAlternate,
  addWhatIf,
  alternateName,
  changeAlternate,
  deleteAlternate,
  deleteWhatIf,
  setAlternateText,
  setArrival,
  setError,
} from "../../web/state/decide-edits.ts";
import { createDecisions, wantsDecisions } from "../../web/state/decisions.ts";
import { departingAt } from "../../web/state/departing-at.ts";
import type { PlanDocument } from "../../web/state/plan-document.ts";
import { setPlanText } from "../../web/state/plan-edits.ts";
import { createDeciding } from "../../web/worker/deciding.ts";
import { createPlanReader } from "../../web/worker/plan-reader.ts";
import { sourcesOf } from "../../web/worker/shared-shelves.ts";
import { bytesOfDemo, demoEngine } from "./demo-engine.ts";

function decidable(plan: PlanDocument): PlanDocument {
  const withPlace = addAlternate(plan, 53.53, -13.5);
  const withChange = addWhatIf(withPlace, { wind: 1.2, late: "30 min" });
  return setError(withChange, "current", { speed: "0.2 m/s", length: "30 km", time: "6 h" });
}

describe("what the worker decides", () => {
  test("is what the library decides of the same plan", async () => {
    const { plan, reader } = demoEngine("islands");
    const wanted = decidable(plan);
    const answer = await createDeciding(reader).decide(wanted, false);
    const own = await estimatePlan(JSON.stringify(wanted), { file: "islands.plan.json", open: bytesOfDemo });
    if (!answer.ok) throw new Error(answer.fault);
    expect(answer.routes).toEqual(own.estimate.routes);
    expect(answer.routes[0]).toMatchObject({ turnBack: {}, whatIf: [{}], spread: {} });
    expect(answer.sensitivities.length).toBe(plan.routes.length);
  });

  test("is in what is exported, and only where the plan names it", async () => {
    const { plan, estimator } = demoEngine("islands");
    await estimator.estimate(plan);
    expect((await estimator.answered())?.estimate.routes[0]?.turnBack).toBeUndefined();
    await estimator.estimate(decidable(plan));
    expect((await estimator.answered())?.estimate.routes[0]?.turnBack).toBeDefined();
  });

  test("has the curve of a route with the pace's own speed, the least use and the fastest that keeps the reserve", async () => {
    const { plan, reader } = demoEngine("islands");
    const answer = await createDeciding(reader).paceCurve(plan, 1);
    if (!answer.ok) throw new Error(answer.fault);
    expect(answer.curve.points.every(({ route }) => route === plan.routes[1]?.name)).toBe(true);
    // 8 kn is 8 × 1852/3600 m/s.
    expect(answer.speed_m_s).toBeCloseTo(4.11556, 5);
    expect(answer.least?.use).toBeLessThanOrEqual(
      Math.min(...answer.curve.points.map(({ use }) => use ?? Infinity)),
    );
    expect(answer.fastest?.remaining).toBeGreaterThanOrEqual((answer.fastest?.reserve ?? 0) - 1e-3);
  });

  test("answers an arrival with speeds that make it", async () => {
    const { plan, estimator } = demoEngine("islands");
    const answer = await estimator.estimate(setArrival(plan, "2027-05-04T14:30:00Z"));
    if (!answer.ok) throw new Error(answer.fault);
    for (const { arrive, arrival } of answer.estimate.routes) {
      expect(arrive?.chosen).not.toBeNull();
      expect(Date.parse(arrival ?? "")).toBeCloseTo(Date.parse("2027-05-04T14:30:00Z"), -1);
    }
  });
});

describe("a second worker on the first one's shelves", () => {
  test("reads the same fields once, and again when a file is another", async () => {
    const { plan, fields, files } = demoEngine("islands");
    let asked = 0;
    const shelves = {
      file: async (name: string) => files.blob(name),
      fields: async (references: Parameters<typeof fields.merged>[0]) => {
        asked += 1;
        return fields.merged(references);
      },
      land: async () => null,
      revision: async () => fields.revision(),
    };
    const reader = createPlanReader(sourcesOf(shelves));
    const first = await reader.read(plan);
    await reader.read({ ...plan, departure: "2027-05-04T10:00:00Z" });
    expect(asked).toBe(1);
    fields.forget(plan.fields?.[0]?.file ?? "");
    const again = await reader.read(plan);
    expect(asked).toBe(2);
    expect(again.input.fields).toEqual(first.input.fields);
  });

  test("says in a sentence which file is missing", async () => {
    const { plan, fields } = demoEngine("islands");
    const missing = Object.assign(new Error("open that file too"), { name: "InputError" });
    const refuse = () => Promise.reject(missing);
    const shelves = { file: refuse, fields: fields.merged, land: async () => null, revision: async () => 0 };
    const reading = createPlanReader(sourcesOf(shelves)).read(plan);
    await expect(reading).rejects.toBeInstanceOf(InputError);
  });
});

describe("decisions on the page", () => {
  test("are asked for where the plan names something to decide, and keep routes in their places", async () => {
    const { plan, reader } = demoEngine("islands");
    expect(wantsDecisions(plan, false)).toBe(false);
    expect(wantsDecisions(plan, true)).toBe(true);
    const drawn = { ...plan.routes[0], name: "New", waypoints: [] };
    const wanted = { ...decidable(plan), routes: [drawn, ...plan.routes] };
    expect(wantsDecisions(wanted, false)).toBe(true);
    const deciding = createDeciding(reader);
    const decisions = createDecisions((asked, turnBack) => deciding.decide(asked, turnBack));
    await decisions.ask(wanted, false);
    expect(decisions.decided.value?.plan).toBe(wanted);
    expect(decisions.decided.value?.routes.map((route) => route?.name ?? null)).toEqual([
      null,
      ...plan.routes.map(({ name }) => name),
    ]);
  });
});

describe("edits of what is decided", () => {
  const { plan } = demoEngine("islands");

  test("add and take out alternates, with names of their own", () => {
    const two = addAlternate(addAlternate(plan, 1, 2), 3, 4);
    expect(two.alternates?.map(({ name }) => name)).toEqual(["Alternate 1", "Alternate 2"]);
    const refilled = addAlternate(deleteAlternate(two, 0), 5, 6);
    expect(new Set(refilled.alternates?.map(({ name }) => name)).size).toBe(2);
    expect(changeAlternate(two, 1, { name: "Cove" }).alternates?.[1]).toEqual({
      name: "Cove",
      lat: 3,
      lon: 4,
    });
    expect("alternates" in deleteAlternate(addAlternate(plan, 1, 2), 0)).toBe(false);
  });

  test("call an alternate that the plan does not name by its number, and let no text be a name or a height", () => {
    const named = setAlternateText(addAlternate(plan, 1, 2), 0, "height", "30 m");
    expect(named.alternates).toEqual([{ name: "Alternate 1", lat: 1, lon: 2, height: "30 m" }]);
    const bare = setAlternateText(setAlternateText(named, 0, "name", " "), 0, "height", "");
    expect(bare.alternates).toEqual([{ lat: 1, lon: 2 }]);
    expect(alternateName({ lat: 1, lon: 2 }, 0)).toBe("Alternate 1");
    expect(addAlternate(bare, 3, 4).alternates?.[1]?.name).toBe("Alternate 2");
  });

  test("take what-ifs and errors away again without a trace", () => {
    expect(deleteWhatIf(addWhatIf(plan, { wind: 2 }), 0)).toEqual(plan);
    const stated = setError(plan, "wind", { speed: "1 m/s", length: "1 km", time: "1 h" });
    expect(stated.fields?.filter(({ error }) => error !== undefined).map(({ role }) => role)).toEqual([
      "wind",
    ]);
    expect(setError(stated, "wind", null)).toEqual(plan);
    // Nothing is left that a confidence could be held against.
    const sure = setPlanText(stated, "confidence", "90 %");
    expect(sure.confidence).toBe("90 %");
    expect(setError(sure, "wind", null)).toEqual(plan);
    const both = setError(sure, "current", { speed: "1 m/s", length: "1 km", time: "1 h" });
    expect(setError(both, "wind", null).confidence).toBe("90 %");
    expect(setPlanText(sure, "confidence", " ")).toEqual(stated);
  });

  test("set a departure alone, or with a speed under the pace's own rule", () => {
    const at = { departure: "2027-05-04T09:00:00Z", speed: null };
    expect(departingAt(plan, at)).toEqual({ ...plan, departure: at.departure });
    const ground: PlanDocument = { ...plan, pace: { hold: "ground-speed", speed: "8 kn" } };
    expect(departingAt(ground, { ...at, speed: "6 kn" }).pace).toEqual({
      hold: "ground-speed",
      speed: "6 kn",
    });
    expect(departingAt(ground, { ...at, speed: "6 kn", through: true }).pace).toEqual({
      hold: "through-speed",
      speed: "6 kn",
    });
    const arriving = setArrival(plan, "2027-05-04T14:00:00Z");
    expect(departingAt(arriving, { ...at, speed: "6 kn" }).pace).toEqual({
      hold: "through-speed",
      speed: "6 kn",
    });
  });
});
