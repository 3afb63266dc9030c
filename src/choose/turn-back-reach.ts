import { spotsAtEdge } from "./turn-back-between.ts";
import type { Journeys } from "./turn-back-journey.ts";
import type { Reach, ReachStretch, RoutePlace, TurnLimit } from "./turn-back-result.ts";
import type { RouteWalk, Spot } from "./turn-back-walk.ts";

/** Two sides of an edge are no farther apart than this, m or, in a stay, s. */
const EDGE_WIDTH = 1;
/** Most changes looked for between two neighbouring spots. */
const MOST_CHANGES = 8;

/** The route in stretches by what becomes of going to a goal. */
export function reachStretches(
  walk: RouteWalk,
  journeys: Journeys,
  spots: readonly Spot[],
  goal: number,
): ReachStretch[] {
  const reachAt = (spot: Spot) => journeys.to(goal, spot).reach;
  const stretches: ReachStretch[] = [];
  let first = spots[0] as Spot;
  const close = (last: Spot, next: Spot) => {
    stretches.push(stretch(journeys, goal, first, last));
    first = next;
  };
  for (let n = 0; n + 1 < spots.length; n += 1) {
    const b = spots[n + 1] as Spot;
    let a = spots[n] as Spot;
    for (let change = 0; reachAt(a) !== reachAt(b); change += 1) {
      const [last, next] = change < MOST_CHANGES ? edgeOf(walk, journeys, goal, a, b) : [a, b];
      close(last, next);
      a = next;
    }
  }
  close(spots[spots.length - 1] as Spot, first);
  return stretches;
}

function stretch(journeys: Journeys, goal: number, from: Spot, to: Spot): ReachStretch {
  const { reach, stop } = journeys.to(goal, from);
  return { reach, reason: stop, from: from.place, to: to.place };
}

/** Both sides of the first change found on the way from `a` to `b`, whose reach differs. */
function edgeOf(walk: RouteWalk, journeys: Journeys, goal: number, a: Spot, b: Spot): [Spot, Spot] {
  const { reach, margin } = journeys.to(goal, a);
  const figure = (spot: Spot) => {
    const journey = journeys.to(goal, spot);
    return margin === null ? (journey.reach === reach ? 1 : null) : journey.margin;
  };
  const { inside, outside } = spotsAtEdge(walk, a, b, figure);
  return [inside, outside];
}

/** How far along the route a goal is reachable, from its stretches. */
export function turnLimit(goal: number, stretches: readonly ReachStretch[]): TurnLimit {
  const index = stretches.map(({ reach }) => reach).lastIndexOf("reachable");
  const unknown = stretches.find(({ reach }, n) => n > index && reach === "unknown");
  return {
    goal,
    last: stretches[index]?.to ?? null,
    beyond: notReachable(stretches[index + 1]?.reach),
    notKnownFrom: unknown?.from ?? null,
    reason: unknown?.reason ?? null,
  };
}

/** How far along the route any one of some goals is reachable, from the limits and stretches of each. */
export function anyLimit(
  limits: readonly TurnLimit[],
  stretches: readonly (readonly ReachStretch[])[],
): TurnLimit {
  const furthest = limits.reduce((best, limit) =>
    (limit.last?.time_s ?? -1) > (best.last?.time_s ?? -1) ? limit : best,
  );
  const { last } = furthest;
  const time = last?.time_s ?? -1;
  const unknown = stretches
    .flat()
    .filter(({ reach, to }) => reach === "unknown" && to.time_s > time)
    .sort((a, b) => a.from.time_s - b.from.time_s)[0];
  const isAtOnce = unknown !== undefined && unknown.from.time_s <= time;
  return {
    goal: null,
    last,
    beyond: isAtOnce && furthest.beyond !== null ? "unknown" : furthest.beyond,
    notKnownFrom: isAtOnce ? last : (unknown?.from ?? null),
    reason: unknown?.reason ?? null,
  };
}

function notReachable(reach: Reach | undefined): TurnLimit["beyond"] {
  return reach === undefined || reach === "reachable" ? null : reach;
}

/** Where no goal at all is reachable, or that is not known of some while none is known to be. */
export function nowhereStretches(stretches: readonly (readonly ReachStretch[])[]): ReachStretch[] {
  const places = stretches
    .flatMap((all) => all.flatMap(({ from, to }) => [from, to]))
    .sort((a, b) => a.time_s - b.time_s);
  const whole: ReachStretch[] = [];
  for (let n = 0; n + 1 < places.length; n += 1) {
    const from = places[n] as RoutePlace;
    const to = places[n + 1] as RoutePlace;
    if (to.time_s <= from.time_s) continue;
    const here = reachOfAll(stretches, (from.time_s + to.time_s) / 2);
    if (here !== null) append(whole, { reach: here, reason: null, from, to });
  }
  return whole.filter(({ from, to }) => !isSliver(from, to));
}

/** `null` where a goal is reachable, else `unknown` if any is, else `short`. */
function reachOfAll(stretches: readonly (readonly ReachStretch[])[], time: number): Reach | null {
  const all = stretches.map((own) => {
    // Between two stretches is the width to which their edge was found.
    const holding = own.filter(({ from }) => from.time_s <= time).at(-1);
    return holding?.reach ?? "unknown";
  });
  if (all.includes("reachable")) return null;
  return all.includes("unknown") ? "unknown" : "short";
}

function append(whole: ReachStretch[], next: ReachStretch): void {
  const last = whole[whole.length - 1];
  if (last !== undefined && last.reach === next.reach && last.to.time_s >= next.from.time_s)
    whole[whole.length - 1] = { ...last, to: next.to };
  else whole.push(next);
}

/** Between the two sides of one edge. */
function isSliver(from: RoutePlace, to: RoutePlace): boolean {
  const width = from.distance_m === to.distance_m ? to.time_s - from.time_s : to.distance_m - from.distance_m;
  return width <= EDGE_WIDTH;
}
