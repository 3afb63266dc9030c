import { spawnSync } from "node:child_process";
import { closeSync, openSync, rmSync, writeSync } from "node:fs";
import { join } from "node:path";
import { atMost, figure, type Part } from "./comparison.ts";

const [MEMBERS, TIMES, LATS, LONS] = [50, 10, 100, 100];
const ROUNDS = 3;
/** Two numbers of eight bytes a node. */
const GRID_MB = (16 * MEMBERS * TIMES * LATS * LONS) / 1e6;

/** A route across the whole of the fields, of ten legs. */
const PLAN = JSON.stringify({
  format: "legwork-plan/1",
  departure: "2027-05-04T00:30:00Z",
  craft: {
    name: "Airship",
    moves: "air",
    speed: "40 m/s",
    power: { model: "constant", rate: "100 kW" },
    store: { capacity: "5000 kWh" },
  },
  reserve: "10 %",
  fields: [{ role: "wind", file: "members.csv" }],
  routes: [
    {
      name: "Across",
      waypoints: Array.from({ length: 11 }, (_, n) => ({
        name: `W${n}`,
        lat: 36 + 2.2 * n,
        lon: -29 + 1.1 * n + (n % 2),
      })),
    },
  ],
});

/** What one estimate in a process of its own says of itself. */
interface Run {
  readonly peak_MB: number;
  readonly members: number;
  readonly arrived: number;
}

/** An ensemble of 50 members, 5 million rows in one file, read and estimated: the peak of memory above that of its grids. */
export function ensembleMemory(folder: string): Part {
  const file = join(folder, "members.csv");
  writeMembers(file);
  const runs = Array.from({ length: ROUNDS }, () => run(join(folder, "ensemble.mjs"), file));
  rmSync(file);
  const above = Math.max(...runs.map(({ peak_MB }) => peak_MB)) - GRID_MB;
  const what = `memory above the grids, ${MEMBERS} members read and estimated`;
  const grids = `grids ${figure(GRID_MB)} MB`;
  return { comparisons: [atMost(what, above, 150, "MB", "", grids)], timings: [] };
}

function run(script: string, file: string): Run {
  const { stdout, stderr, status } = spawnSync(process.execPath, [script, PLAN, file], { encoding: "utf8" });
  if (status !== 0) throw new Error(`the ensemble ended with status ${status}: ${stderr}`);
  const found = JSON.parse(stdout) as Run;
  if (found.members !== MEMBERS || found.arrived !== MEMBERS)
    throw new Error(`${found.arrived} of ${found.members} members arrived, not all of ${MEMBERS}`);
  return found;
}

function writeMembers(file: string): void {
  const out = openSync(file, "w");
  writeSync(out, "member,time,lat,lon,u,v\n");
  for (let member = 0; member < MEMBERS; member += 1) {
    for (let t = 0; t < TIMES; t += 1) {
      const time = new Date(Date.UTC(2027, 4, 4, 6 * t)).toISOString().replace(".000", "");
      for (let j = 0; j < LATS; j += 1) {
        const head = `${member},${time},${(35 + j / 4).toFixed(2)}`;
        const row = (i: number) => {
          const [u, v] = [8 * Math.sin(0.37 * i + j + t + member), 8 * Math.cos(0.21 * i - j + t - member)];
          return `${head},${(i / 4 - 30).toFixed(2)},${u.toFixed(3)},${v.toFixed(3)}\n`;
        };
        writeSync(out, Array.from({ length: LONS }, (_, i) => row(i)).join(""));
      }
    }
  }
  closeSync(out);
}
