import type { ArrivalWindow } from "../../src/choose/arrival-window.ts";
import { cubePower } from "../../src/craft/cube.ts";
import { craftOf, DEPARTURE, gridField, HOUR, routeOf, spaced, waypoint } from "../estimate/fixtures.ts";

export const SHAPE = { lon: spaced(-1, 2, 6), lat: spaced(-1, 1, 4), hours: spaced(-6, 60, 22) };
/** A uniform stream, eastward, m/s. */
export const stream = (u: number) => gridField("current", SHAPE, () => [u, 0]);

/** Along the equator the rhumb is a circle of the ellipsoid's semi-major axis. */
export const DISTANCE = (6378137 * Math.PI) / 180;
export const ROUTE = routeOf(waypoint("A", 0, 0), { ...waypoint("B", 0, 1), path: "rhumb" });
/** Going slower is always cheaper. */
export const craft = craftOf({
  moves: "water",
  power: cubePower({ referenceSpeed_m_s: 6, referencePower_W: 60_000 }),
  speeds: { min: 2, max: 8 },
  store: { unit: "J", usable: 4e9 },
});

export const whatIf = (name: string, change: object) => {
  const none = { wind: 1, current: 1, veer_deg: 0, speed_m_s: 0, consumption: 0, late_s: 0 };
  return { name, ...none, ...change };
};
/** A span of times to arrive in, hours after the departure. */
export const between = (from: number, to: number): ArrivalWindow => ({
  notBefore: DEPARTURE + from * HOUR,
  notAfter: DEPARTURE + to * HOUR,
});
