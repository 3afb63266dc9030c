import type { PreparedRoute } from "../estimate/prepare.ts";
import type { ArrivalAnswer, ArrivalSolution } from "../estimate/result.ts";
import { solutionAt } from "./arrival-solution.ts";
import type { ArrivalTests, ArrivalTestsAt } from "./arrival-tests.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import { type ArrivalSearch, searchArrival } from "./arrive.ts";
import { lastToHold } from "./last-to-hold.ts";
import { type Measure, rootsOf, scan } from "./line-search.ts";
import type { PacelessConditions } from "./speed-trials.ts";
import { runSteps } from "./steps.ts";

/** How near to the latest time a member or what-if arrives at the least speed that is in time, s. */
const ACCURACY = 1e-6;
/** By how much one may be late and still count as in time, s. */
const SLACK = 1e-3;
/** Share of a speed to which the edge of those that hold is found, where it is not one of arriving in time. */
const CLOSENESS = 1e-7;

/** The speeds found for an arrival, and what they were put to the test with. */
export interface FoundArrival {
  /** Its reason is not told yet where the cheapest by the plain estimate does not hold. */
  readonly answer: ArrivalAnswer;
  readonly tests: ArrivalTests | null;
  /** Where no speed was found that holds: the slowest in time in everything, else the fastest. */
  readonly shut: { readonly speed: number; readonly isInTime: boolean } | null;
}

/**
 * The speeds that arrive when they should, as `solveArrival` has them; where there are tests, as {@link heldArrival}.
 *
 * @param testsAt `null` to find them by the plain estimate alone
 */
export function findArrival(
  prepared: PreparedRoute,
  conditions: PacelessConditions,
  wanted: ArrivalWindow,
  testsAt: ArrivalTestsAt | null,
): FoundArrival {
  const found = searchArrival(prepared, conditions, wanted);
  if (testsAt === null) return { answer: found.answer, tests: null, shut: null };
  return heldArrival(found, testsAt(prepared, found.speeds, found.departure));
}

/** A speed at which the plain estimate arrives when it should. */
interface Candidate {
  readonly speed: number;
  readonly use: number;
}

/**
 * The speeds found for a span of times to arrive in, with the cheapest that holds in everything that the plan names: that one is chosen;
 * where none is found, the cheapest by the plain estimate stays so.
 *
 * Search: the arrival falls with the speed in every member and what-if, so that each is in time from one speed on, bracketed and found to
 * a microsecond: the least at which all are, and the probability is that asked for, begins the stretch to choose from. It, the
 * speeds at which the plain estimate was tried and its own solutions are gone down, the cheapest first, to one that holds; where a neighbour
 * is cheaper and does not, the edge between them is halved to a ten-millionth. A stretch between two of them that holds is not seen.
 */
function heldArrival(found: ArrivalSearch, tests: ArrivalTests): FoundArrival {
  const { answer } = found;
  const { solutions, chosen } = answer;
  const plain = chosen === null ? undefined : solutions[chosen];
  const isHeld = plain !== undefined && tests.holds(plain.speed_m_s);
  const unchanged = { ...answer, cheapest: chosen, holds: isHeld };
  if (plain === undefined || isHeld) return { answer: unchanged, tests, shut: null };
  const places = found.uses.flatMap(({ x, value }) => (value === null ? [] : [x]));
  const least = leastInTime(tests, places);
  const speed = least === null ? null : cheapestToHold(found, tests, least, places);
  if (speed !== null) return { answer: withHeld(found, plain, speed), tests, shut: null };
  const shut = { speed: least ?? places[places.length - 1] ?? plain.speed_m_s, isInTime: least !== null };
  return { answer: unchanged, tests, shut };
}

/** With the speed that holds among the solutions, and chosen. */
function withHeld(
  { answer, speeds, departure }: ArrivalSearch,
  plain: ArrivalSolution,
  speed: number,
): ArrivalAnswer {
  const { solutions } = answer;
  const known = solutions.find(({ speed_m_s }) => speed_m_s === speed);
  const held = known ?? solutionAt(speeds, speed, departure);
  const all = known === undefined ? [...solutions, held] : [...solutions];
  all.sort((a, b) => a.speed_m_s - b.speed_m_s);
  return { ...answer, solutions: all, chosen: all.indexOf(held), cheapest: all.indexOf(plain), holds: true };
}

/** The cheapest speed from one on that holds; `null` where none is found. */
function cheapestToHold(
  { answer, speeds }: ArrivalSearch,
  tests: ArrivalTests,
  least: number,
  places: readonly number[],
): number | null {
  const solved = answer.solutions.map(({ speed_m_s }) => speed_m_s);
  const tried = [...new Set([least, ...places, ...solved])].filter((speed) => speed >= least);
  const candidates = tried
    .sort((a, b) => a - b)
    .flatMap((speed): Candidate[] => {
      const use = speeds.use(speed);
      return use === null ? [] : [{ speed, use }];
    });
  const held = byUse(candidates).find(({ speed }) => tests.holds(speed));
  if (held === undefined) return null;
  const at = candidates.indexOf(held);
  const edges = [candidates[at - 1], candidates[at + 1]].flatMap((next): Candidate[] => {
    if (next === undefined || !(next.use < held.use)) return [];
    const speed = edgeOf(tests, held.speed, next.speed);
    return [{ speed, use: speeds.use(speed) ?? Number.POSITIVE_INFINITY }];
  });
  return byUse([held, ...edges])[0]?.speed ?? null;
}

/** In the order of their use, of equals the slower first. */
function byUse(candidates: readonly Candidate[]): Candidate[] {
  return [...candidates].sort((a, b) => a.use - b.use || a.speed - b.speed);
}

/** The edge between a speed that holds and one that does not: first of what stops the latter alone, at one estimate a step. */
function edgeOf(tests: ArrivalTests, held: number, shut: number): number {
  if (tests.holds(shut)) return shut;
  const edge = halved((speed) => !tests.isBrokenAlike(speed), held, shut);
  return tests.holds(edge) ? edge : halved((speed) => tests.holds(speed), held, edge);
}

function halved(holds: (speed: number) => boolean, held: number, shut: number): number {
  // biome-ignore lint/correctness/useYield: one test is one step.
  const steps = function* (speed: number) {
    return holds(speed);
  };
  return runSteps(lastToHold(steps, held, shut, CLOSENESS));
}

/** The least speed in time in everything, from the slowest of some places on; `null` where none is found. */
function leastInTime(tests: ArrivalTests, places: readonly number[]): number | null {
  let least = places[0] ?? null;
  // Who was made in time once stays so at every faster speed.
  for (let round = 0; round <= tests.late.length + 1 && least !== null; round += 1) {
    const worst = latest(tests, least);
    if (worst === null) return least;
    const from: number = least;
    least = firstInTime(worst, [from, ...places.filter((place) => place > from)]);
  }
  return null;
}

/**
 * The measure that is the latest at a speed, one without a value before all; `null` where all are in time. Of the probability, which costs
 * most, only where no other is late.
 */
function latest({ late, lateByChance }: ArrivalTests, speed: number): Measure | null {
  const lateAt = (measure: Measure) => measure(speed) ?? Number.POSITIVE_INFINITY;
  let worst: Measure | null = null;
  let most = SLACK;
  for (const measure of late) {
    const value = lateAt(measure);
    if (value > most) [worst, most] = [measure, value];
  }
  if (worst !== null || lateByChance === null) return worst;
  // It is looked for a little early as it is, so that a probability has no slack.
  return lateAt(lateByChance) > ACCURACY ? lateByChance : null;
}

/** The first speed from the slowest of some places on at which a measure is in time: between both ends, else between each two. */
function firstInTime(measure: Measure, places: readonly number[]): number | null {
  const [slowest, fastest] = [places[0], places[places.length - 1]];
  if (slowest === undefined || fastest === undefined) return null;
  const ends = [slowest, fastest].map((x) => ({ x, value: measure(x) }));
  const [root] = rootsOf(measure, ends, ACCURACY);
  if (root !== undefined) return root;
  if ((measure(fastest) ?? 0) > ACCURACY) return null;
  const samples = scan(measure, places);
  const at = samples.findIndex(({ value }) => value !== null && value <= ACCURACY);
  const first = samples[at];
  if (first === undefined) return null;
  const before = samples[at - 1];
  return (before && rootsOf(measure, [before, first], ACCURACY)[0]) ?? first.x;
}
