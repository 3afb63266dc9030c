/** A function along an interval; `null` where it has no value. */
export type Along = (x: number) => number | null;

/** Both sides of an edge. */
export interface Edge {
  readonly inside: number;
  readonly outside: number;
}

const MOST_STEPS = 100;

/**
 * Brackets the place where a function ceases to have the sign (0 counts as positive) that it has at 0, between 0 and `length`: where it
 * crosses zero, to `fine`; where it has no value any more, to `coarse`. Inverse quadratic steps where they are safe, else
 * bisection (Chandrupatla, Advances in Engineering Software 28 (1997) 145-149), held off both ends by the tolerance so that
 * the bracket closes from both sides.
 *
 * @param atStart value at 0
 * @param atEnd value at `length`: of the other sign, or `null`
 * @param enough a value of at most this size ends the search: `inside` is then that place
 * @returns the last place found with the sign of `atStart`, and the first one without
 *
 * @example
 * bracketEdge((x) => 2 - x * x, 2, 2, -2, 1e-6, 1).inside.toFixed(5) // → "1.41421"
 */
export function bracketEdge(
  f: Along,
  length: number,
  atStart: number,
  atEnd: number | null,
  fine: number,
  coarse: number,
  enough = -1,
): Edge {
  const isInside = (value: number | null) => value !== null && value >= 0 === atStart >= 0;
  // The newest end, the other, and the one before.
  let x1 = 0;
  let f1: number | null = atStart;
  let x2 = length;
  let f2 = atEnd;
  let share = chord(atStart, atEnd);
  for (let step = 0; step < MOST_STEPS; step += 1) {
    const width = Math.abs(x2 - x1);
    const least = (f1 === null || f2 === null ? coarse : fine) / width;
    if (least >= 1) break;
    const hold = Math.min(0.5, least / 2);
    const x = x1 + Math.min(1 - hold, Math.max(hold, share)) * (x2 - x1);
    if (x === x1 || x === x2) break;
    const value = f(x);
    if (value !== null && Math.abs(value) <= enough) return { inside: x, outside: isInside(f1) ? x2 : x1 };
    let x3 = x1;
    let f3 = f1;
    if (isInside(value) !== isInside(f1)) {
      x3 = x2;
      f3 = f2;
      x2 = x1;
      f2 = f1;
    }
    x1 = x;
    f1 = value;
    share = quadratic(x1, f1, x2, f2, x3, f3);
  }
  return isInside(f1) ? { inside: x1, outside: x2 } : { inside: x2, outside: x1 };
}

function chord(a: number, b: number | null): number {
  return b === null || a === b ? 0.5 : a / (a - b);
}

/** The next step as a share of the bracket, counted from its newest end. */
function quadratic(
  x1: number,
  f1: number | null,
  x2: number,
  f2: number | null,
  x3: number,
  f3: number | null,
): number {
  if (f1 === null || f2 === null || f3 === null) return 0.5;
  const xi = (x1 - x2) / (x3 - x2);
  const phi = (f1 - f2) / (f3 - f2);
  if (!(phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi)) return 0.5;
  const share =
    (f1 / (f2 - f1)) * (f3 / (f2 - f3)) + ((x3 - x1) / (x2 - x1)) * (f1 / (f3 - f1)) * (f2 / (f3 - f2));
  return Number.isFinite(share) ? share : 0.5;
}
