import { execFileSync } from "node:child_process";
import { closeSync, mkdtempSync, openSync, rmSync, statSync, writeFileSync, writeSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { build } from "vite";
import { afterAll, beforeAll, bench, describe } from "vitest";

/*
 * Reading 5 million rows (time, lat, lon, u, v; 234 MB) into the grid, beside papaparse alone with its rows thrown away.
 * Goals: at least papaparse's speed / 1.5; peak memory at most the grid + 150 MB.
 * The two take turns in processes of their own; only ratios within one run mean anything. Results: csv.results.json.
 */

const [TIMES, LATS, LONS] = [20, 500, 500];
const ROUNDS = 5;

interface Run {
  readonly seconds: number;
  readonly peak_MB: number;
  readonly grid_MB: number;
  readonly rows: number;
}

const folder = mkdtempSync(join(tmpdir(), "legwork-csv-"));
const file = join(folder, "field.csv");
const script = join(folder, "csv-run.mjs");
const runs: Record<"papaparse" | "grid", Run[]> = { papaparse: [], grid: [] };

beforeAll(async () => {
  writeField();
  await build({
    configFile: false,
    logLevel: "error",
    build: {
      ssr: new URL("csv-run.ts", import.meta.url).pathname,
      outDir: folder,
      emptyOutDir: false,
      rolldownOptions: { output: { entryFileNames: "csv-run.mjs" } },
    },
    ssr: { noExternal: true },
  });
}, 120_000);

afterAll(() => {
  report();
  rmSync(folder, { recursive: true });
});

describe("234 MB of CSV", () => {
  const options = { iterations: ROUNDS, time: 0, warmupIterations: 1, warmupTime: 0, throws: true };
  bench(
    "papaparse alone, then the grid",
    () => {
      for (const way of ["papaparse", "grid"] as const) {
        const output = execFileSync(process.execPath, [script, way, file], { encoding: "utf8" });
        runs[way].push(JSON.parse(output) as Run);
      }
    },
    options,
  );
});

function writeField(): void {
  const out = openSync(file, "w");
  writeSync(out, "time,lat,lon,u,v\n");
  for (let t = 0; t < TIMES; t++) {
    const time = new Date(Date.UTC(2027, 4, 4, 3 * t)).toISOString().replace(".000", "");
    for (let j = 0; j < LATS; j++) {
      const head = `${time},${(j / 4 - 60).toFixed(2)}`;
      const row = (i: number) => {
        const [u, v] = [10 * Math.sin(0.37 * i + j + t), 10 * Math.cos(0.21 * i - j + t)];
        return `${head},${(i / 4 - 70).toFixed(2)},${u.toFixed(3)},${v.toFixed(3)}\n`;
      };
      writeSync(out, Array.from({ length: LONS }, (_, i) => row(i)).join(""));
    }
  }
  closeSync(out);
}

function report(): void {
  const megabytes = statSync(file).size / 1e6;
  // The first round warms the file cache.
  const summary = (["papaparse", "grid"] as const).map((way) => {
    const speeds = runs[way].slice(1).map(({ seconds }) => megabytes / seconds);
    const mean = speeds.reduce((sum, speed) => sum + speed, 0) / speeds.length;
    const deviation = Math.sqrt(speeds.reduce((sum, speed) => sum + (speed - mean) ** 2, 0) / speeds.length);
    const peak = Math.max(...runs[way].map(({ peak_MB }) => peak_MB));
    return { way, best_MB_s: Math.max(...speeds), mean_MB_s: mean, deviation_MB_s: deviation, peak_MB: peak };
  });
  const [bare, grid] = summary as [(typeof summary)[number], (typeof summary)[number]];
  const results = {
    rows: TIMES * LATS * LONS,
    megabytes,
    node: process.version,
    ways: summary,
    ratioOfMeans: bare.mean_MB_s / grid.mean_MB_s,
    peakAboveGrid_MB: grid.peak_MB - (runs.grid[0] as Run).grid_MB,
    raw: runs,
  };
  writeFileSync(new URL("csv.results.json", import.meta.url), `${JSON.stringify(results, null, 2)}\n`);
  console.table(summary);
  console.log(
    `papaparse / grid: ${results.ratioOfMeans.toFixed(2)} (goal 1.5); above the grid: ${results.peakAboveGrid_MB.toFixed(0)} MB (goal 150)`,
  );
}
