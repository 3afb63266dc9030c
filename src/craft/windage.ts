import { requirePositive, requireShare } from "./bounds.ts";
import type { Windage } from "./craft.ts";

/*
 * Added resistance of the wind on a craft in water, in the form of ISO 15016 and ITTC 7.5-04-01-01.1, where the part of the
 * still air belongs to the calm-water curve. With the course T, the ground speed g, the heading h as unit vectors and the
 * wind relative to the craft W = w_wind - g T:
 *
 *     R = -½ ρ_a A C |W| (W·h) - ½ ρ_a A C g²      added power = R V / η
 */

/**
 * Added resistance R in N: above 0 where the wind costs more than still air would, below 0 where it helps.
 *
 * @param windage areas and coefficients
 * @param windU eastward wind over the ground, m/s, the way the air moves
 * @param windV northward wind over the ground, m/s
 * @param groundSpeed g, m/s
 * @param sinCourse sine of the course; with `cosCourse` the unit vector T
 * @param cosCourse cosine of the course
 * @param headingU eastward part of the heading as a unit vector
 * @param headingV northward part of the heading
 * @see ISO 15016:2015, annex C; ITTC 7.5-04-01-01.1
 * @example
 * windageResistance({ frontalArea_m2: 2, dragCoefficient: 1, efficiency: 0.5, airDensity_kg_m3: 1 }, 0, -3, 1, 0, 1, 0, 1) // → 15
 */
export function windageResistance(
  windage: Windage,
  windU: number,
  windV: number,
  groundSpeed: number,
  sinCourse: number,
  cosCourse: number,
  headingU: number,
  headingV: number,
): number {
  const relativeU = windU - groundSpeed * sinCourse;
  const relativeV = windV - groundSpeed * cosCourse;
  const relative = Math.sqrt(relativeU * relativeU + relativeV * relativeV);
  const onHeading = relativeU * headingU + relativeV * headingV;
  return -windageFactor(windage) * (relative * onHeading + groundSpeed * groundSpeed);
}

/**
 * Added shaft power R V / η in W.
 *
 * @param resistance R, N
 * @param throughSpeed V, m/s
 */
export function windagePower(windage: Windage, resistance: number, throughSpeed: number): number {
  return (resistance * throughSpeed) / windage.efficiency;
}

/** ½ ρ_a A C, kg/m. */
export function windageFactor(windage: Windage): number {
  return 0.5 * windage.airDensity_kg_m3 * windage.frontalArea_m2 * windage.dragCoefficient;
}

/** Throws an InputError unless area, coefficient and density are above 0 and the efficiency is a share. */
export function checkWindage(windage: Windage): void {
  requirePositive(windage.frontalArea_m2, "windage: frontal area", "m2");
  requirePositive(windage.dragCoefficient, "windage: drag coefficient", "");
  requirePositive(windage.airDensity_kg_m3, "windage: air density", "kg/m3");
  requireShare(windage.efficiency, "windage: efficiency");
}
