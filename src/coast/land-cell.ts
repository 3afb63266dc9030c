import { booleanPointInPolygon, multiPolygon } from "@turf/turf";
import type { Feature, Position as LonLat, MultiPolygon } from "geojson";
import type { Land } from "./land-cells.ts";

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
 * Shares 0..1 of the straight line between two positions at which it meets the rings of a cell, ascending. A line along an edge
 * meets the edges beside that one at its ends.
 */
export function coastCuts(land: Land, cell: number, from: LonLat, to: LonLat): number[] {
  const cuts: number[] = [];
  const end = land.ringRange[2 * cell + 1] ?? 0;
  for (let ring = land.ringRange[2 * cell] ?? 0; ring < end; ring++) addRingCuts(land, ring, from, to, cuts);
  return cuts.sort((a, b) => a - b);
}

function addRingCuts(land: Land, ring: number, from: LonLat, to: LonLat, cuts: number[]): void {
  const { xy } = land;
  const [x0 = 0, y0 = 0] = from;
  const dx = (to[0] ?? 0) - x0;
  const dy = (to[1] ?? 0) - y0;
  const start = land.ringStart[ring] ?? 0;
  const end = land.ringStart[ring + 1] ?? 0;
  // Seen from the line's start, across the line: left of it is positive.
  let ax = (xy[end - 2] ?? 0) - x0;
  let ay = (xy[end - 1] ?? 0) - y0;
  let aSide = dx * ay - dy * ax;
  for (let i = start; i < end; i += 2) {
    const bx = (xy[i] ?? 0) - x0;
    const by = (xy[i + 1] ?? 0) - y0;
    const bSide = dx * by - dy * bx;
    // An edge along the line has both ends on it, at which the edges beside it meet the line.
    if (aSide !== bSide && (aSide <= 0 ? bSide >= 0 : bSide <= 0)) {
      const share = (ax * (by - ay) - ay * (bx - ax)) / (bSide - aSide);
      if (share >= 0 && share <= 1) cuts.push(share);
    }
    ax = bx;
    ay = by;
    aSide = bSide;
  }
}
