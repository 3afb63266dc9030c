import type { Locator, Page } from "playwright-core";

/* What a hand does to the page. Distances in px. */

export async function boxOf(
  locator: Locator,
): Promise<{ x: number; y: number; width: number; height: number }> {
  const box = await locator.boundingBox();
  if (box === null) throw new Error(`${locator} is not on the screen`);
  return box;
}

export async function dragBy(page: Page, locator: Locator, dx: number, dy: number): Promise<void> {
  const { x, y, width, height } = await boxOf(locator);
  const from = { x: x + width / 2, y: y + height / 2 };
  await page.mouse.move(from.x, from.y);
  await page.mouse.down();
  await page.mouse.move(from.x + dx, from.y + dy, { steps: 6 });
  await page.mouse.up();
}

export async function touchDragBy(page: Page, locator: Locator, dx: number, dy: number): Promise<void> {
  const { x, y, width, height } = await boxOf(locator);
  const from = { x: x + width / 2, y: y + height / 2 };
  const touch = await page.context().newCDPSession(page);
  await touch.send("Input.dispatchTouchEvent", { type: "touchStart", touchPoints: [from] });
  for (let step = 1; step <= 6; step += 1) {
    const at = { x: from.x + (dx * step) / 6, y: from.y + (dy * step) / 6 };
    await touch.send("Input.dispatchTouchEvent", { type: "touchMove", touchPoints: [at] });
  }
  await touch.send("Input.dispatchTouchEvent", { type: "touchEnd", touchPoints: [] });
}

/** A finger laid on a place and held still. */
export async function longPress(page: Page, x: number, y: number): Promise<void> {
  const touch = await page.context().newCDPSession(page);
  await touch.send("Input.dispatchTouchEvent", { type: "touchStart", touchPoints: [{ x, y }] });
  await page.waitForTimeout(700);
  await touch.send("Input.dispatchTouchEvent", { type: "touchEnd", touchPoints: [] });
}

/** Two fingers drawn apart about a place. */
export async function pinchOut(page: Page, x: number, y: number): Promise<void> {
  const touch = await page.context().newCDPSession(page);
  const apart = (by: number) => [
    { x: x - by, y },
    { x: x + by, y },
  ];
  await touch.send("Input.dispatchTouchEvent", { type: "touchStart", touchPoints: apart(30) });
  for (let by = 40; by <= 110; by += 10)
    await touch.send("Input.dispatchTouchEvent", { type: "touchMove", touchPoints: apart(by) });
  await touch.send("Input.dispatchTouchEvent", { type: "touchEnd", touchPoints: [] });
}
