import type { PlanDocument, WaypointDocument } from "./plan-document.ts";
import { changeRoute } from "./route-edits.ts";

/* Edits of a route's waypoints. `route` and `index` count from 0; an index that does not exist changes nothing. */

export type WaypointKey = "name" | "speed" | "stay" | "height";

/** Adds a waypoint at the end of a route. */
export function appendWaypoint(plan: PlanDocument, route: number, waypoint: WaypointDocument): PlanDocument {
  return changeWaypoints(plan, route, (waypoints) => [...waypoints, waypoint]);
}

/**
 * Puts a waypoint before the one at `index`. The leg that it splits keeps its path and its ordered speed on both halves.
 */
export function insertWaypoint(
  plan: PlanDocument,
  route: number,
  index: number,
  waypoint: WaypointDocument,
): PlanDocument {
  return changeWaypoints(plan, route, (waypoints) => {
    const { path, speed } = index > 0 ? (waypoints[index] ?? {}) : {};
    const split = {
      ...(path === undefined ? {} : { path }),
      ...(speed === undefined ? {} : { speed }),
      ...waypoint,
    };
    return [...waypoints.slice(0, index), split, ...waypoints.slice(index)];
  });
}

/** Gives a waypoint another position: degrees, or text in any notation that a plan takes. */
export function placeWaypoint(
  plan: PlanDocument,
  route: number,
  index: number,
  lat: number | string,
  lon: number | string,
): PlanDocument {
  return changeWaypoint(plan, route, index, (waypoint) => ({ ...waypoint, lat, lon }));
}

/** Sets a text of a waypoint; an empty text takes the key away. */
export function setWaypointText(
  plan: PlanDocument,
  route: number,
  index: number,
  key: WaypointKey,
  text: string,
): PlanDocument {
  return changeWaypoint(plan, route, index, (waypoint) => {
    const { [key]: _old, ...rest } = waypoint;
    return text.trim() === "" ? rest : { ...rest, [key]: text };
  });
}

/** Sets the path of the leg that arrives at a waypoint. */
export function setWaypointPath(
  plan: PlanDocument,
  route: number,
  index: number,
  path: "geodesic" | "rhumb",
): PlanDocument {
  return changeWaypoint(plan, route, index, (waypoint) => ({ ...waypoint, path }));
}

/** Takes a waypoint out; the leg that now spans the place is the one that arrived at the next waypoint. */
export function deleteWaypoint(plan: PlanDocument, route: number, index: number): PlanDocument {
  return changeWaypoints(plan, route, (waypoints) => waypoints.filter((_, at) => at !== index));
}

/** Moves a waypoint to another place in the order, with all that it carries. */
export function moveWaypoint(plan: PlanDocument, route: number, from: number, to: number): PlanDocument {
  return changeWaypoints(plan, route, (waypoints) => {
    const order = [...waypoints];
    const [moved] = order.splice(from, 1);
    if (moved === undefined) return waypoints;
    order.splice(to, 0, moved);
    return order;
  });
}

function changeWaypoint(
  plan: PlanDocument,
  route: number,
  index: number,
  change: (waypoint: WaypointDocument) => WaypointDocument,
): PlanDocument {
  return changeWaypoints(plan, route, (waypoints) =>
    waypoints.map((waypoint, at) => (at === index ? change(waypoint) : waypoint)),
  );
}

function changeWaypoints(
  plan: PlanDocument,
  route: number,
  change: (waypoints: readonly WaypointDocument[]) => readonly WaypointDocument[],
): PlanDocument {
  return changeRoute(plan, route, (old) => ({ ...old, waypoints: change(old.waypoints) }));
}
