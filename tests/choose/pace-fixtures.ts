import { cubePower } from "../../src/craft/cube.ts";
import { WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { geodesicInverse } from "../../src/geodesy/geodesic.ts";
import { craftOf, routeOf, spaced, waypoint } from "../estimate/fixtures.ts";

export const east = routeOf(waypoint("A", 0, 0), waypoint("B", 0, 1));
export const distance = geodesicInverse(WGS84, { lat: 0, lon: 0 }, { lat: 0, lon: 1 }).distance;
export const box = { lon: spaced(-2, 3, 10), lat: spaced(-2, 2, 8) };
/** P = 160 V³ W. */
export const boat = craftOf({
  moves: "water",
  power: cubePower({ referenceSpeed_m_s: 5, referencePower_W: 20_000 }),
  speeds: { min: 0.5, max: 12 },
});
