import { describe, expect, test } from "vitest";
import { nearestKey } from "../../src/plan/nearest-key.ts";

describe("the nearest known key", () => {
  test.each([
    ["sped", ["path", "speed", "stay"], "speed"],
    ["Speed", ["stay", "speed"], "speed"],
    ["lta", ["lat", "lon"], "lat"],
    ["heigth", ["height", "weight"], "height"],
    ["departuretime", ["title", "departure"], "departure"],
    ["", ["title", "lat"], "lat"],
    ["nothing alike", ["format"], "format"],
  ])("of %j among %j is %j", (found, known, nearest) => {
    expect(nearestKey(found, known)).toBe(nearest);
  });

  test("the first of equals is taken", () => {
    expect(nearestKey("lax", ["lat", "lay"])).toBe("lat");
  });

  test("a very long key is answered at once", () => {
    expect(nearestKey("x".repeat(1_000_000), ["lat", "departure"])).toBe("lat");
  });
});
