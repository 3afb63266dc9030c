import { dirname } from "node:path";
import { expect, test } from "vitest";
import { findBrowser } from "./find-browser.ts";

test("the browser is the one that is named, else the first on PATH", () => {
  const found = findBrowser();
  expect(findBrowser({ LEGWORK_BROWSER: found })).toBe(found);
  expect(findBrowser({ PATH: `/nowhere:${dirname(found)}` })).toBe(found);
});

test("where there is none, one sentence says what to install", () => {
  expect(() => findBrowser({ PATH: "/nowhere" })).toThrow(
    "The browser tests need Chromium: install Debian's package chromium (apt-get install chromium), or name one in LEGWORK_BROWSER.",
  );
  expect(() => findBrowser({ LEGWORK_BROWSER: "/nowhere/chromium" })).toThrow(
    "LEGWORK_BROWSER is /nowhere/chromium, which is no program: name a Chromium by its full path.",
  );
});
