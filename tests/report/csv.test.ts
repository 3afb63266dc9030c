import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { csvCell, writeCsv } from "../../src/report/csv.ts";
import { drone, ocean, reportOf, tender, tenderSketch } from "./fixtures.ts";
import { readCsv } from "./rfc4180.ts";

type Record = { readonly [header: string]: string };

function records(csv: string): readonly Record[] {
  const [header = [], ...rows] = readCsv(csv);
  return rows.map((row) => Object.fromEntries(header.map((name, index) => [name, row[index] ?? ""])));
}

describe("the legs as CSV", () => {
  it("are one row each, of as many cells as the header, ended by CR LF", () => {
    for (const input of [tender, drone, ocean]) {
      const csv = writeCsv(input);
      const legs = input.estimate.routes.flatMap((route) => route.legs);
      expect(csv.replaceAll("\r\n", "")).not.toMatch(/[\r\n]/);
      expect(csv.split("\r\n")).toHaveLength(legs.length + 2);
      const rows = readCsv(csv);
      expect(new Set(rows.map((row) => row.length)).size).toBe(1);
      expect(new Set(rows[0]).size).toBe(rows[0]?.length);
    }
  });

  it("read back to the very numbers of the estimate", () => {
    const legs = tender.estimate.routes.flatMap((route) => route.legs);
    for (const [index, row] of records(writeCsv(tender)).entries()) {
      const leg = legs[index];
      expect(row["distance [m]"]).toBe(String(leg?.distance_m));
      expect(row["time under way [s]"]).toBe(leg?.time_s == null ? "" : String(leg.time_s));
      expect(row["use [J]"]).toBe(leg?.use == null ? "" : String(leg.use));
      expect(row["left [J]"]).toBe(leg?.remaining == null ? "" : String(leg.remaining));
      expect(row["max true heading [deg]"]).toBe(leg?.heading_deg ? String(leg.heading_deg.max) : "");
      expect(row["current mean cross track [m/s]"]).toBe(
        leg?.current ? String(leg.current.meanCrossTrack_m_s) : "",
      );
    }
  });

  it("name the store's unit, leave empty what a stopped route lacks, and carry findings and advisory", () => {
    const rows = records(writeCsv(ocean));
    expect(Object.keys(rows[0] ?? {})).toContain("left [kg]");
    const stopped = records(writeCsv(tender)).filter((row) => row.route === "Through the race");
    expect(stopped.map((row) => row["time under way [s]"] === "")).toEqual([false, true, true]);
    expect(stopped.map((row) => row["distance [m]"])).toEqual(["10800", "16100", "28700"]);
    expect(stopped.map((row) => row.findings)).toEqual(["", "cannot-hold-track", ""]);
    expect(stopped[0]?.advisory).toContain("Not for navigation");
  });

  it("cannot start a formula from a name, and leave negative numbers alone", () => {
    for (const name of [
      "=1+1",
      "+1",
      "-1",
      "@SUM(A1)",
      "\t=1",
      "\r=1",
      " =1",
      "\n=1",
      "＝1",
      "\u0000=1",
      '="a",1',
    ]) {
      const input = reportOf({
        ...tenderSketch,
        routes: tenderSketch.routes.map((route) => ({ ...route, name })),
      });
      for (const row of records(writeCsv(input))) expect(row.route).toBe(`'${name}`);
    }
    expect(csvCell(-1.5e-9)).toBe("-1.5e-9");
    expect(records(writeCsv(tender))[0]?.["from longitude [deg]"]).toBe("-6.3871");
  });

  it("give back any name through a reader of RFC 4180", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary" }), (name) => {
        const [[cell] = []] = readCsv(`${csvCell(name)},x\r\n`);
        expect([name, `'${name}`]).toContain(cell);
      }),
      { numRuns: 300 },
    );
  });

  it("refuse a figure that is not a number", () => {
    expect(() => csvCell(Number.NaN)).toThrow("a figure of the estimate is NaN");
  });
});
