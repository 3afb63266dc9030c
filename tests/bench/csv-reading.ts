import { spawnSync } from "node:child_process";
import { closeSync, openSync, statSync, writeSync } from "node:fs";
import { join } from "node:path";
import { atMost, type Comparison, figure, type Part } from "./comparison.ts";
import { type Contestant, type Timing, takeTurns } from "./timing.ts";

const [TIMES, LATS, LONS] = [20, 500, 500];
const ROUNDS = 5;
const PANDAS = "import pandas, sys; pandas.read_csv(sys.argv[1], dtype={'time': 'category'})";

/** What one reading in a process of its own says of itself. */
interface Reading {
  readonly seconds: number;
  readonly peak_MB: number;
  readonly grid_MB: number;
  readonly rows: number;
}

/** Reading 5 million rows (time, lat, lon, u, v; 234 MB) into the grid, by the side of papaparse with its rows thrown away. */
export async function csvReading(folder: string): Promise<Part> {
  const file = join(folder, "field.csv");
  writeField(file);
  const megabytes = statSync(file).size / 1e6;
  const readings: Record<"grid" | "papaparse", Reading[]> = { grid: [], papaparse: [] };
  const reader = (name: "grid" | "papaparse"): Contestant => ({
    name,
    time: () => {
      const reading = read(join(folder, "read-csv.mjs"), name, file);
      readings[name].push(reading);
      return reading.seconds / megabytes;
    },
  });
  const contestants = [reader("grid"), reader("papaparse")];
  const python = ["python3", "/usr/bin/python3"].find(
    (one) => spawnSync(one, ["-c", "import pandas"]).status === 0,
  );
  if (python !== undefined)
    contestants.push({ name: "pandas", time: () => pandasTime(python, file) / megabytes });
  const timings = await takeTurns(contestants, ROUNDS);
  const [grid, bare, pandas] = timings as [Timing, Timing, Timing | undefined];
  const grid_MB = readings.grid[0]?.grid_MB ?? Number.NaN;
  const above = Math.max(...readings.grid.map(({ peak_MB }) => peak_MB)) - grid_MB;
  const comparisons = [
    slower("CSV into the grid", grid, bare, 1.5),
    atMost("memory above the grid while reading", above, 150, "MB", "", `grid ${figure(grid_MB)} MB`),
  ];
  if (pandas !== undefined) comparisons.push(slower("CSV into the grid", grid, pandas, null));
  return { comparisons, timings };
}

function slower(what: string, ours: Timing, peer: Timing, goal: number | null): Comparison {
  const speed = ({ least, mean }: Timing) => `${figure(1 / least)} MB/s (${figure(1 / mean)})`;
  const ratio = ours.least / peer.least;
  return {
    what,
    ours: speed(ours),
    peer: `${peer.name}: ${speed(peer)}`,
    ratio: `${figure(ratio)} × its time (means: ${figure(ours.mean / peer.mean)})`,
    goal: goal === null ? "" : `at most ${figure(goal)} ×`,
    met: goal === null ? null : ratio <= goal,
  };
}

function read(script: string, way: string, file: string): Reading {
  const { stdout, status } = spawnSync(process.execPath, [script, way, file], { encoding: "utf8" });
  if (status !== 0) throw new Error(`reading by ${way} ended with status ${status}`);
  const reading = JSON.parse(stdout) as Reading;
  if (reading.rows !== TIMES * LATS * LONS) throw new Error(`${way} read ${reading.rows} rows`);
  return reading;
}

function pandasTime(python: string, file: string): number {
  const timed = `import time; s = time.perf_counter(); ${PANDAS}; print(time.perf_counter() - s)`;
  return Number(spawnSync(python, ["-c", timed, file], { encoding: "utf8" }).stdout);
}

function writeField(file: string): void {
  const out = openSync(file, "w");
  writeSync(out, "time,lat,lon,u,v\n");
  for (let t = 0; t < TIMES; t += 1) {
    const time = new Date(Date.UTC(2027, 4, 4, 3 * t)).toISOString().replace(".000", "");
    for (let j = 0; j < LATS; j += 1) {
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
