import { requireNotNegative } from "./bounds.ts";
import type { PowerModel } from "./craft.ts";

/**
 * The same rate at every speed.
 *
 * @param unit unit of the rate: power in W, or fuel in kg/s or L/s
 * @param rate not below 0
 * @throws InputError where the rate is below 0 or not finite
 * @example
 * constantPower("W", 250).perSecond(7) // → 250
 */
export function constantPower(unit: PowerModel["unit"], rate: number): PowerModel {
  requireNotNegative(rate, "rate", unit);
  return {
    model: "constant",
    unit,
    min: 0,
    max: Number.POSITIVE_INFINITY,
    perSecond: () => rate,
    slope: () => 0,
    kinks: [],
    climbForce: 0,
  };
}
