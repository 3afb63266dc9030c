import type { Craft } from "./craft.ts";
import { perJoule } from "./propulsion.ts";

/**
 * What a craft spends under way, in store units per second, hotel load included; propulsion never counts below zero.
 *
 * @param throughSpeed V, m/s, within the power model's domain
 * @param shaftExtra_W power of windage (either sign) and climb, W; 0 unless given
 * @throws InputError where there is extra power and the craft names no specific consumption for it
 */
export function storeRate(craft: Craft, throughSpeed: number, shaftExtra_W = 0): number {
  const extra = shaftExtra_W === 0 ? 0 : shaftExtra_W * perJoule(craft, "windage or climb");
  return Math.max(0, craft.power.perSecond(throughSpeed) * craft.storePerRate + extra) + craft.hotelPerSecond;
}

/** Climb power in W: m g₀ (dh/dt) / η while climbing, nothing given back descending. `climbRate` in m/s. */
export function climbPower(craft: Craft, climbRate: number): number {
  return climbRate > 0 ? craft.power.climbForce * climbRate : 0;
}

/**
 * What a craft spends staying at a place, in store units per second. In water it is the hotel load alone: the craft lies
 * moored. In air the craft hovers against the wind at V = |w|.
 *
 * @param mediumSpeed |w|, m/s
 * @returns `null` where the power model has no value at that speed
 * @throws Error for a wing, which cannot stay: a plan that asks for it is refused when it is read
 */
export function stayRate(craft: Craft, mediumSpeed: number): number | null {
  if (craft.moves === "water") return craft.hotelPerSecond;
  if (craft.power.model === "wing") throw new Error("a wing cannot stay at a place");
  if (!(mediumSpeed >= craft.power.min && mediumSpeed <= craft.power.max)) return null;
  return storeRate(craft, mediumSpeed);
}
