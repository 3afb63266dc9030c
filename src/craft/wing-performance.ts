import { STANDARD_GRAVITY } from "../constants.ts";
import { InputError } from "../errors.ts";
import { requirePositive, requireShare } from "./bounds.ts";
import type { WingParameters } from "./wing.ts";

/*
 * Performance of a propeller-driven fixed-wing craft with the parabolic drag polar C_D = C_D0 + k C_L², W = m g₀:
 * Anderson, Introduction to Flight, chapter 6 (least drag and least power required; Breguet's formulas for range and
 * endurance of a propeller aeroplane). Still air, level unaccelerated flight.
 */

type Polar = Pick<WingParameters, "zeroLiftDrag" | "inducedFactor">;
type Wing = Polar & Pick<WingParameters, "mass_kg" | "wingArea_m2" | "airDensity_kg_m3">;

function checkPolar(polar: Polar): void {
  requirePositive(polar.zeroLiftDrag, "zero-lift drag coefficient", "");
  requirePositive(polar.inducedFactor, "induced-drag factor", "");
}

/**
 * Greatest ratio of lift to drag, 1 / (2 sqrt(k C_D0)): where zero-lift and induced drag are equal.
 * @example
 * maxLiftToDrag({ zeroLiftDrag: 0.04, inducedFactor: 0.0625 }) // → 10
 */
export function maxLiftToDrag(polar: Polar): number {
  checkPolar(polar);
  return 1 / (2 * Math.sqrt(polar.inducedFactor * polar.zeroLiftDrag));
}

/**
 * Greatest C_L^(3/2) / C_D = (3 C_D0 / k)^(3/4) / (4 C_D0): where induced drag is three times the zero-lift drag.
 *
 * @throws InputError where a figure is not above 0
 *
 * @example
 * maxLiftThreeHalvesToDrag({ zeroLiftDrag: 0.04, inducedFactor: 0.0625 }) // → 10.194
 */
export function maxLiftThreeHalvesToDrag(polar: Polar): number {
  checkPolar(polar);
  const { zeroLiftDrag, inducedFactor } = polar;
  return ((3 * zeroLiftDrag) / inducedFactor) ** 0.75 / (4 * zeroLiftDrag);
}

/**
 * Speed of the greatest lift-to-drag ratio in m/s, V = sqrt(2 W / (ρ S) · sqrt(k / C_D0)): farthest glide and range.
 *
 * @throws InputError where a figure is not above 0
 *
 * @example
 * const polar = { zeroLiftDrag: 0.04, inducedFactor: 0.0625 };
 * bestGlideSpeed({ ...polar, mass_kg: 10, wingArea_m2: 1, airDensity_kg_m3: 1.225 }) // → 14.147
 */
export function bestGlideSpeed(wing: Wing): number {
  checkPolar(wing);
  const weight = requirePositive(wing.mass_kg, "mass", "kg") * STANDARD_GRAVITY;
  const area = requirePositive(wing.wingArea_m2, "wing area", "m2");
  const density = requirePositive(wing.airDensity_kg_m3, "air density", "kg/m3");
  return Math.sqrt(((2 * weight) / (density * area)) * Math.sqrt(wing.inducedFactor / wing.zeroLiftDrag));
}

/**
 * Speed of least power required in m/s, 3^(-1/4) of the best glide speed: longest endurance.
 *
 * @throws InputError where a figure is not above 0
 *
 * @example
 * const polar = { zeroLiftDrag: 0.04, inducedFactor: 0.0625 };
 * leastPowerSpeed({ ...polar, mass_kg: 10, wingArea_m2: 1, airDensity_kg_m3: 1.225 }) // → 10.749
 */
export function leastPowerSpeed(wing: Wing): number {
  return bestGlideSpeed(wing) / 3 ** 0.25;
}

/** Craft and fuel of a Breguet estimate. */
export interface BreguetParameters {
  readonly startMass_kg: number;
  /** With the fuel spent; below the start mass. */
  readonly endMass_kg: number;
  /** η of the propeller, 0..1. */
  readonly propellerEfficiency: number;
  /** Mass of fuel per shaft work, kg/J. */
  readonly specificConsumption_kg_J: number;
}

function checkBreguet(given: BreguetParameters): void {
  requirePositive(given.endMass_kg, "end mass", "kg");
  requirePositive(given.startMass_kg, "start mass", "kg");
  if (!(given.startMass_kg >= given.endMass_kg))
    throw new InputError(
      `end mass is at most the start mass, ${given.startMass_kg} kg; found ${given.endMass_kg} kg`,
    );
  requireShare(given.propellerEfficiency, "propeller efficiency");
  requirePositive(given.specificConsumption_kg_J, "specific consumption", "kg/J");
}

/**
 * Range in m at a constant lift-to-drag ratio, η / (c g₀) · L/D · ln(m₀ / m₁).
 *
 * @param liftToDrag above 0; `maxLiftToDrag` gives the longest range
 * @throws InputError where one is out of its range
 * @see Breguet; Anderson, Introduction to Flight, section 6.12
 *
 * @example
 * const fuel = { startMass_kg: 1000, endMass_kg: 900, propellerEfficiency: 0.8, specificConsumption_kg_J: 8e-8 };
 * breguetRange(fuel, 10) // → 1074378.3
 */
export function breguetRange(given: BreguetParameters, liftToDrag: number): number {
  checkBreguet(given);
  requirePositive(liftToDrag, "lift-to-drag ratio", "");
  const { propellerEfficiency: eta, specificConsumption_kg_J: c } = given;
  return (eta / (c * STANDARD_GRAVITY)) * liftToDrag * Math.log(given.startMass_kg / given.endMass_kg);
}

/**
 * Endurance in s at a constant lift coefficient, η / (c g₀) · C_L^(3/2)/C_D · sqrt(2 ρ S) (W₁^(-1/2) - W₀^(-1/2)).
 *
 * @param liftThreeHalvesToDrag above 0; `maxLiftThreeHalvesToDrag` gives the longest endurance
 * @throws InputError where one is out of its range
 * @see Breguet; Anderson, Introduction to Flight, section 6.12
 *
 * @example
 * const fuel = { startMass_kg: 1000, endMass_kg: 900, propellerEfficiency: 0.8, specificConsumption_kg_J: 8e-8 };
 * breguetEndurance({ ...fuel, wingArea_m2: 15, airDensity_kg_m3: 1.225 }, 10) // → 33766.4
 */
export function breguetEndurance(
  given: BreguetParameters & Pick<WingParameters, "wingArea_m2" | "airDensity_kg_m3">,
  liftThreeHalvesToDrag: number,
): number {
  checkBreguet(given);
  requirePositive(liftThreeHalvesToDrag, "ratio of lift to the power 3/2 to drag", "");
  const area = requirePositive(given.wingArea_m2, "wing area", "m2");
  const density = requirePositive(given.airDensity_kg_m3, "air density", "kg/m3");
  const { propellerEfficiency: eta, specificConsumption_kg_J: c } = given;
  const startWeight = given.startMass_kg * STANDARD_GRAVITY;
  const endWeight = given.endMass_kg * STANDARD_GRAVITY;
  const weights = 1 / Math.sqrt(endWeight) - 1 / Math.sqrt(startWeight);
  return (eta / (c * STANDARD_GRAVITY)) * liftThreeHalvesToDrag * Math.sqrt(2 * density * area) * weights;
}
