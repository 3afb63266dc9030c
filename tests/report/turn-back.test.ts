import { describe, expect, test } from "vitest";
import { withTurnBack } from "../../src/choose/turn-back-estimate.ts";
import type { EstimateInput } from "../../src/estimate/estimate.ts";
import { estimate, prepareRoutes } from "../../src/estimate/estimate.ts";
import { WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { writeCsv } from "../../src/report/csv.ts";
import { writeGeoJson } from "../../src/report/geojson.ts";
import type { ReportInput } from "../../src/report/input.ts";
import { writeJson } from "../../src/report/json.ts";
import { displayWidth } from "../../src/report/plain-text.ts";
import { writeTable } from "../../src/report/table.ts";
import { craftOf, DEPARTURE, gridField, routeOf, waypoint } from "../estimate/fixtures.ts";

const NM = 1852;
const east = (miles: number) => (miles * NM) / ((WGS84.a * Math.PI) / 180);

/** 120 NM and back's worth of store on 100 NM due east, in two legs, at 10 m/s in still air; an alternate halfway, 6 NM off. */
const input: EstimateInput = {
  title: "Out and back",
  departure: DEPARTURE,
  craft: craftOf({ store: { unit: "J", usable: 12 * NM * 1000 } }),
  pace: { hold: "through-speed", speed_m_s: 10 },
  reserve: null,
  fields: [],
  routes: [
    routeOf(
      waypoint("West", 0, 0),
      waypoint("Middle", 0, east(50), { path: "rhumb" }),
      waypoint("East", 0, east(100), { path: "rhumb" }),
    ),
  ],
  land: null,
};
const ALTERNATES = [{ name: "Isle", lat: 0.1, lon: east(50), height_m: null }];

function reported(asked: EstimateInput = input, alternates = ALTERNATES): ReportInput {
  const answer = withTurnBack(estimate(asked), prepareRoutes(asked), asked, alternates);
  return { estimate: answer.estimate, routes: asked.routes, craft: asked.craft, pace: asked.pace };
}

/** Degrees and minutes of longitude so many NM along the equator. */
function positionOf(miles: number): string {
  const degrees = Math.floor(east(miles));
  return `${String(degrees).padStart(3, "0")}°${((east(miles) - degrees) * 60).toFixed(2).padStart(5, "0")}`;
}

const section = (text: string) => {
  const lines = text.split("\n");
  const at = lines.findIndex((line) => line.startsWith("Turning back"));
  return lines.slice(at, lines.indexOf("", at));
};

describe("turning back in the table", () => {
  test("is told in order along the way", () => {
    const lines = section(writeTable(reported(), "sea"));
    // Isle: x² = (50 - x)² + 5.97² and x + sqrt((x - 50)² + 5.97²) = 120, in NM.
    expect(lines.map((line) => line.slice(0, 41).trimEnd())).toEqual([
      "Turning back, at once and without stays,",
      "                              From start",
      "Point                     Leg         NM",
      "Equal: start, Isle          1       25.4",
      "Equal: start, destination   1       50.0",
      "No return: start            2       60.0",
      "Equal: destination, Isle    2       74.6",
      "No return: Isle             2       84.7",
    ]);
    expect(lines[5]?.slice(41)).toBe(`04 09:05         00°00.00'N ${positionOf(60)}'E`);
  });

  test("keeps to 80 columns under any name and units", () => {
    const odd = { ...ALTERNATES[0], name: "長い名前の代替地 with a tail of many more words than fit" };
    for (const units of ["sea", "air", "metric"] as const) {
      const text = writeTable(reported(input, [odd as (typeof ALTERNATES)[number]]), units);
      for (const line of text.split("\n")) expect(displayWidth(line)).toBeLessThanOrEqual(80);
    }
  });

  test("keeps its columns apart where times have seconds and places another decimal", () => {
    const short: EstimateInput = {
      ...input,
      craft: craftOf({ moves: "air", store: { unit: "J", usable: 1.2 * NM * 1000 } }),
      routes: [routeOf(waypoint("West", 61, 9), waypoint("East", 61, 9.05, { path: "rhumb" }))],
    };
    const isle = { name: "Isle of the long name", lat: 61.005, lon: 9.02, height_m: null };
    const [, over, head, ...rest] = section(writeTable(reported(short, [isle]), "air"));
    const rows = rest.filter((line) => !line.includes("in reach from the whole way"));
    expect(over).toMatch(/ From start +At UTC +To go$/);
    expect(head).toMatch(/^Point +Leg +NM +hh:mm:ss +h:mm:ss +Position$/);
    for (const row of rows)
      expect(row).toMatch(/^\S.{0,25} \d +\d\.\d{3} +\d\d:\d\d:\d\d +(\d:\d\d:\d\d +)?\d\d°/);
    expect(rows.length).toBeGreaterThan(2);
  });

  test("says where a goal is in reach from everywhere, or from nowhere, or is not known", () => {
    const rich = { ...input, craft: craftOf() };
    expect(section(writeTable(reported(rich), "sea"))).toEqual(
      expect.arrayContaining([
        "Start: in reach from the whole way.",
        "Isle: in reach from the whole way.",
        "Any of them: in reach from the whole way.",
      ]),
    );
    const far = [{ name: "Far", lat: 40, lon: 0, height_m: null }];
    expect(section(writeTable(reported(input, far), "sea"))).toContain(
      "Far: in reach from nowhere on the way.",
    );
    const short = gridField("wind", { lon: [-1, 4], lat: [-1, 1], hours: [0, 6] }, () => [0, 0]);
    const ends = reported({ ...rich, fields: [short] }, []);
    expect(section(writeTable(ends, "sea")).join(" ")).toMatch(
      /Start: not known from 58\.3 NM from the start on, the data end in time on the way there\./,
    );
  });

  test("names a limit of the craft that the way back breaks", () => {
    const limits = { ...craftOf().limits, wind_m_s: 3 };
    const windy = gridField("wind", { lon: [-1, 4], lat: [-1, 1] }, () => [4, 0]);
    const asked = { ...input, craft: craftOf({ limits }), fields: [windy] };
    expect(section(writeTable(reported(asked, []), "sea")).join(" ")).toContain(
      "The way to start breaks the craft's wind limit, first from the sample",
    );
  });

  test("is left out where it was not asked for", () => {
    const plain = { ...reported(), estimate: estimate(input).estimate };
    expect(writeTable(plain, "sea")).not.toContain("Turning back");
    expect(writeJson(plain.estimate)).not.toContain("turnBack");
    expect(writeCsv(plain)).not.toContain("no return");
    expect(writeGeoJson(plain)).not.toContain("no-return");
  });
});

describe("turning back in the files", () => {
  test("JSON holds all of it beside the contract's keys", () => {
    const { estimate: answer } = reported();
    const route = JSON.parse(writeJson(answer)).routes[0];
    expect(Object.keys(route).at(-1)).toBe("turnBack");
    expect(route.turnBack).toEqual(JSON.parse(JSON.stringify(answer.routes[0]?.turnBack)));
    expect(Object.keys(route.turnBack)).toEqual([
      "goals",
      "end",
      "limits",
      "equalTime",
      "nowhere",
      "stretches",
      "samples",
    ]);
  });

  test("GeoJSON has a point for each", () => {
    const { features } = JSON.parse(writeGeoJson(reported()));
    const kinds = features.map((feature: { properties: { kind: string } }) => feature.properties.kind);
    expect(kinds.filter((kind: string) => kind === "equal-time-point")).toHaveLength(3);
    const start = features.find(
      ({ properties }: { properties: { kind: string; to: string } }) =>
        properties.kind === "point-of-no-return" && properties.to === "start",
    );
    expect(start.geometry.coordinates[0]).toBeCloseTo(east(60), 6);
    expect(start.properties).toMatchObject({ goal: "West", leg: 2, route: "Route" });
  });

  test("CSV says on which leg and where", () => {
    const rows = writeCsv(reported())
      .trim()
      .split("\r\n")
      .map((row) => row.split(",").slice(-3));
    expect(rows[0]).toEqual([
      "no return to start at [m]",
      "no return to start or any alternate at [m]",
      "equal time to start and destination at [m]",
    ]);
    expect(rows[1]?.[0]).toBe("");
    expect(Number(rows[2]?.[0])).toBeCloseTo(10 * NM, 3);
    expect(Number(rows[1]?.[2])).toBeCloseTo(50 * NM, 3);
  });
});
