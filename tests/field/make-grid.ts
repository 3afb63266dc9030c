import { NODE_MISSING } from "../../src/field/field.ts";
import type { GridFile } from "../../src/field/grid-file.ts";

/** A grid by its axes and functions of its nodes; a node whose vector is `null` is missing. */
export function makeGrid(options: {
  readonly lon: readonly number[];
  readonly lat: readonly number[];
  readonly height?: readonly number[];
  readonly times?: readonly number[];
  readonly global?: boolean;
  readonly file?: string;
  readonly at: (lon: number, lat: number, height: number, time: number) => readonly [number, number] | null;
  readonly gust?: (lon: number, lat: number, height: number, time: number) => number;
}): GridFile {
  const { lon, lat, height, times, at, gust } = options;
  const nodes = (height ?? [0]).flatMap((h) => lat.flatMap((j) => lon.map((i) => [i, j, h] as const)));
  const perTime = (times ?? [0]).map((time) => nodes.map(([i, j, h]) => at(i, j, h, time)));
  return {
    file: options.file ?? "field.csv",
    role: "wind",
    lon: Float64Array.from(lon),
    lat: Float64Array.from(lat),
    height: height === undefined ? null : Float64Array.from(height),
    times: times === undefined ? null : Float64Array.from(times),
    slices: perTime.map((vectors) => Float64Array.from(vectors.flatMap((vector) => vector ?? [0, 0]))),
    gusts:
      gust === undefined
        ? null
        : (times ?? [0]).map((time) => Float64Array.from(nodes, ([i, j, h]) => gust(i, j, h, time))),
    masks: perTime.map((vectors) =>
      vectors.includes(null)
        ? Uint8Array.from(vectors, (vector) => (vector === null ? NODE_MISSING : 0))
        : null,
    ),
    global: options.global ?? false,
    ignoredColumns: [],
    notes: [],
    bytes: 0,
  };
}
