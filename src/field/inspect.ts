import { NODE_GIVEN } from "./field.ts";
import type { GridFile } from "./grid-file.ts";

export interface AxisInspection {
  readonly count: number;
  readonly first: number;
  readonly last: number;
  /** Least and greatest step between neighbours; equal where the spacing is regular. `null` where there is one value. */
  readonly step: { readonly min: number; readonly max: number; readonly regular: boolean } | null;
}

export interface RangeInspection {
  readonly min: number;
  readonly max: number;
}

/** What a field file holds, in SI units and degrees, as plain data for JSON. */
export interface FieldInspection {
  readonly file: string;
  readonly role: GridFile["role"];
  /** Degrees; a global grid's first meridian is not counted again at the end. */
  readonly longitude: AxisInspection;
  /** Degrees. */
  readonly latitude: AxisInspection;
  /** m above the surface. */
  readonly height: AxisInspection | null;
  /** Whether the longitudes close around the globe. */
  readonly global: boolean;
  /** ISO 8601 in UTC, and the steps in s; `null` where the field is steady. */
  readonly time:
    | (Omit<AxisInspection, "first" | "last"> & { readonly first: string; readonly last: string })
    | null;
  /** Numbers of the members of an ensemble, ascending; left out where the file has no column of them. */
  readonly members?: readonly number[];
  /** Nodes over all members, times and levels, and those of them without a vector. */
  readonly nodes: number;
  readonly missing: number;
  /** Share of the nodes with a vector, 0..1. */
  readonly coverage: number;
  /** Over the nodes with a vector, m/s; `null` where there is none. */
  readonly speed: RangeInspection | null;
  readonly eastward: RangeInspection | null;
  readonly northward: RangeInspection | null;
  readonly gust: RangeInspection | null;
  readonly ignoredColumns: readonly string[];
  readonly notes: readonly string[];
  /** Size of the file, and of its grid in memory. */
  readonly fileBytes: number;
  readonly memoryBytes: number;
}

/** Steps that differ by less than this share are one regular spacing: the digits of a printed axis. */
const REGULAR = 1e-6;

/** Tells what a file's grid holds. To be called before a gap policy fills the grid: filled nodes count as missing too. *
 * @example
 * const lon = Float64Array.of(-5, -4);
 * const lat = Float64Array.of(50);
 * const nodes = { lon, lat, height: null, times: null, slices: [Float64Array.of(3, 4, 0, 0)], gusts: null, masks: [Uint8Array.of(0, 2)] };
 * const grid = { file: "wind.csv", role: "wind", ...nodes, global: false, ignoredColumns: [], notes: [], bytes: 0 };
 * inspectGrid(grid).speed // → { min: 5, max: 5 }
 */
export function inspectGrid(grid: GridFile): FieldInspection {
  const meridians = grid.global ? grid.lon.subarray(0, -1) : grid.lon;
  const { nodes, missing, ranges } = surveyNodes(grid, meridians.length);
  return {
    file: grid.file,
    role: grid.role,
    longitude: axisInspection(meridians),
    latitude: axisInspection(grid.lat),
    height: grid.height === null ? null : axisInspection(grid.height),
    global: grid.global,
    time: grid.times === null ? null : timeInspection(grid.times),
    ...(grid.members === undefined ? {} : { members: grid.members.map(({ member }) => member) }),
    nodes,
    missing,
    coverage: (nodes - missing) / nodes,
    speed: ranges.speed.found,
    eastward: ranges.eastward.found,
    northward: ranges.northward.found,
    gust: ranges.gust.found,
    ignoredColumns: grid.ignoredColumns,
    notes: grid.notes,
    fileBytes: grid.bytes,
    memoryBytes: memoryOf(grid),
  };
}

function axisInspection(axis: Float64Array): AxisInspection {
  const steps = new Range();
  for (let index = 1; index < axis.length; index++)
    steps.take((axis[index] as number) - (axis[index - 1] as number));
  const found = steps.found;
  const step = found === null ? null : { ...found, regular: found.max - found.min <= REGULAR * found.max };
  return { count: axis.length, first: axis[0] as number, last: axis[axis.length - 1] as number, step };
}

function timeInspection(times: Float64Array): FieldInspection["time"] {
  const { count, first, last, step } = axisInspection(times);
  return {
    count,
    first: new Date(first).toISOString(),
    last: new Date(last).toISOString(),
    step: step === null ? null : { ...step, min: step.min / 1000, max: step.max / 1000 },
  };
}

class Range {
  min = Number.POSITIVE_INFINITY;
  max = Number.NEGATIVE_INFINITY;

  take(value: number): void {
    if (value < this.min) this.min = value;
    if (value > this.max) this.max = value;
  }

  get found(): RangeInspection | null {
    return this.min > this.max ? null : { min: this.min, max: this.max };
  }
}

function surveyNodes(grid: GridFile, meridians: number) {
  const ranges = { speed: new Range(), eastward: new Range(), northward: new Range(), gust: new Range() };
  const columns = grid.lon.length;
  let [nodes, missing] = [0, 0];
  const dated = (grid.members ?? [grid]).flatMap(({ slices, masks, gusts }) =>
    slices.map((values, time) => ({ values, mask: masks[time] ?? null, gusts: gusts?.[time] ?? null })),
  );
  for (const { values, mask, gusts } of dated) {
    for (let node = 0; node < values.length / 2; node++) {
      if (node % columns >= meridians) continue;
      nodes++;
      if (gusts !== null) ranges.gust.take(gusts[node] as number);
      if (mask !== null && mask[node] !== NODE_GIVEN) {
        missing++;
        continue;
      }
      const [u, v] = [values[2 * node] as number, values[2 * node + 1] as number];
      ranges.eastward.take(u);
      ranges.northward.take(v);
      ranges.speed.take(Math.hypot(u, v));
    }
  }
  return { nodes, missing, ranges };
}

function memoryOf(grid: GridFile): number {
  const { lon, lat, height, times } = grid;
  const values = (grid.members ?? [grid]).flatMap(({ slices, gusts, masks }) => [
    ...slices,
    ...(gusts ?? []),
    ...masks,
  ]);
  const arrays = new Set([lon, lat, height, times, ...values]);
  return [...arrays].reduce((bytes, array) => bytes + (array?.byteLength ?? 0), 0);
}
