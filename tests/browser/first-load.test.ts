import { gzipSync } from "node:zlib";
import { expect, test } from "vitest";
import { builtFiles } from "./built-page.ts";
import { visit } from "./visit.ts";

/** What a first visit may fetch, bytes gzipped, without coastline and demo data. */
const BUDGET = 150_000;

test("a first visit fetches at most 150 kB gzipped of page, style and code", async () => {
  const { page } = await visit();
  const asked = await page.evaluate(() => performance.getEntriesByType("resource").map(({ name }) => name));
  const paths = ["index.html", ...new Set(asked.map((address) => new URL(address).pathname.slice(1)))];
  const files = builtFiles();
  const sizes = paths
    .filter((path) => /\.(html|js|css)$/.test(path))
    .map((path) => [path, gzipSync(files.get(path) ?? "", { level: 9 }).length] as const);
  expect(sizes.map(([path]) => path).join(" ")).toMatch(/worker-/);
  const total = sizes.reduce((sum, [, size]) => sum + size, 0);
  expect(total, sizes.map(([path, size]) => `${path} ${size}`).join(", ")).toBeLessThanOrEqual(BUDGET);
});
