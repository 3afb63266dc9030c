import type { Page } from "playwright-core";
import { expect, test } from "vitest";
import { expectAccessible } from "./audit.ts";
import { boxOf, longPress } from "./gestures.ts";
import { visit } from "./visit.ts";

const READ = /current sets \d{3}° \d\.\d knwind from \d{3}° \d+\.\d kn, gusts \d+\.\d53°.*N\s+013°.*W/;

test("what the fields say is read under the mouse, silently, and no more once it has left", async () => {
  const { page } = await visit();
  const { x, y } = await boxOf(page.locator(".waypoint-handle").first());
  await page.mouse.move(x - 30, y);
  await expect.poll(() => reading(page)).toMatch(READ);
  expect(await page.locator(".chart-position").getAttribute("aria-live")).toBe("off");
  await page.mouse.move(5, 5);
  await expect.poll(() => reading(page)).toBe("");
});

test("by keyboard they are read in the middle of the chart and at every handle, follow both, and are told politely", async () => {
  const { page } = await visit();
  await page.getByRole("button", { name: "Zoom in" }).focus();
  for (let back = 0; back < 40 && !(await isChartFocused(page)); back += 1)
    await page.keyboard.press("Shift+Tab");
  await expect.poll(() => reading(page)).toMatch(/53°.*N/);
  expect(await page.locator(".chart-position").getAttribute("aria-live")).toBe("polite");
  await expectAccessible(page, "reading the chart by keyboard");
  const middle = await reading(page);
  await page.keyboard.press("ArrowDown");
  await expect.poll(() => reading(page)).not.toBe(middle);
  await page.keyboard.press("Tab");
  const waypoint = await page.evaluate(() => document.activeElement?.getAttribute("aria-label") ?? "");
  expect(waypoint).toMatch(/^Waypoint 1, Pier buoy/);
  await expect.poll(() => reading(page)).toMatch(READ);
  const there = await reading(page);
  await page.keyboard.press("ArrowUp");
  await page.keyboard.press("ArrowUp");
  await expect.poll(() => reading(page)).not.toBe(there);
  await page.getByRole("button", { name: "Show all" }).focus();
  await expect.poll(() => reading(page)).toBe("");
});

test("by touch they are read where the chart is tapped, stay while the clock runs, and go with a second tap", async () => {
  const { page } = await visit({ width: 390, height: 844, touch: true });
  const chart = await boxOf(page.locator("#chart"));
  const place = { x: chart.x + chart.width * 0.8, y: chart.y + chart.height * 0.8 };
  await page.touchscreen.tap(place.x, place.y);
  await expect.poll(() => reading(page)).toMatch(READ);
  expect(await page.locator(".chart-position").getAttribute("aria-live")).toBe("polite");
  const now = await reading(page);
  await page.getByLabel("Instant shown on the chart").focus();
  await page.keyboard.press("PageUp");
  await expect.poll(() => reading(page)).not.toBe(now);
  expect(await reading(page)).toMatch(READ);
  await page.touchscreen.tap(place.x + 4, place.y);
  await expect.poll(() => reading(page)).toBe("");
});

test("a long press reads the chart where a tap would choose a waypoint", async () => {
  const { page } = await visit({ width: 390, height: 844, touch: true });
  const { x, y, width, height } = await boxOf(page.locator(".waypoint-handle").nth(1));
  await longPress(page, x + width / 2, y + height / 2);
  await expect.poll(() => reading(page)).toMatch(READ);
});

function reading(page: Page): Promise<string | null> {
  return page.locator(".chart-position").textContent();
}

function isChartFocused(page: Page): Promise<boolean> {
  return page.evaluate(() => document.activeElement?.id === "chart");
}
