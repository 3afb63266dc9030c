import { describe, expect, test } from "vitest";
import { CellTrials } from "../../src/choose/cell-trials.ts";
import type { DepartureWindow } from "../../src/choose/departure-window.ts";
import { latestInTime } from "../../src/choose/in-time.ts";
import { refinedBests, refineRoutes } from "../../src/choose/refine.ts";
import { routePaces } from "../../src/choose/route-paces.ts";
import { runSteps } from "../../src/choose/steps.ts";
import { type SureWindow, sureWindow } from "../../src/choose/sure-window.ts";
import type { UncertaintyAsked } from "../../src/choose/uncertain-estimate.ts";
import { makeSweep, windowCells } from "../../src/choose/window.ts";
import type { WindowCell } from "../../src/choose/window-cell.ts";
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

const AS_PLANNED = { wind: 1, current: 1, veer_deg: 0, speed_m_s: 0, consumption: 0, late_s: 0 };

/** What the plan of {@link sureReport} names. */
const ASKED: UncertaintyAsked = {
  members: [],
  whatIfs: [
    { name: "Stream as planned", ...AS_PLANNED },
    { name: "Foul", ...AS_PLANNED, consumption: 1.5 },
    { name: "Two hours late\u001b[31m", ...AS_PLANNED, late_s: 7200 },
  ],
  errors: [{ role: "current", speed_m_s: 0.3, length_m: 30_000, time_s: 10_800 }],
};

function reportOf(
  names: readonly string[],
  speeds_m_s: readonly number[] | null,
  refine = false,
  asked: UncertaintyAsked | null = null,
): WindowReport {
  const craft = craftOf({
    name: "Tender",
    moves: "water",
    power: cubePower({ referenceSpeed_m_s: 5, referencePower_W: 20_000 }),
    speeds: { min: 2, max: 7 },
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
  const window: DepartureWindow = {
    from: DEPARTURE,
    to: DEPARTURE + 30 * HOUR,
    every_s: 3600,
    speeds_m_s,
    ...(asked === null ? {} : { arriveBy: DEPARTURE + 28 * HOUR }),
  };
  const sweep = makeSweep(prepareRoutes(input), input);
  const cells = [...windowCells(sweep, window)];
  const minutes = refine ? refineRoutes(sweep, window, cells) : null;
  const inTime = latestInTime(sweep, window);
  const summary = summariseWindow(cells);
  const paces = refine && asked !== null ? routePaces(sweep, summary) : null;
  const plain = { window, cells, minutes, inTime, paces };
  const sure = asked && runSteps(sureWindow(sweep, new CellTrials(sweep, asked), plain));
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
    summary,
    refined: minutes && refinedBests(minutes),
    inTime,
    paces,
    ...(sure === null ? {} : { sure }),
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

describe("a window whose bests are put to the test", () => {
  const names = ["North", "South", "A route of a very long name indeed, 説明"];
  const report = reportOf(names, [3, 5], true, ASKED);
  const { sure } = report;
  if (sure === undefined || sure === null) throw new Error("nothing was put to the test");
  const text = writeWindowTable(report, "sea");
  const lines = text.split("\n");
  const flat = text.replace(/\s+/g, " ");

  test("is a table of at most 80 columns, without control characters", () => {
    expect(Math.max(...lines.map(displayWidth))).toBeLessThanOrEqual(80);
    expect(lines.some((line) => line !== line.trimEnd())).toBe(false);
    expect(text).not.toContain("\u001b");
  });

  test("shows the bests that hold, and says of the plain ones that do not what breaks them", () => {
    const { plain, sure: held } = sure.refined?.best ?? sure.best;
    expect(plain.time?.departure).not.toBe(held.time?.departure);
    const row = lines.find((line) => line.startsWith("of all, least time"));
    expect(row).toContain(held.time?.departure.slice(11, 16));
    expect(flat).toContain("hold in all 3 what-ifs");
    const when = plain.time?.departure.slice(0, 16).replace("T", " ");
    expect(plain.time?.sure.decidedBy.whatIf).toBe("Foul");
    expect(flat).toMatch(
      new RegExp(`Of all, the quickest[^;.]*, ${when} UTC at \\d\\.\\d kn, .* in the what-if "Foul"`),
    );
  });

  test("says with what probability each reserve holds", () => {
    const head = lines.findIndex((line) => line.startsWith("Best "));
    expect(lines[head - 1]).toMatch(/ Holds$/);
    expect(lines[head]).toMatch(/ %$/);
    for (const row of lines.slice(head + 1, head + 4)) expect(row).toMatch(/ [<>]?\d+(\.\d)?[ !]?$/);
  });

  test("marks in the matrix the bests that hold, and in brackets those that do not", () => {
    const matrix = lines.slice(
      lines.findIndex((line) => line.startsWith("ETD  ")),
      lines.findIndex((line) => line.startsWith("ETD down")),
    );
    const marks = [...matrix.join("\n").matchAll(/(?<=\d[ !])([TUL]*)(?:\(([TUL]+)\))?/g)];
    const found = (group: number) => marks.map((mark) => mark[group] ?? "").join("");
    const bests = ["time", "use", "latest"] as const;
    const key = (cell: WindowCell | null) => cell && [cell.route, cell.departure, cell.speed_m_s].join();
    const passed = bests.filter((by) => key(sure.best.plain[by]) !== key(sure.best.sure[by]));
    expect([...found(1)].sort()).toEqual(["L", "T", "U"]);
    expect(matrix.join("\n")).not.toContain("()");
    expect(found(2)).toHaveLength(passed.length);
    expect(passed.length).toBeGreaterThan(0);
  });

  test("has in its json the plain bests and those that hold, each with what it comes to", () => {
    const json = JSON.parse(writeWindowJson(report));
    const same = (value: unknown) => JSON.parse(JSON.stringify(value));
    expect(json.tried).toEqual({ members: 0, whatIfs: 3 });
    expect(json.best).toEqual(same(sure.best.plain));
    expect(json.sureBest).toEqual(same(sure.best.sure));
    expect(json.refined.sureBest).toEqual(same(sure.refined?.best.sure));
    expect(json.routes.map(({ sureBest }: { sureBest: unknown }) => sureBest)).toEqual(
      same(sure.routes.map((own) => own.sure)),
    );
    expect(json.inTime.routes.map(({ sureLatest }: { sureLatest: unknown }) => sureLatest)).toEqual(
      same(sure.inTime?.map((own) => own.sure)),
    );
    const { sure: told, ...plain } = json.best.time;
    expect(plain).toEqual(report.summary.best.time);
    expect(Object.keys(told)).toEqual(["status", "decidedBy", "worst", "asBad", "ensemble", "reserveHolds"]);
    expect(json.cells).toEqual(report.cells);
  });

  test("names the fastest speed that holds beside the plain ones, in table and json", () => {
    const { paces } = JSON.parse(writeWindowJson(report));
    const told = sure.paces ?? [];
    expect(paces.map(({ sureFastest }: { sureFastest: unknown }) => sureFastest)).toEqual(
      JSON.parse(JSON.stringify(told.map(({ sureFastest }) => sureFastest))),
    );
    const held = told.filter(({ fastest, sureFastest }) => sureFastest !== fastest);
    expect(held.length).toBeGreaterThan(0);
    const rows = lines.filter((line) => line.startsWith("fastest held"));
    expect(rows).toHaveLength(held.length);
    rows.forEach((row, at) => {
      const knots = ((held[at]?.sureFastest?.speed_m_s as number) * 3600) / 1852;
      expect(row).toContain(` ${knots.toFixed(1)} `);
    });
    expect(flat).toContain(
      "Fastest held: the fastest that holds in all 3 what-ifs, at the route's departure",
    );
  });

  test("says what keeps a speed of the craft's range from being a true best", () => {
    const { paces } = JSON.parse(writeWindowJson(report));
    const plain = report.paces ?? [];
    expect(plain.some(({ leastUseBound }) => leastUseBound !== null)).toBe(true);
    plain.forEach(({ route, leastUse, leastUseBound, fastestBound }, at) => {
      expect(paces[at]).toMatchObject({ leastUseBound, fastestBound });
      if (leastUse === null || leastUseBound === null) return;
      const knots = (((leastUse.speed_m_s ?? 0) * 3600) / 1852).toFixed(1);
      const words =
        leastUseBound.stop === null ? "the craft's slowest" : "a slower one outlasts the forecast";
      expect(flat).toContain(`${route}, any speed: least use at ${knots} kn, ${words}`);
    });
  });

  test("has in its CSV columns at the end that are filled for the bests alone", () => {
    const [head, ...rows] = readCsv(writeWindowCsv(report));
    const [plain] = readCsv(writeWindowCsv(reportOf(names, [3, 5], true)));
    expect(head?.slice(0, plain?.length)).toEqual(plain);
    const column = (name: string) => head?.indexOf(name) ?? -1;
    const best = rows.filter((row) => row[column("best")] !== "" || row[column("sure best")] !== "");
    const rest = rows.filter((row) => !best.includes(row));
    expect(rest.every((row) => row.slice(plain?.length).every((cell) => cell === ""))).toBe(true);
    for (const row of best) {
      expect(row[column("sure status")]).toMatch(/^(clear|caution|stop)$/);
      expect(row[column("sure decided by")]).toMatch(/^(plain estimate|what if .+)$/);
      expect(Number(row[column("probability that the reserve holds [1]")])).toBeLessThanOrEqual(1);
      expect(row[column("sure best")] === "").toBe(row[column("sure status")] === "stop");
    }
    const held = best
      .flatMap((row) => (row[column("sure best")] ?? "").split(", "))
      .filter((word) => word !== "");
    expect(held.sort()).toEqual(["latest departure", "time", "use"]);
  });

  test("says so where nothing holds", () => {
    const frozen = { name: "Frozen", ...AS_PLANNED, consumption: 9 };
    const none = writeWindowTable(
      reportOf(["North"], null, false, { ...ASKED, whatIfs: [frozen] }),
      "metric",
    );
    expect(none).toContain("Nothing in the window holds in the what-if.");
    const solid = { ...frozen, consumption: 999 };
    const quick = reportOf(["North"], [3], true, { ...ASKED, whatIfs: [solid] });
    expect(writeWindowTable(quick, "sea")).toContain("\nNorth: no speed holds in the what-if.\n");
    expect(JSON.parse(writeWindowJson(quick)).paces[0].sureFastest).toBeNull();
    expect(none.replace(/\s+/g, " ")).toMatch(
      / The quickest.*, 2027-05-0\d \d\d:\d\d UTC, runs out of store in the what-if "Frozen"/,
    );
  });

  test("with a confidence says what it is, and of the plain bests that do not hold with it that they do not", () => {
    const errors = ASKED.errors.map((error) => ({ ...error, speed_m_s: 4 }));
    const asked = reportOf(names, [3, 5], false, { members: [], whatIfs: [], errors, confidence: 0.9999 });
    const own = asked.sure as SureWindow;
    const passed = own.routes
      .flatMap((each) => Object.values(each.plain))
      .filter((cell) => cell?.sure?.decidedBy.error);
    expect(passed.length).toBeGreaterThan(0);
    const told = writeWindowTable(asked, "sea").replace(/\s+/g, " ");
    expect(told).toContain("hold with a probability of 99.99 % under the stated error");
    expect(told).toMatch(
      /, is too unsure: the reserve holds with a probability of [\d.]+ % under the stated forecast error, and the plan asks for 99\.99 %/,
    );
    const whatIfs = [{ name: "Frozen", ...AS_PLANNED, consumption: 999 }];
    const none = writeWindowTable(
      reportOf(names, null, false, { members: [], whatIfs, errors, confidence: 0.9999999 }),
      "sea",
    );
    expect(none.replace(/\s+/g, " ")).toContain(
      "Nothing in the window holds in the what-if, and with a probability of 99.99999 % under the stated error.",
    );
    for (const line of none.split("\n")) expect(displayWidth(line)).toBeLessThanOrEqual(80);
    const json = JSON.parse(writeWindowJson(asked));
    expect(json.tried).toEqual({ members: 0, whatIfs: 0, confidence: 0.9999 });
    expect(JSON.stringify(json.routes)).toContain('"decidedBy":{"member":null,"whatIf":null,"error":true}');
  });

  test("with a stated error alone has the plain bests, and how probably their reserves hold", () => {
    const stated = reportOf(names, null, false, { ...ASKED, whatIfs: [] });
    const own = writeWindowTable(stated, "sea");
    expect(own).toContain("L latest\ndeparture of these. All times UTC.");
    expect(own.replace(/\s+/g, " ")).toContain("Holds: probability that the reserve does");
    expect(stated.sure?.best.sure).toEqual({ ...stated.sure?.best.plain });
  });
});
