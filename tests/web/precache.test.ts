import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";
import { precacheList } from "../../web/offline/precache.ts";

let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "legwork-"));
  mkdirSync(join(folder, "assets"));
  for (const [name, text] of [
    ["index.html", "<html>"],
    ["service-worker.js", "code"],
    ["assets/a-1.js", "a"],
    ["assets/a-1.js.map", "{}"],
    ["icon.svg", "<svg/>"],
  ] as const)
    writeFileSync(join(folder, name), text);
});

afterEach(() => rmSync(folder, { recursive: true, force: true }));

test("every built file is kept, the page under its folder's address, the service worker itself not", () => {
  expect(precacheList(folder, "code").files).toEqual(["assets/a-1.js", "icon.svg", "./"]);
});

test("the version follows the contents: the same files give the same, any change another", () => {
  const first = precacheList(folder, "code").version;
  expect(precacheList(folder, "code").version).toBe(first);
  writeFileSync(join(folder, "icon.svg"), "<svg />");
  const changed = precacheList(folder, "code").version;
  expect(changed).not.toBe(first);
  expect(precacheList(folder, "other code").version).not.toBe(changed);
});

test("a file that is added, renamed or taken away makes another version", () => {
  const first = precacheList(folder, "code").version;
  rmSync(join(folder, "icon.svg"));
  const without = precacheList(folder, "code").version;
  writeFileSync(join(folder, "mark.svg"), "<svg/>");
  const renamed = precacheList(folder, "code").version;
  expect(new Set([first, without, renamed]).size).toBe(3);
});
