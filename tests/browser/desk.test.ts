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

test("the best departures are those that hold in every member and what-if, and say so by a shape and in words", async () => {
  const { page } = await visit();
  await openDemo(page, "Drone: when, and how sure", "survey-decide");
  await page.locator(".wide-desk").getByText("Departures", { exact: true }).click();
  const bests = page.getByRole("list", { name: "Best departures" });
  const latest = bests.getByRole("button", { name: /^Latest departure Tue/ });
  const plain = bests.getByRole("button", { name: /^Latest departure by the plain estimate/ });
  const text = (item: typeof latest) => item.textContent();

  await expect
    .poll(() => text(latest), { timeout: 15_000 })
    .toMatch(/✓ clear: holds in all 7 members and 3 what-ifs/);
  expect(await text(latest)).toContain("14 Sept 00:30 UTC");
  expect(await text(plain)).toContain("14 Sept 01:30 UTC");
  expect(await text(plain)).toMatch(/✕ stop: breaks its reserve in the what-if "Wind a tenth stronger"/);

  // With the next change of the plan what was tried no longer counts: 16 m/s holds for longer.
  await page.getByLabel("Speed", { exact: true }).first().fill("16 m/s");
  await page.keyboard.press("Enter");
  await expect.poll(() => text(latest), { timeout: 15_000 }).not.toContain("14 Sept 00:30 UTC");
  await expect.poll(() => text(latest), { timeout: 15_000 }).toMatch(/✓ clear: holds in all 7 members/);

  await page.getByRole("button", { name: "Refine the bests to the minute" }).click();
  await expect.poll(() => page.getByRole("button", { name: /^Refin/ }).count(), { timeout: 15_000 }).toBe(0);
  expect(await text(latest)).toMatch(/✓ clear: holds in all 7 members and 3 what-ifs/);
  await expectAccessible(page, "departures put to the test");
});
