import { spawnSync } from "node:child_process";
import { existsSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { atMost, figure, type Part, spread } from "./comparison.ts";
import { type Contestant, type Timing, takeTurns } from "./timing.ts";

const ROUNDS = 25;
const MS = [1e-3, "ms"] as const;

/** The built command, by the side of an empty Node process. */
export async function startUp(root: string, folder: string): Promise<Part> {
  const command = join(root, "dist/cli.js");
  if (!existsSync(command)) throw new Error("dist/cli.js is missing: run npm run build first");
  const empty = join(folder, "empty.mjs");
  writeFileSync(empty, "");
  const timings = await takeTurns(
    [
      nodeProcess("legwork --version", [command, "--version"]),
      nodeProcess("legwork --help", [command, "--help"]),
      nodeProcess("empty process", [empty]),
    ],
    ROUNDS,
    2,
  );
  const [version, help, nothing] = timings as [Timing, Timing, Timing];
  const comparison = (ours: Timing) =>
    atMost(
      `start of the command (${ours.name})`,
      ours.least / nothing.least,
      1.3,
      "×",
      `${nothing.name}: ${spread(nothing, MS)}`,
      `${figure(ours.least / nothing.least)} × (means: ${figure(ours.mean / nothing.mean)})`,
    );
  return { comparisons: [comparison(version), comparison(help)], timings };
}

function nodeProcess(name: string, args: readonly string[]): Contestant {
  return {
    name,
    time: () => {
      const start = performance.now();
      const { status } = spawnSync(process.execPath, args, { stdio: "pipe" });
      if (status !== 0) throw new Error(`${name} ended with status ${status}`);
      return (performance.now() - start) / 1000;
    },
  };
}
