/** Steps of a computation, so that a caller may pause or drop it between two; what it returns is the answer. */
export type Steps<Answer> = Generator<void, Answer, undefined>;

/**
 * Runs a computation to its end.
 *
 * @example
 * function* half(n) { yield; return n / 2; }
 * runSteps(half(6)) // → 3
 */
export function runSteps<Answer>(steps: Steps<Answer>): Answer {
  for (;;) {
    const { done, value } = steps.next();
    if (done === true) return value;
  }
}
