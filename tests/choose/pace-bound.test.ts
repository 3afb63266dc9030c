import { describe, expect, test } from "vitest";
import { fastestBound, leastUseBound } from "../../src/choose/pace-bound.ts";
import { fastestWithReserve, leastUseSpeed } from "../../src/choose/pace-curve.ts";
import type { Craft, Reserve } from "../../src/craft/craft.ts";
import { prepareRoute } from "../../src/estimate/prepare.ts";
import type { Field } from "../../src/field/field.ts";
import { DEPARTURE, gridField } from "../estimate/fixtures.ts";
import { boat, box, distance, east } from "./pace-fixtures.ts";

/** What bounds the least use and the fastest. */
function boundsOf(fields: readonly Field[], craft: Craft = boat, reserve: Reserve | null = null) {
  const prepared = prepareRoute(east, fields);
  const conditions = { departure: DEPARTURE, craft, reserve, fields };
  return {
    least: leastUseBound(prepared, conditions, leastUseSpeed(prepared, conditions)),
    fastest: fastestBound(prepared, conditions, fastestWithReserve(prepared, conditions)),
  };
}

describe("what bounds the speed of least use", () => {
  test("is nothing where the use rises on both sides", () => {
    // For P ~ V³ against a head current c the least use is at 1.5 c, well inside the range.
    expect(boundsOf([gridField("current", box, () => [-2, 0])]).least).toBeNull();
  });

  test("is the craft where its slowest speed uses least", () => {
    expect(boundsOf([]).least).toEqual({ beyond: "slower", stop: null });
  });

  test("is the end of the forecast where slower speeds outlast it", () => {
    // In still water the use falls with the speed, and the forecast ends 10 h after the departure.
    const still = gridField("current", { ...box, hours: [0, 10] }, () => [0, 0]);
    const { least } = boundsOf([still]);
    expect(least?.beyond).toBe("slower");
    expect(least?.stop?.code).toBe("outside-time");
  });
});

describe("what bounds the fastest speed", () => {
  test("is nothing but the reserve where that does", () => {
    const store = { unit: "J", usable: 160 * 5 ** 2 * distance } as const;
    expect(boundsOf([], { ...boat, store }, { kind: "share", share: 0.2 }).fastest).toBeNull();
    expect(boundsOf([], { ...boat, store }).fastest).toBeNull();
  });

  test("is the craft where the store is ample", () => {
    expect(boundsOf([]).fastest).toEqual({ beyond: "faster", stop: null });
  });
});

test("nothing bounds what was not found", () => {
  const { least, fastest } = boundsOf([gridField("current", box, () => [-15, 0])]);
  expect([least, fastest]).toEqual([null, null]);
});
