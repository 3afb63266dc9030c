import type { Page } from "playwright-core";
import { expect, test } from "vitest";
import { saved, visit } from "./visit.ts";

const MARKUP = `<img src=x onerror="document.title='taken'"><script>document.title='taken'</script>`;

test("names from files are text everywhere, never markup", async () => {
  const { page } = await visit();
  const { text } = await saved(page, () => page.getByRole("button", { name: "Save", exact: true }).click());
  const plan = JSON.parse(text);
  plan.title = MARKUP;
  plan.fields = [];
  plan.craft = {
    name: MARKUP,
    moves: "water",
    speed: "8 kn",
    power: { model: "constant", rate: "10 kW" },
    store: { capacity: "90 kWh" },
  };
  for (const [at, route] of plan.routes.entries()) {
    route.name = `${MARKUP} ${at}`;
    for (const waypoint of route.waypoints) waypoint.name = MARKUP;
  }
  await openPlan(page, JSON.stringify(plan));
  await expect.poll(() => page.getByLabel("Title of the plan").inputValue()).toBe(MARKUP);
  await expect.poll(() => page.locator(".leg-table").textContent()).toContain(MARKUP);
  // Over a line, the name of its route is shown beside the pointer.
  const middle = await page.locator(".leg-middle").first().boundingBox();
  if (middle === null) throw new Error("the chosen route has no leg on the chart");
  await page.mouse.move(middle.x + middle.width / 2 + 22, middle.y + middle.height / 2 - 22);
  const own = page.locator(".leaflet-tile-container img");
  expect(await page.locator("img, script[src=x]").count()).toBe(await own.count());
  expect(await page.locator("body script").count()).toBe(0);
  expect(await page.title()).toBe("Legwork");
});

test("a plan of another kind, of another shape or too large is refused in one sentence", async () => {
  const { page } = await visit();
  const before = await page.getByLabel("Title of the plan").inputValue();
  const notice = page.locator(".notice[role=alert]");
  for (const text of [
    "{",
    "[]",
    '{"format":"legwork-plan/2"}',
    '{"format":"legwork-plan/1","departure":"2027-05-04T11:00:00Z","craft":{},"routes":[{}]}',
    " ".repeat(5_000_001),
  ]) {
    await openPlan(page, text);
    await notice.waitFor();
    expect(await notice.textContent()).toMatch(/^bad\.plan\.json /);
    await notice.getByRole("button", { name: "Dismiss" }).click();
    expect(await page.getByLabel("Title of the plan").inputValue()).toBe(before);
  }
});

test("the policy in force forbids inline script, eval and foreign connections, and a violation is noticed", async () => {
  const { page, expectFault } = await visit();
  expectFault(/Content Security Policy|request: https:\/\/elsewhere\.invalid/);
  const outcomes = await page.evaluate(async () => {
    const script = document.createElement("script");
    script.textContent = "document.title = 'inline'";
    document.head.append(script);
    const connection = await fetch("https://elsewhere.invalid/").then(
      () => "made",
      () => "refused",
    );
    const image = await new Promise<string>((resolve) => {
      const picture = new Image();
      picture.onload = () => resolve("shown");
      picture.onerror = () => resolve("refused");
      picture.src = "https://elsewhere.invalid/0/0/0.png";
    });
    return { title: document.title, connection, image };
  });
  expect(outcomes).toEqual({ title: "Legwork", connection: "refused", image: "refused" });
});

async function openPlan(page: Page, text: string): Promise<void> {
  await page
    .locator(".page-head input[type=file]")
    .setInputFiles({ name: "bad.plan.json", mimeType: "application/json", buffer: Buffer.from(text) });
}
