import type { Conditions } from "../estimate/conditions.ts";
import type { PreparedRoute } from "../estimate/prepare.ts";
import type { Profile } from "../estimate/result.ts";
import { type CellNode, type CellSize, NODE_SHARES, type TrackCell } from "./cell.ts";
import { type FieldRates, fieldRates, STILL } from "./field-rates.ts";
import { type LegMotion, legMotion } from "./leg-motion.ts";
import { COMPONENTS, localSensitivity, makeLocalSensitivity } from "./local-sensitivity.ts";
import { stayCells } from "./stay-cells.ts";

/** Step of the route's own estimate, between two samples of its profile. */
interface ProfileStep {
  readonly leg: number;
  readonly from: number;
  readonly to: number;
  /** Time and slowness (s/m) at both ends. */
  readonly start: number;
  readonly end: number;
  readonly slownessFrom: number;
  readonly slownessTo: number;
}

/**
 * Cuts a route that arrives into cells, none longer than `size` and none across a kink of a field, and finds what holds in them.
 *
 * @param profile of the route's estimate under these conditions
 * @returns `null` where a pace or a field has no value beside one of the points (a track along a grid's very edge)
 */
export function trackCells(
  prepared: PreparedRoute,
  conditions: Conditions,
  profile: Profile,
  size: CellSize,
): TrackCell[] | null {
  const cells: TrackCell[] = [];
  let legStart = 0;
  let sample = 0;
  for (const [index, leg] of prepared.legs.entries()) {
    const motion = legMotion(leg, conditions);
    const number = index + 1;
    let arrived = 0;
    for (; sample < profile.leg.length && profile.leg[sample] === number; sample += 1) {
      const step = profileStep(profile, sample, legStart);
      if (step === null) continue;
      arrived = step.end;
      if (!addCells(cells, motion, step, conditions.departure, size)) return null;
    }
    const stay = stayCells(motion, number, conditions, arrived, size);
    if (stay === null) return null;
    cells.push(...stay);
    legStart += leg.track.length;
  }
  return cells;
}

/** The step that ends at a sample; `null` where the sample starts a leg or ends a stay. */
function profileStep(profile: Profile, n: number, legStart: number): ProfileStep | null {
  if (n === 0 || profile.leg[n - 1] !== profile.leg[n]) return null;
  const value = (list: Float64Array, at: number) => list[at] as number;
  const from = value(profile.distance_m, n - 1) - legStart;
  const to = value(profile.distance_m, n) - legStart;
  if (!(to > from)) return null;
  return {
    leg: profile.leg[n] as number,
    from,
    to,
    start: value(profile.time_s, n - 1),
    end: value(profile.time_s, n),
    slownessFrom: 1 / value(profile.groundSpeed_m_s, n - 1),
    slownessTo: 1 / value(profile.groundSpeed_m_s, n),
  };
}

function addCells(
  cells: TrackCell[],
  motion: LegMotion,
  step: ProfileStep,
  departure: number,
  size: CellSize,
): boolean {
  const length = step.to - step.from;
  const count = Math.ceil(length / size.length_m + (step.end - step.start) / size.time_s);
  const cut = length / count;
  for (let n = 0; n < count; n += 1) {
    const from = step.from + n * cut;
    const to = n + 1 === count ? step.to : from + cut;
    const nodes: CellNode[] = [];
    for (const share of NODE_SHARES) {
      const s = from + share * (to - from);
      const node = nodeAt(motion, s, departure + 1000 * timeAt(step, s));
      if (node === null) return false;
      nodes.push(node);
    }
    const middle = (from + to) / 2;
    const { lat, lon } = motion.leg.track.at(middle);
    const duration = timeAt(step, to) - timeAt(step, from);
    cells.push({ leg: step.leg, from, to, time: timeAt(step, middle), duration, lat, lon, nodes, later: 0 });
  }
  return true;
}

/** Time at a place of a step: the cubic with the times and slownesses of its ends. */
function timeAt({ from, to, start, end, slownessFrom, slownessTo }: ProfileStep, s: number): number {
  const length = to - from;
  const x = (s - from) / length;
  const y = 1 - x;
  return (
    start * (1 + 2 * x) * y * y +
    slownessFrom * length * x * y * y +
    end * x * x * (3 - 2 * x) -
    slownessTo * length * x * x * y
  );
}

function nodeAt(motion: LegMotion, s: number, time: number): CellNode | null {
  const read = (field: LegMotion["medium"]): FieldRates | null =>
    field === null ? STILL : fieldRates(field, motion.leg, s, time);
  const medium = read(motion.medium);
  const wind = read(motion.wind);
  if (medium === null || wind === null) return null;
  const local = makeLocalSensitivity();
  const components = Float64Array.of(medium.along, medium.cross, wind.along, wind.cross);
  const changes = [medium.alongRate, medium.crossRate, wind.alongRate, wind.crossRate];
  if (!localSensitivity(motion.motion, components, motion.feels, local)) return null;
  const { groundSpeed: g, rate, groundSpeedBy, rateBy } = local;
  const timeBy = groundSpeedBy.map((by) => -by / (g * g));
  const useBy = rateBy.map((by, j) => by / g + rate * (timeBy[j] as number));
  let delay = 0;
  let useDelay = 0;
  for (let j = 0; j < COMPONENTS; j += 1) {
    delay -= (timeBy[j] as number) * (changes[j] as number);
    useDelay += (useBy[j] as number) * (changes[j] as number);
  }
  return { timeBy, useBy, delay, useDelay, course: motion.leg.track.at(s).course };
}
