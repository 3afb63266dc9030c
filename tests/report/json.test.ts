import { describe, expect, it } from "vitest";
import { writeJson } from "../../src/report/json.ts";
import { drone, ocean, tender } from "./fixtures.ts";

describe("the estimate as JSON", () => {
  it("reads back to the estimate itself", () => {
    for (const { estimate } of [tender, drone, ocean])
      expect(JSON.parse(writeJson(estimate))).toEqual(estimate);
  });

  it("has its keys in one order, whatever the order in memory, and leaves out what is not promised", () => {
    const { estimate } = tender;
    const shuffled = Object.fromEntries(
      Object.entries({ ...estimate, secret: 1 }).reverse(),
    ) as unknown as typeof estimate;
    expect(writeJson(shuffled)).toBe(writeJson(estimate));
  });

  it("has the keys of the format, indented by two, and ends with a line end", () => {
    const text = writeJson(tender.estimate);
    expect(text.startsWith('{\n  "format": "legwork-estimate/1",\n  "advisory": "')).toBe(true);
    expect(text.endsWith("\n}\n")).toBe(true);
    const whole = JSON.parse(text);
    expect(Object.keys(whole)).toEqual(["format", "advisory", "plan", "fields", "routes"]);
    expect(Object.keys(whole.routes[0])).toEqual([
      "name",
      "status",
      "departure",
      "arrival",
      "storeUnit",
      "usable",
      "reserve",
      "totals",
      "legs",
      "findings",
    ]);
    expect(Object.keys(whole.routes[2])).toContain("reached");
    expect(Object.keys(whole.routes[0].legs[0])).toEqual([
      "leg",
      "from",
      "to",
      "path",
      "distance_m",
      "initialCourse_deg",
      "finalCourse_deg",
      "magneticCourse_deg",
      "departure",
      "arrival",
      "time_s",
      "stay_s",
      "throughDistance_m",
      "throughSpeed_m_s",
      "groundSpeed_m_s",
      "heading_deg",
      "crab_deg",
      "wind",
      "current",
      "use",
      "remaining",
      "still",
      "penalty",
      "error",
    ]);
    expect(Object.keys(whole.routes[0].legs[0].current)).toEqual([
      "alongTrackIntegral_m2_s",
      "meanAlongTrack_m_s",
      "meanCrossTrack_m_s",
      "maxSpeed_m_s",
      "covered",
    ]);
    expect(Object.keys(whole.routes[0].legs[0].penalty)).toEqual([
      "time_s",
      "use",
      "alongTime_s",
      "crossTime_s",
      "firstOrderTime_s",
    ]);
    expect(Object.keys(whole.routes[0].findings[0])).toEqual([
      "code",
      "severity",
      "leg",
      "at_m",
      "to_m",
      "lat",
      "lon",
      "message",
    ]);
  });

  it("refuses a figure that JSON cannot carry", () => {
    const [route] = tender.estimate.routes;
    if (route === undefined) throw new Error("the fixture has a route");
    const broken = { ...tender.estimate, routes: [{ ...route, usable: Number.NaN }] };
    expect(() => writeJson(broken)).toThrow("usable is NaN in the estimate");
  });
});
