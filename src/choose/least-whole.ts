import { isLess } from "./rank.ts";

/** Share of the golden section: (√5 - 1)/2. */
const GOLDEN = 0.5 * (Math.sqrt(5) - 1);

/**
 * The whole number from `low` to `high` at which a function with one valley there is least, by the golden section (J. Kiefer,
 * Proc. Amer. Math. Soc. 4, 1953), one call of the function a step; the last few numbers are all tried. Values that rounding alone
 * may tell apart are equal; of equals the lowest number is sought, and where both trials are equal and above what is at `near`, its side
 * is kept.
 *
 * @param near a place, not necessarily whole, near which the function is finite
 * @throws Error where there is no whole number between the two
 */
export function leastWhole(of: (n: number) => number, low: number, near: number, high: number): number {
  if (!(low <= high)) throw new Error(`no whole number from ${low} to ${high}`);
  const known = Math.min(Math.max(Math.round(near), low), high);
  let a = low;
  let b = high;
  while (b - a > 4) {
    const inner = Math.round(b - GOLDEN * (b - a));
    const outer = Math.max(inner + 1, Math.round(a + GOLDEN * (b - a)));
    const [atInner, atOuter] = [of(inner), of(outer)];
    const isTie = !isLess(atInner, atOuter) && !isLess(atOuter, atInner);
    const isHigh = isTie && (atInner === Infinity || isLess(of(known), atInner));
    if (isHigh ? near < outer : !isLess(atOuter, atInner)) b = outer;
    else a = inner;
  }
  let best = a;
  for (let n = a + 1; n <= b; n += 1) if (isLess(of(n), of(best))) best = n;
  return best;
}
