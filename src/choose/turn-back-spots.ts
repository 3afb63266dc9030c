import type { PreparedLeg } from "../estimate/prepare.ts";
import type { Journeys } from "./turn-back-journey.ts";
import { isStay, type RouteWalk, type Spot } from "./turn-back-walk.ts";

/*
 * Where the journeys are looked at: at every waypoint (before and after a stay), and between them at no fewer than 60 even
 * places on the whole route; and, where a figure comes so near to zero between two places that it may cross it
 * twice unseen, at places halfway between, up to four times.
 */

const LEAST_PLACES = 60;
const REFINEMENTS = 4;
const MOST_PLACES = 400;

/** Places in order along the walk, close enough together to see every crossing of the figures. */
export function spotsAlong(walk: RouteWalk, journeys: Journeys): Spot[] {
  let spots = evenSpots(walk);
  for (let round = 0; round < REFINEMENTS && spots.length < MOST_PLACES; round += 1) {
    const split = intervalsToSplit(spots, journeys);
    if (split.size === 0) break;
    spots = spots.flatMap((spot, n) => {
      const next = spots[n + 1];
      if (next === undefined || !split.has(n)) return [spot];
      const middle = walk.inside(spot, next, walk.span(spot, next) / 2);
      return middle === null ? [spot] : [spot, middle];
    });
  }
  return spots;
}

function evenSpots(walk: RouteWalk): Spot[] {
  const { end } = walk;
  const spots: Spot[] = [];
  for (let leg = 1; leg <= end.place.leg; leg += 1) {
    const { track } = walk.legs[leg - 1] as PreparedLeg;
    const length = leg === end.place.leg ? end.place.at_m : track.length;
    const count = length === 0 ? 0 : Math.max(2, Math.ceil((LEAST_PLACES * length) / end.place.distance_m));
    const stayed = leg > 1 && (walk.prepared.legs[leg - 2] as PreparedLeg).to.stay_s > 0;
    for (let n = leg === 1 || stayed ? 0 : 1; n <= count; n += 1) {
      const isEnd = leg === end.place.leg && n === count;
      const spot = isEnd ? end : walk.spot(leg, (length * n) / count, spots[spots.length - 1]);
      if (spot !== null) spots.push(spot);
    }
  }
  return spots;
}

/** Indices of the intervals (from spot n to the next) inside which a figure may touch zero and turn back. */
function intervalsToSplit(spots: readonly Spot[], journeys: Journeys): ReadonlySet<number> {
  const split = new Set<number>();
  for (const figure of figuresOf(journeys)) {
    const values = spots.map(figure);
    for (let n = 1; n + 1 < spots.length; n += 1) {
      if (!mayTouchZero(values[n - 1] ?? null, values[n] ?? null, values[n + 1] ?? null)) continue;
      for (const from of [n - 1, n])
        if (!isStay(spots[from] as Spot, spots[from + 1] as Spot)) split.add(from);
    }
  }
  return split;
}

function figuresOf(journeys: Journeys): ((spot: Spot) => number | null)[] {
  const { goals } = journeys;
  const margins = goals.map((_, goal) => (spot: Spot) => journeys.to(goal, spot).margin);
  const differences = pairsOf(goals.length).map(
    ([a, b]) =>
      (spot: Spot) =>
        timeDifference(journeys, a, b, spot),
  );
  return [...margins, ...differences];
}

/** All pairs of the indices below `count`, the smaller first. */
export function pairsOf(count: number): [number, number][] {
  return Array.from({ length: count }, (_, a) => a).flatMap((a) =>
    Array.from({ length: count - a - 1 }, (_, n): [number, number] => [a, a + 1 + n]),
  );
}

/** Time to go to one goal less that to another, s; 0 where they differ by rounding alone; `null` where either is not known. */
export function timeDifference(journeys: Journeys, a: number, b: number, spot: Spot): number | null {
  const first = journeys.to(a, spot).time;
  const second = journeys.to(b, spot).time;
  if (first === null || second === null) return null;
  const difference = first - second;
  // A moment is kept to a quarter of a microsecond, and times to some 1e-12 of themselves.
  return Math.abs(difference) <= 1e-6 + 1e-11 * (first + second) ? 0 : difference;
}

/** Whether values of one sign, least in the middle, may touch zero on either side of it: the two slopes, drawn on as a tent, do. */
function mayTouchZero(before: number | null, here: number | null, after: number | null): boolean {
  if (before === null || here === null || after === null) return false;
  const sign = Math.sign(here);
  const nearest = here * sign;
  const sides = [before * sign, after * sign];
  const bend = (sides[0] as number) + (sides[1] as number) - 2 * nearest;
  return sign !== 0 && sides.every((side) => side >= nearest) && nearest < bend / 2;
}
