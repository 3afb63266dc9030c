import { spawnSync } from "node:child_process";

/**
 * Runs a peer program on lines of input and returns its answers as rows of numbers.
 *
 * @throws Error with one sentence that names the Debian package, if the program is not installed
 */
export function runPeer(
  program: string,
  debianPackage: string,
  options: string[],
  lines: string[],
): number[][] {
  const run = spawnSync(program, options, {
    input: `${lines.join("\n")}\n`,
    encoding: "utf8",
    maxBuffer: 2 ** 28,
  });
  if (run.error !== undefined && "code" in run.error && run.error.code === "ENOENT") {
    throw new Error(`${program} is not installed: this check needs the Debian package ${debianPackage}.`);
  }
  if (run.status !== 0) throw new Error(`${program} ended with status ${run.status}: ${run.stderr}`);
  return run.stdout
    .trim()
    .split("\n")
    .map((row) => row.trim().split(/\s+/).map(Number));
}
