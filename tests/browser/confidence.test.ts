import { expect, test } from "vitest";
import { openDemo, visit } from "./visit.ts";

test("the probability that a reserve has to hold with is set beside the stated error, and decides which departures hold", async () => {
  const { page } = await visit();
  await openDemo(page, "Drone: when, and how sure", "survey-decide");
  const desk = page.locator(".wide-desk");
  const asked = page.getByLabel("Probability with which the reserve has to hold");
  const bests = page.getByRole("list", { name: "Best departures" });
  const latest = bests.getByRole("button", { name: /^Latest departure Tue/ });
  const ask = async (confidence: string): Promise<void> => {
    await desk.getByText("How sure", { exact: true }).click();
    await asked.fill(confidence);
    await page.keyboard.press("Enter");
  };
  const latestOf = async (): Promise<string | null> => {
    await desk.getByText("Departures", { exact: true }).click();
    return latest.textContent();
  };

  await desk.getByText("How sure", { exact: true }).click();
  expect(await asked.inputValue()).toBe("95 %");
  await expect
    .poll(latestOf, { timeout: 15_000 })
    .toMatch(/00:30 UTC.*holds in all 7 members and 3 what-ifs; .* a probability of 97 %, 95 % asked for$/);
  await ask("90 %");
  await expect
    .poll(latestOf, { timeout: 15_000 })
    .toMatch(/00:45 UTC.* a probability of 93 %, 90 % asked for$/);
  await ask("");
  await expect
    .poll(latestOf, { timeout: 15_000 })
    .toMatch(/00:45 UTC.*holds in all 7 members and 3 what-ifs; under the stated error .* of 93 %$/);

  // With the error that it was held against, a confidence goes too.
  await ask("90 %");
  await page.getByRole("button", { name: "Take out", exact: true }).click();
  await expect.poll(() => asked.count()).toBe(0);
  await expect
    .poll(latestOf, { timeout: 15_000 })
    .toMatch(/00:45 UTC.*holds in all 7 members and 3 what-ifs$/);
});
