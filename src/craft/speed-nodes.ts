import { InputError } from "../errors.ts";
import type { Craft } from "./craft.ts";
import { groundSpeedAlong } from "./triangle.ts";

/** Fewest pieces into which a craft's range of speeds is cut, and fewest between two kinks of its power model. */
const PIECES = 32;
const PIECES_BETWEEN_KINKS = 4;

/**
 * A craft's range of speeds cut at the kinks of its power model and between them, with the model's rate and slope at each
 * node: what a search over speed brackets its answer with. Two turns of the curve inside one piece would go unseen;
 * a cubic between two rows of a table turns at most twice, and is cut into four or more.
 */
export interface SpeedNodes {
  /** m/s, strictly ascending, from the least speed of the range to the greatest. */
  readonly speed: Float64Array;
  readonly rate: Float64Array;
  readonly slope: Float64Array;
}

/** @throws InputError where the craft has no range of speeds, or one outside its power model's domain */
export function speedNodes(craft: Craft): SpeedNodes {
  const { min, max } = checkedRange(craft);
  const ends = [min, ...craft.power.kinks.filter((kink) => kink > min && kink < max), max];
  const pieces = Math.max(PIECES_BETWEEN_KINKS, Math.ceil(PIECES / (ends.length - 1)));
  const speeds: number[] = [min];
  for (let k = 1; k < ends.length; k++) {
    const from = ends[k - 1] as number;
    const to = ends[k] as number;
    for (let piece = 1; piece <= pieces; piece++) {
      const speed = piece === pieces ? to : from + ((to - from) * piece) / pieces;
      if (speed > (speeds[speeds.length - 1] as number)) speeds.push(speed);
    }
  }
  const speed = Float64Array.from(speeds);
  return {
    speed,
    rate: speed.map((v) => craft.power.perSecond(v)),
    slope: speed.map((v) => craft.power.slope(v)),
  };
}

function checkedRange(craft: Craft): { readonly min: number; readonly max: number } {
  if (craft.speeds === null)
    throw new InputError("the paces power and least-energy need the craft's range of speeds; found none");
  const { min, max } = craft.speeds;
  const { power } = craft;
  if (!(min >= 0 && min <= max && max > 0 && Number.isFinite(max)))
    throw new InputError(`the craft's range of speeds ascends from 0 or more; found ${min} to ${max} m/s`);
  if (!(min >= power.min && max <= power.max))
    throw new InputError(
      `the craft's range of speeds lies within its power model's, ${power.min} to ${power.max} m/s; found ${min} to ${max} m/s`,
    );
  return { min, max };
}

/** Index of the least node at which a craft can hold its track: V > |c| and g > 0; the number of nodes where there is none. */
export function firstHeld(nodes: SpeedNodes, along: number, cross: number): number {
  const { speed } = nodes;
  let low = 0;
  let high = speed.length;
  while (low < high) {
    const mid = (low + high) >> 1;
    if (groundSpeedAlong(speed[mid] as number, along, cross) > 0) high = mid;
    else low = mid + 1;
  }
  return low;
}
