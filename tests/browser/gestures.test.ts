import type { Page } from "playwright-core";
import { expect, test } from "vitest";
import { boxOf, pinchOut } from "./gestures.ts";
import { visit } from "./visit.ts";

/* What is loaded only once a hand is there that has a use for it. */

test("a route's name is shown while the mouse is over its line", async () => {
  const { page } = await visit();
  const tip = page.locator(".leaflet-tooltip.route-tip");
  expect(await tip.count()).toBe(0);
  const { x, y } = await page.evaluate(freePlace);
  let moves = 0;
  await expect
    .poll(async () => {
      moves += 1;
      await page.mouse.move(x + (moves % 2), y);
      return tip.count();
    })
    .toBe(1);
  const name = (await tip.textContent()) ?? "";
  expect(name).not.toBe("");
  expect(
    await page.locator("#ledger").or(page.locator("[data-pane=ledger]")).first().textContent(),
  ).toContain(name);
  await page.mouse.move(5, 5);
  await expect.poll(() => tip.count()).toBe(0);
});

test("a box drawn with the Shift key down is zoomed into", async () => {
  const { page } = await visit();
  const chart = await boxOf(page.locator("#chart"));
  const [left, top] = [chart.x + chart.width * 0.35, chart.y + chart.height * 0.35];
  await page.mouse.move(left, top);
  const before = await spanOf(page);
  await expect
    .poll(async () => {
      await page.keyboard.down("Shift");
      await page.mouse.move(left, top);
      await page.mouse.down();
      await page.mouse.move(left + chart.width * 0.25, top + chart.height * 0.25, { steps: 5 });
      await page.mouse.up();
      await page.keyboard.up("Shift");
      await page.waitForTimeout(400);
      return (await spanOf(page)) / before;
    })
    .toBeGreaterThan(1.5);
});

test("two fingers zoom where there are fingers", async () => {
  const { page } = await visit({ width: 390, height: 844, touch: true });
  const before = await spanOf(page);
  const { x, y, width, height } = await boxOf(page.locator("#chart"));
  await pinchOut(page, x + width / 2, y + height / 2);
  await expect.poll(async () => (await spanOf(page)) / before).toBeGreaterThan(1.4);
});

/** Where on the screen the chosen route's line is under nothing else. Runs in the page. */
function freePlace(): { x: number; y: number } {
  const line = [...document.querySelectorAll<SVGPathElement>("path.route-hit")].at(-1);
  const toScreen = line?.getScreenCTM();
  if (!line || !toScreen) throw new Error("there is no route on the chart");
  for (let share = 0.02; share < 1; share += 0.02) {
    const { x, y } = line.getPointAtLength(share * line.getTotalLength()).matrixTransform(toScreen);
    if (document.elementFromPoint(x, y) === line) return { x, y };
  }
  throw new Error("the route's line is under other things all along");
}

async function placeOf(page: Page, handle: number): Promise<{ x: number; y: number }> {
  const { x, y, width, height } = await boxOf(page.locator(".waypoint-handle").nth(handle));
  return { x: x + width / 2, y: y + height / 2 };
}

/** How far apart the first two waypoints are on the screen, px. */
async function spanOf(page: Page): Promise<number> {
  const [a, b] = [await placeOf(page, 0), await placeOf(page, 1)];
  return Math.hypot(a.x - b.x, a.y - b.y);
}
