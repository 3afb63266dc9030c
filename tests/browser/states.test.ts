import { mkdirSync } from "node:fs";
import { join } from "node:path";
import type { Page } from "playwright-core";
import { beforeAll, describe, expect, test } from "vitest";
import { expectAccessible } from "./audit.ts";
import { openDemo, visit } from "./visit.ts";

const SHOTS = new URL("../screenshots/", import.meta.url).pathname;

beforeAll(() => mkdirSync(SHOTS, { recursive: true }));

const COLOURS = ["light", "dark"] as const;
const PANES = ["Chart", "Ribbons", "Ledger", "Plan", "Legs", "Decide"] as const;
/** Colours are the page's own, so that the dark ones need no look at every pane. */
const SOME_PANES = ["Chart", "Ledger", "Decide"] as const;
/** Questions of the desk, and what is there once each is answered. */
const DESK = [
  ["Departures", (page: Page) => page.getByRole("list", { name: "Best departures" })],
  ["Pace", (page: Page) => page.getByRole("slider", { name: /^Use by speed/ })],
  ["Turning back", (page: Page) => page.locator(".turn-back-lines").first()],
  ["How sure", (page: Page) => page.getByRole("region", { name: "What-ifs" })],
] as const;

/** Keeps a picture of the page as it is and holds it against WCAG 2.2 AA. */
async function look(page: Page, name: string): Promise<void> {
  await page.screenshot({ path: join(SHOTS, `${name}.png`), animations: "disabled" });
  await expectAccessible(page, name);
  const { wide, shown } = await page.evaluate(() => ({
    wide: document.documentElement.scrollWidth,
    shown: document.documentElement.clientWidth,
  }));
  expect(wide, `${name} scrolls sideways`).toBeLessThanOrEqual(shown);
}

describe.each(COLOURS)("in %s colours", (colours) => {
  const panes = colours === "light" ? PANES : SOME_PANES;

  test("every state of a wide screen is accessible", async () => {
    const { page } = await visit({ colours });
    await look(page, `wide-${colours}-islands`);

    await page.locator(".chart-shade select").selectOption("current");
    await page.locator(".ribbon-strip").first().focus();
    for (let step = 0; step < 3; step += 1) await page.keyboard.press("PageUp");
    await look(page, `wide-${colours}-pointing`);

    for (const menu of ["Show as", "More"]) {
      await page.locator("summary", { hasText: menu }).click();
      await look(page, `wide-${colours}-${menu.toLowerCase().replace(" ", "-")}`);
      await page.keyboard.press("Escape");
    }
    await page.getByLabel("Differences to").selectOption({ index: 2 });
    const reserve = page.getByLabel("Reserve");
    await reserve.fill("20 cups");
    await reserve.press("Enter");
    await page.locator(".ledger .fault").waitFor();
    await look(page, `wide-${colours}-fault`);
    await page.getByRole("button", { name: "Undo" }).click();

    await openFile(page, "holiday.jpg", "");
    const notice = page.locator(".notice[role=alert]");
    await notice.waitFor();
    await look(page, `wide-${colours}-notice`);
    await notice.getByRole("button", { name: "Dismiss" }).click();

    await openFile(page, "buoys.csv", "breite,laenge,ost,nord\n53,-13,1,1\n53,-14,1,1\n");
    await page.getByRole("dialog").getByRole("table").waitFor();
    await look(page, `wide-${colours}-dialogue`);
    await page.keyboard.press("Escape");

    await page.locator("button.craft-name").click();
    await page.locator(".craft-plots svg").first().waitFor();
    await look(page, `wide-${colours}-craft`);
    await page.keyboard.press("Escape");
    await page.locator("button.field-name").first().click();
    await page.getByRole("dialog").waitFor();
    await look(page, `wide-${colours}-field`);
    await page.keyboard.press("Escape");
    await page.getByRole("button", { name: "Columns" }).click();
    await page.getByRole("dialog").waitFor();
    await look(page, `wide-${colours}-columns`);
    await page.keyboard.press("Escape");
    await page.getByRole("radio", { name: "Profile" }).check();
    await look(page, `wide-${colours}-profile`);
    const desk = page.getByRole("navigation", { name: "On the desk" }).first();
    for (const [part, answer] of DESK) {
      await desk.getByRole("button", { name: part }).click();
      await answer(page).waitFor();
      await look(page, `wide-${colours}-${part.toLowerCase().replace(" ", "-")}`);
    }
    await desk.getByRole("button", { name: "Legs" }).click();

    await openDemo(page, "Ocean passage", "ocean");
    await look(page, `wide-${colours}-ocean`);
    await openDemo(page, "Survey drone", "survey");
    await look(page, `wide-${colours}-survey`);
  });

  test("the panes of a phone are accessible", async () => {
    const { page } = await visit({ colours, width: 390, height: 844, touch: true });
    await lookAtPanes(page, `phone-${colours}`, panes);
  });

  test("every pane of the smallest phone fits", async () => {
    const { page } = await visit({ colours, width: 360, height: 640, touch: true });
    await lookAtPanes(page, `small-${colours}`, ["Chart", "Plan"]);
  });

  test("the panes of a tablet are accessible", async () => {
    const { page } = await visit({ colours, width: 820, height: 1180, touch: true });
    await lookAtPanes(page, `tablet-${colours}`, panes);
  });
});

test("an empty plan is accessible, and says how to begin", async () => {
  const { page } = await visit();
  const drop = page.locator(".pane.route").getByRole("button", { name: "Delete", exact: true });
  for (let route = 0; route < 3; route += 1) await drop.click();
  await page.getByText("A route with two waypoints has a leg table.").waitFor();
  await look(page, "wide-light-empty");
});

async function lookAtPanes(page: Page, name: string, panes: readonly string[]): Promise<void> {
  const tabs = page.getByRole("navigation", { name: "Panes" });
  for (const pane of panes) {
    const tab = tabs.getByRole("button", { name: pane });
    // A pane that is always there has no tab of its own.
    if (await tab.isVisible()) await tab.tap();
    if (pane === "Decide") await page.getByRole("list", { name: "Best departures" }).waitFor();
    await look(page, `${name}-${pane.toLowerCase()}`);
  }
}

async function openFile(page: Page, name: string, text: string): Promise<void> {
  await page
    .locator(".page-head input[type=file]")
    .setInputFiles({ name, mimeType: "text/plain", buffer: Buffer.from(text) });
}
