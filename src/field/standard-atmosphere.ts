import { STANDARD_GRAVITY } from "../constants.ts";

/** Pressure at sea level, Pa. ICAO Doc 7488/3 (1993), table A. */
const SEA_LEVEL_PRESSURE = 101325;
/** Specific gas constant of air, J/(kg K). ICAO Doc 7488/3, table A. */
const GAS_CONSTANT = 287.05287;
/** Ratio of the specific heats. ICAO Doc 7488/3, table A. */
const HEAT_RATIO = 1.4;
/** Base altitude (geopotential m), temperature there (K) and its gradient above (K/m). ICAO Doc 7488/3, table D. */
const LAYERS: readonly (readonly [base: number, temperature: number, gradient: number])[] = [
  [0, 288.15, -0.0065],
  [11_000, 216.65, 0],
  [20_000, 216.65, 0.001],
  [32_000, 228.65, 0.0028],
  [47_000, 270.65, 0],
  [51_000, 270.65, -0.0028],
  [71_000, 214.65, -0.002],
];
const LOWEST = -5000;
const HIGHEST = 80_000;

/** The ICAO standard atmosphere at a geopotential altitude. */
export interface StandardAir {
  /** K */
  readonly temperature: number;
  /** Pa */
  readonly pressure: number;
  /** kg/m³ */
  readonly density: number;
  /** m/s */
  readonly speedOfSound: number;
}

/**
 * Air of the ICAO standard atmosphere at a geopotential altitude of -5,000 to 80,000 m.
 *
 * Source: ICAO Doc 7488/3 (1993), equations (8), (12), (13), (15) and (21), as ISO 2533.
 * Error: an altitude outside (RangeError: callers check what users give).
 *
 * @example
 * standardAir(11000).temperature // → 216.65
 */
export function standardAir(altitude: number): StandardAir {
  if (!(altitude >= LOWEST && altitude <= HIGHEST)) {
    throw new RangeError(`altitude is in ${LOWEST}..${HIGHEST} m; found ${altitude}`);
  }
  const index = layerWhere(([base]) => base <= altitude);
  const [base, baseTemperature, gradient] = LAYERS[index] as (typeof LAYERS)[number];
  const temperature = baseTemperature + gradient * (altitude - base);
  const pressure = pressureAbove(index, altitude);
  const density = pressure / (GAS_CONSTANT * temperature);
  return { temperature, pressure, density, speedOfSound: Math.sqrt(HEAT_RATIO * GAS_CONSTANT * temperature) };
}

/**
 * Geopotential altitude, m, at which the ICAO standard atmosphere has a pressure in Pa: the inverse of `standardAir`.
 *
 * Error: a pressure outside `STANDARD_PRESSURE_RANGE` (RangeError).
 *
 * @example
 * pressureAltitude(101325) // → 0
 */
export function pressureAltitude(pressure: number): number {
  const [least, most] = STANDARD_PRESSURE_RANGE;
  if (!(pressure >= least && pressure <= most)) {
    throw new RangeError(`pressure is in ${least}..${most} Pa; found ${pressure}`);
  }
  const index = layerWhere((_, layer) => (BASE_PRESSURES[layer] as number) >= pressure);
  const [base, temperature, gradient] = LAYERS[index] as (typeof LAYERS)[number];
  const ratio = pressure / (BASE_PRESSURES[index] as number);
  if (gradient === 0) return base - (GAS_CONSTANT * temperature * Math.log(ratio)) / STANDARD_GRAVITY;
  return base + (temperature / gradient) * (ratio ** ((-gradient * GAS_CONSTANT) / STANDARD_GRAVITY) - 1);
}

/** Index of the highest layer whose base passes a test; the lowest where none does, as it reaches below sea level. */
function layerWhere(passes: (layer: (typeof LAYERS)[number], index: number) => boolean): number {
  for (let index = LAYERS.length - 1; index > 0; index--) {
    if (passes(LAYERS[index] as (typeof LAYERS)[number], index)) return index;
  }
  return 0;
}

/** Pressure at an altitude in a layer, Pa. ICAO Doc 7488/3, equations (12) and (13). */
function pressureAbove(index: number, altitude: number): number {
  const [base, temperature, gradient] = LAYERS[index] as (typeof LAYERS)[number];
  const atBase = BASE_PRESSURES[index] as number;
  const rise = altitude - base;
  if (gradient === 0) return atBase * Math.exp((-STANDARD_GRAVITY * rise) / (GAS_CONSTANT * temperature));
  return atBase * (1 + (gradient * rise) / temperature) ** (-STANDARD_GRAVITY / (gradient * GAS_CONSTANT));
}

/** Pressure at the base of each layer, Pa, from the ground up. */
const BASE_PRESSURES: number[] = [SEA_LEVEL_PRESSURE];
for (const [index, [base]] of LAYERS.entries()) {
  if (index > 0) BASE_PRESSURES.push(pressureAbove(index - 1, base));
}

/** Least and greatest pressure of the atmosphere taken here, Pa: at 80,000 and at -5,000 m. */
export const STANDARD_PRESSURE_RANGE: readonly [least: number, most: number] = [
  pressureAbove(LAYERS.length - 1, HIGHEST),
  pressureAbove(0, LOWEST),
];
