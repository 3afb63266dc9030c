import { describe, expect, test } from "vitest";
import { summariseWindow } from "../../src/choose/window-summary.ts";
import type { FieldSummary } from "../../src/estimate/result.ts";
import { fieldJson } from "../../src/report/json.ts";
import { fieldText } from "../../src/report/table-head.ts";
import { writeWindowJson } from "../../src/report/window-json.ts";
import { writeWindowTable } from "../../src/report/window-table.ts";

const PLAIN: FieldSummary = { role: "wind", files: ["w0.csv"], validFrom: null, validTo: null };
const MEMBERS = [0, 1, 2].map((member) => ({ member, files: [`w${member}.csv`, "background.csv"] }));

function reportOf(fields: readonly FieldSummary[]): Parameters<typeof writeWindowTable>[0] {
  return {
    title: "Two marks",
    fields,
    craft: { name: "Tender", moves: "water", store: { unit: "J", usable: 36e6 } as never },
    pace: { hold: "least-energy" },
    arrive: null,
    window: { from: 0, to: 0, every_s: 60, speeds_m_s: null },
    cells: [],
    summary: summariseWindow([]),
    refined: null,
    inTime: null,
    paces: null,
  };
}

describe("the sources of a field", () => {
  test("are the files of every member, each once", () => {
    expect(fieldText(PLAIN)).toBe("w0.csv; steady");
    expect(fieldText({ ...PLAIN, members: MEMBERS })).toBe(
      "w0.csv, background.csv, w1.csv, w2.csv (3 members); steady",
    );
    const column = [0, 1].map((member) => ({ member, files: ["w.csv"] }));
    expect(fieldText({ ...PLAIN, files: ["w.csv"], members: column })).toBe("w.csv (2 members); steady");
  });

  test("stand beside the keys of the control in JSON, and are no keys where there are none", () => {
    expect(Object.keys(fieldJson(PLAIN))).toEqual(["role", "files", "validFrom", "validTo"]);
    const told = fieldJson({ ...PLAIN, members: MEMBERS, unused: ["w9.csv"] });
    expect(Object.keys(told)).toEqual(["role", "files", "validFrom", "validTo", "members", "unused"]);
    expect([told.files, told.members, told.unused]).toEqual([["w0.csv"], MEMBERS, ["w9.csv"]]);
    const window = writeWindowJson(reportOf([{ ...PLAIN, members: MEMBERS }]));
    expect(JSON.parse(window).fields[0].members).toEqual(MEMBERS);
  });

  test("in a window's head are wrapped, with what nothing is used of", () => {
    const members = Array.from({ length: 30 }, (_, member) => ({ member, files: [`wind-${member}.csv`] }));
    const text = writeWindowTable(reportOf([{ ...PLAIN, members, unused: ["late.csv"] }]), "sea");
    for (const line of text.split("\n")) expect(line.length).toBeLessThanOrEqual(80);
    const words = text.replace(/\s+/g, " ");
    for (const { files } of members) expect(words).toContain(` ${files[0]}`);
    expect(words).toContain("wind-29.csv (30 members); steady; nothing used of late.csv");
  });
});
