/**
 * A seeded generator of pseudo-random numbers for tests, so that a failing case can be had again: mulberry32 (Tommy
 * Ettinger, public domain; from memory), a 32-bit counter with a mixing step. Its period is 2^32 and it is not for
 * cryptography. Each number is built from two outputs, so that all 53 bits of the fraction vary.
 *
 * @returns a function that yields the next number, 0 <= x < 1
 */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let mixed = Math.imul(state ^ (state >>> 15), state | 1);
    mixed ^= mixed + Math.imul(mixed ^ (mixed >>> 7), mixed | 61);
    return (mixed ^ (mixed >>> 14)) >>> 0;
  };
  return () => ((next() >>> 5) * 2 ** 26 + (next() >>> 6)) / 2 ** 53;
}

/** A number in from..to (the upper end left out) from a generator. */
export function between(random: () => number, from: number, to: number): number {
  return from + (to - from) * random();
}
