import { expect, test } from "vitest";
import { inspectGrid } from "../../src/field/inspect.ts";
import { makeGrid } from "./make-grid.ts";
import { readText } from "./read-text.ts";

test("an inspection tells axes, times, coverage, ranges and what was not used", async () => {
  const file = [
    "# invented",
    "time,lat,lon,height,u,v,gust,station",
    "2027-05-04T06:00Z,50,1,10,3,4,7,a",
    "2027-05-04T06:00Z,50,2,10,-1,0,,b",
    "2027-05-04T06:00Z,51,2,10,,,9,c",
    "2027-05-04T09:00Z,50,1,10,0,-2,,d",
    "2027-05-04T15:00Z,50,4,10,1,1,,e",
  ].join("\n");
  const inspection = inspectGrid(await readText(file));
  expect(inspection).toEqual({
    file: "winds.csv",
    role: "wind",
    longitude: { count: 3, first: 1, last: 4, step: { min: 1, max: 2, regular: false } },
    latitude: { count: 2, first: 50, last: 51, step: { min: 1, max: 1, regular: true } },
    height: { count: 1, first: 10, last: 10, step: null },
    global: false,
    time: {
      count: 3,
      first: "2027-05-04T06:00:00.000Z",
      last: "2027-05-04T15:00:00.000Z",
      step: { min: 10_800, max: 21_600, regular: false },
    },
    nodes: 18,
    missing: 14,
    coverage: 4 / 18,
    speed: { min: 1, max: 5 },
    eastward: { min: -1, max: 3 },
    northward: { min: -2, max: 4 },
    gust: { min: 7, max: 9 },
    ignoredColumns: ["station"],
    notes: ["invented"],
    fileBytes: file.length,
    // 18 vectors of 16 bytes, 18 gusts of 8, three masks of 6, and axes of 3, 2, 1 and 3 numbers.
    memoryBytes: 18 * 16 + 18 * 8 + 18 + 9 * 8,
  });
  expect(JSON.parse(JSON.stringify(inspection))).toEqual(inspection);
});

test("a global grid counts its meridians once, a printed axis is regular, and nothing given has no range", () => {
  const lon = [-180, -59.9999999, 60, 180];
  const inspection = inspectGrid(makeGrid({ lon, lat: [0], global: true, at: () => null }));
  expect(inspection.longitude).toMatchObject({ count: 3, last: 60, step: { regular: true } });
  expect(inspection).toMatchObject({
    nodes: 3,
    missing: 3,
    coverage: 0,
    speed: null,
    gust: null,
    time: null,
    height: null,
  });
});
