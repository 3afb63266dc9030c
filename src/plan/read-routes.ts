import type { Craft } from "../craft/craft.ts";
import type { Route, Waypoint } from "../estimate/route.ts";
import { quoted } from "../found.ts";
import type { Fault } from "./first-issue.ts";
import type { PlanParts } from "./plan-schema.ts";
import { checkOrderedSpeed } from "./read-craft.ts";

type RouteParts = PlanParts["routes"][number];
type WaypointParts = RouteParts["waypoints"][number];

/**
 * The routes of a plan, checked against pace and craft. A route without a name is called `Route n`, a waypoint `Waypoint n`,
 * counted from 1; a route's path is that of its waypoints that name none; a height holds until the next.
 *
 * Errors: two routes of one name, a waypoint equal to the one before it, a waypoint's speed under a pace that chooses its own
 * or outside the power table, a stay before the first leg, a wing that stays, a rotor without mass that climbs.
 */
export function readRoutes(parts: PlanParts, craft: Craft, fault: Fault): readonly Route[] {
  const names = new Map<string, number>();
  return parts.routes.map((route, r) => {
    const name = route.name ?? `Route ${r + 1}`;
    const earlier = names.get(name);
    if (earlier !== undefined)
      throw fault(
        ["routes", r, "name"],
        `routes have different names; found ${quoted(name)}, the name of routes[${earlier}]`,
      );
    names.set(name, r);
    return { name, waypoints: waypointsOf(route, r, parts, craft, fault) };
  });
}

function waypointsOf(
  route: RouteParts,
  r: number,
  parts: PlanParts,
  craft: Craft,
  fault: Fault,
): readonly Waypoint[] {
  let height: number | null = null;
  return route.waypoints.map((given, w) => {
    const at: Fault = (path, text) => fault(["routes", r, "waypoints", w, ...path], text);
    const before = route.waypoints[w - 1];
    if (before !== undefined && isSamePlace(before, given))
      throw at([], `a waypoint differs from the one before it; found ${given.lat}, ${given.lon} again`);
    checkSpeed(given, parts, craft, at);
    if (given.stay !== undefined && craft.power.model === "wing")
      throw at(["stay"], `a wing cannot stay at a place; found ${quoted(given.stay.text)}`);
    if (w === 0 && (given.stay?.value ?? 0) > 0)
      throw at(
        ["stay"],
        `a route's first waypoint takes no stay, since no leg arrives there: let the plan depart later; found ${quoted(given.stay?.text ?? "")}`,
      );
    const last: number | null = height;
    if (given.height !== undefined) height = given.height.value;
    if (
      craft.power.model === "rotor" &&
      craft.power.climbForce === 0 &&
      last !== null &&
      (height ?? 0) > last
    )
      throw at(
        ["height"],
        `a climb needs the mass of the craft's rotor model; found a climb from ${last} m and no mass`,
      );
    return {
      name: given.name ?? `Waypoint ${w + 1}`,
      lat: given.lat,
      lon: given.lon,
      path: given.path ?? route.path ?? "geodesic",
      speed_m_s: given.speed?.value ?? null,
      height_m: height,
      stay_s: given.stay?.value ?? 0,
    };
  });
}

function checkSpeed({ speed }: WaypointParts, parts: PlanParts, craft: Craft, at: Fault): void {
  if (speed === undefined) return;
  const hold = parts.pace !== undefined && "hold" in parts.pace ? parts.pace.hold : "through-speed";
  if (hold === "power" || hold === "least-energy")
    throw at(
      ["speed"],
      `the pace ${quoted(hold)} chooses the speed itself, so a waypoint names none; found ${quoted(speed.text)}`,
    );
  if (hold === "through-speed") checkOrderedSpeed(speed, craft.power, (text) => at(["speed"], text));
}

/** Equal positions: longitudes a turn apart are one meridian, and all meridians meet at a pole. */
function isSamePlace(a: { lat: number; lon: number }, b: { lat: number; lon: number }): boolean {
  return a.lat === b.lat && (Math.abs(a.lat) === 90 || (a.lon - b.lon) % 360 === 0);
}
