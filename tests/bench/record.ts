import { readFileSync, writeFileSync } from "node:fs";
import { cpus, platform } from "node:os";
import { join } from "node:path";
import type { Comparison, Part } from "./comparison.ts";

const BEGIN = "<!-- results: written by npm run bench -->";
const END = "<!-- end of results -->";

/** Keeps a run: everything in results.json, the ratios in the README. Absolute times depend on the machine and its other work. */
export function record(here: string, date: string, part: Part): void {
  const machine = `${cpus().length} × ${cpus()[0]?.model ?? "unknown"}, ${platform()}, Node ${process.version}`;
  const { comparisons, timings } = part;
  writeFileSync(
    join(here, "results.json"),
    `${JSON.stringify({ date, machine, comparisons, timings_s: timings.map(rounded) }, null, 1)}\n`,
  );
  const file = join(here, "README.md");
  const text = readFileSync(file, "utf8");
  const [before, after] = [text.indexOf(BEGIN), text.indexOf(END)];
  if (before < 0 || after < before) throw new Error(`${file} has no section for results`);
  const section = `${BEGIN}\n${date}, ${machine}\n\n${markdown(comparisons)}\n`;
  writeFileSync(file, text.slice(0, before) + section + text.slice(after));
}

function rounded<T extends { readonly raw: readonly number[] }>(timing: T): T {
  return { ...timing, raw: timing.raw.map((seconds) => Number(seconds.toPrecision(4))) };
}

/** A table as the formatter lays it out: every column as wide as its widest cell. */
function markdown(comparisons: readonly Comparison[]): string {
  const rows = comparisons.map(({ what, peer, ratio, goal, met }) => [
    what,
    peer.split(":")[0] ?? "",
    ratio,
    goal,
    verdict(met),
  ]);
  const head = ["what", "peer", "ratio", "goal", "met"];
  const widths = head.map((_, column) => Math.max(...[head, ...rows].map((row) => row[column]?.length ?? 0)));
  const line = (cells: readonly string[]) =>
    `| ${cells.map((cell, column) => cell.padEnd(widths[column] ?? 0)).join(" | ")} |`;
  return [line(head), line(widths.map((width) => "-".repeat(width))), ...rows.map(line)].join("\n");
}

/** Whether a goal is met, in a word. */
export function verdict(met: boolean | null): string {
  if (met === null) return "";
  return met ? "yes" : "no";
}
