import type { Locator, Page } from "playwright-core";
import { expect, test } from "vitest";
import { boxOf, dragBy, touchDragBy } from "./gestures.ts";
import { visit } from "./visit.ts";

test("waypoints are added, dragged, inserted and deleted by mouse, and every step is undone and redone", async () => {
  const { page } = await visit();
  const start = await positions(page);
  expect(start).toHaveLength(4);

  await dragBy(page, handle(page, 1), 60, 20);
  const moved = await positions(page);
  expect(moved[1]).not.toBe(start[1]);
  expect(moved.filter((_, at) => at !== 1)).toEqual(start.filter((_, at) => at !== 1));

  await dragBy(page, page.locator(".leg-middle").nth(1), -50, 10);
  const inserted = await positions(page);
  expect(inserted).toHaveLength(5);
  expect([...inserted.slice(0, 2), ...inserted.slice(3)]).toEqual(moved);

  await page.getByRole("button", { name: "Add waypoints" }).click();
  const chart = await boxOf(page.locator("#chart"));
  await page.mouse.click(chart.x + chart.width - 60, chart.y + chart.height - 60);
  await page.getByRole("button", { name: "Add waypoints" }).click();
  const added = await positions(page);
  expect(added).toHaveLength(6);
  expect(added.slice(0, 5)).toEqual(inserted);

  await handle(page, 2).click();
  await page.getByRole("button", { name: "Delete waypoint 3", exact: true }).click();
  const deleted = await positions(page);
  expect(deleted).toEqual([...added.slice(0, 2), ...added.slice(3)]);

  for (const before of [added, inserted, moved, start]) {
    await page.getByRole("button", { name: "Undo" }).click();
    await expect.poll(() => positions(page)).toEqual(before);
  }
  for (const after of [moved, inserted, added, deleted]) {
    await page.getByRole("button", { name: "Redo" }).click();
    await expect.poll(() => positions(page)).toEqual(after);
  }
});

test("waypoints are added, dragged and inserted by touch", async () => {
  const { page } = await visit({ width: 820, height: 1180, touch: true });
  const start = await positions(page);

  await touchDragBy(page, handle(page, 1), 70, 10);
  const moved = await positions(page);
  expect(moved).toHaveLength(4);
  expect(moved[1]).not.toBe(start[1]);

  await page.locator(".leg-middle").nth(2).tap();
  await expect.poll(async () => (await positions(page)).length).toBe(5);

  await page.getByRole("button", { name: "Add waypoints" }).tap();
  const chart = await boxOf(page.locator("#chart"));
  await page.touchscreen.tap(chart.x + chart.width - 60, chart.y + chart.height - 60);
  await expect.poll(async () => (await positions(page)).length).toBe(6);

  await handle(page, 5).tap();
  await page.getByRole("navigation", { name: "Panes" }).getByRole("button", { name: "Plan" }).tap();
  await page.getByRole("button", { name: "Delete waypoint 6", exact: true }).tap();
  expect(await positions(page)).toHaveLength(5);
  await page.getByRole("button", { name: "Undo" }).tap();
  expect(await positions(page)).toHaveLength(6);
});

test("waypoints are moved, inserted, added and deleted by keyboard, and undone by Ctrl+Z", async () => {
  const { page } = await visit();
  const start = await positions(page);

  await handle(page, 1).focus();
  await page.keyboard.press("ArrowRight");
  await page.keyboard.press("Shift+ArrowUp");
  const moved = await positions(page);
  expect(moved[1]).not.toBe(start[1]);
  expect(moved[2]).toBe(start[2]);

  await page.keyboard.press("Insert");
  const inserted = await positions(page);
  expect([...inserted.slice(0, 2), ...inserted.slice(3)]).toEqual(moved);
  expect(await focusName(page)).toMatch(/^Waypoint 3/);

  await page.keyboard.press("Delete");
  expect(await positions(page)).toEqual(moved);
  expect(await focusName(page)).toMatch(/^Waypoint 2/);

  await page.getByRole("button", { name: "Add waypoints" }).focus();
  await page.keyboard.press("Space");
  await page.locator("#chart").focus();
  await page.keyboard.press("Enter");
  expect(await positions(page)).toHaveLength(5);

  await page.keyboard.press("Control+z");
  await page.keyboard.press("Control+z");
  await page.keyboard.press("Control+z");
  await expect.poll(() => positions(page)).toEqual(moved);
  await page.keyboard.press("Control+Shift+z");
  await expect.poll(() => positions(page)).toEqual(inserted);
});

test("a position is typed in any notation, and one that is none is told in a sentence and can be mended", async () => {
  const { page } = await visit();
  const latitude = page.getByLabel("Latitude of waypoint 2", { exact: true });
  const arrival = page.locator(".ledger-table tbody").first().locator("[data-label=Arrival]");
  const before = await arrival.textContent();
  for (const text of ["53.55", "53°33.0'N", "53 33 00 N"]) {
    await latitude.fill(text);
    await latitude.press("Enter");
    await expect.poll(() => handle(page, 1).getAttribute("aria-label")).toContain("53°33.0");
  }
  await expect.poll(() => arrival.textContent()).not.toBe(before);
  await latitude.fill("97");
  await latitude.press("Enter");
  const fault = page.locator(".ledger .fault");
  await fault.waitFor();
  expect(await fault.textContent()).toMatch(/^"Latitude" of waypoint \d of Sound/);
  await page.getByRole("button", { name: "Undo" }).click();
  await fault.waitFor({ state: "detached" });
});

test("a route is duplicated, renamed, reversed and deleted, and undo brings each back", async () => {
  const { page } = await visit();
  const names = page.locator(".ledger-table tbody th button");
  const editor = page.locator(".pane.route");
  await editor.getByRole("button", { name: "Duplicate" }).click();
  await expect.poll(() => names.count()).toBe(4);
  const name = page.getByLabel("Name of the route");
  await name.fill("Inside passage");
  await name.press("Enter");
  await expect.poll(async () => (await names.allInnerTexts())[1]).toContain("Inside passage");
  const forth = await positions(page);
  await editor.getByRole("button", { name: "Reverse" }).click();
  await expect.poll(() => positions(page)).toEqual([...forth].reverse());
  await editor.getByRole("button", { name: "Delete", exact: true }).click();
  await expect.poll(() => names.count()).toBe(3);
  for (let step = 0; step < 4; step += 1) await page.getByRole("button", { name: "Undo" }).click();
  await expect.poll(() => names.allInnerTexts()).toEqual(["Sound", "West about", "East about"]);
});

function handle(page: Page, index: number): Locator {
  return page.locator(".waypoint-handle").nth(index);
}

/** The chosen route's positions as the table shows them. */
async function positions(page: Page): Promise<string[]> {
  return page
    .locator(".waypoint-table tbody tr")
    .evaluateAll((rows) =>
      rows.map((row) =>
        [...row.querySelectorAll<HTMLInputElement>("input[aria-label*=itude]")]
          .map(({ value }) => value)
          .join(" "),
      ),
    );
}

function focusName(page: Page): Promise<string> {
  return page.evaluate(() => document.activeElement?.getAttribute("aria-label") ?? "");
}
