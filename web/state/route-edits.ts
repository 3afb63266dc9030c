import type { PlanDocument, RouteDocument, WaypointDocument } from "./plan-document.ts";

/* Edits of the list of routes. Each takes a plan and returns another; an index that does not exist changes nothing. */

/** Adds an empty route at the end, with a name that no other route has. */
export function addRoute(plan: PlanDocument, name: string): PlanDocument {
  return withRoutes(plan, [...plan.routes, { name: freeName(plan, name), waypoints: [] }]);
}

/** Adds routes that were read from a file, renamed where a name is taken. */
export function importRoutes(plan: PlanDocument, routes: readonly RouteDocument[]): PlanDocument {
  return routes.reduce(
    (grown, route) => withRoutes(grown, [...grown.routes, { ...route, name: freeName(grown, route.name) }]),
    plan,
  );
}

export function renameRoute(plan: PlanDocument, index: number, name: string): PlanDocument {
  return changeRoute(plan, index, (route) => ({ ...route, name }));
}

export function deleteRoute(plan: PlanDocument, index: number): PlanDocument {
  return withRoutes(
    plan,
    plan.routes.filter((_, at) => at !== index),
  );
}

export function moveRoute(plan: PlanDocument, from: number, to: number): PlanDocument {
  const routes = [...plan.routes];
  const [moved] = routes.splice(from, 1);
  if (moved === undefined) return plan;
  routes.splice(to, 0, moved);
  return withRoutes(plan, routes);
}

/** Puts a copy right after a route, so that a variant starts from what it varies. */
export function duplicateRoute(plan: PlanDocument, index: number): PlanDocument {
  const route = plan.routes[index];
  if (route === undefined) return plan;
  const routes = [...plan.routes];
  routes.splice(index + 1, 0, { ...route, name: freeName(plan, route.name) });
  return withRoutes(plan, routes);
}

/**
 * Turns a route around. Path and speed belong to the leg that arrives at a waypoint, so they move to its other end; a stay keeps
 * its place; a height that a waypoint kept from an earlier one is written out, since afterwards there is no earlier one.
 */
export function reverseRoute(plan: PlanDocument, index: number): PlanDocument {
  return changeRoute(plan, index, (route) => ({ ...route, waypoints: reversed(route.waypoints) }));
}

function reversed(waypoints: readonly WaypointDocument[]): readonly WaypointDocument[] {
  const heights: (string | undefined)[] = [];
  for (const { height } of waypoints) heights.push(height ?? heights.at(-1));
  return waypoints
    .map((waypoint, at) => {
      const { path: _path, speed: _speed, height: _height, ...kept } = waypoint;
      const { path, speed } = waypoints[at + 1] ?? {};
      const height = heights[at];
      return {
        ...kept,
        ...(path === undefined ? {} : { path }),
        ...(speed === undefined ? {} : { speed }),
        ...(height === undefined ? {} : { height }),
      };
    })
    .reverse();
}

/** A name that no route has yet: the name itself, or with the next free number behind it. */
export function freeName(plan: PlanDocument, wanted: string): string {
  const taken = new Set(plan.routes.map((route) => route.name));
  if (!taken.has(wanted)) return wanted;
  const stem = wanted.replace(/ \d+$/, "");
  let number = 2;
  while (taken.has(`${stem} ${number}`)) number += 1;
  return `${stem} ${number}`;
}

/** Replaces one route by what a function makes of it. */
export function changeRoute(
  plan: PlanDocument,
  index: number,
  change: (route: RouteDocument) => RouteDocument,
): PlanDocument {
  if (plan.routes[index] === undefined) return plan;
  return withRoutes(
    plan,
    plan.routes.map((route, at) => (at === index ? change(route) : route)),
  );
}

function withRoutes(plan: PlanDocument, routes: readonly RouteDocument[]): PlanDocument {
  return { ...plan, routes };
}
