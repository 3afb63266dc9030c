import { spawnSync } from "node:child_process";
import { describe, expect, test } from "vitest";
import { Pchip } from "../../src/craft/pchip.ts";

/*
 * The same interpolant by SciPy's PchipInterpolator, value and derivative, run here: Debian's package python3-scipy
 * (1.10.1 in Debian 12). Points from a fixed linear congruential sequence, so that every run compares the same curves.
 */

const PROGRAM = `
import json, sys
from scipy.interpolate import PchipInterpolator
out = []
for case in json.load(sys.stdin):
    p = PchipInterpolator(case["x"], case["y"])
    out.append({"value": p(case["at"]).tolist(), "derivative": p.derivative()(case["at"]).tolist()})
json.dump(out, sys.stdout)
`;

interface Case {
  readonly x: number[];
  readonly y: number[];
  readonly at: number[];
}

function pythonWithScipy(): string {
  for (const python of ["/usr/bin/python3", "python3"])
    if (spawnSync(python, ["-c", "import scipy.interpolate"]).status === 0) return python;
  throw new Error("no python3 with SciPy was found; install Debian's package python3-scipy");
}

/** Numerical Recipes' "quick and dirty" generator, section 7.1: the same numbers everywhere. */
function sequence(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (Math.imul(1664525, state) + 1013904223) >>> 0;
    return state / 2 ** 32;
  };
}

function cases(): Case[] {
  const next = sequence(20270504);
  const found: Case[] = [];
  for (let n = 2; n <= 14; n++)
    for (let kind = 0; kind < 8; kind++) {
      const x = [next() * 3];
      const y = [next() * 50];
      while (x.length < n) {
        x.push((x[x.length - 1] as number) + 0.05 + 4 * next() ** 3);
        // Rising, wandering, with flat pieces, and steep.
        const step = [next(), next() - 0.5, next() < 0.3 ? 0 : next() - 0.3, next() ** 6][kind % 4] as number;
        y.push((y[y.length - 1] as number) + 40 * step);
      }
      const first = x[0] as number;
      const last = x[n - 1] as number;
      const at = [...x];
      for (let i = 0; i < 40; i++) at.push(Math.min(last, first + (last - first) * next()));
      found.push({ x, y, at });
    }
  return found;
}

describe("Pchip against SciPy's PchipInterpolator", () => {
  test("agrees in value and derivative on 104 tables of 2 to 14 rows", () => {
    const given = cases();
    const run = spawnSync(pythonWithScipy(), ["-c", PROGRAM], {
      input: JSON.stringify(given),
      encoding: "utf8",
      maxBuffer: 2 ** 26,
    });
    expect(run.stderr).toBe("");
    const truth = JSON.parse(run.stdout) as { value: number[]; derivative: number[] }[];
    expect(truth).toHaveLength(given.length);
    given.forEach(({ x, y, at }, k) => {
      const ours = new Pchip(x, y);
      const size = Math.max(...y.map(Math.abs));
      const steep = Math.max(
        ...y
          .slice(1)
          .map((v, i) => Math.abs(v - (y[i] as number)) / ((x[i + 1] as number) - (x[i] as number))),
      );
      at.forEach((place, i) => {
        // The same formulas in another order: a few units in the last place of the largest ordinate and secant.
        expect(Math.abs(ours.value(place) - (truth[k]?.value[i] as number))).toBeLessThanOrEqual(
          2e-15 * size,
        );
        expect(Math.abs(ours.derivative(place) - (truth[k]?.derivative[i] as number))).toBeLessThanOrEqual(
          1e-14 * steep,
        );
      });
    });
  });
});
