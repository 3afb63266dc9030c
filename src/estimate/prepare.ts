import type { LandStretch } from "../coast/land-crossings.ts";
import type { LandFinder } from "../coast/land-finder.ts";
import type { Craft } from "../craft/craft.ts";
import type { Field, FieldRole } from "../field/field.ts";
import { densify } from "../geodesy/drawn-line.ts";
import { makeTrack } from "../geodesy/make-track.ts";
import type { Track } from "../geodesy/track.ts";
import { cutPanels, type LegHeights, locatePanels, type PanelCells, type Panels } from "./panels.ts";
import type { Route, Waypoint } from "./route.ts";
import { fitTrackCurve, type TrackCurve } from "./track-curve.ts";

/*
 * The first half of an estimate: what depends on the route and the grids' axes alone. It is made once and serves every
 * departure, pace, craft and set of values on the same grids.
 */

export interface PreparedLeg {
  readonly from: Waypoint;
  readonly to: Waypoint;
  readonly track: Track;
  readonly curve: TrackCurve;
  readonly panels: Panels;
  readonly heights: LegHeights;
  /** Per field, per tile: the cells of the panels. */
  readonly cells: readonly (readonly PanelCells[])[];
  /** Stretches over the coarse land, a hint only; empty where no land was given. */
  readonly land: readonly LandStretch[];
}

export interface PreparedRoute {
  readonly route: Route;
  readonly legs: readonly PreparedLeg[];
  /** Roles of the fields that `cells` are about, in their order. */
  readonly roles: readonly FieldRole[];
  /**
   * Step of the departures that are compared on the route, s; `null` for none. Where many lie between two valid times, what they share is
   * worked out first; figures then differ from others' in the twelfth digit or so, and are alike among themselves.
   */
  readonly every_s: number | null;
}

/**
 * Prepares a route for estimates on fields with these axes.
 *
 * @param fields those that the craft uses (see {@link fieldsInUse})
 * @param land coarse land to hold the route against, for craft in water; `null` for none
 * @throws InputError where a waypoint's position is not on the globe
 *
 * @example
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const route = { name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] };
 * prepareRoute(route, []).legs[0].track.length // → 111319.491
 */
export function prepareRoute(
  route: Route,
  fields: readonly Field[],
  land: LandFinder | null = null,
): PreparedRoute {
  const legs = route.waypoints
    .slice(1)
    .map((to, index) => prepareLeg(route.waypoints[index] as Waypoint, to, fields, land));
  return { route, legs, roles: fields.map(({ role }) => role), every_s: null };
}

function prepareLeg(
  from: Waypoint,
  to: Waypoint,
  fields: readonly Field[],
  land: LandFinder | null,
): PreparedLeg {
  const track = makeTrack(from, to, to.path);
  const curve = fitTrackCurve(track);
  const heights = { from: from.height_m, to: to.height_m };
  const panels = cutPanels(curve, fields, heights);
  const cells = fields.map((field) => field.tiles.map((tile) => locatePanels(curve, panels, tile, heights)));
  const stretches = land === null ? [] : land(densify(track));
  return { from, to, track, curve, panels, heights, cells, land: stretches };
}

/**
 * The fields that act on a craft: a current in the plan of a craft in the air is left out.
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Kite", "moves": "air", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "1 kWh" } }`,
 * );
 * const fields = [{ role: "current", tiles: [] }, { role: "wind", tiles: [] }];
 * fieldsInUse(craft, fields).map(({ role }) => role) // → ["wind"]
 */
export function fieldsInUse(craft: Craft, fields: readonly Field[]): Field[] {
  return fields.filter(({ role }) => craft.moves === "water" || role === "wind");
}

/** The field that the craft moves through. */
export function mediumRole(craft: Craft): FieldRole {
  return craft.moves === "water" ? "current" : "wind";
}
