import { spawnSync } from "node:child_process";
import { join } from "node:path";
import { type Comparison, figure, type Part, spread } from "./comparison.ts";
import { median, type Timing } from "./timing.ts";

const GOAL = 1.5;
const MS = [1e-3, "ms"] as const;

/** The job's window of 240 departures of 5 routes, filled by two threads and by one. */
export function windowThreads(folder: string): Part {
  const { stdout, stderr, status } = spawnSync(process.execPath, [join(folder, "window-threads.mjs")], {
    encoding: "utf8",
  });
  if (status !== 0) throw new Error(`the window on threads ended with status ${status}: ${stderr}`);
  const timings = JSON.parse(stdout) as [Timing, Timing];
  const [one, two] = timings;
  const ratio = one.least / two.least;
  const comparison: Comparison = {
    what: "a window of 1,200 cells on two threads",
    ours: spread(two, MS),
    peer: `one thread: ${spread(one, MS)}`,
    ratio: `${figure(ratio)} × as fast (medians: ${figure(median(one) / median(two))})`,
    goal: `at least ${figure(GOAL)} ×`,
    met: ratio >= GOAL,
  };
  return { comparisons: [comparison], timings };
}
