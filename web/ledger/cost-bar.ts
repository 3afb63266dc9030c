import type { RouteEstimate } from "../core.ts";

type CostKind = "still" | "gain" | "along" | "cross";

/** A part of a route's stacked bar, from and to in seconds. `gain` is what a following flow took off the still part. */
export interface CostPart {
  readonly kind: CostKind;
  readonly from: number;
  readonly to: number;
}

/**
 * The time of a route as it adds up: still, then along, then cross. A following flow is drawn as the end of the still part that it
 * saved, so that the solid bar always ends at the time under way and stayed.
 */
export function costBar({ totals }: RouteEstimate): CostPart[] {
  const still = totals.still.time_s;
  const along = totals.penalty?.alongTime_s ?? null;
  const cross = totals.penalty?.crossTime_s ?? null;
  if (along === null || cross === null) return [{ kind: "still", from: 0, to: still }];
  const cost = Math.max(along, 0) + Math.max(cross, 0);
  const gain = Math.max(-along, 0) + Math.max(-cross, 0);
  const solid = Math.max(still - gain, 0);
  const parts: CostPart[] = [
    { kind: "still", from: 0, to: solid },
    { kind: "along", from: solid, to: solid + Math.max(along, 0) },
    { kind: "cross", from: solid + Math.max(along, 0), to: solid + cost },
    { kind: "gain", from: solid + cost, to: solid + cost + gain },
  ];
  return parts.filter(({ from, to }) => to > from);
}

/** The longest bar's end, s: the common scale of all bars. */
export function barsEnd(routes: readonly (RouteEstimate | null)[]): number {
  return Math.max(
    1,
    ...routes.flatMap((route) => (route === null ? [] : costBar(route).map(({ to }) => to))),
  );
}
