import { createHash } from "node:crypto";
import { readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join, relative, sep } from "node:path";
import type { Plugin } from "vite";

const SERVICE_WORKER = "service-worker.js";

/**
 * Tells the built service worker which files the page is made of: every file of the build, with a digest of them all as the
 * version. It runs once everything is written, as files of `public/` are in no bundle.
 */
export function precache(): Plugin {
  return {
    name: "precache",
    apply: "build",
    enforce: "post",
    writeBundle({ dir }) {
      if (dir === undefined) return;
      const script = join(dir, SERVICE_WORKER);
      const code = readFileSync(script, "utf8");
      const list = JSON.stringify(precacheList(dir, code));
      writeFileSync(script, `const PRECACHE=${list};\n${code}`);
    },
  };
}

/** The files of a folder by address, the page itself as `./`, and their version. */
export function precacheList(
  dir: string,
  code: string,
): { readonly version: string; readonly files: string[] } {
  const digest = createHash("sha256").update(code);
  const files: string[] = [];
  const found = readdirSync(dir, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile())
    .map(({ parentPath, name }) => relative(dir, join(parentPath, name)).split(sep).join("/"))
    .filter((file) => file !== SERVICE_WORKER && !file.endsWith(".map"))
    .sort();
  for (const file of found) {
    digest.update(`\0${file}\0`).update(readFileSync(join(dir, file)));
    files.push(file === "index.html" ? "./" : file);
  }
  return { version: digest.digest("hex").slice(0, 16), files };
}
