import type { Craft } from "../craft/craft.ts";
import { InputError } from "../errors.ts";

/** Speeds through the medium, m/s, 0 < min < max. */
export interface SpeedRange {
  readonly min: number;
  readonly max: number;
}

/** Steps of the scan over a craft's speeds; a stretch of speeds narrower than a step may be missed where nothing points to it. */
export const SPEED_STEPS = 64;
/** Lowest speed considered where the craft's range begins at rest, as a share of the highest. */
const LEAST_SHARE = 0.02;

/**
 * The through-speeds that a choice is made among: the craft's `speeds`, else the domain of its power model.
 *
 * @throws InputError where neither is bounded above
 *
 * @example
 * const craft = readCraft('{ "name": "Boat", "moves": "water", "power": { "model": "cube", "reference": { "speed": "5 m/s", "power": "20 kW" } }, "speeds": { "min": "2 m/s", "max": "8 m/s" }, "store": { "capacity": "100 kWh" } }', "boat.craft.json");
 * speedRange(craft) // → { min: 2, max: 8 }
 */
export function speedRange({ name, speeds, power }: Craft): SpeedRange {
  const low = Math.max(speeds?.min ?? power.min, power.min);
  const max = Math.min(speeds?.max ?? power.max, power.max);
  if (!Number.isFinite(max))
    throw new InputError(
      `a choice of speed needs the craft's speeds, as { "min": "3 kn", "max": "14 kn" }, beside the ${power.model} model; found none for ${name}`,
    );
  return { min: Math.max(low, LEAST_SHARE * max), max };
}

/** Speeds over a range, evenly spaced in the time that they take over a distance, ascending, both ends among them. */
export function evenlyInTime({ min, max }: SpeedRange, steps = SPEED_STEPS): number[] {
  return Array.from({ length: steps + 1 }, (_, n) => {
    if (n === 0) return min;
    if (n === steps) return max;
    return 1 / (1 / min + ((1 / max - 1 / min) * n) / steps);
  });
}

/** Speeds over a range, evenly spaced, ascending, both ends among them. */
export function evenlyInSpeed({ min, max }: SpeedRange, steps = SPEED_STEPS): number[] {
  return Array.from({ length: steps + 1 }, (_, n) => (n === steps ? max : min + ((max - min) * n) / steps));
}
