import type { LegEstimate, RouteEstimate } from "../estimate/result.ts";
import type { Route, Waypoint } from "../estimate/route.ts";
import { reduceTurn } from "../geodesy/angle.ts";
import { cutAtAntimeridian, densify, type LonLat } from "../geodesy/drawn-line.ts";
import { makeTrack } from "../geodesy/make-track.ts";
import type { ReportInput } from "./input.ts";
import { findingJson, legJson, refuseNotFinite } from "./json.ts";

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

function routeFeatures(route: RouteEstimate, geometry: Route | undefined): Feature[] {
  const waypoints = geometry?.waypoints ?? [];
  const legs = route.legs.map((leg, index) => {
    const from = waypoints[index];
    const to = waypoints[index + 1];
    if (from === undefined || to === undefined) throw new Error(`leg ${leg.leg} has no geometry`);
    return legFeature(route, leg, from, to);
  });
  const points = waypoints.map((waypoint, index) => waypointFeature(route, waypoint, index));
  return [...legs, ...points, ...findingFeatures(route)];
}

/**
 * The estimate as a GeoJSON FeatureCollection (RFC 7946), longitude first, WGS84: a line a leg, within 50 m of the track and cut at
 * the antimeridian (then a MultiLineString), with the leg's figures as in JSON; a point a waypoint; a point a finding that has
 * a place. `kind` tells them apart. Heights are above the surface and so stand in the properties, not in the coordinates.
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
