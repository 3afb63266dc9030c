import { STANDARD_GRAVITY } from "../constants.ts";
import { requirePositive, requireShare } from "./bounds.ts";
import type { PowerModel } from "./craft.ts";

/** A fixed-wing craft in level flight with the parabolic drag polar C_D = C_D0 + k C_L². */
export interface WingParameters {
  readonly mass_kg: number;
  /** S, m². */
  readonly wingArea_m2: number;
  /** C_D0. */
  readonly zeroLiftDrag: number;
  /** k; 1/(π e AR) of a wing of aspect ratio AR and Oswald's efficiency e. */
  readonly inducedFactor: number;
  /** η, from store to air, 0..1. */
  readonly efficiency: number;
  /** ρ, kg/m³. */
  readonly airDensity_kg_m3: number;
}

/** The formula asks for V > 0 alone; a micrometre a second keeps every figure finite. */
const LEAST_SPEED = 1e-6;

/**
 * Power model of a fixed-wing craft: P = (½ ρ V³ S C_D0 + 2 k W² / (ρ V S)) / η with W = m g₀. Level, unaccelerated flight,
 * below compressibility; it knows nothing of the stall. A climb adds m g₀ dh/dt / η.
 *
 * @throws InputError where a parameter is out of its range
 * @see Anderson, Introduction to Flight, chapter 6, power required; any performance text
 *
 * @example
 * const wing = { mass_kg: 10, wingArea_m2: 1, zeroLiftDrag: 0.04, inducedFactor: 0.0625, airDensity_kg_m3: 1.225 };
 * wingPower({ ...wing, efficiency: 0.5 }).perSecond(20) // → 490.133
 */
export function wingPower(given: WingParameters): PowerModel {
  const mass = requirePositive(given.mass_kg, "mass", "kg");
  const area = requirePositive(given.wingArea_m2, "wing area", "m2");
  const drag = requirePositive(given.zeroLiftDrag, "zero-lift drag coefficient", "");
  const k = requirePositive(given.inducedFactor, "induced-drag factor", "");
  const efficiency = requireShare(given.efficiency, "efficiency");
  const density = requirePositive(given.airDensity_kg_m3, "air density", "kg/m3");
  const weight = mass * STANDARD_GRAVITY;
  const parasite = (0.5 * density * area * drag) / efficiency;
  const induced = (2 * k * weight * weight) / (density * area * efficiency);
  return {
    model: "wing",
    unit: "W",
    min: LEAST_SPEED,
    max: Number.POSITIVE_INFINITY,
    perSecond: (v) => parasite * v * v * v + induced / v,
    slope: (v) => 3 * parasite * v * v - induced / (v * v),
    kinks: [],
    climbForce: weight / efficiency,
  };
}
