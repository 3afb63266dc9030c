import { storeRate } from "./consumption.ts";
import type { Craft, Pace, StoreUnit } from "./craft.ts";
import { paceSolver } from "./pace.ts";
import { emptySolution, PACE_OK } from "./pace-solution.ts";
import { stillConditions } from "./propulsion.ts";

/** Steps between the least speed and the greatest. */
const STEPS = 160;
/** Where neither the craft nor its model bounds the speed, how far beyond the ordered speed the curve goes. */
const BEYOND_ORDERED = 1.5;
/** Least speed of the curve as a share of the greatest: what is spent per metre has no value at rest. */
const LEAST_SHARE = 0.04;

/** What a craft spends in a still medium against its speed, hotel load included. One entry a speed, ascending. */
export interface StillCurve {
  readonly storeUnit: StoreUnit;
  /** Usable amount, in the store's unit. */
  readonly usable: number;
  /** m/s, through the medium and so over the ground. */
  readonly speed_m_s: Float64Array;
  /** Store units per second. */
  readonly usePerSecond: Float64Array;
  /** Store units per metre. */
  readonly usePerMetre: Float64Array;
  /** The craft's range of speeds for the paces that choose one, m/s; `null` where it has none. */
  readonly range: { readonly min: number; readonly max: number } | null;
}

/** A speed on a still curve with what is spent at it. */
export interface StillPoint {
  readonly speed_m_s: number;
  readonly usePerSecond: number;
  readonly usePerMetre: number;
  /** How far and how long the usable store lasts, m and s; `null` where nothing is spent. */
  readonly range_m: number | null;
  readonly endurance_s: number | null;
}

/**
 * The curve over the speeds at which the craft can be ordered: those of its power model, as far as `speeds` where the model has
 * no end; `null` where nothing bounds them.
 *
 * Without wind or current: windage acts by the craft's own motion only where a wind is known, so that it is left out here.
 */
export function stillCurve(craft: Craft): StillCurve | null {
  const { power, speeds, store } = craft;
  const ordered = craft.speed_m_s === null ? Number.POSITIVE_INFINITY : craft.speed_m_s * BEYOND_ORDERED;
  const max = Math.min(power.max, speeds?.max ?? ordered);
  if (!Number.isFinite(max)) return null;
  const min = Math.max(power.min, LEAST_SHARE * max);
  const speed = Float64Array.from({ length: STEPS + 1 }, (_, n) =>
    n === STEPS ? max : min + ((max - min) * n) / STEPS,
  );
  const usePerSecond = speed.map((v) => storeRate(craft, v));
  return {
    storeUnit: store.unit,
    usable: store.usable,
    speed_m_s: speed,
    usePerSecond,
    usePerMetre: usePerSecond.map((rate, n) => rate / (speed[n] as number)),
    range: speeds,
  };
}

/**
 * The speed that a pace chooses in a still medium; `null` where the pace finds none.
 *
 * @throws InputError where the craft lacks what the pace needs
 */
export function stillPoint(craft: Craft, pace: Pace): StillPoint | null {
  const solution = emptySolution();
  const status = paceSolver(craft, pace, false).solve(stillConditions(), solution);
  if (status !== PACE_OK) return null;
  const { throughSpeed, groundSpeed, rate } = solution;
  const lasts = rate > 0 ? craft.store.usable / rate : null;
  return {
    speed_m_s: throughSpeed,
    usePerSecond: rate,
    usePerMetre: rate / groundSpeed,
    range_m: lasts === null ? null : lasts * groundSpeed,
    endurance_s: lasts,
  };
}
