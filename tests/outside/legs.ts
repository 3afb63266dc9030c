import { estimateRoute, type RouteRun } from "../../src/estimate/estimate-route.ts";
import { cutPanels, locatePanels } from "../../src/estimate/panels.ts";
import { type PreparedRoute, prepareRoute } from "../../src/estimate/prepare.ts";
import type { Route } from "../../src/estimate/route.ts";
import { fitTrackCurve } from "../../src/estimate/track-curve.ts";
import type { Field, FieldRole } from "../../src/field/field.ts";
import { DEGREE } from "../../src/geodesy/angle.ts";
import { type Ellipsoid, WGS84 } from "../../src/geodesy/ellipsoid.ts";
import { makeTrackOn } from "../../src/geodesy/make-track.ts";
import { craftOf, DEPARTURE, gridField, routeOf, waypoint } from "../estimate/fixtures.ts";

/** Whole legs for the checks of this folder. */

export interface LegTerms {
  /** Held speed through the air, m/s. */
  readonly speed: number;
  readonly fields?: readonly Field[];
}

/** Estimates a route of a craft that holds a speed through the air. */
export function flown(route: Route, { speed, fields = [] }: LegTerms): RouteRun {
  return run(prepareRoute(route, fields), { speed, fields });
}

/** The same on another ellipsoid: the public preparation is for WGS84, so its parts are put together here. */
export function flownOn(shape: Ellipsoid, route: Route, { speed, fields = [] }: LegTerms): RouteRun {
  const legs = route.waypoints.slice(1).map((to, index) => {
    const from = route.waypoints[index] as (typeof route.waypoints)[number];
    const track = makeTrackOn(shape, from, to, to.path);
    const curve = fitTrackCurve(track);
    const heights = { from: from.height_m, to: to.height_m };
    const panels = cutPanels(curve, fields, heights);
    const cells = fields.map(({ tiles }) => tiles.map((tile) => locatePanels(curve, panels, tile, heights)));
    return { from, to, track, curve, panels, heights, cells, land: [] };
  });
  return run({ route, legs, roles: fields.map(({ role }) => role), every_s: null }, { speed, fields });
}

function run(prepared: PreparedRoute, { speed, fields = [] }: LegTerms): RouteRun {
  const pace = { hold: "through-speed", speed_m_s: speed } as const;
  return estimateRoute(prepared, { departure: DEPARTURE, craft: craftOf(), pace, reserve: null, fields });
}

/** A leg of a given length, m, due east along the equator from Greenwich. */
export function equatorLeg(length: number, terms: LegTerms): RouteRun {
  const to = waypoint("end", 0, length / (WGS84.a * DEGREE), { path: "rhumb" });
  return flown(routeOf(waypoint("start", 0, 0), to), terms);
}

/** The same wind everywhere. */
export function uniformWind({ u, v }: { readonly u: number; readonly v: number }): Field {
  return uniformField("wind", u, v);
}

export function uniformField(role: FieldRole, u: number, v: number): Field {
  return gridField(role, { lon: [-180, 0, 180], lat: [-90, 0, 90] }, () => [u, v]);
}
