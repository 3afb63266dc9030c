import type { Position as LonLat } from "geojson";
import type { Land } from "./land-cells.ts";

/** Whether a cell has any land at all. */
export function hasLand(land: Land, cell: number): boolean {
  return (land.ringRange[2 * cell] ?? 0) < (land.ringRange[2 * cell + 1] ?? 0);
}

/**
 * Whether a position, in the cell's own turn of longitude, is on the land of its cell: within one polygon at least, by the
 * even-odd rule over that polygon's rings. On a ring is on land: where the data cuts land at the antimeridian, two rings share
 * that edge.
 */
export function onCellLand(land: Land, cell: number, position: LonLat): boolean {
  const end = land.ringRange[2 * cell + 1] ?? 0;
  let inside = false;
  for (let ring = land.ringRange[2 * cell] ?? 0; ring < end; ring++) {
    const side = ringSide(land, ring, position);
    if (side === "on") return true;
    if (side === "inside") inside = !inside;
    const isLastOfPolygon = ring + 1 === end || land.ringPolygon[ring + 1] !== land.ringPolygon[ring];
    if (isLastOfPolygon && inside) return true;
  }
  return false;
}

/** Where a position lies to a ring: a ray from it to the east meets the edges of the ring an odd number of times from inside. */
function ringSide(land: Land, ring: number, [x = 0, y = 0]: LonLat): "on" | "inside" | "outside" {
  const { xy } = land;
  const start = land.ringStart[ring] ?? 0;
  const end = land.ringStart[ring + 1] ?? 0;
  let isInside = false;
  // Seen from the position.
  let ax = (xy[end - 2] ?? 0) - x;
  let ay = (xy[end - 1] ?? 0) - y;
  for (let i = start; i < end; i += 2) {
    const bx = (xy[i] ?? 0) - x;
    const by = (xy[i + 1] ?? 0) - y;
    const turn = ax * by - ay * bx;
    if (turn === 0 && ax * bx <= 0 && ay * by <= 0) return "on";
    // An end at the position's own latitude counts as above it, so that a corner is met once or twice.
    if (ay < 0 !== by < 0 && turn > 0 === by > ay) isInside = !isInside;
    ax = bx;
    ay = by;
  }
  return isInside ? "inside" : "outside";
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
