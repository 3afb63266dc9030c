import type { Pace } from "../craft/craft.ts";
import type { Conditions } from "../estimate/conditions.ts";
import { type Motion, makeMotion } from "../estimate/motion.ts";
import { mediumRole, type PreparedLeg } from "../estimate/prepare.ts";
import type { Field } from "../field/field.ts";
import { COMPONENTS } from "./local-sensitivity.ts";

/** How a craft moves on one leg, and the fields that act on it. */
export interface LegMotion {
  readonly leg: PreparedLeg;
  readonly motion: Motion;
  /** What the craft moves through, and the wind where it acts besides; `null` for none. */
  readonly medium: Field | null;
  readonly wind: Field | null;
  /** Whether the motion answers to the medium's along and cross component, and the wind's. */
  readonly feels: readonly boolean[];
}

/** The motion on a leg, as an estimate has it. */
export function legMotion(leg: PreparedLeg, { craft, pace, fields }: Conditions): LegMotion {
  const role = mediumRole(craft);
  const medium = fields.find((field) => field.role === role) ?? null;
  const wind = fields.find((field) => field.role === "wind") ?? null;
  const lowest = Math.min(...(medium?.tiles.map(({ height }) => height?.[0] ?? 0) ?? [0]));
  const climb = (leg.heights.to ?? lowest) - (leg.heights.from ?? lowest);
  const acts = wind !== null && craft.moves === "water" && craft.windage !== null;
  const feels = Array.from({ length: COMPONENTS }, (_, j) => (j < 2 ? medium !== null : acts));
  return {
    leg,
    motion: makeMotion(craft, paceOn(leg, pace), wind !== null, climb / leg.track.length),
    medium,
    wind: acts ? wind : null,
    feels,
  };
}

function paceOn(leg: PreparedLeg, pace: Pace): Pace {
  const speed = leg.to.speed_m_s;
  if (speed === null || pace.hold === "power" || pace.hold === "least-energy") return pace;
  return { hold: pace.hold, speed_m_s: speed };
}
