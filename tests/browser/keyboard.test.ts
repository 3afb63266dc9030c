import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { type BuiltCommand, builtCommand } from "../cli/built-command.ts";
import { firstDifference } from "./same-figures.ts";
import { said, saved, visit } from "./visit.ts";

let command: BuiltCommand;
let folder: string;

beforeAll(async () => {
  command = await builtCommand();
  folder = mkdtempSync(join(tmpdir(), "legwork-"));
  expect(command.run(["demo", folder]).status).toBe(0);
});

afterAll(() => {
  command.remove();
  rmSync(folder, { recursive: true, force: true });
});

test("by keyboard alone a demo is opened, a waypoint moved, another route compared, and the leg table exported", async () => {
  const { page } = await visit();
  const keys = page.keyboard;
  await tabTo(page, "More");
  await keys.press("Enter");
  await tabTo(page, "Survey drone");
  await keys.press("Enter");
  await expect.poll(() => said(page)).toBe("Opened survey.plan.json");

  await tabTo(page, "Latitude of waypoint 3");
  await keys.press("Control+a");
  await keys.type("28 35.9 S");
  await keys.press("Enter");
  await tabTo(page, "Differences to");
  await keys.press("ArrowDown");
  await expect.poll(() => page.locator(".difference").count()).toBeGreaterThan(0);
  await tabTo(page, "Low, round the homestead");
  await keys.press("Enter");

  await tabTo(page, "Save");
  const plan = await saved(page, () => keys.press("Enter"));
  expect(plan.text).toContain("28 35.9 S");
  await tabTo(page, "More");
  await keys.press("Enter");
  await tabTo(page, "Export CSV");
  const table = await saved(page, () => keys.press("Enter"));

  // The plan as the page saved it, given to the command, has the same leg table.
  const file = join(folder, "by-keyboard.plan.json");
  writeFileSync(file, plan.text);
  const own = command.run(["estimate", file, "--route", "Low, round the homestead", "--format", "csv"]);
  expect(own.status, own.err).toBeLessThanOrEqual(1);
  expect(firstDifference(table.text, own.out)).toBe(null);
});

test("every stop of the Tab key shows where it is, can be seen, and has a name", async () => {
  const { page } = await visit();
  const seen: Stop[] = [];
  for (let stop = 0; stop < 200; stop += 1) {
    await page.keyboard.press("Tab");
    const found = await focusStop(page);
    if (found === null) break;
    seen.push(found);
  }
  expect(seen.length).toBeGreaterThan(40);
  expect(seen.filter(({ name }) => name === "")).toEqual([]);
  expect(seen.filter(({ marked }) => !marked)).toEqual([]);
  expect(seen.filter(({ inSight }) => !inSight)).toEqual([]);
});

interface Stop {
  readonly name: string;
  readonly what: string;
  /** Whether the focus is drawn. */
  readonly marked: boolean;
  /** Whether it lies, at least in part, on the screen and under nothing else. */
  readonly inSight: boolean;
}

/** Presses Tab, or Shift+Tab from the end back, until what is named has the focus. */
async function tabTo(page: Page, name: string): Promise<void> {
  for (let stop = 0; stop < 200; stop += 1) {
    await page.keyboard.press("Tab");
    const found = await focusStop(page);
    if (found?.name.startsWith(name)) return;
  }
  throw new Error(`Tab never comes to "${name}"`);
}

/** What has the focus; `null` where the page itself has it. */
function focusStop(page: Page): Promise<Stop | null> {
  return page.evaluate(() => {
    const element = document.activeElement;
    if (!(element instanceof HTMLElement || element instanceof SVGElement) || element === document.body)
      return null;
    const labels =
      element instanceof HTMLInputElement || element instanceof HTMLSelectElement ? element.labels : null;
    const name =
      element.getAttribute("aria-label") ??
      document.getElementById(element.getAttribute("aria-labelledby") ?? "")?.textContent ??
      labels?.[0]?.textContent ??
      element.textContent ??
      "";
    // A field inside a label that looks like a button shows the focus on the label.
    const shown = [element, element.closest("label"), element.nextElementSibling].filter(
      (each) => each !== null,
    );
    // The parts of a field for date and time are the browser's own, and so is their focus.
    const parted = element instanceof HTMLInputElement && element.type === "datetime-local";
    const marked =
      parted ||
      shown.some((each) => {
        const { outlineStyle, outlineWidth, boxShadow } = getComputedStyle(each);
        return (
          (outlineStyle !== "none" && Number.parseFloat(outlineWidth) >= 1.5) || boxShadow.includes("inset")
        );
      });
    const inSight = shown.some((each) => {
      const { left, top, right, bottom, width, height } = each.getBoundingClientRect();
      const x = Math.min(Math.max((left + right) / 2, left + 1), right - 1);
      const y = (Math.max(top, 0) + Math.min(bottom, innerHeight)) / 2;
      const there = document.elementFromPoint(x, y);
      return width > 1 && height > 1 && (each.contains(there) || there?.contains(each) === true);
    });
    return { name: name.trim(), what: element.outerHTML.slice(0, 120), marked, inSight };
  });
}
