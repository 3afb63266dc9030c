import type { Page } from "playwright-core";
import { expect, test } from "vitest";
import { ready, saved, visit } from "./visit.ts";

test("the first steps are shown on a first visit, and stay away once dismissed", async () => {
  const { page } = await visit();
  const hint = page.getByRole("complementary", { name: "First steps" });
  expect(await hint.getByRole("listitem").count()).toBe(3);
  await hint.getByRole("button", { name: "Dismiss" }).click();
  await hint.waitFor({ state: "detached" });
  await page.reload();
  await ready(page);
  expect(await hint.count()).toBe(0);
});

test("units, zone and hidden columns are kept between visits, and the print leaves the same columns out", async () => {
  const { page } = await visit();
  await page.locator("summary", { hasText: "Show as" }).click();
  await page
    .locator(".menu-sheet")
    .getByLabel(/^Units/)
    .selectOption("metric");
  await page.keyboard.press("Escape");
  await page.getByRole("button", { name: "Columns" }).click();
  const sheet = page.getByRole("dialog", { name: "Columns and units" });
  await sheet.getByLabel("Heading").uncheck();
  await sheet.getByRole("button", { name: "Done" }).click();
  expect(await page.evaluate(() => document.activeElement?.textContent)).toBe("Columns");
  const before = await headings(page);
  expect(before.join(" ")).toMatch(/Distance\s*km/);
  expect(before.join(" ")).not.toContain("Heading");
  await page.reload();
  await ready(page);
  expect(await headings(page)).toEqual(before);
  await page.emulateMedia({ media: "print" });
  expect(await headings(page)).toEqual(before);
});

test("the craft is changed in its form, a wrong figure is told beside it, and undo brings the craft back", async () => {
  const { page } = await visit();
  const left = page.locator(".ledger-table tbody").first().locator("[data-label=Left]");
  const before = await left.textContent();
  await page.locator("button.craft-name").click();
  const form = page.getByRole("dialog", { name: "Craft and pace" });
  const capacity = form.getByLabel("Capacity", { exact: true });
  await capacity.fill("240");
  await capacity.press("Enter");
  await expect.poll(() => left.textContent()).not.toBe(before);
  await capacity.fill("plenty");
  await capacity.press("Enter");
  await expect.poll(() => capacity.getAttribute("aria-invalid")).toBe("true");
  await form.getByRole("button", { name: "Done" }).click();
  await form.waitFor({ state: "detached" });
  await page.getByRole("button", { name: "Undo" }).click();
  await page.getByRole("button", { name: "Undo" }).click();
  await expect.poll(() => left.textContent()).toBe(before);
});

test("a craft saved from the page is the craft that it was, and another is opened in its place", async () => {
  const { page } = await visit();
  await page.locator("button.craft-name").click();
  const form = page.getByRole("dialog", { name: "Craft and pace" });
  await form.locator(".craft-plots svg").first().waitFor();
  const craft = await saved(page, () => form.getByRole("button", { name: "Save craft" }).click());
  expect(craft.name).toMatch(/\.craft\.json$/);
  expect(JSON.parse(craft.text)).toMatchObject({ name: "Battery workboat, 12 m", moves: "water" });
  await form.locator("input[type=file]").setInputFiles({
    name: "other.craft.json",
    mimeType: "application/json",
    buffer: Buffer.from(craft.text.replace("Battery workboat, 12 m", "Sister boat")),
  });
  await form.getByRole("button", { name: "Done" }).click();
  await expect.poll(() => page.locator("button.craft-name").textContent()).toContain("Sister boat");
});

test("departures are compared by keyboard, and the one chosen becomes the plan's, as one step to undo", async () => {
  const { page } = await visit();
  const departure = page.getByLabel(/^Departure/).first();
  const before = await departure.inputValue();
  await page.getByRole("button", { name: "Departures" }).click();
  const grid = page.getByRole("grid", { name: /^Departures/ });
  await grid.waitFor();
  await page.getByRole("button", { name: "Departures" }).focus();
  await grid.press("End");
  await expect.poll(() => grid.textContent(), { timeout: 20_000 }).not.toMatch(/not worked out|no departure/);
  await grid.press("ArrowLeft");
  await grid.press("Enter");
  await expect.poll(() => departure.inputValue()).not.toBe(before);
  await page.getByRole("button", { name: "Undo" }).click();
  await expect.poll(() => departure.inputValue()).toBe(before);
});

function headings(page: Page): Promise<string[]> {
  return page.locator(".leg-table th").allInnerTexts();
}
