import { spawnSync } from "node:child_process";
import { expect, test } from "vitest";
import { mergeField } from "../../src/field/merge.ts";
import { sampleField } from "../../src/field/sample.ts";
import { makeGrid } from "../field/make-grid.ts";
import { between, seeded } from "../seeded.ts";

/** A Python that has SciPy; where there is none, the test fails and says what to install. */
function pythonWithScipy(): string {
  const found = ["/usr/bin/python3", "python3"].find(
    (python) => spawnSync(python, ["-c", "import scipy.interpolate"]).status === 0,
  );
  if (found === undefined) throw new Error("This check needs SciPy: install Debian's python3-scipy.");
  return found;
}

// Multilinear interpolation as scipy.interpolate.RegularGridInterpolator(method="linear") has it (SciPy 1.10 to 1.17 tried).
const SCRIPT = `
import json, sys
import numpy as np
from scipy.interpolate import RegularGridInterpolator
job = json.load(sys.stdin)
axes = [np.array(axis) for axis in job["axes"]]
points = np.array(job["points"])
values = [np.array(component).reshape([len(axis) for axis in axes]) for component in job["values"]]
json.dump([RegularGridInterpolator(axes, component)(points).tolist() for component in values], sys.stdout)
`;

test("4,000 samples of a random timed field on heights are SciPy's", () => {
  const random = seeded(20270504);
  const axis = (from: number, to: number, count: number) => {
    const inner = Array.from({ length: count - 2 }, () => between(random, from, to));
    return [from, ...inner, to].sort((a, b) => a - b);
  };
  const times = axis(0, 86_400_000, 5);
  const height = axis(0, 300, 4);
  const lat = axis(40, 84, 9);
  const lon = axis(-20, 35, 12);
  const wind = new Map<string, readonly [number, number]>();
  const at = (...place: number[]) => {
    const key = place.join();
    const vector = wind.get(key) ?? ([between(random, -20, 20), between(random, -20, 20)] as const);
    wind.set(key, vector);
    return vector;
  };
  const grid = makeGrid({ lon, lat, height, times, at });
  const field = mergeField("wind", [{ grid, gaps: "stop", beyond: "stop", outside: "stop" }]);
  const within = (values: readonly number[]) => between(random, values[0] as number, values.at(-1) as number);
  const points = Array.from(
    { length: 4000 },
    () => [times, height, lat, lon].map(within) as [number, number, number, number],
  );
  const component = (offset: number) =>
    grid.slices.flatMap((slice) => [...slice].filter((_, index) => index % 2 === offset));
  const job = { axes: [times, height, lat, lon], points, values: [component(0), component(1)] };
  const run = spawnSync(pythonWithScipy(), ["-c", SCRIPT], {
    input: JSON.stringify(job),
    encoding: "utf8",
    maxBuffer: 1 << 26,
  });
  expect(run.stderr).toBe("");
  const [east, north] = JSON.parse(run.stdout) as [number[], number[]];
  for (const [index, [time, h, phi, lambda]] of points.entries()) {
    const sample = sampleField(field, phi, lambda, h, time);
    if (sample.none !== null) throw new Error(`no sample at ${points[index]}: ${sample.none}`);
    // Sixteen products of numbers up to 20 in another order: within a few units of 4e-15.
    expect(Math.abs(sample.u - (east[index] as number))).toBeLessThan(3e-14);
    expect(Math.abs(sample.v - (north[index] as number))).toBeLessThan(3e-14);
  }
});
