import { storeRate } from "../../src/craft/consumption.ts";
import type { Craft, PowerModel, Windage } from "../../src/craft/craft.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { cosDegrees, sinDegrees } from "../../src/craft/direction.ts";
import { rotorPower } from "../../src/craft/rotor.ts";
import { tablePower } from "../../src/craft/table.ts";
import { groundSpeedAlong } from "../../src/craft/triangle.ts";
import { windagePower, windageResistance } from "../../src/craft/windage.ts";
import { wingPower } from "../../src/craft/wing.ts";

/** Invented craft of plausible size, for tests. */

export const KNOT = 1852 / 3600;

export function craftWith(power: PowerModel, more: Partial<Craft> = {}): Craft {
  return {
    name: "Invented",
    moves: "water",
    speed_m_s: 5,
    power,
    windage: null,
    speeds: { min: 1, max: 7 },
    hotelPerSecond: 800,
    storePerRate: 1,
    storePerJoule: 1,
    store: { unit: "J", usable: 1e9 },
    limits: {
      wind_m_s: null,
      gust_m_s: null,
      groundSpeed_m_s: null,
      opposedWind_m_s: 8,
      opposedCurrent_m_s: 0.5,
    },
    ...more,
  };
}

/** A tender's table with a hump near planing speed, concave beyond it. */
export const tenderTable = tablePower("W", [
  { speed_m_s: 0, rate: 1200 },
  { speed_m_s: 3 * KNOT, rate: 2600 },
  { speed_m_s: 6 * KNOT, rate: 9000 },
  { speed_m_s: 8 * KNOT, rate: 30000 },
  { speed_m_s: 10 * KNOT, rate: 36000 },
  { speed_m_s: 14 * KNOT, rate: 43000 },
  { speed_m_s: 18 * KNOT, rate: 80000 },
]);

export const tender = craftWith(tenderTable, { speeds: { min: 0, max: 18 * KNOT } });
export const barge = craftWith(cubePower({ referenceSpeed_m_s: 5, referencePower_W: 40000 }));

export const drone = craftWith(
  rotorPower({
    bladeProfilePower_W: 79.85628,
    inducedPower_W: 88.6279377,
    tipSpeed_m_s: 120,
    hoverInducedSpeed_m_s: 4.03,
    fuselageDragRatio: 0.6,
    solidity: 0.05,
    discArea_m2: 0.503,
    airDensity_kg_m3: 1.225,
    efficiency: 0.8,
    mass_kg: 2,
  }),
  { moves: "air", speeds: { min: 0, max: 30 }, hotelPerSecond: 5 },
);

export const aeroplane = craftWith(
  wingPower({
    mass_kg: 12,
    wingArea_m2: 0.7,
    zeroLiftDrag: 0.03,
    inducedFactor: 0.05,
    efficiency: 0.6,
    airDensity_kg_m3: 1.225,
  }),
  { moves: "air", speeds: { min: 10, max: 45 }, hotelPerSecond: 20 },
);

export const windage: Windage = {
  frontalArea_m2: 7,
  dragCoefficient: 0.9,
  efficiency: 0.6,
  airDensity_kg_m3: 1.225,
};

/** Ground speed and store rate at V by plain vectors in east and north, along a course of 37°: no shared formula with `propulsion.ts`. */
export function byVectors(
  craft: Craft,
  v: number,
  at: { along: number; cross: number; windAlong: number; windCross: number; climbSlope: number },
): { groundSpeed: number; rate: number } | null {
  const groundSpeed = groundSpeedAlong(v, at.along, at.cross);
  if (!(groundSpeed > 0) || v < craft.power.min || v > craft.power.max) return null;
  const course = 37;
  const s = sinDegrees(course);
  const c = cosDegrees(course);
  const medium = { u: at.along * s + at.cross * c, v: at.along * c - at.cross * s };
  const wind = { u: at.windAlong * s + at.windCross * c, v: at.windAlong * c - at.windCross * s };
  const heading = { u: (groundSpeed * s - medium.u) / v, v: (groundSpeed * c - medium.v) / v };
  let extra = craft.power.climbForce * Math.max(0, at.climbSlope) * groundSpeed;
  if (craft.windage !== null && craft.moves === "water") {
    const r = windageResistance(craft.windage, wind.u, wind.v, groundSpeed, s, c, heading.u, heading.v);
    extra += windagePower(craft.windage, r, v);
  }
  return { groundSpeed, rate: storeRate(craft, v, extra) };
}
