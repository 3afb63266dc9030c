import type { Land } from "./land-cells.ts";
import { type LandStretch, landCrossings, type PathPoint } from "./land-crossings.ts";

/** Answers for one coast: the stretches of a leg over land. An estimate is handed one, and knows nothing of coasts itself. */
export type LandFinder = (points: readonly PathPoint[]) => readonly LandStretch[];

/**
 * The finder of a prepared land, see {@link landCrossings}.
 *
 * @example
 * landFinder(prepareLand({ type: "Topology", arcs: [[[10, -9], [20, -9], [20, 9], [10, 9], [10, -9]]], objects: { land: { type: "Polygon", arcs: [[0]] } } }))([{ s: 0, lat: 1, lon: 9 }, { s: 4000, lat: 1, lon: 13 }]) // → [{ from_m: 1000, to_m: 4000 }]
 */
export function landFinder(land: Land): LandFinder {
  return (points) => landCrossings(land, points);
}
