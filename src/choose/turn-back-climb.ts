import type { Craft } from "../craft/craft.ts";
import { InputError } from "../errors.ts";
import type { Route } from "../estimate/route.ts";
import type { Alternate } from "./alternate.ts";

/**
 * Refuses ways back or off that climb, as a route does that descends, for a rotor whose model has no mass: what climbing
 * costs is not known then.
 *
 * @throws InputError
 */
export function requireClimb({ waypoints }: Route, craft: Craft, alternates: readonly Alternate[]): void {
  if (craft.power.model !== "rotor" || craft.power.climbForce > 0) return;
  const heights = waypoints.map(({ height_m }) => height_m ?? 0);
  const low = Math.min(...heights);
  const climb = heights.find((height, n) => height > (heights[n + 1] ?? height));
  const high = alternates.map(({ height_m }) => height_m ?? low).find((height) => height > low);
  const found = climb ?? high;
  if (found === undefined) return;
  const way = climb === undefined ? "a way to an alternate" : "the way back of a route that descends";
  throw new InputError(
    `${way} is a climb, which needs the mass of the craft's rotor model; found a climb to ${found} m and no mass`,
  );
}
