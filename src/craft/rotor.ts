import { STANDARD_GRAVITY } from "../constants.ts";
import { requireNotNegative, requirePositive, requireShare } from "./bounds.ts";
import type { PowerModel } from "./craft.ts";

/*
 * Rotary-wing propulsion power in level flight: Zeng, Xu & Zhang, "Energy minimization for wireless communication with
 * rotary-wing UAV", IEEE Trans. Wireless Comm. 18(4) (2019) 2329-2345, eq. (12) and Table I:
 *
 *     P(V) = P₀ (1 + 3 V²/U²) + P_i (sqrt(1 + V⁴/(4 v₀⁴)) - V²/(2 v₀²))^(1/2) + ½ d₀ ρ s A V³
 */

/** Parameters of eq. (12). */
export interface RotorParameters {
  /** P₀, W. */
  readonly bladeProfilePower_W: number;
  /** P_i, W: induced power in hover. */
  readonly inducedPower_W: number;
  /** U, m/s: speed of the blade tip. */
  readonly tipSpeed_m_s: number;
  /** v₀, m/s: mean induced speed in hover. */
  readonly hoverInducedSpeed_m_s: number;
  /** d₀. */
  readonly fuselageDragRatio: number;
  /** s. */
  readonly solidity: number;
  /** A, m². */
  readonly discArea_m2: number;
  /** ρ, kg/m³. */
  readonly airDensity_kg_m3: number;
  /** From store to air, 0..1; 1 unless given. */
  readonly efficiency?: number;
  /** For climb; without it a climb costs nothing more. */
  readonly mass_kg?: number;
}

/**
 * Power model of a rotary-wing craft (eq. 12, over the efficiency). Level flight; a climb adds m g₀ dh/dt over the efficiency.
 *
 * @throws InputError where a parameter is out of its range
 * @see Zeng, Xu & Zhang (2019), eq. (12)
 * @example
 * rotorPower({ bladeProfilePower_W: 80, inducedPower_W: 88, tipSpeed_m_s: 120, hoverInducedSpeed_m_s: 4, fuselageDragRatio: 0.6, solidity: 0.05, discArea_m2: 0.5, airDensity_kg_m3: 1.225 }).perSecond(0) // → 168
 */
export function rotorPower(given: RotorParameters): PowerModel {
  const profile = requireNotNegative(given.bladeProfilePower_W, "blade profile power", "W");
  const induced = requirePositive(given.inducedPower_W, "induced power", "W");
  const tip = requirePositive(given.tipSpeed_m_s, "tip speed", "m/s");
  const hover = requirePositive(given.hoverInducedSpeed_m_s, "hover induced speed", "m/s");
  const ratio = requireNotNegative(given.fuselageDragRatio, "fuselage drag ratio", "");
  const solidity = requirePositive(given.solidity, "rotor solidity", "");
  const area = requirePositive(given.discArea_m2, "rotor disc area", "m2");
  const density = requirePositive(given.airDensity_kg_m3, "air density", "kg/m3");
  const efficiency = requireShare(given.efficiency ?? 1, "efficiency");
  const mass = given.mass_kg === undefined ? 0 : requirePositive(given.mass_kg, "mass", "kg");
  const p0 = profile / efficiency;
  const pi = induced / efficiency;
  const parasite = (0.5 * ratio * density * solidity * area) / efficiency;
  const tip2 = tip * tip;
  const hover2 = hover * hover;
  return {
    model: "rotor",
    unit: "W",
    min: 0,
    max: Number.POSITIVE_INFINITY,
    perSecond: (v) => {
      const v2 = v * v;
      const x = v2 / (2 * hover2);
      return p0 * (1 + (3 * v2) / tip2) + pi * inducedRatio(x) + parasite * v2 * v;
    },
    slope: (v) => {
      const x = (v * v) / (2 * hover2);
      // d/dx of the induced ratio is -ratio / (2 sqrt(1 + x²)); dx/dV = V/v₀².
      const fall = inducedRatio(x) / (2 * Math.sqrt(1 + x * x));
      return (6 * p0 * v) / tip2 - (pi * fall * v) / hover2 + 3 * parasite * v * v;
    },
    kinks: [],
    climbForce: (mass * STANDARD_GRAVITY) / efficiency,
  };
}

/** (sqrt(1 + x²) - x)^(1/2), written without the difference, which would lose every digit at speed. */
function inducedRatio(x: number): number {
  return 1 / Math.sqrt(Math.sqrt(1 + x * x) + x);
}

/**
 * Mean induced speed through a rotor disc, m/s: in hover v_h = sqrt(T / (2 ρ A)); in edgewise flight at speed V
 * v = v_h (sqrt(1 + V⁴/(4 v_h⁴)) - V²/(2 v_h²))^(1/2) (Glauert, in Durand, Aerodynamic Theory IV (1935);
 * Leishman, Principles of Helicopter Aerodynamics, momentum theory).
 *
 * @param thrust_N above 0
 * @param airDensity_kg_m3 above 0
 * @param discArea_m2 above 0
 * @param speed_m_s speed of edgewise flight, not below 0; 0 (hover) unless given
 * @example
 * glauertInducedSpeed(20, 1.25, 0.5) // → 4
 */
export function glauertInducedSpeed(
  thrust_N: number,
  airDensity_kg_m3: number,
  discArea_m2: number,
  speed_m_s = 0,
): number {
  requirePositive(thrust_N, "thrust", "N");
  requirePositive(airDensity_kg_m3, "air density", "kg/m3");
  requirePositive(discArea_m2, "rotor disc area", "m2");
  requireNotNegative(speed_m_s, "speed", "m/s");
  const hover = Math.sqrt(thrust_N / (2 * airDensity_kg_m3 * discArea_m2));
  return hover * inducedRatio((speed_m_s * speed_m_s) / (2 * hover * hover));
}

/**
 * P₀ = (δ/8) ρ s A Ω³ R³, the power in W that turns the blades against their own drag in hover (Zeng et al. 2019, Table I).
 *
 * @param given δ, ρ (kg/m³), s, A (m²), Ω (rad/s), R (m), each above 0
 * @throws InputError where one is out of its range
 *
 * @example
 * bladeProfilePower({
 *   profileDragCoefficient: 0.012, airDensity_kg_m3: 1.225, solidity: 0.05, discArea_m2: 0.503,
 *   bladeSpeed_rad_s: 300, rotorRadius_m: 0.4,
 * }) // → 79.856
 */
export function bladeProfilePower(given: {
  readonly profileDragCoefficient: number;
  readonly airDensity_kg_m3: number;
  readonly solidity: number;
  readonly discArea_m2: number;
  readonly bladeSpeed_rad_s: number;
  readonly rotorRadius_m: number;
}): number {
  const delta = requirePositive(given.profileDragCoefficient, "profile drag coefficient", "");
  const density = requirePositive(given.airDensity_kg_m3, "air density", "kg/m3");
  const solidity = requirePositive(given.solidity, "rotor solidity", "");
  const area = requirePositive(given.discArea_m2, "rotor disc area", "m2");
  const tip =
    requirePositive(given.bladeSpeed_rad_s, "blade angular speed", "rad/s") *
    requirePositive(given.rotorRadius_m, "rotor radius", "m");
  return (delta / 8) * density * solidity * area * tip ** 3;
}

/**
 * P_i = (1 + k) W^(3/2) / sqrt(2 ρ A), the power in W that carries the weight in hover (Zeng et al. 2019, Table I).
 *
 * @param given k not below 0; W (N), ρ (kg/m³), A (m²), each above 0
 * @throws InputError where one is out of its range
 *
 * @example
 * inducedPower({ inducedCorrection: 0.1, weight_N: 20, airDensity_kg_m3: 1.225, discArea_m2: 0.503 }) // → 88.628
 */
export function inducedPower(given: {
  readonly inducedCorrection: number;
  readonly weight_N: number;
  readonly airDensity_kg_m3: number;
  readonly discArea_m2: number;
}): number {
  const k = requireNotNegative(given.inducedCorrection, "induced-power correction", "");
  const weight = requirePositive(given.weight_N, "weight", "N");
  const density = requirePositive(given.airDensity_kg_m3, "air density", "kg/m3");
  const area = requirePositive(given.discArea_m2, "rotor disc area", "m2");
  return ((1 + k) * weight ** 1.5) / Math.sqrt(2 * density * area);
}
