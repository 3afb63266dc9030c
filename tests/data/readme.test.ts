import { readdirSync, readFileSync, statSync } from "node:fs";
import { join } from "node:path";
import { expect, it } from "vitest";

const ROOT = new URL("../../", import.meta.url);
const readme = readFileSync(new URL("data/README.md", ROOT), "utf8");

/** Names in backquotes in the first column of the README's tables, as patterns under data/. */
const patterns = [...readme.matchAll(/^\|([^|]*)\|/gm)]
  .flatMap(([, cell = ""]) => [...cell.matchAll(/`([^`]+)`/g)])
  .map(
    ([, name = ""]) => new RegExp(`^data/(demo/)?${name.replace(/[.]/g, "\\.").replace(/\*/g, "[^/]*")}$`),
  );

const FOLDER = new URL("data/", ROOT).pathname;
const files = readdirSync(FOLDER, { recursive: true, encoding: "utf8" })
  .filter((name) => statSync(join(FOLDER, name)).isFile())
  .map((name) => `data/${name}`);

it("data/README.md has an entry for every file under data/", () => {
  expect(files.length).toBeGreaterThan(10);
  const unnamed = files.filter(
    (file) => file !== "data/README.md" && !patterns.some((pattern) => pattern.test(file)),
  );
  expect(unnamed).toEqual([]);
});

it("data/README.md names every field of the demos with its notation", () => {
  const fields = files.filter((file) => file.endsWith(".csv")).map((file) => file.replace("data/demo/", ""));
  for (const field of fields) expect(readme).toContain(`\`${field}\``);
});
