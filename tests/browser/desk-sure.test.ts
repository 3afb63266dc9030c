import type { Page } from "playwright-core";
import { expect, test } from "vitest";
import { expectAccessible } from "./audit.ts";
import { findings, openPart, showPane, sureness } from "./desk-parts.ts";
import { visit } from "./visit.ts";

test("a stated error gives a probability that the reserve holds, a larger one another, and undo takes both away", async () => {
  const { page } = await visit();
  await page.getByRole("button", { name: "West about" }).first().click();
  await openPart(page, "How sure");
  expect(await sureness(page, "West about")).not.toMatch(/holds/);
  await page.getByRole("button", { name: "State an error of the current" }).click();
  await expect.poll(() => sureness(page, "West about")).toMatch(/holds: \d\d %/);
  const first = await probability(page);
  const gauges = page.getByRole("table", { name: /^Left on arrival/ });
  const band = await gauges.getByRole("row", { name: /West about/ }).textContent();

  const deviation = page.getByLabel("Deviation per component, current");
  await deviation.fill("0.6 m/s");
  await deviation.press("Enter");
  // The reserve is kept by the estimate, so that a larger error makes it less sure.
  await expect.poll(() => probability(page)).toBeLessThan(first);
  expect(await gauges.getByRole("row", { name: /West about/ }).textContent()).not.toBe(band);
  await expectAccessible(page, "a stated error");
  await page.getByRole("checkbox", { name: /where a wrong forecast adds most/ }).check();
  await page.locator(".ribbon.chosen .sensitivity").waitFor();

  await page.getByRole("button", { name: "Undo" }).click();
  await expect.poll(() => probability(page)).toBe(first);
  await page.getByRole("button", { name: "Undo" }).click();
  await expect.poll(() => sureness(page, "West about")).not.toMatch(/holds/);
});

test("an error that is none is told in a sentence, and what it was comes back with undo", async () => {
  const { page } = await visit();
  await openPart(page, "How sure");
  await page.getByRole("button", { name: "State an error of the wind" }).click();
  const length = page.getByLabel("Correlated over, wind");
  await length.fill("far");
  await length.press("Enter");
  const fault = page.locator(".ledger .fault");
  await fault.waitFor();
  expect(await fault.textContent()).toMatch(/^"Correlated over" of the \w+'s forecast error takes/);
  await page.getByRole("button", { name: "Undo" }).click();
  await fault.waitFor({ state: "detached" });
});

test("a what-if has its row beside the ledger, and one that breaks the reserve is the route's status and a finding", async () => {
  const { page } = await visit();
  await page.getByRole("button", { name: "West about" }).first().click();
  expect(await findings(page, "West about")).toMatch(/clear/);
  await openPart(page, "How sure");
  await page.getByRole("button", { name: "use + 10 %" }).click();
  const name = page.getByLabel("Name of what-if 1");
  await name.fill("Cold battery");
  await name.press("Enter");
  const table = page.locator(".ledger .what-if-table");
  const row = table.getByRole("row", { name: /Cold battery/ });
  await expect.poll(() => row.textContent()).toMatch(/stop/);
  await expect.poll(() => findings(page, "West about")).toMatch(/1 stop/);
  const list = page.getByRole("region", { name: "Findings of West about" });
  await expect.poll(() => list.textContent()).toMatch(/stop: what if Cold battery: .*below the reserve/);
  await expectAccessible(page, "a what-if that breaks the reserve");

  // A tenth of it the reserve stands.
  const use = page.getByLabel("Use + of what-if 1");
  await use.fill("1 %");
  await use.press("Enter");
  await expect.poll(() => row.textContent()).toMatch(/clear/);
  await expect.poll(() => findings(page, "West about")).toMatch(/clear/);
  await page.getByRole("button", { name: "Take out what-if 1" }).click();
  await table.waitFor({ state: "detached" });
});

test("by keyboard alone a what-if is added, changed and taken out", async () => {
  const { page } = await visit();
  await openPart(page, "How sure");
  await page.getByRole("button", { name: "wind × 1.2" }).focus();
  await page.keyboard.press("Enter");
  await page.getByLabel("Wind × of what-if 1").focus();
  await page.keyboard.press("Control+a");
  await page.keyboard.type("1.5");
  await page.keyboard.press("Tab");
  await page.keyboard.type("20 deg");
  await page.keyboard.press("Enter");
  const row = page.locator(".ledger .what-if-table tbody tr");
  await expect.poll(() => row.count()).toBe(1);
  await expect.poll(() => row.textContent()).toMatch(/1\.5.*20/);
  await page.getByRole("button", { name: "Take out what-if 1" }).focus();
  await page.keyboard.press("Enter");
  await expect.poll(() => row.count()).toBe(0);
});

test("on a phone what-ifs are cards with their consequences below, and the ledger says what they come to", async () => {
  const { page } = await visit({ width: 360, height: 640, touch: true, colours: "dark" });
  await openPart(page, "How sure");
  await page.getByRole("button", { name: "current × 1.2" }).tap();
  await page.locator(".sure-view .what-if-table tbody tr").waitFor();
  await page.getByRole("button", { name: "State an error of the current" }).tap();
  await page.getByRole("table", { name: /^Left on arrival/ }).waitFor();
  await expectAccessible(page, "how sure on a phone");
  const { wide, shown } = await page.locator(".desk-body").evaluate((body) => ({
    wide: body.scrollWidth,
    shown: body.clientWidth,
  }));
  expect(wide).toBeLessThanOrEqual(shown);
  await showPane(page, "Ledger");
  expect(await sureness(page, "West about")).toMatch(/holds/);
});

/** That the reserve holds west about, per cent. */
async function probability(page: Page): Promise<number> {
  return Number(/holds: (\d+(?:\.\d)?) %/.exec(await sureness(page, "West about"))?.[1]);
}
