import { spawnSync } from "node:child_process";
import { expect, test } from "vitest";
import { ADVISORY } from "../../src/index.ts";
import { visit } from "./visit.ts";

/** Points: the sizes of the papers. */
const PAPERS = [
  ["A4", 595, 842],
  ["Letter", 612, 792],
] as const;

test.each(PAPERS)(
  "the print on %s carries title, departure, craft, fields, advisory and page numbers",
  async (format, width, height) => {
    const { page } = await visit();
    const pdf = await page.pdf({ format });
    const pages = textOf(pdf).split("\f").slice(0, -1);
    expect(pages.length).toBeGreaterThanOrEqual(1);
    const text = pages.join(" ").replaceAll(/\s+/g, " ");
    for (const part of [
      "Stores for the north light",
      "2027",
      "11:00 UTC",
      "Battery workboat",
      "islands-current.csv",
      "islands-wind.csv",
      "with Legwork",
      ADVISORY,
      "Leg table",
      "North light",
    ]) {
      expect(text).toContain(part);
    }
    for (const [at, one] of pages.entries())
      expect(one).toMatch(new RegExp(`\\b${at + 1} ?/ ?${pages.length}\\b`));
    // Whole pixels of the screen, 0.75 points each.
    const [wide = 0, high = 0] = sizeOf(pdf);
    expect(Math.abs(wide - width)).toBeLessThanOrEqual(1);
    expect(Math.abs(high - height)).toBeLessThanOrEqual(1);
    // What is for the screen alone is not filed.
    expect(text).not.toContain("Undo");
    expect(text).not.toContain("Add waypoint");
  },
);

test("a print in the dark theme is black on white all the same", async () => {
  const { page } = await visit({ colours: "dark" });
  await page.emulateMedia({ media: "print" });
  const [ink, ground] = await page.evaluate(() => {
    const { color } = getComputedStyle(document.querySelector(".leg-table td") ?? document.body);
    return [color, getComputedStyle(document.body).backgroundColor];
  });
  expect(ink).toBe("rgb(0, 0, 0)");
  expect(["rgb(255, 255, 255)", "rgba(0, 0, 0, 0)"]).toContain(ground);
});

function textOf(pdf: Buffer): string {
  return poppler("pdftotext", ["-layout", "-", "-"], pdf);
}

/** Width and height of the first page, whole points. */
function sizeOf(pdf: Buffer): number[] {
  const found = poppler("pdfinfo", ["-"], pdf).match(/Page size:\s+([\d.]+) x ([\d.]+)/);
  return [found?.[1], found?.[2]].map((side) => Math.round(Number(side)));
}

function poppler(program: string, args: readonly string[], pdf: Buffer): string {
  const { error, status, stdout, stderr } = spawnSync(program, args, { input: pdf, encoding: "utf8" });
  if (error) throw new Error(`${program} is needed: install Debian's package poppler-utils.`);
  if (status !== 0) throw new Error(`${program}: ${stderr}`);
  return stdout;
}
