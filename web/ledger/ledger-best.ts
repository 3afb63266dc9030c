import type { RouteEstimate } from "../core.ts";

/** Which route is best in each column of the ledger; more than one where they tie, none where fewer than two can be compared. */
export interface Best {
  readonly arrival: ReadonlySet<number>;
  readonly use: ReadonlySet<number>;
  readonly remaining: ReadonlySet<number>;
}

/** A route that ends in a stop is never best: its figures say what would happen, not what may be done. */
export function bestOf(routes: readonly (RouteEstimate | null)[]): Best {
  const column = (pick: (route: RouteEstimate) => number | null, sign: 1 | -1): ReadonlySet<number> => {
    const values = routes.map((route) => (route === null || route.status === "stop" ? null : pick(route)));
    const known = values.flatMap((value) => (value === null ? [] : [value * sign]));
    const compared = routes.filter((route) => route !== null && pick(route) !== null).length;
    if (compared < 2 || known.length === 0) return new Set();
    const least = Math.min(...known);
    return new Set(values.flatMap((value, at) => (value !== null && value * sign === least ? [at] : [])));
  };
  return {
    arrival: column((route) => (route.arrival === null ? null : Date.parse(route.arrival)), 1),
    use: column((route) => route.totals.use, 1),
    remaining: column((route) => route.totals.remaining, -1),
  };
}
