import { spawnSync } from "node:child_process";
import { fileURLToPath } from "node:url";

/** Modules that the Python programs of this folder import, with the Debian package that brings each. */
const MODULES = [
  ["scipy.integrate", "python3-scipy"],
  ["pyproj", "python3-pyproj"],
] as const;

/**
 * Runs a Python program of this folder on a value written as JSON and returns the value that it writes.
 *
 * @throws Error with one sentence that names the Debian package, if Python or a module is not installed
 */
export function runPython(program: string, input: unknown): unknown {
  const python = pythonWith(MODULES);
  const path = fileURLToPath(new URL(program, import.meta.url));
  const run = spawnSync(python, [path], {
    input: JSON.stringify(input),
    encoding: "utf8",
    maxBuffer: 2 ** 28,
    // One thread: the arrays are small, and the other tests run beside this one.
    env: { ...process.env, OMP_NUM_THREADS: "1", OPENBLAS_NUM_THREADS: "1" },
  });
  if (run.status !== 0) throw new Error(`${program} ended with status ${run.status}: ${run.stderr}`);
  return JSON.parse(run.stdout);
}

/**
 * The first python3 that has these modules.
 *
 * @param modules each with the Debian package that brings it
 * @throws Error with one sentence that names the packages, if there is none
 */
export function pythonWith(modules: readonly (readonly [module: string, debianPackage: string])[]): string {
  const missing = new Set<string>();
  for (const python of ["/usr/bin/python3", "python3"]) {
    const lacking = modules.filter(([module]) => spawnSync(python, ["-c", `import ${module}`]).status !== 0);
    if (lacking.length === 0) return python;
    for (const [, debianPackage] of lacking) missing.add(debianPackage);
  }
  const names = [...missing].join(" and ");
  throw new Error(`no python3 has what this check needs: install Debian's ${names}.`);
}
