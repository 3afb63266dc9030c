/** A function of one variable whose root is sought. */
export interface Residual {
  residual(x: number): number;
}

const MAX_STEPS = 200;

/**
 * Root of a residual between two places where it has different signs, to a few units in the last place. Inverse quadratic
 * steps where they are safe, else bisection: Chandrupatla, Advances in Engineering Software 28 (1997) 145-149. Where
 * the residual jumps through zero it finds the jump. Allocates nothing.
 *
 * @param scale size of x below which digits do not matter; the bracket shrinks to ε (|x| + ε · scale)
 */
export function findRoot(
  of: Residual,
  low: number,
  atLow: number,
  high: number,
  atHigh: number,
  scale: number,
): number {
  if (atLow === 0) return low;
  if (atHigh === 0) return high;
  // x1 is the newest end, x2 the other, x3 the one before; the first step is the chord's.
  let x1 = low;
  let f1 = atLow;
  let x2 = high;
  let f2 = atHigh;
  let t = atLow / (atLow - atHigh);
  for (let step = 0; step < MAX_STEPS; step++) {
    const tolerance = Number.EPSILON * (Math.min(Math.abs(x1), Math.abs(x2)) + Number.EPSILON * scale);
    const share = tolerance / Math.abs(x2 - x1);
    if (share >= 0.5) break;
    let x = x1 + Math.min(1 - share, Math.max(share, t)) * (x2 - x1);
    if (x === x1 || x === x2) x = 0.5 * (x1 + x2);
    if (x === x1 || x === x2) break;
    const f = of.residual(x);
    if (f === 0) return x;
    let x3 = x1;
    let f3 = f1;
    if (f > 0 !== f1 > 0) {
      x3 = x2;
      f3 = f2;
      x2 = x1;
      f2 = f1;
    }
    x1 = x;
    f1 = f;
    const xi = (x1 - x2) / (x3 - x2);
    const phi = (f1 - f2) / (f3 - f2);
    const safe = phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi;
    t = safe
      ? (f1 / (f2 - f1)) * (f3 / (f2 - f3)) + ((x3 - x1) / (x2 - x1)) * (f1 / (f3 - f1)) * (f2 / (f3 - f2))
      : 0.5;
  }
  return Math.abs(f1) < Math.abs(f2) ? x1 : x2;
}
