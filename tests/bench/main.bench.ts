import { join } from "node:path";
import type { Comparison, Part } from "./comparison.ts";
import { csvReading } from "./csv-reading.ts";
import { ensembleMemory } from "./ensemble-memory.ts";
import { geodesicSampling } from "./geodesic-sampling.ts";
import { interpolation } from "./interpolation.ts";
import { makeOcean, type Ocean } from "./ocean.ts";
import { pageSize } from "./page-size.ts";
import { pageWindow } from "./page-window.ts";
import { type PythonPeer, startPeer } from "./python-peer.ts";
import { record, verdict } from "./record.ts";
import { startUp } from "./start-up.ts";
import { wholeJob } from "./whole-job.ts";
import { windowThreads } from "./window-threads.ts";

/*
 * Every benchmark in one run. Called by run.mjs as `node main.mjs HERE FOLDER DATE [PART …]`: the folder of the benchmarks, one
 * for what is written on the way, and the day.
 */

const [, , here, folder, date, ...names] = process.argv as [string, string, string, string, string];
const root = join(here, "../..");

/** The field and the peer, once a part wants them. */
let job: { readonly ocean: Ocean; readonly peer: PythonPeer | null } | null = null;

function theJob() {
  if (job !== null) return job;
  const ocean = makeOcean();
  job = { ocean, peer: startPeer(here, folder, ocean.prepared) };
  if (job.peer === null) process.stderr.write("no Python with SciPy: its side is left out\n");
  return job;
}

/** Those that start processes come first: while this one is small, it does not count in their peak of memory. */
const PARTS: Readonly<Record<string, () => Part | Promise<Part>>> = {
  page: () => pageSize(root),
  window: () => pageWindow(root),
  start: () => startUp(root, folder),
  csv: () => csvReading(folder),
  ensemble: () => ensembleMemory(folder),
  workers: () => windowThreads(folder),
  geodesic: () => geodesicSampling(theJob().ocean),
  interpolation: () => interpolation(theJob().ocean, folder, theJob().peer),
  whole: () => wholeJob(theJob().ocean, theJob().peer),
};

const chosen = names.length === 0 ? Object.keys(PARTS) : names;
const parts: Part[] = [];
for (const name of chosen) {
  const run = PARTS[name];
  if (run === undefined)
    throw new Error(`${name} is no part of the benchmarks: ${Object.keys(PARTS).join(", ")}`);
  const part = await run();
  for (const comparison of part.comparisons) show(comparison);
  parts.push(part);
}
closePeer();
if (names.length === 0) {
  const all = { comparisons: parts.flatMap((p) => p.comparisons), timings: parts.flatMap((p) => p.timings) };
  record(here, date, all);
}

function closePeer(): void {
  job?.peer?.close();
}

function show({ what, ours, peer, ratio, goal, met }: Comparison): void {
  const lines = [
    ["ours", ours],
    ["peer", peer],
    ["ratio", ratio],
    ["goal", goal],
    ["met", verdict(met)],
  ]
    .filter(([, text]) => text !== "")
    .map(([label, text]) => `  ${label?.padEnd(6)}${text}\n`);
  process.stdout.write(`${what}\n${lines.join("")}`);
}
