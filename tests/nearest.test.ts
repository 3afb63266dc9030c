import { describe, expect, test } from "vitest";
import { nearest as nearestOf } from "../src/nearest.ts";

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
    expect(nearestOf(found, known).name).toBe(nearest);
  });

  test("the first of equals is taken", () => {
    expect(nearestOf("lax", ["lat", "lay"]).name).toBe("lat");
  });

  test("a very long key is answered at once", () => {
    expect(nearestOf("x".repeat(1_000_000), ["lat", "departure"]).name).toBe("lat");
  });
});
