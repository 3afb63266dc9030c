import { expect, test } from "vitest";
import { expectAccessible } from "./audit.ts";
import { figure, openPart, showPane } from "./desk-parts.ts";
import { boxOf } from "./gestures.ts";
import { visit } from "./visit.ts";

test("a speed is looked at and set from the curve by mouse, and one undo takes it back", async () => {
  const { page } = await visit();
  await openPart(page, "Pace");
  const curve = page.getByRole("slider", { name: /^Use by speed/ });
  await curve.waitFor();
  const speed = page.getByLabel("Speed", { exact: true });
  const before = { speed: await speed.inputValue(), time: await figure(page, "Sound", "Time") };
  const { width } = await boxOf(curve);
  await curve.hover({ position: { x: width * 0.4, y: 80 } });
  await expect.poll(() => figure(page, "Sound", "Time")).not.toBe(before.time);
  expect(await page.locator(".looking").textContent()).toMatch(/Looking at \d\.\d kn/);
  expect(await speed.inputValue()).toBe(before.speed);

  await curve.click({ position: { x: width * 0.4, y: 80 } });
  await page.mouse.move(5, 5);
  await expect.poll(() => speed.inputValue()).toMatch(/^[56]\.?\d? kn$/);
  await page.getByRole("button", { name: "Undo" }).click();
  await expect.poll(() => speed.inputValue()).toBe(before.speed);
  await expect.poll(() => figure(page, "Sound", "Time")).toBe(before.time);
});

test("by keyboard the curve is walked in tenths and the speed under it set, as is the fastest that keeps the reserve", async () => {
  const { page } = await visit();
  await openPart(page, "Pace");
  const curve = page.getByRole("slider", { name: /^Time by speed/ });
  await curve.waitFor();
  await curve.focus();
  await curve.press("ArrowLeft");
  await curve.press("ArrowLeft");
  expect(await curve.getAttribute("aria-valuetext")).toMatch(/^7\.8 kn, about \d h \d\d$/);
  await expectAccessible(page, "looking at a speed");
  await curve.press("Enter");
  const speed = page.getByLabel("Speed", { exact: true });
  await expect.poll(() => speed.inputValue()).toBe("7.8 kn");

  const fastest = page.getByRole("button", { name: /^Fastest that keeps the reserve/ });
  await fastest.focus();
  await page.keyboard.press("Enter");
  await expect.poll(() => speed.inputValue()).toMatch(/^7\.\d\d kn$/);
  await page.getByRole("button", { name: "Undo" }).focus();
  // 20 % of 102 kWh is kept, and hardly more.
  await expect.poll(() => figure(page, "Sound", "Left")).toMatch(/^20\.[45]/);
  await page.keyboard.press("Enter");
  await expect.poll(() => speed.inputValue()).toBe("7.8 kn");
});

test("on a phone the curve is tapped", async () => {
  const { page } = await visit({ width: 390, height: 844, touch: true, colours: "dark" });
  await openPart(page, "Pace");
  const curve = page.getByRole("slider", { name: /^Use by speed/ });
  await curve.waitFor();
  await expectAccessible(page, "pace on a phone");
  const { x, y, width } = await boxOf(curve);
  await page.touchscreen.tap(x + width * 0.5, y + 80);
  await showPane(page, "Plan");
  expect(await page.getByLabel("Speed", { exact: true }).inputValue()).toMatch(/^6\.?\d? kn$/);
});
