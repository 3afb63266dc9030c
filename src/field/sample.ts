import { type AxisCell, axisCell, latitudeCell, longitudeCell } from "./axis-cell.ts";
import { type Field, NODE_FILLED, NODE_MISSING, type Tile } from "./field.ts";
import { WeightedNodes } from "./weighted-nodes.ts";

/** A policy or a limit that had a part in a sample, by the name of its finding. */
export type SampleEdge = "gap-filled" | "held-beyond" | "zero-outside" | "height-outside-field";

/** Why a field has no value somewhere, by the name of its finding. */
type NoSampleReason = "outside-area" | "outside-time" | "gap";

export interface FieldSample {
  readonly none: null;
  /** Eastward, m/s, the way the medium moves. */
  readonly u: number;
  /** Northward, m/s. */
  readonly v: number;
  /** Wind gust speed, m/s; `null` where the field has none or a node that counts here lacks it. */
  readonly gust: number | null;
  /** Whether the value rests on given nodes alone. A height outside the levels counts as covered. */
  readonly covered: boolean;
  readonly edges: readonly SampleEdge[];
}

export interface NoSample {
  readonly none: NoSampleReason;
}

/**
 * The field at a place and time: linear in longitude, latitude, height and time between the nodes' u and v. Beyond 85° of
 * latitude each node's vector is first turned into the point's own east and north. A node whose weight is zero is not used.
 *
 * @param lat degrees, north positive
 * @param lon degrees, east positive, of any turn
 * @param height m above the surface; `null` is the lowest level. Outside the levels the nearest one holds.
 * @param time ms since 1970-01-01T00:00Z
 * @returns the value, or the reason why there is none; of tiles that overlap the earliest in the list that has the time, and
 * where none has it the earliest that holds beyond its last
 *
 * @example
 * const lon = Float64Array.of(-5, -4);
 * const lat = Float64Array.of(50, 51);
 * const slices = [Float64Array.of(0, 0, 4, 0, 0, 0, 4, 0)];
 * const tile = { files: [], lon, lat, height: null, times: null, slices, gusts: null, masks: [null], global: false, beyond: "stop" };
 * const field = { role: "wind", tiles: [tile], outside: "stop" };
 * sampleField(field, 50.5, -4.75, null, 0).u // → 1
 */
export function sampleField(
  field: Field,
  lat: number,
  lon: number,
  height: number | null,
  time: number,
): FieldSample | NoSample {
  const choice = tileAt(field, lat, lon, time);
  if (typeof choice === "string") {
    if (choice !== "outside-area" || field.outside !== "zero") return { none: choice };
    return { none: null, u: 0, v: 0, gust: null, covered: false, edges: ["zero-outside"] };
  }
  return sampleTile(choice, lat, lon, height, time);
}

/**
 * The tile that holds at a place and time: the first whose area has the place and whose times have the time (a steady one
 * has every time), or else the first whose area has the place and that holds beyond its last time; or the reason why there
 * is none.
 */
function tileAt(
  field: Field,
  lat: number,
  lon: number,
  time: number,
): Tile | "outside-area" | "outside-time" {
  const tiles = field.tiles.filter((tile) => isInArea(tile, lat, lon));
  if (tiles.length === 0) return "outside-area";
  const current = tiles.find((tile) => tile.times === null || axisCell(tile.times, time) !== null);
  return current ?? tiles.find((tile) => holdsAt(tile, time)) ?? "outside-time";
}

function isInArea(tile: Tile, lat: number, lon: number): boolean {
  return latitudeCell(tile.lat, lat) !== null && longitudeCell(tile.lon, lon) !== null;
}

function holdsAt(tile: Tile, time: number): boolean {
  return (
    tile.beyond === "hold" && tile.times !== null && time > (tile.times[tile.times.length - 1] as number)
  );
}

function sampleTile(
  tile: Tile,
  lat: number,
  lon: number,
  height: number | null,
  time: number,
): FieldSample | NoSample {
  const edges: SampleEdge[] = [];
  const latCell = latitudeCell(tile.lat, lat) as AxisCell;
  const lonCell = longitudeCell(tile.lon, lon) as AxisCell;
  const levelCell = cellOfLevel(tile, height, edges);
  const timeCell = cellOfTime(tile, time, edges);
  const sum = new WeightedNodes();
  sum.sum(tile, { time: timeCell, level: levelCell, lat: latCell, lon: lonCell }, lat, lon);
  if (sum.worst === NODE_MISSING) return { none: "gap" };
  if (sum.worst === NODE_FILLED) edges.push("gap-filled");
  const covered = !edges.includes("gap-filled") && !edges.includes("held-beyond");
  return { none: null, u: sum.u, v: sum.v, gust: Number.isNaN(sum.gust) ? null : sum.gust, covered, edges };
}

/** The cell of a height, and an edge where it is outside the levels. */
export function cellOfLevel(tile: Tile, height: number | null, edges: SampleEdge[]): AxisCell {
  if (tile.height === null || height === null) return { index: 0, weight: 0 };
  const cell = axisCell(tile.height, height);
  if (cell !== null) return cell;
  edges.push("height-outside-field");
  return { index: height < (tile.height[0] as number) ? 0 : tile.height.length - 1, weight: 0 };
}

/** The cell of a time that the tile has or holds, and an edge where it is held. */
export function cellOfTime(tile: Tile, time: number, edges: SampleEdge[]): AxisCell {
  if (tile.times === null) return { index: 0, weight: 0 };
  const cell = axisCell(tile.times, time);
  if (cell !== null) return cell;
  edges.push("held-beyond");
  return { index: tile.times.length - 1, weight: 0 };
}
