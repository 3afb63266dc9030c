import { durationText, speedText } from "../estimate/finding-text.ts";

/** A change of what the estimate rests on, to see its consequences. Left as the plan has it: factors 1, the rest 0. */
export interface WhatIf {
  readonly name: string;
  /** Factors of the wind's speed, gusts included, and of the current's. */
  readonly wind: number;
  readonly current: number;
  /** Degrees by which the wind veers: clockwise, backing negative. */
  readonly veer_deg: number;
  /** Added to every speed ordered, m/s. */
  readonly speed_m_s: number;
  /** Share by which everything spent is more, hotel load and stays included; negative is less. */
  readonly consumption: number;
  /** Later departure, s; negative is earlier. */
  readonly late_s: number;
}

/**
 * The changes of a what-if in words, where the plan gives it no name.
 *
 * @example
 * whatIfText({ wind: 1.2, current: 1, veer_deg: -20, speed_m_s: 0, consumption: 0, late_s: 3600 }) // → "wind × 1.2, wind backed 20°, 1 h 00 min late"
 */
export function whatIfText(change: Omit<WhatIf, "name">): string {
  const { wind, current, veer_deg, speed_m_s, consumption, late_s } = change;
  const parts: string[] = [];
  if (wind !== 1) parts.push(`wind × ${wind}`);
  if (veer_deg !== 0) parts.push(`wind ${veer_deg > 0 ? "veered" : "backed"} ${Math.abs(veer_deg)}°`);
  if (current !== 1) parts.push(`current × ${current}`);
  if (speed_m_s !== 0) parts.push(`${speedText(Math.abs(speed_m_s))} ${speed_m_s > 0 ? "faster" : "slower"}`);
  if (consumption !== 0)
    parts.push(
      `consumption ${consumption > 0 ? "+" : "-"}${Number((Math.abs(consumption) * 100).toFixed(6))} %`,
    );
  if (late_s !== 0) parts.push(`${durationText(Math.abs(late_s))} ${late_s > 0 ? "late" : "early"}`);
  return parts.length === 0 ? "as planned" : parts.join(", ");
}
