import { once } from "node:events";
import { createWriteStream, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { visit } from "./visit.ts";

const LARGE = 200_000_000;
/** A page that answers within this, ms, has not frozen; on an idle machine it is a tenth of it. */
const FROZEN = 3000;

let folder: string;
let large: string;

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), "legwork-"));
  large = join(folder, "large-wind.csv");
  await writeLarge(large);
}, 120_000);

afterAll(() => rmSync(folder, { recursive: true, force: true }));

test("a field with strange headers is dropped, mapped in the dialogue and added, its first rows read as it is mapped", async () => {
  const { page } = await visit();
  await drop(page, "buoys.csv", strangeField());
  const dialogue = page.getByRole("dialog", { name: "What does buoys.csv hold?" });
  await dialogue.waitFor();
  const add = dialogue.getByRole("button", { name: /^Add/ });
  await dialogue.getByText("current", { exact: true }).click();
  await expect.poll(() => add.isDisabled()).toBe(true);
  for (const [header, meaning] of [
    ["breite", "latitude"],
    ["laenge", "longitude"],
    ["stroem_o", "eastward_sea_water_velocity"],
    ["stroem_n", "northward_sea_water_velocity"],
  ] as const) {
    await dialogue.getByLabel(`Meaning of ${header}`).selectOption(meaning);
  }
  await expect.poll(() => dialogue.getByRole("status").textContent()).toBe("The first rows read well.");
  await add.click();
  await dialogue.waitFor({ state: "detached" });
  const fields = page.locator(".plan-item.fields");
  await expect.poll(() => fields.textContent()).toContain("buoys.csv");
});

test("the dialogue is left by Escape, and nothing is added", async () => {
  const { page } = await visit();
  const before = await page.locator(".plan-item.fields").textContent();
  await drop(page, "buoys.csv", strangeField());
  await page.getByRole("dialog").waitFor();
  await page.keyboard.press("Escape");
  await page.getByRole("dialog").waitFor({ state: "detached" });
  expect(await page.locator(".plan-item.fields").textContent()).toBe(before);
});

test("a field file that is torn late is told in one sentence, with the line, and leaves the plan as it was", async () => {
  const { page } = await visit();
  const before = await page.locator(".plan-item.fields").textContent();
  await drop(page, "torn.csv", `${windField(80)}\n59,-13,twelve,3\n`);
  const notice = page.locator(".notice[role=alert]");
  await notice.waitFor();
  const sentence = (await notice.textContent())?.replace(/\s*Dismiss\s*$/, "") ?? "";
  expect(sentence).toContain("torn.csv");
  expect(sentence).toContain("line 6402");
  expect(sentence).toContain("twelve");
  expect(sentence.split("\n")).toHaveLength(1);
  expect(await page.locator(".plan-item.fields").textContent()).toBe(before);
  await notice.getByRole("button", { name: "Dismiss" }).click();
  await notice.waitFor({ state: "detached" });
});

test("a field file that is torn in its first rows is told in the dialogue, and can't be added", async () => {
  const { page } = await visit();
  await drop(page, "torn.csv", `${windField(6)}\n54,-13,twelve,3\n`);
  const dialogue = page.getByRole("dialog", { name: "What does torn.csv hold?" });
  const status = dialogue.getByRole("status");
  await expect.poll(() => status.textContent()).toContain("twelve");
  expect(await status.textContent()).toContain("line 38");
  expect(await dialogue.getByRole("button", { name: /^Add/ }).isDisabled()).toBe(true);
  await dialogue.getByRole("button", { name: "Leave it out" }).click();
  await dialogue.waitFor({ state: "detached" });
});

test("a file that is neither plan, craft nor field is told in one sentence", async () => {
  const { page } = await visit();
  await drop(page, "holiday.jpg", "not a picture");
  const notice = page.locator(".notice[role=alert]");
  await notice.waitFor();
  expect(await notice.textContent()).toContain("holiday.jpg");
});

test.each([
  ["winds.grb", "GRIB\u0000\u0000\u0000\u0002", "GRIB"],
  ["winds.csv", "CDF\u0001\u0000\u0000\u0000\u0000", "NetCDF"],
])(
  "the file %s is told by its first bytes for what it is, and nothing is asked",
  async (name, bytes, kind) => {
    const { page } = await visit();
    const before = await page.locator(".plan-item.fields").textContent();
    await drop(page, name, bytes);
    const notice = page.locator(".notice[role=alert]");
    await notice.waitFor();
    expect(await notice.textContent()).toContain(
      `${name}: a field is a CSV file; found what looks like ${kind}: export it as CSV`,
    );
    expect(await page.getByRole("dialog").count()).toBe(0);
    expect(await page.locator(".plan-item.fields").textContent()).toBe(before);
  },
);

test("a field file of 200 MB is read while the page goes on answering", async () => {
  const { page } = await visit();
  await watchGaps(page);
  await openFile(page, large);
  const progress = page.getByRole("progressbar", { name: "Reading large-wind.csv" });
  await progress.waitFor();
  const routes = page.locator(".ledger-table tbody th button");
  let asked = 0;
  while (await progress.isVisible()) {
    const route = routes.nth(asked % 3);
    await route.click({ timeout: FROZEN });
    await expect.poll(() => route.getAttribute("aria-pressed"), { timeout: FROZEN }).toBe("true");
    asked += 1;
    await page.waitForTimeout(200);
  }
  expect(asked).toBeGreaterThan(2);
  await expect.poll(() => page.locator(".plan-item.fields").textContent()).toContain("large-wind.csv");
  expect(await longestGap(page)).toBeLessThan(FROZEN);
}, 120_000);

test("the reading of a large file is stopped, and the plan is as it was", async () => {
  const { page } = await visit();
  const before = await page.locator(".plan-item.fields").textContent();
  await openFile(page, large);
  const progress = page.getByRole("progressbar", { name: "Reading large-wind.csv" });
  await progress.waitFor();
  await page.locator(".reading").getByRole("button", { name: "Stop" }).click();
  await progress.waitFor({ state: "detached" });
  expect(await page.locator(".plan-item.fields").textContent()).toBe(before);
});

/** A current under headers that nobody knows. */
function strangeField(): string {
  return windField(6).replace(/^.*/, "breite,laenge,stroem_o,stroem_n");
}

/** A steady wind on `side` × `side` nodes around the demo's islands. */
function windField(side: number): string {
  const rows = ["lat,lon,eastward_wind,northward_wind"];
  for (let at = 0; at < side * side; at += 1) {
    const [row, column] = [Math.floor(at / side), at % side];
    rows.push(
      `${(53 + row * 0.05).toFixed(2)},${(-14 + column * 0.05).toFixed(2)},3.5,${(0.1 * row).toFixed(1)}`,
    );
  }
  return rows.join("\n");
}

/** A wind on 101 × 101 nodes for as many hours as fill 200 MB. */
async function writeLarge(file: string): Promise<void> {
  const out = createWriteStream(file);
  out.write("time,latitude,longitude,eastward_wind,northward_wind\n");
  const nodes: string[] = [];
  for (let lat = 0; lat <= 100; lat += 1) {
    for (let lon = 0; lon <= 100; lon += 1) {
      const wind = `${(3 * Math.sin(lat / 9)).toFixed(4)},${(4 * Math.cos(lon / 7)).toFixed(4)}`;
      nodes.push(`${(40 + lat * 0.1).toFixed(2)},${(-20 + lon * 0.1).toFixed(2)},${wind}\n`);
    }
  }
  let bytes = 0;
  for (let hour = 0; bytes < LARGE; hour += 1) {
    const time = new Date(Date.UTC(2027, 4, 1, hour)).toISOString();
    const block = nodes.map((node) => `${time},${node}`).join("");
    bytes += block.length;
    if (!out.write(block)) await once(out, "drain");
  }
  out.end();
  await once(out, "finish");
}

/** Drops a file on the page as a user would. */
async function drop(page: Page, name: string, text: string): Promise<void> {
  const transfer = await page.evaluateHandle(
    ([file, content]) => {
      const data = new DataTransfer();
      data.items.add(new File([content], file, { type: "text/csv" }));
      return data;
    },
    [name, text] as const,
  );
  await page.dispatchEvent("body", "dragover", { dataTransfer: transfer });
  await page.dispatchEvent("body", "drop", { dataTransfer: transfer });
}

/** Chooses a file by its path; the browser itself reads it, so that its size costs the test nothing. */
async function openFile(page: Page, file: string): Promise<void> {
  const devtools = await page.context().newCDPSession(page);
  const { root } = await devtools.send("DOM.getDocument", { depth: 0 });
  const { nodeId } = await devtools.send("DOM.querySelector", {
    nodeId: root.nodeId,
    selector: ".page-head input[type=file]",
  });
  await devtools.send("DOM.setFileInputFiles", { files: [file], nodeId });
}

/** Notes from now on how long the page ever goes without drawing a frame. */
async function watchGaps(page: Page): Promise<void> {
  await page.evaluate(() => {
    let last = performance.now();
    let longest = 0;
    const frame = (now: number): void => {
      longest = Math.max(longest, now - last);
      last = now;
      document.documentElement.dataset.longestGap = String(longest);
      requestAnimationFrame(frame);
    };
    requestAnimationFrame(frame);
  });
}

async function longestGap(page: Page): Promise<number> {
  return Number(await page.locator("html").getAttribute("data-longest-gap"));
}
