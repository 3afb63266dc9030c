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

  it("keeps its columns where arrivals to the second fall on the day after", () => {
    const survey = join(folder, "demo", "survey-decide.plan.json");
    const { out } = legwork.run(["window", survey, "--route", "Low, round the homestead"]);
    const rows = out.split("\n").filter((line) => /^\d\d:\d\d {2}\d/.test(line));
    expect(rows.some((row) => row.includes("+1 "))).toBe(true);
    expect(rows.some((row) => !row.includes("+1"))).toBe(true);
    const points = rows.map((row) => row.match(/\d\.\d/)?.index);
    expect(new Set(points).size).toBe(1);
    expect(out).toMatch(/^ETD {4}ETA +Left$/m);
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
      /^legwork: --every takes a number with one of s, min, h, .* found "30" \(without a unit\)\n$/,
    ],
    [["--every", "0min"], /^legwork: --every: the step .* is at least 1 s; found "0min"\n$/],
    [["--every", "-5min"], /^legwork: --every: the step .* is at least 1 s; found "-5min"\n$/],
    [["--every", "0.5s"], /^legwork: --every: the step .* is at least 1 s; found "0\.5s"\n$/],
    [["--every", "9 kn"], /^legwork: --every takes .* found "9 kn" \(kn is a unit of speed\)\n$/],
    [["--from", "dawn"], /^legwork: --from takes an ISO 8601 date and time with its zone/],
    [
      ["--to", "2027-05-03T00:00Z"],
      /^legwork: --from, --to: a window of departures does not end before it begins; found 2027-05-04T06:00Z to 2027-05-03T00:00Z\n$/,
    ],
    [["--speeds", "8kn,"], /^legwork: --speeds takes a number with one of .* found ""\n$/],
    [
      ["--speeds", "8kn,99kn"],
      /^legwork: --speeds: a speed of a window lies within the power model .* found 50\.9 m\/s \(99\.0 kn\)\n$/,
    ],
    [["--speeds=-3kn"], /^legwork: --speeds is above 0; found "-3kn"\n$/],
    [["--speeds", "8kn,9kn,8.0 kn"], /^legwork: --speeds takes speeds that differ; found "8.0 kn" twice\n$/],
    [["--speeds", "8kn,0kn"], /^legwork: --speeds is above 0; found "0kn"\n$/],
    [
      ["--every", "1s", "--to", "2027-05-09T00:00Z"],
      /^legwork: --from, --to, --every: a window has at most 100000 cells/,
    ],
    [
      ["--arrive-by", "2027-05-04T06:00Z"],
      /^legwork: --arrive-by: an arrival is after the earliest departure considered; found 2027-05-04T06:00Z and 2027-05-04T06:00Z\n$/,
    ],
    [["--route", "Nowhere"], /^legwork: --route: a route is one of "Sound", .* found "Nowhere"\n$/],
    [
      ["--route=Sound", "--route=Sound"],
      /^legwork: --route: a route is asked for once; found "Sound" twice\n$/,
    ],
    [["--format", "gpx"], /^legwork: --format takes one of table, csv, json; found "gpx"/],
  ])("refuses %j with one line and status 2, and writes nothing", (options, message) => {
    const out = join(folder, "none.txt");
    const day = DAY.filter((_, index) => !options.includes(DAY[index - (index % 2)] as string));
    const { status, out: text, err } = legwork.run(["window", islands, ...day, ...options, "--out", out]);
    expect([status, text]).toEqual([2, ""]);
    expect(err).toMatch(message);
    expect(err.split("\n")).toHaveLength(2);
    expect(existsSync(out)).toBe(false);
  });

  it("tells a fault that the plan's own window has a part in of the option alone", () => {
    const plan = changedPlan("own", (document) => {
      document.window = { from: "2027-05-04T08:00Z", to: "2027-05-04T12:00Z", every: "2 h" };
    });
    const { err } = legwork.run(["window", plan, "--from", "2027-05-05T00:00Z"]);
    expect(err).toBe(
      "legwork: --from: a window of departures does not end before it begins; found 2027-05-05T00:00Z to 2027-05-04T12:00Z\n",
    );
  });

  it("tells a fault of the plan's own arriveBy of the plan", () => {
    const plan = changedPlan("early", (document) => {
      document.window = {
        from: "2027-05-04T08:00Z",
        to: "2027-05-04T09:00Z",
        every: "1 h",
        arriveBy: "2027-05-04T07:00Z",
      };
    });
    const { err } = legwork.run(["window", plan]);
    expect(err).toBe(
      `legwork: ${plan}, window.arriveBy: an arrival is after the earliest departure considered; found 2027-05-04T07:00Z and 2027-05-04T08:00Z\n`,
    );
  });

  it("asks for the window where neither plan nor options name it, and names both", () => {
    const { status, err } = legwork.run(["window", islands]);
    expect(status).toBe(2);
    expect(err).toBe(
      `legwork: ${islands}, window: a window of departures needs from, to and every, in the plan or as --from, --to and --every; found no from in either\n`,
    );
  });
});

/** What `legwork window` writes of the plain plan: nothing in it speaks of what the bests could be put to the test with. */
const PLAIN_TABLE = `Stores for the north light
Craft:     Battery workboat, 12 m, holds 8.0 kn through the water
Store:     102.0 kWh usable
Window:    2027-05-04 09:00 UTC to 2027-05-04 11:00 UTC, every 60 min: 1 of 3
           can be done
Current:   islands-current.csv; valid 2027-05-04 07:00 to 2027-05-04 19:00 UTC
Wind:      islands-wind.csv; valid 2027-05-04 06:00 to 2027-05-04 20:00 UTC

       Sound
ETD    ETA       Left
2027-05-04
09:00  11:42     27.2 TUL
10:00  x reserve
11:00  x reserve

ETD down; across ETA, with +1 on the day after departure; left in kWh. ! with
cautions. x cannot be done, and why. T least time, U least use, L latest
departure of these. All times UTC.

                              ETD          ETA     Time      Use     Left
Best           Route     dd hh:mm     dd hh:mm     h:mm      kWh      kWh
least time     Sound     04 09:00     04 11:42     2:42     74.8     27.2
least use      Sound     04 09:00     04 11:42     2:42     74.8     27.2
latest         Sound     04 09:00     04 11:42     2:42     74.8     27.2
After the latest departure, on the same route: leg 3, from 6.0 km (3.3 NM) after
Sound north to North light: what is left falls below the reserve of 20.40 kWh;
at the end 16.38 kWh is left, 4.02 kWh short.

Why
Sound: 2 of 3 cannot be done
  reserve     2, first 2027-05-04 10:00, last 2027-05-04 11:00 UTC: leg 3, from
              6.0 km (3.3 NM) after Sound north to North light: what is left
              falls below the reserve of 20.40 kWh; at the end 16.38 kWh is
              left, 4.02 kWh short

================================================================================
Advisory estimate from forecast data and simplified models, for planning
comparison only. Not for navigation. No substitute for official charts, notices,
forecasts and airspace information, the maker's limits, local regulations, or
the judgement of the licensed person in command.
`;

describe("legwork window of a plan that names nothing to put its bests to the test with", () => {
  const SHORT = [
    "--from",
    "2027-05-04T09:00Z",
    "--to",
    "2027-05-04T11:00Z",
    "--every",
    "1h",
    "--route",
    "Sound",
  ];

  it("writes the plain estimate's bests and no word more", () => {
    expect(legwork.run(["window", islands, ...SHORT]).out).toBe(PLAIN_TABLE);
    const csv = legwork.run(["window", islands, ...SHORT, "--format", "csv"]).out;
    expect(csv.split("\r\n")[0]).toBe(
      "route,departure [UTC],speed [m/s],status,arrival [UTC],time under way [s],departure to arrival [s],use [J],left [J],reserve [J],best,finding,message,advisory",
    );
    const json = legwork.run(["window", islands, ...SHORT, "--format", "json"]).out;
    expect(json).not.toMatch(/"sure|"tried/);
  });
});

describe("legwork window of a plan that names members and what-ifs", () => {
  const demo = (name: string) => join(folder, "demo", `${name}-decide.plan.json`);

  it.each(["islands", "survey", "ocean"])("decides %s in them, in at most 80 columns", (name) => {
    for (const options of [[], ["--refine"]]) {
      const { status, out, err } = legwork.run(["window", demo(name), ...options]);
      expect([status, err]).toEqual([0, ""]);
      expect(Math.max(...out.split("\n").map(displayWidth))).toBeLessThanOrEqual(80);
      expect(out.replace(/\s+/g, " ")).toMatch(
        /Bests of the departures that hold in all [57] members and 3 what-ifs(\.|, and with a probability of 95 % under the stated error\.)/,
      );
    }
  });

  it("passes over the ship's quickest departure, and says that a fouled hull would break its reserve", () => {
    const { out } = legwork.run(["window", demo("ocean")]);
    expect(out.replace(/\s+/g, " ")).toContain(
      'Of all, the quickest, Down the stream, 2027-11-03 06:00 UTC at 13.0 kn, breaks its reserve in the what-if "Fouled hull" (and 3 more).',
    );
    expect(out).toMatch(/of all, least time .* 12\.5 03 00:00/);
  });

  it("ends with 1 where no departure holds in all of them, though some can be done", () => {
    const options = ["--route", "High, straight", "--format", "json"];
    const { status, out } = legwork.run(["window", demo("survey"), ...options]);
    const { possible, best, sureBest } = JSON.parse(out);
    expect(status).toBe(1);
    expect(possible).toBeGreaterThan(0);
    expect(best.time.sure.status).toBe("stop");
    expect(sureBest).toEqual({ time: null, use: null, latest: null, closedBy: null });
  });

  it("names a what-if that the plan's own pace does not allow, with status 2", () => {
    const plan = changedPlan("eager", (document) => {
      document.whatIf = [{ name: "Faster", speed: "20 kn" }];
    });
    const { status, err } = legwork.run(["window", plan, ...DAY]);
    expect(status).toBe(2);
    expect(err).toMatch(/the what-if "Faster" keeps the speed above 0 and within the power model of .*\n$/);
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
