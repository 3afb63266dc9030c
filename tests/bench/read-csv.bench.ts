import { createReadStream } from "node:fs";
import Papa from "papaparse";
import { readGridFile } from "../../src/field/csv.ts";

/*
 * One reading of a file in a process of its own, so that the peak of memory is its own too.
 * Called as `node read-csv.mjs papaparse|grid FILE`; writes { seconds, peak_MB, grid_MB, rows }.
 */

const [, , way, file] = process.argv as [string, string, string, string];
const start = performance.now();
const result = way === "papaparse" ? await readBare() : await readGrid();
const seconds = (performance.now() - start) / 1000;
process.stdout.write(JSON.stringify({ seconds, peak_MB: process.resourceUsage().maxRSS / 1024, ...result }));

/** Papaparse alone: its rows are counted and thrown away. */
function readBare(): Promise<{ rows: number; grid_MB: number }> {
  const parse = (Papa as unknown as { parse: (input: unknown, config: object) => void }).parse;
  return new Promise((resolve, reject) => {
    let rows = -1;
    parse(createReadStream(file), {
      chunk: ({ data }: { data: string[][] }) => {
        rows += data.length;
      },
      complete: () => resolve({ rows, grid_MB: 0 }),
      error: reject,
    });
  });
}

async function readGrid(): Promise<{ rows: number; grid_MB: number }> {
  const grid = await readGridFile(() => createReadStream(file), { file, role: "wind" });
  const bytes = grid.slices.reduce((sum, slice) => sum + slice.byteLength, 0);
  return { rows: bytes / 16, grid_MB: bytes / 1e6 };
}
