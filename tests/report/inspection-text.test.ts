import { describe, expect, it } from "vitest";
import type { FieldInspection } from "../../src/field/inspect.ts";
import { writeInspection } from "../../src/report/inspection-text.ts";
import { displayWidth } from "../../src/report/plain-text.ts";

const FIELD: FieldInspection = {
  file: "wind.csv",
  role: "wind",
  longitude: { count: 360, first: 0, last: 359, step: { min: 1, max: 1, regular: true } },
  latitude: { count: 3, first: -10, last: 10.25, step: { min: 10, max: 10.25, regular: false } },
  height: { count: 1, first: 10, last: 10, step: null },
  global: true,
  time: {
    count: 3,
    first: "2027-05-04T00:00:00.000Z",
    last: "2027-05-04T09:00:00.000Z",
    step: { min: 5400, max: 27000, regular: false },
  },
  nodes: 3240,
  missing: 1,
  coverage: 3239 / 3240,
  speed: { min: 0, max: 21.456 },
  eastward: { min: -3, max: 4 },
  northward: { min: -1, max: 1 },
  gust: null,
  ignoredColumns: ["depth", "a\u0000b"],
  notes: ["A note that is long enough to need a second line, since it goes on and on beyond the width."],
  fileBytes: 123456,
  memoryBytes: 999,
};

describe("an inspection as text", () => {
  it("says all that the field holds, within 80 columns", () => {
    const text = writeInspection(FIELD);
    expect(text).toBe(
      [
        "File:      wind.csv, 123.5 kB; 999 B in memory",
        "Field:     read as wind",
        "Longitude: 360: 0 to 359 deg, every 1 deg, around the globe",
        "Latitude:  3: -10 to 10.25 deg, steps of 10 deg to 10.25 deg",
        "Height:    1: 10 m",
        "Times:     3: 2027-05-04 00:00 to 2027-05-04 09:00 UTC, steps of 90 min to 450",
        "           min",
        "Nodes:     3240 over all times, 1 missing, coverage 99.9 %",
        "Speed:     0.00 to 21.46 m/s",
        "Eastward:  -3.00 to 4.00 m/s",
        "Northward: -1.00 to 1.00 m/s",
        'Ignored:   columns "depth", "a b"',
        "Note:      A note that is long enough to need a second line, since it goes on",
        "           and on beyond the width.",
        "",
      ].join("\n"),
    );
    for (const line of text.split("\n")) expect(displayWidth(line)).toBeLessThanOrEqual(80);
  });
  it("says that a field is steady, and that it has no gaps", () => {
    const text = writeInspection({ ...FIELD, time: null, missing: 0, coverage: 1, height: null });
    expect(text).toContain("Times:     none: a steady field\nNodes:     3240 over all times, no gaps\n");
    expect(text).not.toContain("Height");
  });
});
