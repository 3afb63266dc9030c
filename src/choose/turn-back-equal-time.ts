import { spotsAtEdge } from "./turn-back-between.ts";
import type { Journeys } from "./turn-back-journey.ts";
import type { EqualTimePoint } from "./turn-back-result.ts";
import { pairsOf, timeDifference } from "./turn-back-spots.ts";
import type { RouteWalk, Spot } from "./turn-back-walk.ts";

/**
 * All places, in order along the route, from which two goals are equally far in time: where the difference of the times
 * changes its sign. Where they are equal all along a stretch, its first sampled place.
 */
export function equalTimePoints(
  walk: RouteWalk,
  journeys: Journeys,
  spots: readonly Spot[],
): EqualTimePoint[] {
  return pairsOf(journeys.goals.length)
    .flatMap(([a, b]) => {
      const difference = (spot: Spot) => timeDifference(journeys, a, b, spot);
      return changesOf(walk, spots, difference).map(
        (spot): EqualTimePoint => ({
          between: [a, b],
          place: spot.place,
          time_s: journeys.to(a, spot).time ?? 0,
        }),
      );
    })
    .sort((p, q) => p.place.time_s - q.place.time_s);
}

function changesOf(
  walk: RouteWalk,
  spots: readonly Spot[],
  difference: (spot: Spot) => number | null,
): Spot[] {
  const found: Spot[] = [];
  let before = 0;
  let signed = -1;
  spots.forEach((spot, n) => {
    const value = difference(spot);
    const sign = Math.sign(value ?? 0);
    if (value === null) signed = -1;
    if (sign === 0) return;
    if (signed >= 0 && sign !== before) {
      const from = spots[signed] as Spot;
      const root = signed === n - 1 ? zeroBetween(walk, from, spot, difference) : spots[signed + 1];
      if (root !== undefined && root !== null) found.push(root);
    }
    before = sign;
    signed = n;
  });
  return found;
}

/** The spot between two neighbours where the difference crosses zero; `null` where it is not known there. */
function zeroBetween(
  walk: RouteWalk,
  a: Spot,
  b: Spot,
  difference: (spot: Spot) => number | null,
): Spot | null {
  // Within rounding the difference is 0, and that is near enough.
  const { inside, outside } = spotsAtEdge(walk, a, b, difference, 0);
  const near = Math.abs(difference(inside) as number);
  const far = difference(outside);
  if (near > 0 && far === null) return null;
  return far === null || near <= Math.abs(far) ? inside : outside;
}
