import { DOMParser, type Element } from "@xmldom/xmldom";
import { InputError } from "../errors.ts";
import { foundText } from "../found.ts";
import {
  checkSize,
  type FoundLine,
  type ImportedRoutes,
  lineText,
  routesOf,
  type WaypointDocument,
} from "./imported-routes.ts";
import { parseCoordinate } from "./position.ts";

/** What our own files say of the heights in them; another's are above the sea, which a plan does not know. */
const OWN_HEIGHT = "ele is the height above the surface";

/**
 * Reads the routes and tracks of a GPX file (1.0 or 1.1), every point a waypoint; of a file with neither, its waypoints in their
 * order are one route. Names are kept.
 *
 * Entities and document types are refused, so that a small file can't grow when it is read.
 *
 * @param file name of the file, for messages and for routes without a name
 * @throws InputError with the line of the first fault
 *
 * @example
 * importGpx('<gpx><rte><name>Out</name><rtept lat="1" lon="2"/><rtept lat="3" lon="4"/></rte></gpx>', "a.gpx").routes[0] // → { name: "Out", waypoints: [{ lat: 1, lon: 2 }, { lat: 3, lon: 4 }] }
 */
export function importGpx(text: string, file: string): ImportedRoutes {
  checkSize(text, file);
  const root = rootOf(text, file);
  const routes = children(root, "rte").map((route) =>
    lineOf("the route", route, children(route, "rtept"), file),
  );
  const tracks = children(root, "trk").map((track) => {
    const points = children(track, "trkseg").flatMap((segment) => children(segment, "trkpt"));
    return lineOf("the track", track, points, file);
  });
  const marks = children(root, "wpt");
  const lines = [...routes, ...tracks];
  if (lines.length > 0) {
    const beside = marks.length === 0 ? [] : [`left out of it: ${marks.length} beside the routes (wpt)`];
    return routesOf(lines, file, beside);
  }
  if (marks.length === 0) return routesOf([], file, []);
  const named = children(root, "metadata")[0] ?? root;
  return routesOf([lineOf("the list of waypoints", named, marks, file)], file, []);
}

function rootOf(text: string, file: string): Element {
  const declared = /<!(?:DOCTYPE|ENTITY)/i.exec(text);
  if (declared !== null) {
    const line = text.slice(0, declared.index).split("\n").length;
    throw new InputError("a GPX file has no document type of its own; found one", { file, line });
  }
  const parser = new DOMParser({
    onError(_level, message, context) {
      const line = Number(context?.locator?.lineNumber ?? 0);
      const said = lineText(String(message).replace(/^\[xmldom [^\]]*\]/, "")).slice(0, 120);
      throw new InputError(
        `GPX is well-formed XML; found a fault: ${said}`,
        line > 0 ? { file, line } : { file },
      );
    },
  });
  const root = parsed(parser, text, file).documentElement;
  if (root?.localName !== "gpx") {
    throw new InputError(`a GPX file's outermost element is gpx; found ${foundText(root?.localName)}`, {
      file,
    });
  }
  return root;
}

/** The parser wraps what its handler throws; what it throws of its own is a fault of the text as well. */
function parsed(parser: DOMParser, text: string, file: string) {
  try {
    return parser.parseFromString(text.replace(/^\uFEFF/, ""), "text/xml");
  } catch (error) {
    if (error instanceof InputError) throw error;
    const said = error instanceof Error ? lineText(error.message).slice(0, 120) : "";
    throw new InputError(`GPX is well-formed XML; found a fault: ${said}`, { file });
  }
}

function lineOf(what: string, element: Element, points: readonly Element[], file: string): FoundLine {
  return {
    what,
    name: textOf(element, "name"),
    place: placeOf(element, file),
    waypoints: points.map((point) => waypointOf(point, file)),
  };
}

function waypointOf(point: Element, file: string): WaypointDocument {
  const name = textOf(point, "name");
  const height = textOf(point, "cmt") === OWN_HEIGHT ? textOf(point, "ele") : "";
  return {
    ...(name === "" ? {} : { name }),
    lat: degrees(point, "lat", file),
    lon: degrees(point, "lon", file),
    ...(height === "" ? {} : { height: `${height} m` }),
  };
}

function degrees(point: Element, axis: "lat" | "lon", file: string): number {
  const text = point.getAttribute(axis)?.trim() ?? "";
  const place = placeOf(point, file);
  if (!/^[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?$/i.test(text)) {
    const name = axis === "lat" ? "latitude" : "longitude";
    throw new InputError(`${name} takes decimal degrees; found ${foundText(text)}`, place);
  }
  return parseCoordinate(Number(text), axis, place);
}

function placeOf(element: Element, file: string) {
  const { lineNumber } = element;
  return lineNumber === undefined ? { file } : { file, line: lineNumber };
}

/** The elements of a name right inside an element, whatever the prefix of their namespace. */
function children(element: Element, name: string): Element[] {
  const found: Element[] = [];
  for (let node = element.firstChild; node !== null; node = node.nextSibling) {
    if (node.nodeType === 1 && (node as Element).localName === name) found.push(node as Element);
  }
  return found;
}

function textOf(element: Element, name: string): string {
  return lineText(children(element, name)[0]?.textContent ?? "");
}
