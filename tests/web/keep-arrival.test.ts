import { describe, expect, test } from "vitest";
import type { WindowCell } from "../../web/core.ts";
import {
  arrivalToKeep,
  keepsArrival,
  latestMarks,
  spareText,
  spareTime,
} from "../../web/window/keep-arrival.ts";
import type { Filled } from "../../web/window/window-fill.ts";

const CELL: WindowCell = {
  route: "East",
  departure: "2027-05-04T09:00:00.000Z",
  speed_m_s: null,
  arrival: "2027-05-04T11:30:00.000Z",
  time_s: 9000,
  passage_s: 9000,
  use: 1,
  remaining: 1,
  reserve: null,
  status: "clear",
  worst: null,
};
const at = (time: string): number => Date.parse(`2027-05-04T${time}Z`);

describe("an arrival to keep", () => {
  test("has time to spare, or is missed by some, or has nothing to be compared with", () => {
    expect(spareTime(CELL, at("12:00"))).toBe(1800);
    expect(spareTime(CELL, at("11:00"))).toBe(-1800);
    expect(spareTime({ ...CELL, arrival: null }, at("12:00"))).toBeNull();
    expect(spareTime(CELL, null)).toBeNull();
    expect(spareText(CELL, at("12:00"))).toBe("in time, 30 min to spare");
    expect(spareText(CELL, at("10:00"))).toBe("1 h 30 too late");
    expect(spareText(CELL, null)).toBe("");
  });

  test("is kept to the instant, and only by what can be done", () => {
    expect(keepsArrival(CELL, at("11:30"))).toBe(true);
    expect(keepsArrival(CELL, at("11:30") - 1)).toBe(false);
    expect(keepsArrival({ ...CELL, status: "caution" }, at("11:30"))).toBe(true);
    expect(keepsArrival({ ...CELL, status: "stop" }, at("11:30"))).toBe(false);
    expect(keepsArrival(CELL, null)).toBe(false);
  });

  test("stands on its row of the map at its very departure, and nowhere outside the window", () => {
    const latest = (departure: string) => ({
      route: "",
      speed_m_s: 1,
      latest: { ...CELL, departure: `2027-05-04T${departure}:00.000Z` },
      earliest: CELL,
    });
    const filled = {
      plan: { window: { arriveBy: "2027-05-04T12:00Z" } },
      shape: { departures: [at("08:00"), at("09:00"), at("10:00")], speeds: [1, 2] },
      bests: {
        inTime: {
          routes: [latest("08:15"), latest("09:30"), { ...latest("08:00"), latest: null }, latest("10:01")],
        },
      },
    } as unknown as Filled;
    const row = (route: number, speed: number) => ({ route, speed, name: "" });
    expect(arrivalToKeep(filled)).toBe(at("12:00"));
    expect(latestMarks(filled, [row(0, 1), row(1, 1)])).toEqual([{ row: 0, column: 1.5 }]);
    expect(latestMarks(filled, [row(0, 0), row(0, 1), row(1, 0)])).toEqual([
      { row: 0, column: 0.25 },
      { row: 1, column: 1.5 },
    ]);
    const tried = [null, { ...CELL, departure: "2027-05-04T08:30:00.000Z" }, null, null];
    const sure = { inTime: tried.map((cell) => ({ sure: cell })) } as unknown as Filled["sure"];
    expect(latestMarks({ ...filled, sure }, [row(0, 0), row(0, 1)])).toEqual([{ row: 1, column: 0.5 }]);
    expect(arrivalToKeep({ plan: { ...filled.plan, window: { from: "", to: "", every: "" } } })).toBeNull();
  });
});
