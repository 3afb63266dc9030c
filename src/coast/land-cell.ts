import { booleanPointInPolygon, lineIntersect, lineString, multiLineString, multiPolygon } from "@turf/turf";
import type { Feature, Position as LonLat, MultiPolygon } from "geojson";
import type { Land } from "./land.ts";

/** The land of one cell, a polygon for each that reaches into it; `null` where it is all sea. */
export function cellShape(land: Land, cell: number): Feature<MultiPolygon> | null {
  const first = land.ringRange[2 * cell] ?? 0;
  const end = land.ringRange[2 * cell + 1] ?? 0;
  if (first === end) return null;
  const polygons: LonLat[][][] = [];
  for (let ring = first; ring < end; ring++) {
    const closed = closedRing(land, ring);
    const same = ring > first && land.ringPolygon[ring] === land.ringPolygon[ring - 1];
    if (same) polygons.at(-1)?.push(closed);
    else polygons.push([closed]);
  }
  return multiPolygon(polygons);
}

function closedRing(land: Land, ring: number): LonLat[] {
  const start = land.ringStart[ring] ?? 0;
  const end = land.ringStart[ring + 1] ?? 0;
  const positions: LonLat[] = [];
  for (let i = start; i < end; i += 2) positions.push([land.xy[i] ?? 0, land.xy[i + 1] ?? 0]);
  positions.push([land.xy[start] ?? 0, land.xy[start + 1] ?? 0]);
  return positions;
}

/**
 * Whether a position, in the cell's own turn of longitude, is on the land of its cell. On a ring is on land: where the data
 * cuts land at the antimeridian, two rings share that edge.
 */
export function onCellLand(shape: Feature<MultiPolygon>, position: LonLat): boolean {
  return booleanPointInPolygon(position, shape);
}

/**
 * Shares 0..1 of the straight line between two positions at which it meets the rings of a cell, ascending.
 * Only the rings' edges that reach into the line's own box are handed to the search for intersections.
 */
export function coastCuts(land: Land, cell: number, from: LonLat, to: LonLat): number[] {
  const [x0 = 0, y0 = 0] = from;
  const [x1 = 0, y1 = 0] = to;
  if (x0 === x1 && y0 === y1) return [];
  const edges: LonLat[][] = [];
  const end = land.ringRange[2 * cell + 1] ?? 0;
  for (let ring = land.ringRange[2 * cell] ?? 0; ring < end; ring++)
    addEdgesNear(land, ring, from, to, edges);
  if (edges.length === 0) return [];
  const met = lineIntersect(lineString([from, to]), multiLineString(edges));
  const alongLongitude = Math.abs(x1 - x0) > Math.abs(y1 - y0);
  return met.features
    .map(({ geometry }) => {
      const [x = 0, y = 0] = geometry.coordinates;
      return alongLongitude ? (x - x0) / (x1 - x0) : (y - y0) / (y1 - y0);
    })
    .sort((a, b) => a - b);
}

function addEdgesNear(land: Land, ring: number, from: LonLat, to: LonLat, edges: LonLat[][]): void {
  const { xy } = land;
  const [west, east] = ascending(from[0] ?? 0, to[0] ?? 0);
  const [south, north] = ascending(from[1] ?? 0, to[1] ?? 0);
  const start = land.ringStart[ring] ?? 0;
  const end = land.ringStart[ring + 1] ?? 0;
  let ax = xy[end - 2] ?? 0;
  let ay = xy[end - 1] ?? 0;
  for (let i = start; i < end; i += 2) {
    const bx = xy[i] ?? 0;
    const by = xy[i + 1] ?? 0;
    const reachesIn =
      (ax >= west || bx >= west) &&
      (ax <= east || bx <= east) &&
      (ay >= south || by >= south) &&
      (ay <= north || by <= north);
    if (reachesIn)
      edges.push([
        [ax, ay],
        [bx, by],
      ]);
    ax = bx;
    ay = by;
  }
}

function ascending(a: number, b: number): [number, number] {
  return a < b ? [a, b] : [b, a];
}
