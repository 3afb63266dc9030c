import type { Page } from "playwright-core";
import { expect, test } from "vitest";
import { expectAccessible } from "./audit.ts";
import { openPart, showPane } from "./desk-parts.ts";
import { boxOf, touchDragBy } from "./gestures.ts";
import { openDemo, said, visit } from "./visit.ts";

test("an alternate is set on the chart, renamed, dragged and taken out, and points of no return follow", async () => {
  const { page } = await visit();
  await openPart(page, "Turning back");
  await expect.poll(() => lines(page)).toMatch(/Point of no return, start \(Pier buoy\)/);
  const without = await lines(page);

  await page.getByRole("button", { name: "Set an alternate on the chart" }).click();
  const waypoint = await boxOf(page.locator(".waypoint-handle").nth(2));
  await page.mouse.click(waypoint.x - 25, waypoint.y + 30);
  await expect.poll(() => handles(page)).toMatchObject([/^Alternate 1, Alternate 1, 53°/]);
  const name = page.getByLabel("Name of alternate 1");
  await name.fill("Cable jetty");
  await name.press("Enter");
  await expect.poll(() => lines(page)).toMatch(/Cable jetty/);
  expect(await page.locator(".alternate-handle .handle-name").allInnerTexts()).toEqual(["Cable jetty"]);
  const placed = await handles(page);
  const beforeDrag = await lines(page);

  const { x, y } = await boxOf(page.locator(".alternate-handle"));
  await page.mouse.move(x + 15, y + 15);
  await page.mouse.down();
  await page.mouse.move(x + 45, y - 5, { steps: 8 });
  // What follows from it is worked out while the button is still down.
  await expect.poll(() => lines(page)).not.toBe(beforeDrag);
  await page.mouse.move(x + 55, y - 15, { steps: 4 });
  await page.mouse.up();
  const dragged = await handles(page);
  expect(dragged).not.toEqual(placed);
  expect(await page.getByRole("button", { name: "Undo" }).getAttribute("title")).toBe("Undo: Move alternate");
  // All moves of the drag are one step.
  await page.getByRole("button", { name: "Undo" }).click();
  await expect.poll(() => handles(page)).toEqual(placed);
  await expect.poll(() => lines(page)).toBe(beforeDrag);
  await page.getByRole("button", { name: "Redo" }).click();
  await expect.poll(() => handles(page)).toEqual(dragged);

  await page.getByRole("button", { name: "Take out alternate Cable jetty" }).click();
  await expect.poll(() => handles(page)).toEqual([]);
  await expect.poll(() => lines(page)).toBe(without);
});

test("by keyboard alone an alternate is set in the middle of the chart, moved by arrows and taken out", async () => {
  const { page } = await visit();
  await openPart(page, "Turning back");
  await page.getByRole("button", { name: "Set an alternate on the chart" }).focus();
  await page.keyboard.press("Enter");
  await page.locator("#chart").focus();
  await page.keyboard.press("Enter");
  await expect.poll(() => page.locator(".alternate-handle").count()).toBe(1);
  const handle = page.locator(".alternate-handle");
  await handle.focus();
  const [start] = await handles(page);
  await page.keyboard.press("ArrowRight");
  await page.keyboard.press("Shift+ArrowUp");
  const [moved] = await handles(page);
  expect(moved).not.toBe(start);
  expect(await page.evaluate(() => document.activeElement?.className)).toContain("alternate-handle");
  await expect.poll(() => lines(page)).toMatch(/Alternate 1/);
  await expectAccessible(page, "an alternate with the keyboard on it");
  await page.keyboard.press("Control+z");
  await expect.poll(() => handles(page)).toEqual([start]);
  await handle.focus();
  await page.keyboard.press("Delete");
  await expect.poll(() => handles(page)).toEqual([]);
  expect(await page.evaluate(() => document.activeElement?.id)).toBe("chart");
});

test("on a phone an alternate is set by a tap and dragged by a finger", async () => {
  const { page } = await visit({ width: 390, height: 844, touch: true, colours: "dark" });
  await openPart(page, "Turning back");
  await page.getByRole("button", { name: "Set an alternate on the chart" }).tap();
  const chart = await boxOf(page.locator("#chart"));
  await page.touchscreen.tap(chart.x + chart.width * 0.85, chart.y + chart.height * 0.5);
  // The list of alternates is back in view once one is set.
  await page.getByLabel("Name of alternate 1").waitFor();
  await expect.poll(() => lines(page)).toMatch(/Alternate 1/);
  await expectAccessible(page, "alternates on a phone");
  await showPane(page, "Chart");
  const placed = await handles(page);
  await touchDragBy(page, page.locator(".alternate-handle"), -40, 30);
  await expect.poll(() => handles(page)).not.toEqual(placed);
});

test("names of alternates lie on no other name of the chart", async () => {
  const { page } = await visit();
  await openDemo(page, "Workboat: when, and how sure", "islands-decide");
  await page.locator(".alternate-handle").nth(1).waitFor();
  const boxes = await page.locator("#chart .handle-name").evaluateAll((names) =>
    names.map((name) => {
      const { left, right, top, bottom } = name.getBoundingClientRect();
      return { name: name.textContent, left, right, top, bottom };
    }),
  );
  expect(boxes.length).toBe(6);
  const overlapping = boxes.flatMap((a, at) =>
    boxes
      .slice(at + 1)
      .filter((b) => a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom)
      .map((b) => `${a.name} and ${b.name}`),
  );
  expect(overlapping).toEqual([]);
});

test("a place that turning back names is shown on the chart when its line is chosen", async () => {
  const { page } = await visit();
  const pane = await openPart(page, "Turning back");
  await pane
    .getByRole("button", { name: /^Point of no return, start/ })
    .first()
    .click();
  await page.locator(".turn-mark.no-return").first().waitFor();
  await page.locator(".ribbon.chosen .ribbon-cursor").waitFor({ state: "attached" });
  expect(await said(page)).not.toMatch(/could not/);
});

/** What is said of turning back on the chosen route. */
function lines(page: Page): Promise<string | null> {
  return page.locator(".turn-back-view .turn-back-route").first().textContent();
}

function handles(page: Page): Promise<(string | null)[]> {
  return page
    .locator(".alternate-handle")
    .evaluateAll((all) => all.map((handle) => handle.getAttribute("aria-label")));
}
