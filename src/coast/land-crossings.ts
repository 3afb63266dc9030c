import type { Feature, Position as LonLat, MultiPolygon } from "geojson";
import type { Position } from "../geodesy/track.ts";
import { cellShape, coastCuts, onCellLand } from "./land-cell.ts";
import { CELL, cellAt, type Land, SOUTH, WEST } from "./land-cells.ts";

/** A place on a leg: `s` metres from its start, longitude continuous along the leg. */
export interface PathPoint extends Position {
  readonly s: number;
}

/** A stretch of a leg over land, m from the leg's start. */
export interface LandStretch {
  readonly from_m: number;
  readonly to_m: number;
}

/** The line between two neighbouring points of a leg, or a part of it. */
interface Chord {
  readonly a: PathPoint;
  readonly b: PathPoint;
}

/** What is kept along one leg: the shapes of cells already met, and the stretches found so far. */
interface Walk {
  readonly land: Land;
  readonly shapes: Map<number, Feature<MultiPolygon> | null>;
  readonly stretches: { from_m: number; to_m: number }[];
}

/** Metres that join two stretches: only the cutting into cells took them apart. */
const JOINED = 1e-3;

/** Share of a chord below which two cuts are one: some micrometres on a chord across an ocean. */
const SAME_CUT = 1e-12;

/**
 * Whether a position is on land.
 *
 * @param position latitude and longitude in degrees, any turn
 *
 * @example
 * isOnLand(prepareLand({ type: "Topology", arcs: [[[10, -9], [20, -9], [20, 9], [10, 9], [10, -9]]], objects: { land: { type: "Polygon", arcs: [[0]] } } }), { lat: 1, lon: 375 }) // → true
 */
export function isOnLand(land: Land, { lat, lon }: Position): boolean {
  const column = Math.floor((lon - WEST) / CELL);
  const shape = cellShape(land, cellAt(column, Math.floor((lat - SOUTH) / CELL)));
  return shape !== null && onCellLand(shape, [lon - turnOf(column), lat]);
}

/**
 * The stretches of a leg that lie over land, in order, as a coarse hint: see `prepareLand` on the coast's accuracy. A leg
 * that starts or ends in a harbour commonly starts or ends on the coarse land; it is reported like any other stretch.
 *
 * @param points the leg as a line straight in longitude and latitude between neighbours, ascending in `s`, within about
 *   50 m of the track (`densify` makes it); `s` is taken as linear between them
 *
 * @example
 * landCrossings(prepareLand({ type: "Topology", arcs: [[[10, -9], [20, -9], [20, 9], [10, 9], [10, -9]]], objects: { land: { type: "Polygon", arcs: [[0]] } } }), [{ s: 0, lat: 1, lon: 9 }, { s: 4000, lat: 1, lon: 13 }]) // → [{ from_m: 1000, to_m: 4000 }]
 */
export function landCrossings(land: Land, points: readonly PathPoint[]): LandStretch[] {
  const walk: Walk = { land, shapes: new Map(), stretches: [] };
  for (let i = 1; i < points.length; i++) {
    const chord: Chord = { a: points[i - 1] as PathPoint, b: points[i] as PathPoint };
    const shares = cellCuts(chord);
    for (let k = 1; k < shares.length; k++) walkPart(walk, chord, shares[k - 1] ?? 0, shares[k] ?? 1);
  }
  return walk.stretches;
}

/** Adds what of a chord between two shares of it, all within one cell, is land. */
function walkPart(walk: Walk, chord: Chord, from: number, to: number): void {
  const middle = alongChord(chord, (from + to) / 2);
  const column = Math.floor((middle.lon - WEST) / CELL);
  const cell = cellAt(column, Math.floor((middle.lat - SOUTH) / CELL));
  const shape = shapeOf(walk, cell);
  if (shape === null) return;
  const turn = turnOf(column);
  const lonLat = (share: number): LonLat => {
    const { lat, lon } = alongChord(chord, share);
    return [lon - turn, lat];
  };
  const cuts = coastCuts(walk.land, cell, lonLat(from), lonLat(to)).map(
    (share) => from + share * (to - from),
  );
  let start = from;
  for (const end of [...cuts, to]) {
    if (end - start <= SAME_CUT) continue;
    if (onCellLand(shape, lonLat((start + end) / 2))) {
      addStretch(walk.stretches, alongChord(chord, start).s, alongChord(chord, end).s);
    }
    start = end;
  }
}

function shapeOf({ land, shapes }: Walk, cell: number): Feature<MultiPolygon> | null {
  let shape = shapes.get(cell);
  if (shape === undefined) {
    shape = cellShape(land, cell);
    shapes.set(cell, shape);
  }
  return shape;
}

function addStretch(stretches: Walk["stretches"], from_m: number, to_m: number): void {
  if (to_m <= from_m) return;
  const last = stretches.at(-1);
  if (last !== undefined && from_m - last.to_m < JOINED) last.to_m = to_m;
  else stretches.push({ from_m, to_m });
}

/** Shares of a chord, from 0 to 1, at which it passes from cell to cell. */
function cellCuts({ a, b }: Chord): number[] {
  const shares = [0, 1, ...gridCuts(a.lon, b.lon, WEST), ...gridCuts(a.lat, b.lat, SOUTH)];
  return shares.sort((x, y) => x - y);
}

function gridCuts(a: number, b: number, origin: number): number[] {
  const first = Math.ceil((Math.min(a, b) - origin) / CELL);
  const last = Math.floor((Math.max(a, b) - origin) / CELL);
  const cuts: number[] = [];
  for (let k = first; k <= last && a !== b; k++) cuts.push((origin + k * CELL - a) / (b - a));
  return cuts;
}

function alongChord({ a, b }: Chord, share: number): PathPoint {
  const between = (x: number, y: number) => (share === 1 ? y : x + (y - x) * share);
  return { s: between(a.s, b.s), lat: between(a.lat, b.lat), lon: between(a.lon, b.lon) };
}

/** Degrees to take from a longitude in a column to bring it into the cells' own turn. */
function turnOf(column: number): number {
  return 360 * Math.floor((column * CELL) / 360);
}
