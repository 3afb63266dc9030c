import type { BeyondPolicy, Field, FieldRole, GapPolicy, OutsidePolicy, Tile } from "./field.ts";
import { applyGapPolicy } from "./gaps.ts";
import type { GridFile } from "./grid-file.ts";

/** Axis values nearer than this are the same: degrees of latitude and longitude, and m of height. */
const SAME_VALUE = 1e-9;

/** A file's grid with the policies that the plan gives it. */
export interface FieldSource {
  readonly grid: GridFile;
  readonly gaps: GapPolicy;
  readonly beyond: BeyondPolicy;
  readonly outside: OutsidePolicy;
}

/**
 * Makes a role's files one field. Timed files with the same latitudes, longitudes and heights are joined along time into
 * one tile, at the place of the first of them; times of a later file within the first and last of an earlier one are left
 * out. Every other file is a tile of its own. Nothing is copied: the grids' slices are taken over, with gaps filled in place.
 *
 * `beyond` of a joined tile is that of the file with its last time; `outside` is `zero` where any file says so.
 *
 * @example
 * const lon = Float64Array.of(-5, -4);
 * const lat = Float64Array.of(50);
 * const nodes = { lon, lat, height: null, times: null, slices: [Float64Array.of(3, 4, 0, 0)], gusts: null, masks: [Uint8Array.of(0, 2)] };
 * const grid = { file: "wind.csv", role: "wind", ...nodes, global: false, ignoredColumns: [], notes: [], bytes: 0 };
 * mergeField("wind", [{ grid, gaps: "zero", beyond: "stop", outside: "stop" }]).tiles.length // → 1
 */
export function mergeField(role: FieldRole, sources: readonly FieldSource[]): Field {
  return { role, tiles: joinedFiles(sources).map(({ tile }) => tile), outside: outsideOf(sources) };
}

/** Files that are joined into one tile, in the order of the list. */
export interface JoinedFiles {
  readonly tile: Tile;
  readonly group: readonly FieldSource[];
  /** Those of which some valid time is in the tile. */
  readonly used: ReadonlySet<FieldSource>;
}

/** The tiles of a role's files: see {@link mergeField}. */
export function joinedFiles(sources: readonly FieldSource[]): JoinedFiles[] {
  const groups: FieldSource[][] = [];
  for (const source of sources) {
    const group = groups.find(([first]) => areJoined((first as FieldSource).grid, source.grid));
    if (group === undefined) groups.push([source]);
    else group.push(source);
  }
  return groups.map(joined);
}

/** What holds outside all tiles of a role's files. */
export function outsideOf(sources: readonly FieldSource[]): OutsidePolicy {
  return sources.some((source) => source.outside === "zero") ? "zero" : "stop";
}

function areJoined(a: GridFile, b: GridFile): boolean {
  if (a.times === null || b.times === null) return false;
  return sameAxis(a.lon, b.lon) && sameAxis(a.lat, b.lat) && sameAxis(a.height, b.height);
}

function sameAxis(a: Float64Array | null, b: Float64Array | null): boolean {
  if (a === null || b === null) return a === b;
  return (
    a.length === b.length && a.every((value, index) => Math.abs(value - (b[index] as number)) <= SAME_VALUE)
  );
}

/** A slice of a file and where it came from. */
interface DatedSlice {
  readonly time: number;
  readonly source: FieldSource;
  readonly values: Float64Array;
  readonly gusts: Float64Array | null;
  readonly mask: Uint8Array | null;
}

function joined(group: readonly FieldSource[]): JoinedFiles {
  const first = group[0] as FieldSource;
  const slices = datedSlices(group);
  const last = slices.at(-1) as DatedSlice;
  const used = new Set(slices.map((slice) => slice.source));
  const { lon, lat, height, global } = first.grid;
  const tile: Tile = {
    files: group.filter((source) => used.has(source)).map((source) => source.grid.file),
    lon,
    lat,
    height,
    times: first.grid.times === null ? null : Float64Array.from(slices, (slice) => slice.time),
    slices: slices.map((slice) => slice.values),
    gusts: gustsOf(slices),
    masks: slices.map((slice) => slice.mask),
    global,
    beyond: last.source.beyond,
  };
  return { tile, group, used };
}

/** The slices of files that are joined, in order of time; those that an earlier file's times span are left out. */
function datedSlices(group: readonly FieldSource[]): DatedSlice[] {
  const slices: DatedSlice[] = [];
  const spans: (readonly [from: number, to: number])[] = [];
  for (const source of group) {
    const grid = applyGapPolicy(source.grid, source.gaps);
    const times = grid.times ?? Float64Array.of(0);
    for (const [index, time] of times.entries()) {
      if (spans.some(([from, to]) => time >= from && time <= to)) continue;
      const values = grid.slices[index] as Float64Array;
      slices.push({
        time,
        source,
        values,
        gusts: grid.gusts?.[index] ?? null,
        mask: grid.masks[index] ?? null,
      });
    }
    spans.push([times[0] as number, times[times.length - 1] as number]);
  }
  return slices.sort((a, b) => a.time - b.time);
}

/** Gusts of every slice, missing ones in the slices of files without gusts; `null` where no file has them. */
function gustsOf(slices: readonly DatedSlice[]): Float64Array[] | null {
  if (slices.every((slice) => slice.gusts === null)) return null;
  const none = new Float64Array((slices[0] as DatedSlice).values.length / 2).fill(Number.NaN);
  return slices.map((slice) => slice.gusts ?? none);
}
