import type { Locator, Page } from "playwright-core";
import { afterAll, beforeAll, expect, test } from "vitest";
import { builtFiles } from "./built-page.ts";
import { type PageServer, servePage } from "./serve-page.ts";
import { openDemo, ready, visit } from "./visit.ts";

let server: PageServer;

beforeAll(async () => {
  server = await servePage(builtFiles());
});

afterAll(() => server.close());

test("after a crash the plan comes back with its fields, as it was last changed", async () => {
  const { page, reopen, expectFault } = await visit();
  expectFault(/crash/i);
  await openDemo(page, "Survey drone", "survey");
  await rename(page, "Mast, second try");
  const before = await figures(page);
  await kept(page);
  const devtools = await page.context().newCDPSession(page);
  const crashed = page.waitForEvent("crash");
  // Its answer never comes.
  void devtools.send("Page.crash").catch(() => undefined);
  await crashed;
  const again = await reopen();
  expect(await titleOf(again)).toBe("Mast, second try");
  await expect.poll(() => figures(again)).toEqual(before);
  expect(await again.locator(".plan-item.fields").textContent()).toContain("survey-wind.csv");
});

test("after a reload the plan is still said not to be in a file", async () => {
  const { page } = await visit();
  await rename(page, "Another title");
  await kept(page);
  await page.reload();
  await ready(page);
  expect(await titleOf(page)).toBe("Another title");
  expect(await page.locator(".saved-state").textContent()).toContain("not saved");
});

test("a field file given anew under its name is taken back by Undo, figures and all, and stays so after a reload", async () => {
  const { page } = await visit();
  await openDemo(page, "Survey drone", "survey");
  const before = await figures(page);
  const rows = [
    "time,lat,lon,u,v",
    ...["2027-01-01T00:00Z", "2028-01-01T00:00Z"].flatMap((time) =>
      [0, 80].flatMap((lat) => [-40, 40].map((lon) => `${time},${lat},${lon},1,0`)),
    ),
  ];
  await page.locator(".page-head input[type=file]").setInputFiles({
    name: "survey-wind.csv",
    mimeType: "text/csv",
    buffer: Buffer.from(rows.join("\n")),
  });
  await expect.poll(() => figures(page)).not.toEqual(before);
  await rename(page, "Another wind");
  await kept(page);
  await page.getByRole("button", { name: "Undo" }).click();
  await page.getByRole("button", { name: "Undo" }).click();
  await expect.poll(() => figures(page)).toEqual(before);
  await rename(page, "The wind as it was");
  await kept(page);
  await page.reload();
  await ready(page);
  await expect.poll(() => figures(page)).toEqual(before);
});

test("after the first visit the page opens without a network, demos and coast as well", async () => {
  const { page, context } = await visit({ address: server.address });
  await installed(page);
  await rename(page, "Far from anywhere");
  const before = await figures(page);
  await kept(page);
  await context.setOffline(true);
  await page.reload();
  await page.locator(".leg-table tbody tr").first().waitFor();
  expect(await titleOf(page)).toBe("Far from anywhere");
  await expect.poll(() => figures(page)).toEqual(before);
  await openDemo(page, "Ocean passage", "ocean");
  await page.getByRole("button", { name: "Zoom in" }).click();
});

test("a newer version says so, waits until it is asked for, and loses nothing", async () => {
  const { page } = await visit({ address: server.address });
  await installed(page);
  await withNewerVersion(async () => {
    await page.reload();
    const offer = await offered(page);
    expect(await offer.textContent()).toContain("newer version");
    expect(await page.title()).toBe("Legwork");
    await rename(page, "Half done");
    await useIt(page);
    await expect.poll(() => page.title()).toBe("Legwork, newer");
    await ready(page);
    expect(await titleOf(page)).toBe("Half done");
  });
});

// Seen on 2026-12-01: a request that came as the worker before was stopped started it again, and the newer one waited on.
test("a newer version comes in when asked for while the page is fetching without a pause", async () => {
  const { page } = await visit({ address: server.address });
  await installed(page);
  await withNewerVersion(async () => {
    await page.reload();
    await offered(page);
    await rename(page, "Busy");
    await page.evaluate(() => {
      const part = performance.getEntriesByType("resource").find(({ name }) => name.includes("/assets/"));
      const fetchOn = async (): Promise<void> => {
        for (;;) await (await fetch(part?.name ?? "")).arrayBuffer();
      };
      // It ends with the page that fetches.
      for (const fetching of [fetchOn(), fetchOn()]) fetching.catch(() => undefined);
    });
    await useIt(page);
    await expect.poll(() => page.title()).toBe("Legwork, newer");
    await ready(page);
    expect(await titleOf(page)).toBe("Busy");
    expect(page.url()).toBe(server.address);
    expect(await page.locator(".notice.newer").count()).toBe(0);
    // Its worker follows, so that the next visit is to the newer version too.
    await expect.poll(() => waits(page), { timeout: 20_000 }).toBe(false);
    await page.reload();
    expect(await page.title()).toBe("Legwork, newer");
  });
});

test("a newer version that one tab has brought in comes into another when asked for there", async () => {
  const { page, reopen } = await visit({ address: server.address });
  await installed(page);
  await withNewerVersion(async () => {
    await page.reload();
    await offered(page);
    const other = await reopen();
    await offered(other);
    await useIt(page);
    await expect.poll(() => page.title()).toBe("Legwork, newer");
    await expect.poll(() => waits(other), { timeout: 20_000 }).toBe(false);
    expect(await other.title()).toBe("Legwork");
    await useIt(other);
    await expect.poll(() => other.title()).toBe("Legwork, newer");
  });
});

/** Serves another version of the page during an act. */
async function withNewerVersion(act: () => Promise<void>): Promise<void> {
  const served = new Map(server.files);
  try {
    newerVersion(server.files);
    await act();
  } finally {
    for (const [name, content] of served) server.files.set(name, content);
  }
}

/** Waits until a newer version is offered. */
async function offered(page: Page): Promise<Locator> {
  const offer = page.locator(".notice.newer");
  await offer.waitFor();
  return offer;
}

/** Whether a newer version's worker is not let in yet. */
function waits(page: Page): Promise<boolean> {
  return page.evaluate(
    async () => (await navigator.serviceWorker.getRegistration())?.waiting instanceof ServiceWorker,
  );
}

/** Asks for the newer version, and waits until the page is loaded anew. */
async function useIt(page: Page): Promise<void> {
  await Promise.all([page.waitForEvent("load"), page.getByRole("button", { name: "Use it now" }).click()]);
}

/** Another version of the page: another title, and a list of files with another version in it. */
function newerVersion(files: Map<string, Buffer>): void {
  const edit = (name: string, from: RegExp, to: string): void => {
    const text = files.get(name)?.toString("utf8") ?? "";
    expect(text).toMatch(from);
    files.set(name, Buffer.from(text.replace(from, to)));
  };
  edit("index.html", /<title>Legwork<\/title>/, "<title>Legwork, newer</title>");
  edit("service-worker.js", /"version":"[0-9a-f]+"/, '"version":"0123456789abcdef"');
}

/** Waits until the device holds every file of the page and a worker answers for it. */
async function installed(page: Page): Promise<void> {
  await page.evaluate(async () => {
    const { serviceWorker } = navigator;
    await serviceWorker.ready;
    if (serviceWorker.controller === null) {
      await new Promise((resolve) =>
        serviceWorker.addEventListener("controllerchange", resolve, { once: true }),
      );
    }
  });
}

/** Waits until the device holds the title that the page shows. */
async function kept(page: Page): Promise<void> {
  const title = await titleOf(page);
  const onDevice = () =>
    page.evaluate(
      () =>
        new Promise<unknown>((resolve, reject) => {
          const opening = indexedDB.open("legwork");
          opening.onerror = () => reject(opening.error);
          opening.onsuccess = () => {
            const reading = opening.result.transaction("plan").objectStore("plan").get("plan");
            reading.onsuccess = () => {
              opening.result.close();
              resolve(reading.result?.title);
            };
          };
        }),
    );
  await expect.poll(onDevice, { timeout: 10_000 }).toBe(title);
}

async function rename(page: Page, title: string): Promise<void> {
  const field = page.getByLabel("Title of the plan");
  await field.fill(title);
  await field.press("Enter");
}

function titleOf(page: Page): Promise<string> {
  return page.getByLabel("Title of the plan").inputValue();
}

function figures(page: Page): Promise<string[]> {
  return page.locator(".leg-table td").allInnerTexts();
}
