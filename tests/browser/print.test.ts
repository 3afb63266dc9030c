import { spawnSync } from "node:child_process";
import { expect, test } from "vitest";
import { ADVISORY } from "../../src/index.ts";
import { openPart } from "./desk-parts.ts";
import { openDemo, visit } from "./visit.ts";

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

test("what is decided is printed with the leg table where that is asked for, in words in place of fields", async () => {
  const { page } = await visit({ colours: "dark" });
  await openDemo(page, "Workboat: when, and how sure", "islands-decide");
  await openPart(page, "Departures");
  await page.getByRole("list", { name: "Best departures" }).waitFor();
  expect(textOf(await page.pdf({ format: "A4" }))).not.toContain("Departures compared");

  await page.getByLabel("Print with the leg table").check();
  const departures = textOf(await page.pdf({ format: "A4" })).replaceAll(/\s+/g, " ");
  expect(departures).toContain("Departures compared");
  expect(departures).toContain(
    "Departures from Tue 4 May 2027 09:00 UTC to Tue 4 May 2027 16:00 UTC, every 1 h.",
  );
  expect(departures).toContain("Least time");
  expect(departures).not.toMatch(/mm\/dd|the pace's|Refine/);

  await openPart(page, "Turning back");
  await page
    .getByText(/Point of no return/)
    .first()
    .waitFor();
  const turning = textOf(await page.pdf({ format: "A4" })).replaceAll(/\s+/g, " ");
  expect(turning).toMatch(/Turning back and off .*Orrin quay .*Point of no return, start \(Pier buoy\)/);
  expect(turning).not.toContain("Type an alternate");
});

test("the map of departures has paper's colours on paper, and the theme's again afterwards", async () => {
  const { page, expectFault } = await visit({ colours: "dark" });
  // Chromium's advice to whoever reads a canvas often, as this test does.
  expectFault(/willReadFrequently/);
  await openDemo(page, "Workboat: when, and how sure", "islands-decide");
  await openPart(page, "Departures");
  await page.getByRole("list", { name: "Best departures" }).waitFor();
  // The line of the plan's departure, 11:00, on the last row, two hours after the first of the window.
  const line = () =>
    page.evaluate(() => {
      const canvas = document.querySelector<HTMLCanvasElement>(".heat-grid canvas");
      const { width = 0, height = 0 } = canvas ?? {};
      const pixel = canvas?.getContext("2d")?.getImageData((width * 2.5) / 8 - 1, height - 4, 1, 1).data;
      return [...(pixel ?? [])].slice(0, 3);
    });
  const onScreen = await line();
  expect(Math.min(...onScreen)).toBeGreaterThan(200);
  await page.emulateMedia({ media: "print" });
  await expect.poll(async () => Math.max(...(await line()))).toBeLessThan(40);
  await page.emulateMedia({ media: "screen" });
  await expect.poll(line).toEqual(onScreen);
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
