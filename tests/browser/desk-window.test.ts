import type { Locator, Page } from "playwright-core";
import { expect, test } from "vitest";
import { expectAccessible } from "./audit.ts";
import { figure, openPart } from "./desk-parts.ts";
import { boxOf } from "./gestures.ts";
import { openDemo, visit } from "./visit.ts";

const DEMO = ["Workboat: when, and how sure", "islands-decide"] as const;

test("pointing at a cell previews that departure, leaving shows the plan again, and choosing sets it as one step", async () => {
  const { page } = await visit();
  await openDemo(page, ...DEMO);
  await openPart(page, "Departures");
  const cell = await cells(page, 8, 3);
  const before = await figure(page, "Sound", "Arrival");
  await cell(7, 0).hover();
  const looking = page.locator(".looking");
  expect(await looking.textContent()).toMatch(/Looking at departure Tue 4 May 16:00 UTC: not the plan's/);
  await expect.poll(() => figure(page, "Sound", "Arrival")).not.toBe(before);
  await page.mouse.move(5, 5);
  await looking.waitFor({ state: "detached" });
  await expect.poll(() => figure(page, "Sound", "Arrival")).toBe(before);

  await cell(7, 1).click();
  const departure = page.getByLabel(/^Departure/).first();
  await expect.poll(() => departure.inputValue()).toBe("2027-05-04T16:00");
  expect(await chosenRoute(page)).toContain("West about");
  await page.mouse.move(5, 5);
  await page.getByRole("button", { name: "Undo" }).click();
  await expect.poll(() => departure.inputValue()).toBe("2027-05-04T11:00");
  await expect.poll(() => figure(page, "Sound", "Arrival")).toBe(before);
});

test("a window that is being worked out is left for the next change, and no cell is of the plan before it", async () => {
  const { page } = await visit();
  await openDemo(page, ...DEMO);
  await openPart(page, "Departures");
  await page.getByRole("list", { name: "Best departures" }).waitFor();
  const step = page.getByLabel("Step between departures");
  await step.fill("1 min");
  await step.press("Enter");
  const state = page.locator(".heat-state");
  await expect.poll(() => state.textContent()).toMatch(/of 1263 worked out/);
  const reserve = page.getByLabel("Reserve", { exact: true });
  await reserve.fill("95 %");
  await reserve.press("Enter");
  await step.fill("1 h");
  await step.press("Enter");
  // With nearly all of the store in reserve nothing can be done; a cell of the plan before could.
  await page.getByText("No departure of the window can be done on any route.").waitFor();
  const grid = page.getByRole("grid", { name: /^Departures/ });
  await grid.focus();
  expect(await grid.getAttribute("aria-colcount")).toBe("8");
  for (const row of [0, 1, 2]) {
    await grid.press("Home");
    for (let down = 0; down < row; down += 1) await grid.press("ArrowDown");
    for (let column = 0; column < 8; column += 1) {
      expect(await grid.textContent()).toMatch(/cannot be done/);
      await grid.press("ArrowRight");
    }
    await grid.press("ArrowUp");
    await grid.press("ArrowUp");
  }
});

test("an arrival to keep is set, told of every cell, refused in a sentence, and cleared by keyboard alone", async () => {
  const { page } = await visit();
  await openDemo(page, ...DEMO);
  await openPart(page, "Departures");
  const field = page.getByLabel(/^Arrive by/);
  await field.fill("2027-05-04T17:00");
  await field.press("Enter");
  const list = page.getByRole("list", { name: "Latest departures in time" });
  await list.waitFor();
  expect(await list.textContent()).toMatch(/4 May 14:\d\d UTC, West about: .* arrives 17:00/);
  const grid = page.getByRole("grid", { name: /^Departures/ });
  await grid.focus();
  await grid.press("Home");
  expect(await grid.textContent()).toMatch(/in time, \d h \d\d to spare/);
  await grid.press("End");
  expect(await grid.textContent()).toMatch(/\d+ min too late/);
  await expectAccessible(page, "an arrival to keep");

  await field.fill("2027-05-04T08:00");
  await field.press("Enter");
  const fault = page.locator(".window-bar .fault");
  await fault.waitFor();
  expect(await fault.textContent()).toMatch(/arrival is after the earliest departure/);
  expect(await field.getAttribute("aria-invalid")).toBe("true");
  await expectAccessible(page, "an arrival that cannot be kept");

  // A part that is taken out while it is typed anew is no wish for none; a field that is left so is.
  await field.focus();
  await page.keyboard.press("Backspace");
  expect(await page.getByRole("button", { name: "Take out: Arrive by" }).count()).toBe(1);
  // Its parts, and what opens its calendar, are stops of their own.
  const isOnField = () => field.evaluate((input) => document.activeElement === input);
  for (let stop = 0; stop < 10 && (await isOnField()); stop += 1) await page.keyboard.press("Tab");
  await fault.waitFor({ state: "detached" });
  expect(await list.count()).toBe(0);
  expect(await field.inputValue()).toBe("");
  await page.getByRole("button", { name: "Undo" }).click();
  await expect.poll(() => field.inputValue()).toBe("2027-05-04T08:00");
});

test("on a phone a tap looks at a departure, the button beside its figures sets it, and speeds are rows", async () => {
  const { page } = await visit({ width: 390, height: 844, touch: true, colours: "dark" });
  await openDemo(page, "Ocean: when, and how sure", "ocean-decide");
  const pane = await openPart(page, "Departures");
  await page.getByRole("list", { name: "Best departures" }).waitFor({ timeout: 30_000 });
  const grid = await boxOf(page.getByRole("grid", { name: /^Departures/ }));
  // Two routes at three speeds over nine departures.
  await page.touchscreen.tap(grid.x + grid.width * (4.5 / 9), grid.y + grid.height * (4.5 / 6));
  const told = pane.locator(".heat-told");
  expect(await told.textContent()).toMatch(/4 Nov 00:00 UTC, Down the stream at 12\.5 kn/);
  await expectAccessible(page, "looking at a departure on a phone");
  // A second tap looks away, a third looks again.
  const cell = { x: grid.x + grid.width * (4.5 / 9), y: grid.y + grid.height * (4.5 / 6) };
  await page.touchscreen.tap(cell.x, cell.y);
  await told.waitFor({ state: "detached" });
  await page.touchscreen.tap(cell.x, cell.y);
  await told.getByRole("button", { name: "Set this departure" }).tap();
  await page.getByRole("navigation", { name: "Panes" }).getByRole("button", { name: "Plan" }).tap();
  expect(
    await page
      .getByLabel(/^Departure/)
      .first()
      .inputValue(),
  ).toBe("2027-11-04T00:00");
  expect(await page.getByLabel("Speed", { exact: true }).inputValue()).toBe("12.5 kn");
});

/** Cells by column and row, once the window is worked out. */
async function cells(page: Page, columns: number, rows: number) {
  await page.getByRole("list", { name: "Best departures" }).waitFor();
  const grid = page.getByRole("grid", { name: /^Departures/ });
  await grid.scrollIntoViewIfNeeded();
  const { width, height } = await boxOf(grid);
  const at = (column: number, row: number): { x: number; y: number } => ({
    x: (width * (column + 0.5)) / columns,
    y: (height * (row + 0.5)) / rows,
  });
  return (column: number, row: number) => ({
    hover: () => grid.hover({ position: at(column, row) }),
    click: () => grid.click({ position: at(column, row) }),
  });
}

function chosenRoute(page: Page): Promise<string | null> {
  const chosen: Locator = page.locator(".ledger-table tbody.chosen th");
  return chosen.textContent();
}
