import { bracketEdge } from "./turn-back-edge.ts";
import type { RouteWalk, Spot } from "./turn-back-walk.ts";

/** Where a figure is zero is found to this, m or, in a stay, s. */
const FINE = 1e-6;
/** Where a figure ceases to be known is found to this, likewise. */
const COARSE = 1;

/**
 * Both sides of where a figure ceases to have its sign, or to be known, on the way from one spot to its neighbour.
 *
 * @param figure known at `a`, and at `b` of the other sign or not known
 * @param enough see {@link bracketEdge}
 */
export function spotsAtEdge(
  walk: RouteWalk,
  a: Spot,
  b: Spot,
  figure: (spot: Spot) => number | null,
  enough?: number,
): { readonly inside: Spot; readonly outside: Spot } {
  const length = walk.span(a, b);
  const met = new Map<number, Spot>([
    [0, a],
    [length, b],
  ]);
  const along = (x: number) => {
    const spot = walk.inside(a, b, x);
    if (spot === null) return null;
    met.set(x, spot);
    return figure(spot);
  };
  const edge = bracketEdge(along, length, figure(a) as number, figure(b), FINE, COARSE, enough);
  return { inside: met.get(edge.inside) ?? a, outside: met.get(edge.outside) ?? b };
}
