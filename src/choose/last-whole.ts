/**
 * The last whole number from `open` up at which something holds that holds at `open` and not at `shut`, by halving: one such number where
 * it ceases and begins again in between.
 */
export function lastWhole(holds: (n: number) => boolean, open: number, shut: number): number {
  let [low, high] = [open, shut];
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (holds(middle)) low = middle;
    else high = middle;
  }
  return low;
}
