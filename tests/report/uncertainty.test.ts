import { describe, expect, test } from "vitest";
import type { DecidedRoute } from "../../src/choose/decided.ts";
import { withUncertainty } from "../../src/choose/uncertain-estimate.ts";
import type { WhatIf } from "../../src/choose/what-if.ts";
import { whatIfText } from "../../src/choose/what-if.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { type EstimateInput, estimatePrepared, prepareRoutes } from "../../src/estimate/estimate.ts";
import { writeCsv } from "../../src/report/csv.ts";
import type { ReportInput } from "../../src/report/input.ts";
import { writeJson } from "../../src/report/json.ts";
import { percentText } from "../../src/report/percent-text.ts";
import { displayWidth } from "../../src/report/plain-text.ts";
import { writeTable } from "../../src/report/table.ts";
import { craftOf, DEPARTURE, gridField, routeOf, spaced, waypoint } from "../estimate/fixtures.ts";
import { readCsv } from "./rfc4180.ts";

const SHAPE = { lon: spaced(-6, 0, 6), lat: spaced(47, 52, 5), hours: spaced(-2, 40, 14) };
const currentOf = (member: number) =>
  gridField("current", SHAPE, (lon, _, h) => [0.4 * Math.sin(lon + h / 3) - member / 10, 0.2]);

const craft = craftOf({
  moves: "water",
  power: cubePower({ referenceSpeed_m_s: 6, referencePower_W: 60_000 }),
  store: { unit: "J", usable: 2.35e9 },
});

const input: EstimateInput = {
  title: "Sure or not",
  departure: DEPARTURE,
  craft,
  pace: { hold: "through-speed", speed_m_s: 6 },
  reserve: { kind: "share", share: 0.05 },
  fields: [currentOf(0)],
  routes: [
    routeOf(
      waypoint("A", 48, -5),
      waypoint("A place of a name that goes on and on, 北の灯台, to the east", 49, -4),
      waypoint("C", 49, -3),
    ),
  ],
  land: null,
};

const whatIf = (change: Partial<WhatIf>): WhatIf => {
  const whole = { wind: 1, current: 1, veer_deg: 0, speed_m_s: 0, consumption: 0, late_s: 0, ...change };
  return { name: whatIfText(whole), ...whole };
};

const prepared = prepareRoutes(input);
const { estimate } = withUncertainty(estimatePrepared(prepared, input), prepared, input, {
  whatIfs: [
    whatIf({ current: 2 }),
    whatIf({ late_s: 60 * 3600 }),
    whatIf({ consumption: 0.3 }),
    {
      ...whatIf({ current: 0.5 }),
      name: "=cmd, with a name far longer than a column of the table can ever hold",
    },
  ],
  errors: [{ role: "current", speed_m_s: 0.8, length_m: 60_000, time_s: 21_600 }],
  members: [0, 3, 40].map((member) => ({ member, fields: [currentOf(member)] })),
});
const report: ReportInput = { estimate, routes: input.routes, craft, pace: input.pace };
const [route] = estimate.routes as [DecidedRoute];

describe("how sure an estimate is, in the table", () => {
  const lines = writeTable(report, "sea").split("\n");

  test("fits 80 columns", () => {
    for (const line of lines) expect(displayWidth(line)).toBeLessThanOrEqual(80);
  });

  test("gives the spread per leg, the probability and where a wrong forecast hurts most", () => {
    const at = lines.findIndex((line) => line.startsWith("Spread under the forecast error"));
    expect(lines.slice(at + 3, at + 6).map((line) => line.trim().split(/\s+/)[0])).toEqual(["1", "2", "All"]);
    const text = lines.slice(at + 6, at + 9).join(" ");
    expect(text).toMatch(/^The reserve holds with a probability of \d+(\.\d)? %/);
    expect(text).toMatch(/A wrong forecast hurts.* on leg \d/);
  });

  test("gives quantiles of the ensemble and the members by number", () => {
    const at = lines.findIndex((line) => line.startsWith("Ensemble of 3 members"));
    expect(lines[at + 3]).toMatch(/^Leg 1 +least/);
    expect(lines[at + 8]).toMatch(/^Route +least/);
    expect(lines.slice(at + 13, at + 15).join(" ")).toContain("Broken in member");
  });

  test("gives every what-if a row beside the route as planned", () => {
    const at = lines.findIndex((line) => line.startsWith("What if"));
    expect(lines[at + 3]).toMatch(/^\(as planned\)/);
    expect(lines[at + 5]).toMatch(/late .*– +– +– +– +STOP outside-time$/);
    expect(lines[at + 7]).toMatch(/^=cmd, with a name.*…/);
  });
});

describe("a confidence that is not met", () => {
  const asked = {
    whatIfs: [],
    errors: [{ role: "current", speed_m_s: 0.8, length_m: 60_000, time_s: 21_600 }],
  } as const;
  const unsure = withUncertainty(estimatePrepared(prepared, input), prepared, input, {
    ...asked,
    members: [],
    confidence: 0.9995,
  }).estimate;
  const given: ReportInput = { ...report, estimate: unsure };

  test("stands beside the probability found, and decides the status", () => {
    const text = writeTable(given, "sea").replace(/\s+/g, " ");
    expect(text).toMatch(/ taken as normal\); the plan asks for 99\.95 %\. A wrong forecast/);
    expect(text).toMatch(
      /STOP the reserve holds with a probability of \d+(\.\d)? % under the stated forecast error, and/,
    );
  });

  test("is in JSON with the spread, and its finding in JSON and CSV", () => {
    const [written] = JSON.parse(writeJson(unsure)).routes;
    expect(written.spread.confidence).toBe(0.9995);
    expect(written.findings[0].code).toBe("reserve-unsure");
    expect(writeCsv(given)).toContain("reserve-unsure");
  });
});

describe("how sure an estimate is, in files", () => {
  test("stands in JSON beside the contract's keys, whole", () => {
    const written = JSON.parse(writeJson(estimate)).routes[0];
    expect(written.whatIf).toEqual(route.whatIf);
    expect(written.spread).toEqual(route.spread);
    expect(written.ensemble).toEqual(route.ensemble);
  });

  test("stands in CSV in columns of its own, a what-if's name as text", () => {
    const [head, first, second] = readCsv(writeCsv(report)) as [string[], string[], string[]];
    const cell = (row: string[], header: string) => row[head.indexOf(header)];
    expect(cell(first, "standard deviation of arrival [s]")).toBe(String(route.spread?.legs[0]?.arrival_s));
    expect(cell(second, "ensemble p90 of use [J]")).toBe(String(route.ensemble?.legs[1]?.use?.p90));
    expect(cell(second, "ensemble members that break the reserve")).toBe(
      route.ensemble?.breaksReserve.join(" "),
    );
    expect(cell(second, "what if current × 2: route's use [J]")).toBe(String(route.whatIf?.[0]?.use));
    expect(head.some((header) => header.startsWith("what if =cmd"))).toBe(true);
  });
});

describe("a share in percent", () => {
  test.each([
    [0, "0 %"],
    [1e-9, "less than 0.1 %"],
    [0.004, "0.4 %"],
    [0.5, "50 %"],
    [0.995, "99.5 %"],
    [1 - 1e-9, "more than 99.9 %"],
    [1, "100 %"],
  ])("%d is written %s", (share, text) => {
    expect(percentText(share)).toBe(text);
  });
});
