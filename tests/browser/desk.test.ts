import { expect, test } from "vitest";
import { expectAccessible } from "./audit.ts";
import { openDemo, visit } from "./visit.ts";

test("what is decided on the desk is shown with the demo's own answers, accessible in every part", async () => {
  const { page } = await visit();
  await openDemo(page, "Workboat: when, and how sure", "islands-decide");
  const desk = page.locator(".wide-desk");
  const shown = async () => (await page.locator("main").allInnerTexts()).join("\n");

  await desk.getByText("Departures", { exact: true }).click();
  await expect.poll(shown, { timeout: 15_000 }).toMatch(/Least time/);
  await expectAccessible(page, "departures");

  await desk.getByText("Pace", { exact: true }).click();
  await expect.poll(shown, { timeout: 15_000 }).toMatch(/least use/i);
  await expectAccessible(page, "pace");

  await desk.getByText("Turning back", { exact: true }).click();
  await expect.poll(shown, { timeout: 15_000 }).toMatch(/point of no return/i);
  await expectAccessible(page, "turning back");

  await desk.getByText("How sure", { exact: true }).click();
  // Seven members and a stated error of the current: a share and a probability stand beside the routes.
  await expect.poll(shown, { timeout: 15_000 }).toMatch(/\d of 7/);
  expect(await shown()).toMatch(/\d\d? %/);
  await expectAccessible(page, "how sure");
});
