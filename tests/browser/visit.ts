import { type Browser, type BrowserContext, chromium, type Download, type Page } from "playwright-core";
import { expect, inject, onTestFinished } from "vitest";

export interface VisitOptions {
  readonly width?: number;
  readonly height?: number;
  readonly colours?: "light" | "dark";
  readonly touch?: boolean;
  /** Where the page is; the one that is served to all tests unless a test serves its own. */
  readonly address?: string;
}

/** One user's browser at the page. Whatever goes wrong in it unasked fails the test that opened it. */
export interface Visit {
  readonly page: Page;
  readonly context: BrowserContext;
  /** The page anew, with what the device holds: a second tab, or the tab again after the first was closed or has crashed. */
  reopen(): Promise<Page>;
  /** Says that faults that match are provoked on purpose. */
  expectFault(pattern: RegExp): void;
}

let browser: Promise<Browser> | undefined;

/** Opens the page as a new user with nothing kept on the device, and waits until the first demo is estimated. */
export async function visit(options: VisitOptions = {}): Promise<Visit> {
  const { width = 1440, height = 900, colours = "light", touch = false } = options;
  const address = options.address ?? inject("pageAddress");
  browser ??= chromium.connect(inject("browserEndpoint"));
  const context = await (await browser).newContext({
    viewport: { width, height },
    colorScheme: colours,
    hasTouch: touch,
    isMobile: touch,
    locale: "en-GB",
    timezoneId: "UTC",
    permissions: ["clipboard-read", "clipboard-write"],
  });
  context.setDefaultTimeout(15_000);
  const watch = watchFaults(context, new URL(address).origin);
  onTestFinished(async () => {
    await context.close();
    expect(watch.faults(), "requests elsewhere, policy violations, console errors and exceptions").toEqual(
      [],
    );
  });
  const reopen = async (): Promise<Page> => {
    const page = await context.newPage();
    await page.goto(address);
    await ready(page);
    return page;
  };
  return { page: await reopen(), context, reopen, expectFault: watch.expect };
}

/** Waits until the plan on the page is estimated and nothing is being fetched. */
export async function ready(page: Page): Promise<void> {
  await page.locator(".leg-table tbody tr").first().waitFor({ state: "attached" });
  await page.waitForLoadState("networkidle");
}

/** What an act that saves a file hands over: its name and its text. */
export async function saved(
  page: Page,
  act: () => Promise<void>,
): Promise<{ readonly name: string; readonly text: string }> {
  const [download] = await Promise.all([page.waitForEvent("download"), act()]);
  return { name: download.suggestedFilename(), text: await textOf(download) };
}

async function textOf(download: Download): Promise<string> {
  const chunks: Uint8Array[] = [];
  for await (const chunk of await download.createReadStream()) chunks.push(chunk as Uint8Array);
  return Buffer.concat(chunks).toString("utf8");
}

/** Chooses an entry of the menu of things done now and then. */
export async function choose(page: Page, entry: string): Promise<void> {
  await page.locator("summary", { hasText: "More" }).click();
  await page.locator(".menu-sheet").getByRole("button", { name: entry, exact: true }).click();
}

/** Opens a demo by its entry in the menu, and waits until it is estimated. */
export async function openDemo(page: Page, entry: string, name: string): Promise<void> {
  await choose(page, entry);
  await expect.poll(() => said(page), { timeout: 15_000 }).toBe(`Opened ${name}.plan.json`);
  await ready(page);
}

/** What the page last said to those who hear it. */
export function said(page: Page): Promise<string | null> {
  return page.locator(".page > p[role=status]").textContent();
}

interface FaultWatch {
  faults(): string[];
  expect(pattern: RegExp): void;
}

function watchFaults(context: BrowserContext, origin: string): FaultWatch {
  const found: string[] = [];
  const expected: RegExp[] = [];
  context.on("request", (request) => {
    const { protocol, origin: asked } = new URL(request.url());
    const own = protocol === "data:" || protocol === "blob:" || asked === origin;
    if (!own) found.push(`request: ${request.url()}`);
  });
  context.on("response", (response) => {
    if (response.status() >= 400) found.push(`answer ${response.status()}: ${response.url()}`);
  });
  context.on("console", (message) => {
    if (["error", "warning"].includes(message.type())) found.push(`console: ${message.text()}`);
  });
  context.on("weberror", (fault) => {
    found.push(`exception: ${fault.error().stack ?? fault.error().message}`);
  });
  return {
    faults: () => found.filter((fault) => !expected.some((pattern) => pattern.test(fault))),
    expect: (pattern) => expected.push(pattern),
  };
}
