import type { Pace } from "../craft/craft.ts";
import type { Conditions } from "./conditions.ts";
import { type Motion, makeMotion } from "./motion.ts";
import { mediumRole, type PreparedLeg } from "./prepare.ts";

/** The pace on a leg: a speed that the leg names takes the place of the pace's. */
export function paceOn(pace: Pace, { to }: PreparedLeg): Pace {
  if (to.speed_m_s === null || pace.hold === "power" || pace.hold === "least-energy") return pace;
  return { hold: pace.hold, speed_m_s: to.speed_m_s };
}

/** How the craft moves on a leg. */
export function motionOn(conditions: Conditions, leg: PreparedLeg): Motion {
  const { craft, pace, fields } = conditions;
  const lowest = lowestLevel(conditions);
  const climb = (leg.heights.to ?? lowest) - (leg.heights.from ?? lowest);
  const windKnown = fields.some(({ role }) => role === "wind");
  return makeMotion(craft, paceOn(pace, leg), windKnown, climb / leg.track.length);
}

/** Where a waypoint without any height is: the lowest level of the medium, m above the surface. */
export function lowestLevel({ craft, fields }: Conditions): number {
  const medium = fields.find(({ role }) => role === mediumRole(craft));
  return Math.min(...(medium?.tiles.map(({ height }) => height?.[0] ?? 0) ?? [0]));
}
