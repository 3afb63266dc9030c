/** Share of the golden section: (√5 - 1)/2. */
const GOLDEN = 0.5 * (Math.sqrt(5) - 1);

/**
 * The whole number from `low` to `high` at which a function with one valley there is least, by the golden section (J. Kiefer,
 * Proc. Amer. Math. Soc. 4, 1953), one call of the function a step; the last few numbers are all tried. Where both trials are infinite the side of `near` is kept.
 *
 * @param near a place, not necessarily whole, near which the function is finite
 * @throws Error where there is no whole number between the two
 */
export function leastWhole(of: (n: number) => number, low: number, near: number, high: number): number {
  if (!(low <= high)) throw new Error(`no whole number from ${low} to ${high}`);
  let a = low;
  let b = high;
  while (b - a > 4) {
    const inner = Math.round(b - GOLDEN * (b - a));
    const outer = Math.max(inner + 1, Math.round(a + GOLDEN * (b - a)));
    const [atInner, atOuter] = [of(inner), of(outer)];
    const isLeft = atInner === atOuter && atInner === Infinity ? near < outer : atInner <= atOuter;
    if (isLeft) b = outer;
    else a = inner;
  }
  let best = a;
  for (let n = a + 1; n <= b; n += 1) if (of(n) < of(best)) best = n;
  return best;
}
