import { describe, expect, test } from "vitest";
import { estimatePlan } from "../../src/plan/estimate-plan.ts";
import { serializePlan } from "../../src/plan/write-plan.ts";
import { changed, opener, read, SUPPLY_RUN } from "./documents.ts";

const STILL = changed(SUPPLY_RUN, ["fields", undefined]) as typeof SUPPLY_RUN;
const ISLE = { name: "Isle", lat: "58°10.0'N", lon: -6.9, height: "20 ft" };

const estimated = (document: unknown, turnBack?: boolean) =>
  estimatePlan(JSON.stringify(document), {
    file: "run.plan.json",
    open: opener(),
    ...(turnBack === undefined ? {} : { turnBack }),
  });

describe("alternates in a plan", () => {
  test("are read into degrees and metres, and called by number where they have no name", async () => {
    const { alternates } = await read(changed(STILL, ["alternates", [ISLE, { lat: -1, lon: 350 }]]));
    expect(alternates).toEqual([
      { name: "Isle", lat: 58 + 10 / 60, lon: -6.9, height_m: 20 * 0.3048 },
      { name: "Alternate 2", lat: -1, lon: 350, height_m: null },
    ]);
    expect(await read(STILL)).not.toHaveProperty("alternates");
  });

  test("make the estimate say how far the routes can turn back", async () => {
    const { estimate } = await estimated(changed(STILL, ["alternates", [ISLE]]));
    const [route] = estimate.routes;
    expect(route?.turnBack?.goals.map(({ name }) => name)).toEqual(["Quay", "Skerrin", "Isle"]);
    expect(route?.turnBack?.limits.map(({ goal }) => goal)).toEqual([0, 2, null]);
    const { estimate: plain } = await estimated(STILL);
    const { turnBack, ...rest } = route ?? {};
    expect(rest).toEqual(plain.routes[0]);
    expect(turnBack).toBeDefined();
  });

  test("are not needed where it is asked for, and an empty list asks for nothing", async () => {
    expect((await estimated(STILL, true)).estimate.routes[0]?.turnBack?.limits).toHaveLength(1);
    expect((await estimated(changed(STILL, ["alternates", []]))).estimate.routes[0]).not.toHaveProperty(
      "turnBack",
    );
  });

  test("are at the speed found where the pace asks for an arrival", async () => {
    const document = changed(STILL, ["pace", { arrive: "2027-05-04T11:00:00Z" }]);
    const { estimate } = await estimated(document, true);
    const { turnBack, totals } = estimate.routes[0] ?? {};
    const arrives = (totals?.time_s ?? 0) + (totals?.stay_s ?? 0);
    expect(turnBack?.end.time_s).toBeCloseTo(arrives, 6);
    expect(arrives).toBeCloseTo(5 * 3600, 0);
  });

  test("are written after the routes, with their keys in order", () => {
    const alternates = [{ height: "20 ft", lon: -6.9, lat: "58°10.0'N", name: "Isle" }];
    const text = serializePlan({ ...STILL, alternates });
    expect(Object.keys(JSON.parse(text)).at(-1)).toBe("alternates");
    expect(Object.keys(JSON.parse(text).alternates[0])).toEqual(["name", "lat", "lon", "height"]);
  });
});
