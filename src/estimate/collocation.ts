import { FIRST_NODE, INTEGRAL_TO_STATION, LAST_NODE, STATIONS } from "./gauss-kronrod.ts";

const NODES = 9;

/** The collocation matrix without the columns and the row of the stations that are no nodes: rows of nine for stations 1 to 10. */
const ROWS = Float64Array.from({ length: (STATIONS - FIRST_NODE) * NODES }, (_, n) => {
  const row = FIRST_NODE + Math.floor(n / NODES);
  return INTEGRAL_TO_STATION[row * STATIONS + FIRST_NODE + (n % NODES)] as number;
});

/**
 * Puts the integral of the slowness 1/g (s/m) from the step's start up to each station into `elapsed` (s).
 *
 * The nine products are written out: this is the innermost sum of an estimate, and as a loop it takes twice as long.
 *
 * @param half half the step's length, m
 * @returns the largest change of an elapsed time, s
 */
export function integrateTimes(elapsed: Float64Array, slowness: Float64Array, half: number): number {
  const f1 = slowness[FIRST_NODE] as number;
  const f2 = slowness[FIRST_NODE + 1] as number;
  const f3 = slowness[FIRST_NODE + 2] as number;
  const f4 = slowness[FIRST_NODE + 3] as number;
  const f5 = slowness[FIRST_NODE + 4] as number;
  const f6 = slowness[FIRST_NODE + 5] as number;
  const f7 = slowness[FIRST_NODE + 6] as number;
  const f8 = slowness[FIRST_NODE + 7] as number;
  const f9 = slowness[LAST_NODE] as number;
  let largest = 0;
  for (let i = FIRST_NODE, k = 0; i < STATIONS; i += 1, k += NODES) {
    const sum =
      (ROWS[k] as number) * f1 +
      (ROWS[k + 1] as number) * f2 +
      (ROWS[k + 2] as number) * f3 +
      (ROWS[k + 3] as number) * f4 +
      (ROWS[k + 4] as number) * f5 +
      (ROWS[k + 5] as number) * f6 +
      (ROWS[k + 6] as number) * f7 +
      (ROWS[k + 7] as number) * f8 +
      (ROWS[k + 8] as number) * f9;
    const time = half * sum;
    const moved = Math.abs(time - (elapsed[i] as number));
    if (moved > largest) largest = moved;
    elapsed[i] = time;
  }
  return largest;
}
