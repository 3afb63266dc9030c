import { chromium } from "playwright-core";
import type { TestProject } from "vitest/node";
import { buildIfStale, builtFiles } from "./built-page.ts";
import { findBrowser } from "./find-browser.ts";
import { ARGUMENTS } from "./launch-arguments.ts";
import { servePage } from "./serve-page.ts";

declare module "vitest" {
  interface ProvidedContext {
    /** Where the one browser of all tests listens. */
    browserEndpoint: string;
    /** Where the built page is served, with a `/` at its end. */
    pageAddress: string;
  }
}

/** Starts the browser and serves the page, once for all browser tests. */
export default async function setUp(project: TestProject): Promise<() => Promise<void>> {
  const executablePath = findBrowser();
  buildIfStale();
  const page = await servePage(builtFiles());
  const browser = await chromium.launchServer({ executablePath, args: ARGUMENTS });
  project.provide("browserEndpoint", browser.wsEndpoint());
  project.provide("pageAddress", page.address);
  return async () => {
    await browser.close();
    await page.close();
  };
}
