import { bracketEdge } from "./turn-back-edge.ts";
import type { Journeys } from "./turn-back-journey.ts";
import { FINE } from "./turn-back-reach.ts";
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
  const length = walk.span(a, b);
  const found = new Map<number, Spot>([
    [0, a],
    [length, b],
  ]);
  const at = (x: number) => {
    const spot = walk.inside(a, b, x);
    if (spot === null) return null;
    found.set(x, spot);
    return difference(spot);
  };
  const start = difference(a) as number;
  // Within rounding the difference is 0, and that is near enough.
  const { inside, outside } = bracketEdge(at, length, start, difference(b), FINE, FINE, 0);
  const sides = [inside, outside].map((x) => found.get(x) as Spot);
  const sizes = sides.map((spot) => Math.abs(difference(spot) ?? Number.POSITIVE_INFINITY));
  const [near = 0, far = 0] = sizes;
  const isJump = near > 0 && !Number.isFinite(near + far);
  return isJump ? null : ((near <= far ? sides[0] : sides[1]) as Spot);
}
