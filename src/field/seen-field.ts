import type { Field, FieldRole, Tile } from "./field.ts";
import { type FieldSource, type JoinedFiles, joinedFiles, outsideOf } from "./merge.ts";

/** Ends of axes nearer than this are the same, degrees. */
const SAME_END_DEG = 1e-9;

/** A file of which nothing is used, and the earlier ones that hold wherever and whenever it has data. */
interface HiddenSource {
  readonly source: FieldSource;
  readonly by: readonly FieldSource[];
}

/** The field that a role's files make, without the tiles that an earlier one hides. */
export interface SeenField {
  readonly field: Field;
  readonly hidden: readonly HiddenSource[];
}

/**
 * As `mergeField`, without what never holds: a tile whose area and times an earlier tile covers.
 *
 * @example
 * const axes = { lon: Float64Array.of(-5, -4), lat: Float64Array.of(50, 51), height: null, times: null };
 * const values = { slices: [new Float64Array(8)], gusts: null, masks: [null], global: false };
 * const grid = (file) => ({ file, role: "wind", ...axes, ...values, ignoredColumns: [], notes: [], bytes: 0 });
 * const source = (file) => ({ grid: grid(file), gaps: "stop", beyond: "stop", outside: "stop" });
 * seenField("wind", [source("a.csv"), source("b.csv")]).hidden.map(({ source }) => source.grid.file) // → ["b.csv"]
 */
export function seenField(role: FieldRole, sources: readonly FieldSource[]): SeenField {
  const seen: JoinedFiles[] = [];
  const hidden: HiddenSource[] = [];
  for (const own of joinedFiles(sources)) {
    const cover = seen.find(({ tile }) => covers(tile, own.tile));
    if (cover === undefined) {
      seen.push(own);
      hidden.push(...leftOut(own));
    } else hidden.push(...own.group.map((source) => ({ source, by: [...cover.used] })));
  }
  return { field: { role, tiles: seen.map(({ tile }) => tile), outside: outsideOf(sources) }, hidden };
}

/** The files of a joined tile that add no time to it, with those whose spans hold their times. */
function leftOut({ group, used }: JoinedFiles): HiddenSource[] {
  return group.flatMap((source, place) => {
    if (used.has(source)) return [];
    const own = source.grid.times ?? [];
    const by = group.slice(0, place).filter((earlier) => {
      const [from, to] = endsOf(earlier.grid.times ?? new Float64Array(1));
      return used.has(earlier) && own.some((time) => time >= from && time <= to);
    });
    return [{ source, by }];
  });
}

/** Whether a tile holds wherever and whenever a later one has data. Heights play no part in which tile holds. */
function covers(earlier: Tile, later: Tile): boolean {
  return coversTimes(earlier, later) && coversArea(earlier, later);
}

function coversTimes(earlier: Tile, later: Tile): boolean {
  if (earlier.times === null) return true;
  if (later.times === null) return false;
  const [from, to] = endsOf(earlier.times);
  const [laterFrom, laterTo] = endsOf(later.times);
  const heldAlone = later.beyond === "hold" && earlier.beyond !== "hold";
  return from <= laterFrom && laterTo <= to && !heldAlone;
}

function coversArea(earlier: Tile, later: Tile): boolean {
  const [south, north] = endsOf(earlier.lat);
  const [laterSouth, laterNorth] = endsOf(later.lat);
  if (laterSouth < south - SAME_END_DEG || laterNorth > north + SAME_END_DEG) return false;
  const [west, east] = endsOf(earlier.lon);
  const [laterWest, laterEast] = endsOf(later.lon);
  const turn = 360 * Math.ceil((west - SAME_END_DEG - laterWest) / 360);
  return earlier.global || laterEast + turn <= east + SAME_END_DEG;
}

function endsOf(axis: Float64Array): readonly [first: number, last: number] {
  return [axis[0] as number, axis[axis.length - 1] as number];
}
