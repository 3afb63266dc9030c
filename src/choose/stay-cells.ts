import { stayRate } from "../craft/consumption.ts";
import type { Conditions } from "../estimate/conditions.ts";
import { type CellNode, type CellSize, NODE_SHARES, type TrackCell } from "./cell.ts";
import { fieldRates } from "./field-rates.ts";
import type { LegMotion } from "./leg-motion.ts";
import { COMPONENTS } from "./local-sensitivity.ts";

/** Least parts of a stay. */
const LEAST_PARTS = 8;
/** Step of the central difference of the rate, m/s. */
const STEP = 1e-3;

/**
 * The stay at the end of a leg in parts: a craft in the air hovers against the wind at V = |w|, so that an error of the wind
 * changes what it spends, and a later arrival meets another wind. None for a craft that moors, for no stay, or without a wind.
 *
 * @param arrived s since departure
 * @returns `null` where the wind or the power model has no value beside one of the points
 */
export function stayCells(
  { leg, medium }: LegMotion,
  number: number,
  conditions: Conditions,
  arrived: number,
  { time_s }: CellSize,
): TrackCell[] | null {
  const stay = leg.to.stay_s;
  if (stay === 0 || conditions.craft.moves === "water" || medium === null) return [];
  const s = leg.track.length;
  const windAt = (time: number) => fieldRates(medium, leg, s, conditions.departure + 1000 * time);
  const rateAt = (time: number): number | null => {
    const wind = windAt(time);
    return wind && stayRate(conditions.craft, Math.hypot(wind.along, wind.cross));
  };
  const first = rateAt(arrived);
  const last = rateAt(arrived + stay);
  if (first === null || last === null) return null;
  const count = Math.max(LEAST_PARTS, Math.ceil(stay / time_s));
  const duration = stay / count;
  const { lat, lon, course } = leg.track.at(s);
  const cells: TrackCell[] = [];
  for (let n = 0; n < count; n += 1) {
    const start = arrived + n * duration;
    const nodes: CellNode[] = [];
    for (const share of NODE_SHARES) {
      const wind = windAt(start + share * duration);
      const useBy = wind && hoverBy(conditions, wind.along, wind.cross);
      if (useBy === null) return null;
      nodes.push({ timeBy: new Float64Array(COMPONENTS), useBy, delay: 0, useDelay: 0, course });
    }
    const later = n === 0 ? last - first : 0;
    cells.push({ leg: number, from: s, to: s, time: start + duration / 2, duration, lat, lon, nodes, later });
  }
  return cells;
}

/** ∂r/∂w = r'(|w|) w/|w| along and across the leg's course; 0 in still air, where the rate has its least or a corner. */
function hoverBy({ craft }: Conditions, along: number, cross: number): Float64Array | null {
  const by = new Float64Array(COMPONENTS);
  const speed = Math.hypot(along, cross);
  if (speed === 0) return by;
  const low = Math.max(0, speed - STEP);
  const above = stayRate(craft, speed + STEP);
  const below = stayRate(craft, low);
  if (above === null || below === null) return null;
  const slope = (above - below) / (speed + STEP - low);
  by[0] = (slope * along) / speed;
  by[1] = (slope * cross) / speed;
  return by;
}
