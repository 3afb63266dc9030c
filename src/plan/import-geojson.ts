import { InputError } from "../errors.ts";
import { foundText } from "../found.ts";
import { placeOf } from "./first-issue.ts";
import { type FoundFeature, ownRoutes } from "./import-own-geojson.ts";
import {
  checkSize,
  type FoundLine,
  type ImportedRoutes,
  lineText,
  routesOf,
  type WaypointDocument,
} from "./imported-routes.ts";
import { parseJson } from "./json-text.ts";
import { parseCoordinate } from "./position.ts";

type Path = readonly (string | number)[];

interface Source {
  readonly file: string;
}

/** Deepest nesting of collections. */
const DEEPEST = 20;

/**
 * Reads the routes of a GeoJSON file (RFC 7946): each LineString is one, a MultiLineString one for as far as its parts join, over
 * the antimeridian too; of a file without lines, its points in their order are one. `properties.name` is the name. A file that was
 * exported from here gives the routes that it was exported from, with names, paths, heights and stays.
 *
 * @throws InputError with the key of the first fault
 *
 * @example
 * importGeoJson('{"type":"LineString","coordinates":[[2,1],[4,3]]}', "out.geojson").routes // → [{ name: "out", waypoints: [{ lat: 1, lon: 2 }, { lat: 3, lon: 4 }] }]
 */
export function importGeoJson(text: string, file: string): ImportedRoutes {
  checkSize(text, file);
  const source = { file };
  const features = featuresIn(parseJson(text, file), [], source, {}, 0);
  const own = ownRoutes(features, (feature) => pointOf(feature, source), file);
  if (own.length > 0) return routesOf(own, file, []);
  const lines = features.flatMap((feature) => linesOf(feature, source));
  const points = features.flatMap((feature) => pointsOf(feature, source));
  if (lines.length > 0) {
    const beside = points.length === 0 ? [] : [`left out of it: ${points.length} beside the lines (Point)`];
    return routesOf(lines, file, beside);
  }
  if (points.length === 0) return routesOf([], file, []);
  return routesOf([{ what: "the list of points", name: "", place: source, waypoints: points }], file, []);
}

function featuresIn(
  value: unknown,
  path: Path,
  source: Source,
  properties: FoundFeature["properties"],
  depth: number,
): FoundFeature[] {
  if (!isObject(value) || depth > DEEPEST) {
    const rule = depth > DEEPEST ? `is nested at most ${DEEPEST} deep` : "is an object";
    throw fault(`GeoJSON ${rule}; found ${foundText(value)}`, path, source);
  }
  const within = (list: unknown, key: string): FoundFeature[] => {
    if (!Array.isArray(list))
      throw fault(`${key} takes a list; found ${foundText(list)}`, [...path, key], source);
    return list.flatMap((each, at) => featuresIn(each, [...path, key, at], source, properties, depth + 1));
  };
  switch (value["type"]) {
    case "FeatureCollection":
      return within(value["features"], "features");
    case "GeometryCollection":
      return within(value["geometries"], "geometries");
    case "Feature": {
      if (value["geometry"] === null) return [];
      const own = isObject(value["properties"]) ? value["properties"] : {};
      return featuresIn(value["geometry"], [...path, "geometry"], source, own, depth + 1);
    }
    case "Point":
    case "MultiPoint":
    case "LineString":
    case "MultiLineString":
    case "Polygon":
    case "MultiPolygon":
      return [{ properties, geometry: value, path }];
    default:
      throw fault(
        `type takes a type of GeoJSON; found ${foundText(value["type"])}`,
        [...path, "type"],
        source,
      );
  }
}

function linesOf({ geometry, properties, path }: FoundFeature, source: Source): FoundLine[] {
  const { type, coordinates } = geometry;
  const at = [...path, "coordinates"];
  const parts =
    type === "LineString"
      ? [positions(coordinates, at, source)]
      : type === "MultiLineString"
        ? joined(list(coordinates, at, source).map((part, n) => positions(part, [...at, n], source)))
        : [];
  const name = nameOf(properties);
  const place = placeOf(source.file, path);
  return parts.map((waypoints, n) => ({
    what: "the line",
    name: name === "" || parts.length === 1 ? name : `${name} ${n + 1}`,
    place,
    waypoints,
  }));
}

/** Parts that go on where the one before ended are one line; where that is the antimeridian, the cut is no waypoint. */
function joined(parts: readonly WaypointDocument[][]): WaypointDocument[][] {
  const lines: WaypointDocument[][] = [];
  for (const part of parts) {
    const line = lines.at(-1);
    const [end, start] = [line?.at(-1), part[0]];
    if (line === undefined || end === undefined || start === undefined || end.lat !== start.lat) {
      lines.push([...part]);
    } else if (end.lon === start.lon) {
      line.push(...part.slice(1));
    } else if (Math.abs(Number(end.lon)) === 180 && Number(end.lon) === -Number(start.lon)) {
      line.pop();
      line.push(...part.slice(1));
    } else {
      lines.push([...part]);
    }
  }
  return lines;
}

function pointsOf(feature: FoundFeature, source: Source): WaypointDocument[] {
  const { geometry, path } = feature;
  if (geometry["type"] === "Point") return [pointOf(feature, source)];
  return geometry["type"] === "MultiPoint"
    ? positions(geometry["coordinates"], [...path, "coordinates"], source)
    : [];
}

function pointOf({ geometry, properties, path }: FoundFeature, source: Source): WaypointDocument {
  const place = position(geometry["coordinates"], [...path, "coordinates"], source);
  const name = nameOf(properties);
  return name === "" ? place : { name, ...place };
}

function positions(value: unknown, path: Path, source: Source): WaypointDocument[] {
  return list(value, path, source).map((each, at) => position(each, [...path, at], source));
}

function position(value: unknown, path: Path, source: Source): { lat: number; lon: number } {
  const [lon, lat] = list(value, path, source);
  if (typeof lon !== "number" || typeof lat !== "number") {
    throw fault(
      `a position is a longitude and a latitude in degrees; found ${foundText(value)}`,
      path,
      source,
    );
  }
  const place = placeOf(source.file, path);
  return { lat: parseCoordinate(lat, "lat", place), lon: parseCoordinate(lon, "lon", place) };
}

function list(value: unknown, path: Path, source: Source): readonly unknown[] {
  if (!Array.isArray(value)) throw fault(`coordinates take a list; found ${foundText(value)}`, path, source);
  return value;
}

function nameOf({ name }: FoundFeature["properties"]): string {
  return typeof name === "string" || typeof name === "number" ? lineText(String(name)) : "";
}

function fault(sentence: string, path: Path, { file }: Source): InputError {
  return new InputError(sentence, placeOf(file, path));
}

function isObject(value: unknown): value is Record<string, unknown> {
  return typeof value === "object" && value !== null && !Array.isArray(value);
}
