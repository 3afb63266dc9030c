import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { displayWidth } from "../../src/report/plain-text.ts";
import { type BuiltCommand, builtCommand } from "./built-command.ts";

let legwork: BuiltCommand;
let folder: string;
let islands: string;

const DAY = ["--from", "2027-05-04T06:00Z", "--to", "2027-05-04T18:00Z", "--every", "1h"];

beforeAll(async () => {
  legwork = await builtCommand();
  folder = mkdtempSync(join(tmpdir(), "legwork-window-"));
  const demo = join(folder, "demo");
  legwork.run(["demo", demo]);
  islands = join(demo, "islands.plan.json");
}, 60_000);

afterAll(() => {
  legwork.remove();
  rmSync(folder, { recursive: true, force: true });
});

/** The demo plan changed, beside its files. */
function changedPlan(name: string, change: (plan: Record<string, unknown>) => void): string {
  const plan = JSON.parse(readFileSync(islands, "utf8"));
  change(plan);
  const file = join(folder, "demo", `${name}.plan.json`);
  writeFileSync(file, JSON.stringify(plan));
  return file;
}

describe("legwork window", () => {
  it("compares departures in at most 80 columns, with status 0 where some can be done", () => {
    const { status, out, err } = legwork.run([
      "window",
      islands,
      ...DAY,
      "--speeds",
      "6kn, 8 kn",
      "--refine",
    ]);
    expect([status, err]).toEqual([0, ""]);
    const lines = out.split("\n");
    expect(Math.max(...lines.map(displayWidth))).toBeLessThanOrEqual(80);
    expect(out).toMatch(/of all, latest/);
    expect(out).toContain("6.0 kn");
  });

  it("gives the figures of legwork estimate for the same departure", () => {
    const { out } = legwork.run(["window", islands, ...DAY, "--route", "Sound", "--format", "json"]);
    const window = JSON.parse(out);
    expect(window.format).toBe("legwork-window/1");
    expect(window.cells).toHaveLength(13);
    const cell = window.cells[7];
    const alone = legwork.run([
      "estimate",
      islands,
      "--route",
      "Sound",
      "--departure",
      cell.departure,
      "--format",
      "json",
    ]);
    const [route] = JSON.parse(alone.out).routes;
    expect([cell.arrival, cell.use, cell.remaining, cell.status]).toEqual([
      route.arrival,
      route.totals.use,
      route.totals.remaining,
      route.status,
    ]);
  });

  it("takes the plan's own window, parts of it replaced by options", () => {
    const plan = changedPlan("planned", (document) => {
      document.window = { from: "2027-05-04T08:00Z", to: "2027-05-04T12:00Z", every: "2 h" };
    });
    const cells = (...options: string[]) =>
      JSON.parse(legwork.run(["window", plan, "--format", "json", ...options]).out).cells.length;
    expect(cells()).toBe(9);
    expect(cells("--every", "30 min")).toBe(27);
  });

  it("writes CSV to a file", () => {
    const out = join(folder, "window.csv");
    const { status } = legwork.run(["window", islands, ...DAY, "--format", "csv", "--out", out]);
    expect(status).toBe(0);
    expect(readFileSync(out, "utf8").split("\r\n")).toHaveLength(1 + 39 + 1);
  });

  it("finds the latest departure that arrives in time", () => {
    const { out } = legwork.run(["window", islands, ...DAY, "--arrive-by", "2027-05-04T18:00Z"]);
    expect(out).toMatch(/in time +Sound +04 16:03 +04 17:59/);
    expect(out).toContain("In time: the latest departure that arrives by 2027-05-04 18:00 UTC.");
  });

  it("ends with 1 where no departure can be done", () => {
    const { status, out } = legwork.run(["window", islands, ...DAY, "--route", "East about"]);
    expect(status).toBe(1);
    expect(out).toContain("Nothing in the window can be done.");
  });

  it.each([
    [
      ["--every", "30"],
      /^legwork: every takes a number with one of s, min, h, .* found "30" \(without a unit\)\n$/,
    ],
    [["--from", "dawn"], /^legwork: from takes an ISO 8601 date and time with its zone/],
    [["--to", "2027-05-03T00:00Z"], /does not end before it begins/],
    [["--speeds", "8kn,"], /^legwork: speeds takes a number with one of .* found ""\n$/],
    [["--speeds", "99kn"], /lies within the power model .* found 50\.9 m\/s \(99\.0 kn\)\n$/],
    [["--every", "1s", "--to", "2027-05-09T00:00Z"], /a window has at most 100000 cells/],
    [["--route", "Nowhere"], /a route is one of "Sound"/],
    [["--format", "gpx"], /'gpx' is invalid/],
  ])("refuses %j with one line and status 2, and writes nothing", (options, message) => {
    const out = join(folder, "none.txt");
    const { status, out: text, err } = legwork.run(["window", islands, ...DAY, ...options, "--out", out]);
    expect([status, text]).toEqual([2, ""]);
    expect(err).toMatch(message);
    expect(err.split("\n")).toHaveLength(2);
    expect(existsSync(out)).toBe(false);
  });

  it("asks for the window where neither plan nor options name it", () => {
    const { status, err } = legwork.run(["window", islands]);
    expect(status).toBe(2);
    expect(err).toMatch(/a window of departures needs from, to and every, .* found no from in either\n$/);
  });
});

describe("legwork estimate with a pace that asks for an arrival", () => {
  it("holds the speed that makes it, route by route, and says so", () => {
    const plan = changedPlan("arrive", (document) => {
      document.pace = { arrive: "2027-05-04T14:30Z" };
    });
    const { out } = legwork.run(["estimate", plan]);
    expect(out).toMatch(/that\s+arrives\s+at\s+2027-05-04\s+14:30\s+UTC,\s+each\s+route\s+its\s+own/);
    expect(out).toMatch(/note\s+3\.7 m\/s \(7\.1 kn\) through the medium arrives 2027-05-04 14:30 UTC/);
    const json = JSON.parse(legwork.run(["estimate", plan, "--route", "Sound", "--format", "json"]).out);
    const [route] = json.routes;
    expect(route.arrival).toBe("2027-05-04T14:30:00.000Z");
    expect(route.arrive.solutions[route.arrive.chosen].use).toBe(route.totals.use);
  });

  it("ends with 1 where no speed arrives then, and says when it would", () => {
    const plan = changedPlan("late", (document) => {
      document.pace = { arrive: "2027-05-04T11:30Z" };
    });
    const { status, out } = legwork.run(["estimate", plan, "--route", "Sound"]);
    expect(status).toBe(1);
    expect(out).toMatch(/STOP\s+no through-speed arrives at 2027-05-04 11:30 UTC: the highest speed/);
  });
});
