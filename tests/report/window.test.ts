import { describe, expect, test } from "vitest";
import type { DepartureWindow } from "../../src/choose/departure-window.ts";
import { latestInTime } from "../../src/choose/in-time.ts";
import { refineWindow } from "../../src/choose/refine.ts";
import { makeSweep, windowCells } from "../../src/choose/window.ts";
import { summariseWindow } from "../../src/choose/window-summary.ts";
import { ADVISORY } from "../../src/constants.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { type EstimateInput, fieldSummary, prepareRoutes } from "../../src/estimate/estimate.ts";
import { displayWidth } from "../../src/report/plain-text.ts";
import { writeWindowCsv } from "../../src/report/window-csv.ts";
import type { WindowReport } from "../../src/report/window-input.ts";
import { writeWindowJson } from "../../src/report/window-json.ts";
import { writeWindowTable } from "../../src/report/window-table.ts";
import { craftOf, DEPARTURE, gridField, HOUR, spaced, waypoint } from "../estimate/fixtures.ts";
import { readCsv } from "./rfc4180.ts";

const stream = gridField(
  "current",
  { lon: spaced(-1, 2, 6), lat: spaced(-1, 1, 4), hours: spaced(0, 30, 30) },
  (_lon, _lat, hours) => [3.2 * Math.sin((2 * Math.PI * hours) / 12.42), 0],
);

function reportOf(
  names: readonly string[],
  speeds_m_s: readonly number[] | null,
  refine = false,
): WindowReport {
  const craft = craftOf({
    name: "Tender",
    moves: "water",
    power: cubePower({ referenceSpeed_m_s: 5, referencePower_W: 20_000 }),
    store: { unit: "J", usable: 3.6e8 },
  });
  const input: EstimateInput = {
    title: "Two marks",
    departure: DEPARTURE,
    craft,
    pace: { hold: "through-speed", speed_m_s: 3 },
    reserve: { kind: "share", share: 0.1 },
    fields: [stream],
    routes: names.map((name, n) => ({ name, waypoints: [waypoint("A", 0, 0), waypoint("B", 0.1 * n, 0.5)] })),
    land: null,
  };
  const window: DepartureWindow = { from: DEPARTURE, to: DEPARTURE + 30 * HOUR, every_s: 3600, speeds_m_s };
  const sweep = makeSweep(prepareRoutes(input), input);
  const cells = [...windowCells(sweep, window)];
  const refined = refine ? refineWindow(sweep, window, cells) : null;
  const fields = input.fields.map(fieldSummary);
  const { title, pace } = input;
  return {
    title,
    fields,
    craft,
    pace,
    arrive: null,
    window,
    cells,
    summary: summariseWindow(cells),
    refined,
    inTime: latestInTime(sweep, window),
    paces: null,
  };
}

describe("a window as a table", () => {
  const report = reportOf(["North", "South", "A route of a very long name indeed, 説明"], [3, 5], true);
  const lines = writeWindowTable(report, "sea").split("\n");

  test("is at most 80 columns wide and ends with a line end", () => {
    expect(Math.max(...lines.map(displayWidth))).toBeLessThanOrEqual(80);
    expect(lines.at(-1)).toBe("");
    expect(lines.some((line) => line !== line.trimEnd())).toBe(false);
  });

  test("has a row a departure and block, with dates on lines of their own", () => {
    const blocks = lines.filter((line) => line.startsWith("ETD  ")).length;
    expect(blocks).toBeGreaterThan(1);
    const rows = lines.filter((line) => /^\d\d:\d\d {2}/.test(line));
    expect(rows).toHaveLength(31 * blocks);
    expect(lines.filter((line) => /^2027-05-0[456]$/.test(line))).toHaveLength(2 * blocks);
  });

  test("shows arrival and what is left, the best marked once each, and why others cannot be done", () => {
    const matrix = lines.slice(
      lines.findIndex((line) => line.startsWith("ETD  ")),
      lines.findIndex((line) => line.startsWith("ETD down")),
    );
    const marks =
      matrix
        .join("\n")
        .match(/(?<=\d[ !])[TUL]+/g)
        ?.join("") ?? "";
    expect([...marks].sort()).toEqual(["L", "T", "U"]);
    expect(matrix.join("\n")).toContain("x track");
    expect(matrix.join("\n")).toContain("x no forecast");
    expect(lines.join("\n")).toMatch(/of \d+ cannot be done/);
  });

  test("figures are those of the cells", () => {
    const one = reportOf(["North"], null);
    const cell = one.cells.find(({ status, arrival }) => status === "clear" && arrival !== null);
    if (cell === undefined || cell.arrival === null || cell.remaining === null)
      throw new Error("no cell can be done");
    const row = writeWindowTable(one, "sea")
      .split("\n")
      .find((line) => line.startsWith(`${cell.departure.slice(11, 16)}  `));
    const arrival = new Date(Math.round(Date.parse(cell.arrival) / 60_000) * 60_000).toISOString();
    expect(row).toContain(arrival.slice(11, 16));
    expect(row).toContain((cell.remaining / 3.6e6).toFixed(1));
  });

  test("says in which way it is refined, and what closes the window", () => {
    expect(lines.join(" ")).toMatch(/The bests below are to the minute/);
    expect(lines.join(" ")).toMatch(/After the latest departure, on the same route: leg 1,/);
  });

  test("of a window in which nothing can be done says so", () => {
    // The first departure alone rides the stream; all later ones meet it stronger than their speed.
    const one = reportOf(["North"], [0.5]);
    const cells = one.cells.slice(1);
    const text = writeWindowTable({ ...one, cells, summary: summariseWindow(cells) }, "metric");
    expect(text).toContain("Nothing in the window can be done.");
    expect(text).toMatch(/0 of 30\s+can be done/);
  });
});

describe("a window as json", () => {
  test("is legwork-window/1 with every cell, the bests and the reasons", () => {
    const report = reportOf(["North", "South"], [3, 5], true);
    const json = JSON.parse(writeWindowJson(report));
    expect(Object.keys(json)).toEqual([
      "format",
      "advisory",
      "plan",
      "fields",
      "window",
      "arrive",
      "storeUnit",
      "usable",
      "possible",
      "best",
      "routes",
      "refined",
      "cells",
    ]);
    expect(json.format).toBe("legwork-window/1");
    expect(json.advisory).toBe(ADVISORY);
    expect(json.window).toEqual({
      from: "2027-05-04T06:00:00.000Z",
      to: "2027-05-05T12:00:00.000Z",
      every_s: 3600,
      speeds_m_s: [3, 5],
    });
    expect(json.cells).toEqual(report.cells);
    expect(json.best).toEqual(report.summary.best);
    expect(json.routes).toEqual(report.summary.routes);
    expect(json.refined).toEqual(report.refined);
  });

  test("without refinement has no key for it", () => {
    expect(JSON.parse(writeWindowJson(reportOf(["North"], null)))).not.toHaveProperty("refined");
  });
});

describe("a window as CSV", () => {
  test("has a row a cell in full precision and the bests marked", () => {
    const report = reportOf(['North, "by the head"', "=South"], null);
    const [head, ...rows] = readCsv(writeWindowCsv(report));
    expect(head?.slice(0, 3)).toEqual(["route", "departure [UTC]", "speed [m/s]"]);
    expect(rows).toHaveLength(report.cells.length);
    report.cells.forEach((cell, n) => {
      const row = Object.fromEntries((head ?? []).map((name, column) => [name, rows[n]?.[column] ?? ""]));
      expect(row["departure [UTC]"]).toBe(cell.departure);
      expect(row["left [J]"]).toBe(cell.remaining === null ? "" : String(cell.remaining));
      expect(row.finding).toBe(cell.worst?.code ?? "");
    });
    const best = rows.map((row) => row[head?.indexOf("best") ?? 0]).filter((text) => text !== "");
    expect(best.join(", ").split(", ").sort()).toEqual(["latest departure", "time", "use"]);
    expect(rows[1]?.[0]).toBe("'=South");
  });

  test("refined, adds the bests between the cells as rows of their own", () => {
    const report = reportOf(["North"], null, true);
    const [head, ...rows] = readCsv(writeWindowCsv(report));
    expect(rows.length).toBeGreaterThan(report.cells.length);
    for (const row of rows.slice(report.cells.length)) expect(row[head?.indexOf("best") ?? 0]).not.toBe("");
  });
});
