import type { DecidedRoute } from "../core.ts";

/** Standard deviations from the middle to the 10 % and 90 % quantiles of a normal distribution (R: qnorm(0.9)). */
const DEVIATIONS = 1.281552;

/** What is left with 10 % and 90 % probability, store units. */
export interface Between {
  readonly low: number;
  readonly high: number;
}

/** The same at a place on a ribbon's axis. */
export interface LeftBetween extends Between {
  readonly at: number;
}

/** What is left at the end of every leg under the stated forecast error; `null` where that is not known. */
export function errorBetween({ spread, legs }: DecidedRoute): readonly (Between | null)[] {
  return (spread?.legs ?? []).map(({ remaining }, leg) => {
    const left = legs[leg]?.remaining ?? null;
    const half = DEVIATIONS * remaining;
    return left === null ? null : { low: left - half, high: left + half };
  });
}

/** The same among an ensemble's members; the two sources of spread are never mixed. */
export function membersBetween({ ensemble }: DecidedRoute): readonly (Between | null)[] {
  return (ensemble?.legs ?? []).map(({ remaining }) =>
    remaining === null ? null : { low: remaining.p10, high: remaining.p90 },
  );
}

/** Places on the axis from the start on, as far as the spread is known. @param ends of the legs, the start's before them */
export function alongAxis(
  { usable }: DecidedRoute,
  ends: readonly number[],
  legs: readonly (Between | null)[],
): LeftBetween[] {
  if (legs.length === 0) return [];
  const found: LeftBetween[] = [{ at: ends[0] ?? 0, low: usable, high: usable }];
  for (const [leg, between] of legs.entries()) {
    const at = ends[leg + 1];
    if (between === null || at === undefined) break;
    found.push({ at, ...between });
  }
  return found;
}

/** On arrival; `null` where the route does not arrive so. */
export function onArrival(route: DecidedRoute, legs: readonly (Between | null)[]): Between | null {
  return legs.length === route.legs.length ? (legs.at(-1) ?? null) : null;
}
