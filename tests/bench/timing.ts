/** One way of doing a piece of work; `time` does a round of it and returns seconds a unit. */
export interface Contestant {
  readonly name: string;
  readonly time: () => number | Promise<number>;
}

/** Seconds a unit, over the rounds that count. */
export interface Timing {
  readonly name: string;
  readonly least: number;
  readonly mean: number;
  readonly deviation: number;
  readonly raw: readonly number[];
}

/** Rounds of all contestants in turn, so that what disturbs the machine disturbs them alike; the first rounds do not count. */
export async function takeTurns(
  contestants: readonly Contestant[],
  rounds: number,
  warmUps = 1,
): Promise<Timing[]> {
  const raw: number[][] = contestants.map(() => []);
  for (let round = -warmUps; round < rounds; round += 1) {
    for (const [index, contestant] of contestants.entries()) {
      const seconds = await contestant.time();
      if (round >= 0) raw[index]?.push(seconds);
    }
  }
  return contestants.map(({ name }, index) => summary(name, raw[index] as number[]));
}

/** The rounds of a contestant as one timing. */
export function summary(name: string, raw: readonly number[]): Timing {
  const mean = raw.reduce((sum, value) => sum + value, 0) / raw.length;
  const deviation = Math.sqrt(raw.reduce((sum, value) => sum + (value - mean) ** 2, 0) / raw.length);
  return { name, least: Math.min(...raw), mean, deviation, raw };
}

/** The middle of a contestant's rounds, seconds a unit. */
export function median({ raw }: Timing): number {
  const sorted = [...raw].sort((a, b) => a - b);
  const middle = sorted.length / 2;
  return ((sorted[Math.ceil(middle) - 1] as number) + (sorted[Math.floor(middle)] as number)) / 2;
}

/**
 * Work in this process: `work` does `units` of it and returns a figure that depends on all of them.
 *
 * @throws Error where that figure is not finite, so that no result goes unused
 */
export function inProcess(name: string, units: number, work: () => number): Contestant {
  return {
    name,
    time: () => {
      const start = performance.now();
      const figure = work();
      const seconds = (performance.now() - start) / 1000;
      if (!Number.isFinite(figure)) throw new Error(`${name} gave ${figure}`);
      return seconds / units;
    },
  };
}
