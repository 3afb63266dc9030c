import { existsSync } from "node:fs";
import { createRequire } from "node:module";
import { join } from "node:path";
import type { Browser, Page } from "playwright-core";
import { builtFiles } from "../browser/built-page.ts";
import { findBrowser } from "../browser/find-browser.ts";
import { ARGUMENTS } from "../browser/launch-arguments.ts";
import { servePage } from "../browser/serve-page.ts";
import { atMost, type Comparison, figure, type Part } from "./comparison.ts";
import { median, summary, type Timing } from "./timing.ts";

const DEMOS = [
  ["islands", "Workboat: when, and how sure"],
  ["survey", "Drone: when, and how sure"],
  ["ocean", "Ocean: when, and how sure"],
] as const;
const ROUNDS = 7;
const FIRST_PAINT_MS = 100;
const FRAME_MS = 50;
/** The pointer goes on moving over the window for so long once it is filled, ms. */
const AFTER_MS = 500;

/** What the page says of one opening of the window, ms: of the first cells painted, of the bests, of the longest time without a frame. */
interface Opening {
  readonly painted: number;
  readonly complete: number;
  readonly longestFrame: number;
}

/** The built page in Chromium: how the window of each demo that decides opens, as a new visitor sees it. */
export async function pageWindow(root: string): Promise<Part> {
  const built = join(root, "dist/page");
  if (!existsSync(built)) throw new Error("dist/page is missing: run npm run build first");
  const executablePath = browserOrNone();
  if (executablePath === null) return { comparisons: [], timings: [] };
  // From where it is installed: the bundle that this is part of lies elsewhere.
  const { chromium } = createRequire(join(root, "package.json"))(
    "playwright-core",
  ) as typeof import("playwright-core");
  const server = await servePage(builtFiles(built));
  const browser = await chromium.launch({ executablePath, args: ARGUMENTS });
  try {
    const openings = new Map<string, Opening[]>(DEMOS.map(([name]) => [name, []]));
    for (let round = 0; round < ROUNDS; round += 1) {
      for (const [name, entry] of DEMOS)
        openings.get(name)?.push(await openWindow(browser, server.address, entry));
    }
    const parts = [...openings].map(([name, own]) => partOf(name, own));
    return {
      comparisons: parts.flatMap(({ comparisons }) => comparisons),
      timings: parts.flatMap(({ timings }) => timings),
    };
  } finally {
    await browser.close();
    await server.close();
  }
}

function browserOrNone(): string | null {
  try {
    return findBrowser();
  } catch {
    process.stderr.write("no Chromium: the page's window is left out\n");
    return null;
  }
}

function partOf(name: string, openings: readonly Opening[]): Part {
  const timing = (what: string, of: (opening: Opening) => number): Timing =>
    summary(
      `${what}, ${name}`,
      openings.map((opening) => of(opening) / 1000),
    );
  const painted = timing("first cells of the window painted", ({ painted }) => painted);
  const complete = timing("the window complete", ({ complete }) => complete);
  const frame = timing("longest time without a frame", ({ longestFrame }) => longestFrame);
  const medianOf = (one: Timing) => `median ${figure(1000 * median(one))} ms`;
  const limited = (one: Timing, limit: number): Comparison =>
    atMost(`${one.name}`, 1000 * one.least, limit, "ms", "", medianOf(one));
  const seen: Comparison = { ...limited(complete, 0), goal: "", met: null };
  return {
    comparisons: [limited(painted, FIRST_PAINT_MS), seen, limited(frame, FRAME_MS)],
    timings: [painted, complete, frame],
  };
}

/** One opening, in a browser of its own that holds nothing yet. */
async function openWindow(browser: Browser, address: string, entry: string): Promise<Opening> {
  const context = await browser.newContext({ viewport: { width: 1440, height: 900 }, locale: "en-GB" });
  try {
    const page = await context.newPage();
    await page.addInitScript(watchWindow);
    await page.goto(address);
    await settled(page);
    await page.locator("summary", { hasText: "More" }).click();
    await page.locator(".menu-sheet").getByRole("button", { name: entry, exact: true }).click();
    await page.getByText(/^Opened .*-decide\.plan\.json/).waitFor({ state: "attached" });
    await settled(page);
    const tab = page.getByRole("button", { name: "Departures", exact: true });
    const box = await tab.boundingBox();
    if (box === null) throw new Error("the desk has no tab of departures");
    await page.mouse.move(box.x + box.width / 2, box.y + box.height / 2, { steps: 5 });
    await page.mouse.down();
    await page.mouse.up();
    return await movePointer(page);
  } finally {
    await context.close();
  }
}

/** Until the plan is estimated, and what is decided and held against land is there too. */
async function settled(page: Page): Promise<void> {
  await page.locator(".leg-table tbody tr").first().waitFor({ state: "attached" });
  await page.waitForLoadState("networkidle");
  await page.waitForTimeout(300);
}

/** Moves to and fro where the cells are to come, until the window has been complete for a while. */
async function movePointer(page: Page): Promise<Opening> {
  const done: { opening?: Opening } = {};
  const opened = page
    .evaluate((after) => (globalThis as unknown as Watched).windowWatch.opening(after), AFTER_MS)
    .then((opening) => {
      done.opening = opening;
    });
  // Nothing else is asked of the page meanwhile: questions would cost it frames.
  for (let step = 0; done.opening === undefined; step += 1)
    await page.mouse.move(500 + 250 * Math.sin(step / 9), 720 + 40 * Math.sin(step / 7));
  await opened;
  return done.opening;
}

interface Watched {
  /** Answers once the window has been complete for so many milliseconds. */
  windowWatch: { opening(after: number): Promise<Opening> };
}

/** Runs in the page before its own code: notes when the tab is pressed, cells are drawn, the bests are there, and every frame. */
function watchWindow(): void {
  let pressed = Number.NaN;
  let painted = Number.NaN;
  let complete = Number.NaN;
  let drawn = false;
  let longestFrame = 0;
  let lastFrame = Number.NaN;
  const afterFrame = (done: () => void): void => {
    requestAnimationFrame(() => {
      const { port1, port2 } = new MessageChannel();
      port1.onmessage = done;
      port2.postMessage(null);
    });
  };
  addEventListener(
    "click",
    ({ target, timeStamp }) => {
      if (!(target instanceof Element) || target.textContent !== "Departures") return;
      pressed = timeStamp;
      lastFrame = timeStamp;
    },
    true,
  );
  // Nothing but cells and the bests' letters is filled on that canvas, and the letters come last.
  const { fillRect } = CanvasRenderingContext2D.prototype;
  CanvasRenderingContext2D.prototype.fillRect = function (...box) {
    fillRect.apply(this, box);
    if (drawn || !this.canvas.closest(".window-view")) return;
    drawn = true;
    afterFrame(() => {
      painted = performance.now();
    });
  };
  const frame = (): void => {
    const now = performance.now();
    if (now - lastFrame > longestFrame) longestFrame = now - lastFrame;
    if (!Number.isNaN(pressed)) {
      lastFrame = now;
      if (Number.isNaN(complete) && document.querySelector(".window-view .bests")) complete = now;
    }
    requestAnimationFrame(frame);
  };
  requestAnimationFrame(frame);
  (globalThis as unknown as Watched).windowWatch = {
    async opening(after) {
      while (!(performance.now() > complete + after)) await new Promise(requestAnimationFrame);
      return { painted: painted - pressed, complete: complete - pressed, longestFrame };
    },
  };
}
