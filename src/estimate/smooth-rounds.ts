import { PAIR } from "./smooth-pair.ts";
import { type Lanes, makeLanes } from "./smooth-step.ts";

/** Those that go over a panel in several steps: index j in the round, `who` in the fleet. */
export interface Rounds {
  readonly who: Int32Array;
  /** Metres from the leg's start: where the next step begins and ends, and at most. */
  readonly place: Float64Array;
  readonly to: Float64Array;
  readonly limit: Float64Array;
  /** How long the next step may be, m. */
  readonly longest: Float64Array;
  readonly tries: Int32Array;
  /** 1 where the step is being cut at a valid time. */
  readonly cutting: Uint8Array;
  readonly lanes: Lanes;
  readonly parts: Float64Array;
}

export function makeRounds(count: number): Rounds {
  return {
    who: new Int32Array(count),
    place: new Float64Array(count),
    to: new Float64Array(count),
    limit: new Float64Array(count),
    longest: new Float64Array(count),
    tries: new Int32Array(count),
    cutting: new Uint8Array(count),
    lanes: makeLanes(count),
    parts: new Float64Array(count * PAIR),
  };
}

/** Moves what is known of one from index `from` to index `at`. */
export function move(
  { who, place, to, limit, longest, tries, cutting }: Rounds,
  from: number,
  at: number,
): void {
  who[at] = who[from] as number;
  place[at] = place[from] as number;
  to[at] = to[from] as number;
  limit[at] = limit[from] as number;
  longest[at] = longest[from] as number;
  tries[at] = tries[from] as number;
  cutting[at] = cutting[from] as number;
}
