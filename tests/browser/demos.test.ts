import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { type BuiltCommand, builtCommand } from "../cli/built-command.ts";
import { firstDifference } from "./same-figures.ts";
import { choose, openDemo, saved, visit } from "./visit.ts";

let command: BuiltCommand;
let folder: string;

beforeAll(async () => {
  command = await builtCommand();
  folder = mkdtempSync(join(tmpdir(), "legwork-"));
  const { status, err } = command.run(["demo", folder]);
  expect(status, err).toBe(0);
});

afterAll(() => {
  command.remove();
  rmSync(folder, { recursive: true, force: true });
});

const DEMOS = [
  ["islands", "Workboat among islands"],
  ["survey", "Survey drone"],
  ["ocean", "Ocean passage"],
] as const;

const DECIDING = [
  ["islands-decide", "Workboat: when, and how sure"],
  ["survey-decide", "Drone: when, and how sure"],
  ["ocean-decide", "Ocean: when, and how sure"],
] as const;

type Export = readonly [entry: string, format: string, ending: string];
const FIGURES: Export = ["Estimate (JSON)", "json", ".estimate.json"];
const OTHERS: readonly Export[] = [
  ["CSV", "csv", ".csv"],
  ["GeoJSON", "geojson", ".geojson"],
  ["GPX", "gpx", ".gpx"],
];

function byCommand(demo: string, route: string, format: string): string {
  const plan = join(folder, `${demo}.plan.json`);
  const { status, out, err } = command.run(["estimate", plan, "--route", route, "--format", format]);
  expect(status, err).toBeLessThanOrEqual(1);
  return out;
}

async function exportAs(page: Page, [entry, , ending]: Export): Promise<string> {
  const { name, text } = await saved(page, () => choose(page, `Export ${entry}`));
  expect(name.endsWith(ending), name).toBe(true);
  return text;
}

test.each(DECIDING)(
  "the demo %s is opened, and what it decides is copied as the command writes it",
  async (demo, title) => {
    const { page } = await visit();
    await openDemo(page, title, demo);
    const routes = page.locator(".ledger-table tbody th button");
    for (const [at, name] of (await routes.allInnerTexts()).entries()) {
      await routes.nth(at).click();
      const own = byCommand(demo, name, "table");
      expect(own).toMatch(/^Ensemble of [57] members/m);
      const copied = async () => {
        await choose(page, "Copy as text");
        return page.evaluate(() => navigator.clipboard.readText());
      };
      // Until the coast is there, the findings about land are missing.
      await expect.poll(copied, { timeout: 15_000, interval: 500 }).toBe(own);
    }
  },
);

test.each(DEMOS)(
  "the demo %s leads from a cold start to exports with the command's words and figures",
  async (demo, title) => {
    const { page } = await visit();
    await openDemo(page, title, demo);
    const routes = page.locator(".ledger-table tbody th button");
    const names = await routes.allInnerTexts();
    expect(names.length).toBeGreaterThanOrEqual(2);
    for (const [at, name] of names.entries()) {
      await routes.nth(at).click();
      for (const each of at === 0 ? [FIGURES, ...OTHERS] : [FIGURES]) {
        const own = byCommand(demo, name, each[1]);
        // Until the coast is there, the findings about land are missing.
        const difference = async () => firstDifference(await exportAs(page, each), own);
        await expect.poll(difference, { timeout: 15_000, interval: 200 }).toBe(null);
      }
      await choose(page, "Copy as text");
      const copied = () => page.evaluate(() => navigator.clipboard.readText());
      await expect.poll(copied).toBe(byCommand(demo, name, "table"));
    }
  },
);
