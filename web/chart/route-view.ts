import { readPosition } from "../format/read-position.ts";
import type { Answer } from "../state/answers.ts";
import type { PlanDocument, RouteDocument } from "../state/plan-document.ts";
import type { RouteDrawing } from "../worker/protocol.ts";
import { continuousLongitudes } from "./longitude.ts";
import type { DrawnRoute } from "./route-lines.ts";
import type { Handle, LegMiddle } from "./waypoint-handles.ts";

/** The waypoints of a route with positions that can be read, in order, longitudes continuous; `null` where one can't be read. */
export function handlesOf(route: RouteDocument | undefined): Handle[] | null {
  if (route === undefined) return [];
  try {
    const places = route.waypoints.map(({ lat, lon }) => readPosition(lat, lon));
    const lons = continuousLongitudes(places.map(({ lon }) => lon));
    return places.map(({ lat }, at) => ({ name: route.waypoints[at]?.name ?? "", lat, lon: lons[at] ?? 0 }));
  } catch {
    return null;
  }
}

/** What is drawn of every route: the worker's track, or straight lines between waypoints while there is none. */
export function drawnRoutes(plan: PlanDocument, answer: Answer, chosen: number): DrawnRoute[] {
  return plan.routes.flatMap((route, index) => {
    const drawing = answer.drawings[index] ?? straight(route);
    return drawing === null || drawing.lat.length === 0
      ? []
      : [{ index, name: route.name, chosen: index === chosen, drawing }];
  });
}

/** The middle of each leg, on the track as drawn where that belongs to these waypoints. */
export function legMiddles(handles: readonly Handle[], drawing: RouteDrawing | null): LegMiddle[] {
  const drawn = drawing !== null && drawing.waypoints.length === handles.length ? drawing : null;
  return handles.slice(1).map((to, at) => {
    const from = handles[at] ?? to;
    const first = drawn?.waypoints[at];
    const last = drawn?.waypoints[at + 1];
    if (drawn === null || first === undefined || last === undefined || last - first < 2) {
      return { before: at + 1, lat: (from.lat + to.lat) / 2, lon: (from.lon + to.lon) / 2 };
    }
    const middle = (first + last) >> 1;
    return { before: at + 1, lat: drawn.lat[middle] ?? from.lat, lon: drawn.lon[middle] ?? from.lon };
  });
}

function straight(route: RouteDocument): RouteDrawing | null {
  const handles = handlesOf(route);
  if (handles === null) return null;
  return {
    lat: Float64Array.from(handles, ({ lat }) => lat),
    lon: Float64Array.from(handles, ({ lon }) => lon),
    distance_m: new Float64Array(handles.length),
    waypoints: Int32Array.from(handles, (_, at) => at),
    profile: null,
  };
}
