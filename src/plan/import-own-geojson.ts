import type { FoundLine, WaypointDocument } from "./imported-routes.ts";

/** A feature as far as it is looked at: what it is called, its geometry, and where they stand. */
export interface FoundFeature {
  readonly properties: Readonly<Record<string, unknown>>;
  readonly geometry: Readonly<Record<string, unknown>>;
  readonly path: readonly (string | number)[];
}

/**
 * The routes of a GeoJSON file that `writeGeoJson` wrote: its waypoints by route, each with the path of the leg that arrives at
 * it. None where the file is another's.
 */
export function ownRoutes(
  features: readonly FoundFeature[],
  pointOf: (feature: FoundFeature) => WaypointDocument,
  file: string,
): FoundLine[] {
  const lines = new Map<string, WaypointDocument[]>();
  const paths = new Map<string, string>();
  for (const { properties } of features) {
    const { kind, route, leg, path } = properties;
    if (kind === "leg" && typeof path === "string") paths.set(`${String(leg)} ${String(route)}`, path);
  }
  for (const feature of features) {
    const { kind, route, waypoint, height_m, stay_s } = feature.properties;
    if (kind !== "waypoint" || typeof route !== "string" || feature.geometry["type"] !== "Point") continue;
    const path = paths.get(`${Number(waypoint) - 1} ${route}`);
    const line = lines.get(route) ?? [];
    lines.set(route, line);
    line.push({
      ...pointOf(feature),
      ...(path === "rhumb" ? { path } : {}),
      ...(typeof height_m === "number" && height_m >= 0 ? { height: `${height_m} m` } : {}),
      ...(typeof stay_s === "number" && stay_s > 0 ? { stay: `${stay_s} s` } : {}),
    });
  }
  return [...lines].map(([name, waypoints]) => ({ what: "the route", name, place: { file }, waypoints }));
}
