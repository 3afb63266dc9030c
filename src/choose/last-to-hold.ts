import type { Steps } from "./steps.ts";

/**
 * Halves between a place that holds and one that does not, above or below it, until they are as close as a share of the place; the one
 * that holds.
 */
export function* lastToHold(
  holds: (x: number) => Steps<boolean>,
  open: number,
  shut: number,
  closeness: number,
): Steps<number> {
  let [held, lost] = [open, shut];
  while (Math.abs(lost - held) > closeness * Math.abs(held)) {
    const middle = 0.5 * (held + lost);
    if (yield* holds(middle)) held = middle;
    else lost = middle;
    yield;
  }
  return held;
}
