import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { gzipSync } from "node:zlib";
import { atMost, type Part } from "./comparison.ts";

/** What a first visit fetches at once; every other chunk, coastline and demo file comes when it is wanted. */
const FIRST = /^(index\.html|assets\/(index|worker)-[^/]*\.(js|css))$/;

/** What the built page loads at first, every file gzipped by itself: markup, style, code and the worker's code. */
export function pageSize(root: string): Part {
  const page = join(root, "dist/page");
  if (!existsSync(page)) throw new Error("dist/page is missing: run npm run build first");
  const files = ["index.html", ...readdirSync(join(page, "assets")).map((name) => `assets/${name}`)];
  const sizes = files
    .filter((name) => FIRST.test(name))
    .map((name) => ({ name, bytes: gzipSync(readFileSync(join(page, name)), { level: 9 }).length }));
  const kilobytes = (part: RegExp) =>
    sizes.filter(({ name }) => part.test(name)).reduce((sum, { bytes }) => sum + bytes, 0) / 1000;
  const worker = kilobytes(/worker/);
  const all = kilobytes(/./);
  const parts = `page ${(all - worker).toFixed(0)} kB, worker ${worker.toFixed(0)} kB`;
  return { comparisons: [atMost("first load of the page, gzipped", all, 150, "kB", "", parts)], timings: [] };
}
