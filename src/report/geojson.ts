import type { DecidedRoute } from "../choose/decided.ts";
import type { RoutePlace } from "../choose/turn-back-result.ts";
import type { LegEstimate, RouteEstimate } from "../estimate/result.ts";
import type { Route, Waypoint } from "../estimate/route.ts";
import { reduceTurn } from "../geodesy/angle.ts";
import { cutAtAntimeridian, densify, type LonLat } from "../geodesy/drawn-line.ts";
import { makeTrack } from "../geodesy/make-track.ts";
import type { ReportInput } from "./input.ts";
import { findingJson, legJson, refuseNotFinite } from "./json.ts";
import { placeJson } from "./turn-back-json.ts";
import { noReturn } from "./turn-back-text.ts";

/** How far, m, the drawn line may stand from the track. */
const DRAWN_WITHIN = 50;
/** Places of a degree in a coordinate: a centimetre. */
const DEGREE_PLACES = 7;

type Geometry =
  | { readonly type: "Point"; readonly coordinates: LonLat }
  | { readonly type: "LineString"; readonly coordinates: readonly LonLat[] }
  | { readonly type: "MultiLineString"; readonly coordinates: readonly (readonly LonLat[])[] };

interface Feature {
  readonly type: "Feature";
  readonly geometry: Geometry;
  readonly properties: Readonly<Record<string, unknown>>;
}

function coordinate([lon, lat]: LonLat): LonLat {
  const place = 10 ** DEGREE_PLACES;
  return [Math.round(lon * place) / place + 0, Math.round(lat * place) / place + 0];
}

function point(lat: number, lon: number): Geometry {
  return { type: "Point", coordinates: coordinate([reduceTurn(lon), lat]) };
}

function legGeometry(from: Waypoint, to: Waypoint): Geometry {
  const parts = cutAtAntimeridian(densify(makeTrack(from, to, to.path), DRAWN_WITHIN));
  const [first = [], ...rest] = parts.map((part) => part.map(coordinate));
  return rest.length === 0
    ? { type: "LineString", coordinates: first }
    : { type: "MultiLineString", coordinates: [first, ...rest] };
}

function waypointFeature(route: RouteEstimate, waypoint: Waypoint, index: number): Feature {
  return {
    type: "Feature",
    geometry: point(waypoint.lat, waypoint.lon),
    properties: {
      kind: "waypoint",
      route: route.name,
      waypoint: index + 1,
      name: waypoint.name,
      height_m: waypoint.height_m,
      stay_s: waypoint.stay_s,
    },
  };
}

function legFeature(route: RouteEstimate, leg: LegEstimate, from: Waypoint, to: Waypoint): Feature {
  return {
    type: "Feature",
    geometry: legGeometry(from, to),
    properties: { kind: "leg", route: route.name, storeUnit: route.storeUnit, ...legJson(leg) },
  };
}

function findingFeatures(route: RouteEstimate): Feature[] {
  return route.findings.flatMap((finding) =>
    finding.lat === null || finding.lon === null
      ? []
      : [
          {
            type: "Feature",
            geometry: point(finding.lat, finding.lon),
            properties: { kind: "finding", route: route.name, ...findingJson(finding) },
          },
        ],
  );
}

function turnFeatures({ name, turnBack }: DecidedRoute): Feature[] {
  if (turnBack === undefined) return [];
  const { goals, limits, equalTime } = turnBack;
  const feature = (place: RoutePlace, properties: Feature["properties"]): Feature => ({
    type: "Feature",
    geometry: point(place.lat, place.lon),
    properties: { ...properties, route: name, ...placeJson(place) },
  });
  const nameOf = (goal: number) => goals[goal]?.name ?? "";
  const kindOf = (goal: number) => goals[goal]?.kind ?? "";
  return [
    ...limits.flatMap((limit) => {
      const place = noReturn(limit);
      const to = limit.goal === null ? "any" : kindOf(limit.goal);
      const goal = limit.goal === null ? null : nameOf(limit.goal);
      return place === null ? [] : [feature(place, { kind: "point-of-no-return", to, goal })];
    }),
    ...equalTime.map(({ between, place, time_s }) =>
      feature(place, {
        kind: "equal-time-point",
        to: between.map(kindOf),
        goals: between.map(nameOf),
        timeToGo_s: time_s,
      }),
    ),
  ];
}

function routeFeatures(route: DecidedRoute, geometry: Route | undefined): Feature[] {
  const waypoints = geometry?.waypoints ?? [];
  const legs = route.legs.map((leg, index) => {
    const from = waypoints[index];
    const to = waypoints[index + 1];
    if (from === undefined || to === undefined) throw new Error(`leg ${leg.leg} has no geometry`);
    return legFeature(route, leg, from, to);
  });
  const points = waypoints.map((waypoint, index) => waypointFeature(route, waypoint, index));
  return [...legs, ...points, ...findingFeatures(route), ...turnFeatures(route)];
}

/**
 * The estimate as a GeoJSON FeatureCollection (RFC 7946), longitude first, WGS84: a line a leg, within 50 m of the track and cut at
 * the antimeridian (then a MultiLineString), with the leg's figures as in JSON; a point a waypoint; a point a finding that has
 * a place; where turning back was asked for, a point a point of no return and an equal-time point. `kind` tells them apart.
 * Heights are above the surface and so stand in the properties, not in the coordinates.
 *
 * @example
 * JSON.parse(writeGeoJson({ estimate: { format: "legwork-estimate/1", advisory: "", plan: { title: "Two marks" }, fields: [], routes: [] }, routes: [], craft: { name: "Tender", moves: "water" }, pace: { hold: "least-energy" } })).type // → "FeatureCollection"
 */
export function writeGeoJson({ estimate, routes }: ReportInput): string {
  const features = estimate.routes.flatMap((route, index) => routeFeatures(route, routes[index]));
  const head = { type: "FeatureCollection", title: estimate.plan.title, advisory: estimate.advisory };
  const lines = features.map((feature) => JSON.stringify(feature, refuseNotFinite));
  // One feature a line: short enough to read, and to compare line by line.
  return `${JSON.stringify(head).slice(0, -1)},"features":[\n${lines.join(",\n")}\n]}\n`;
}
