/*
 * Bundles the benchmarks and runs them in plain Node: a test runner's transforms slow hot code by a factor of 5 to 10.
 * `node tests/bench/run.mjs [PART …]` runs the parts named, all of them without a name; only a run of all is kept.
 */

import { spawnSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";
import { build } from "vite";

const here = dirname(fileURLToPath(import.meta.url));
const folder = mkdtempSync(join(tmpdir(), "legwork-bench-"));
const date = new Date().toISOString().slice(0, 10);
try {
  await build({
    configFile: false,
    logLevel: "error",
    publicDir: false,
    ssr: { noExternal: true },
    build: {
      ssr: true,
      outDir: folder,
      target: "node20",
      minify: false,
      rolldownOptions: {
        input: Object.fromEntries(
          ["main", "read-csv", "window-threads", "ensemble"].map((name) => [
            name,
            join(here, `${name}.bench.ts`),
          ]),
        ),
        output: {
          format: "es",
          entryFileNames: "[name].mjs",
          chunkFileNames: "[name].mjs",
          // As the command and the page are built.
          topLevelVar: false,
        },
      },
    },
  });
  const parts = process.argv.slice(2);
  const node = [...process.execArgv, join(folder, "main.mjs"), here, folder, date, ...parts];
  process.exitCode = spawnSync(process.execPath, node, { stdio: "inherit" }).status ?? 1;
} finally {
  rmSync(folder, { recursive: true });
}
