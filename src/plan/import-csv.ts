import { InputError } from "../errors.ts";
import { CsvTable } from "../field/csv-table.ts";
import { quoted } from "../found.ts";
import { type Dimension, parseQuantity } from "../units.ts";
import {
  checkSize,
  type FoundLine,
  type ImportedRoutes,
  lineText,
  routesOf,
  type WaypointDocument,
} from "./imported-routes.ts";
import { parseCoordinate } from "./position.ts";

/** Headers of each column, in lower case. */
const HEADERS = {
  route: ["route"],
  name: ["name", "waypoint", "wp"],
  lat: ["lat", "latitude"],
  lon: ["lon", "long", "lng", "longitude"],
  path: ["path"],
  speed: ["speed"],
  height: ["height"],
  stay: ["stay"],
} as const;

type Column = keyof typeof HEADERS;

/** Where a column stands, and the unit in its header's brackets, if any. */
interface Found {
  readonly at: number;
  readonly unit: string;
}

type Columns = ReadonlyMap<Column, Found>;

type GrowingLine = Omit<FoundLine, "waypoints"> & { readonly waypoints: WaypointDocument[] };

const DIMENSIONS: readonly (readonly ["speed" | "height" | "stay", Dimension])[] = [
  ["speed", "speed"],
  ["height", "length"],
  ["stay", "time"],
];

/**
 * Reads a CSV table of waypoints, one a row: `lat` and `lon` in any notation of a plan, and where there are such columns `name`,
 * `path`, `speed`, `height` and `stay` as in a plan, the unit in the cell or in brackets in the header (`speed [kn]`). A column
 * `route` tells several routes apart; rows of one need not stand together. Other columns are named in the notes.
 *
 * @throws InputError with the line of the first fault
 *
 * @example
 * importCsv("name,lat,lon\nQuay,50°21.5'N,4 09 W\nHead,50.3,-4.2\n", "a.csv").routes[0].waypoints[0] // → { name: "Quay", lat: "50°21.5'N", lon: "4 09 W" }
 */
export function importCsv(text: string, file: string): ImportedRoutes {
  checkSize(text, file);
  const newline = text.includes("\n") || !text.includes("\r") ? "\n" : "\r";
  const whole = text.replace(/^\uFEFF/, "").replace(/[\r\n]*$/, newline);
  const table = new CsvTable(file);
  const rows = table.take({ text: whole, newline, bytes: whole.length });
  table.end();
  if (table.head === null) throw new InputError("a table begins with a header; found none", { file });
  const { headers, headerLine } = table.head;
  const columns = columnsOf(headers);
  for (const axis of ["lat", "lon"] as const) {
    if (columns.has(axis)) continue;
    const rule = `a table of waypoints has a column ${quoted(axis)}`;
    throw new InputError(`${rule}; found ${headers.map(quoted).join(", ")}`, { file, line: headerLine });
  }
  const lines = new Map<string, GrowingLine>();
  rows.rows.forEach((row, at) => {
    if (row.every((cell) => cell.trim() === "")) return;
    const place = { file, line: rows.lineOf(at) };
    const name = cellOf(row, columns.get("route"));
    const line: GrowingLine = lines.get(name) ?? { what: "the route", name, place, waypoints: [] };
    lines.set(name, line);
    line.waypoints.push(waypointOf(row, columns, place));
  });
  return routesOf([...lines.values()], file, unused(headers, columns));
}

function columnsOf(headers: readonly string[]): Columns {
  const columns = new Map<Column, Found>();
  headers.forEach((header, at) => {
    const [, word = "", unit = ""] = /^([^[\]]*?)\s*(?:\[\s*(.*?)\s*\])?$/.exec(header.trim()) ?? [];
    const wanted = word.trim().toLowerCase();
    for (const [column, names] of Object.entries(HEADERS) as [Column, readonly string[]][])
      if (names.includes(wanted) && !columns.has(column)) columns.set(column, { at, unit });
  });
  return columns;
}

function waypointOf(
  row: readonly string[],
  columns: Columns,
  place: { readonly file: string; readonly line: number },
): WaypointDocument {
  const name = cellOf(row, columns.get("name"));
  const path = cellOf(row, columns.get("path"));
  if (path !== "" && path !== "geodesic" && path !== "rhumb") {
    throw new InputError(`path takes "geodesic" or "rhumb"; found ${quoted(path)}`, place);
  }
  const quantities = DIMENSIONS.flatMap(([column, dimension]) => {
    const found = columns.get(column);
    const cell = cellOf(row, found);
    if (cell === "") return [];
    const text = found?.unit && Number.isFinite(Number(cell)) ? `${cell} ${found.unit}` : cell;
    parseQuantity(text, dimension, column, place);
    return [[column, text] as const];
  });
  return {
    ...(name === "" ? {} : { name }),
    lat: coordinateOf(row, columns, "lat", place),
    lon: coordinateOf(row, columns, "lon", place),
    ...(path === "" ? {} : { path }),
    ...Object.fromEntries(quantities),
  };
}

/** As written, so that the plan says what the table said; a bare number as a number. */
function coordinateOf(
  row: readonly string[],
  columns: Columns,
  axis: "lat" | "lon",
  place: { readonly file: string; readonly line: number },
): number | string {
  const text = cellOf(row, columns.get(axis));
  const degrees = parseCoordinate(text, axis, place);
  return /^[+-]?\d+(?:\.\d+)?$/.test(text) ? degrees : text;
}

function cellOf(row: readonly string[], found: Found | undefined): string {
  return found === undefined ? "" : lineText(row[found.at] ?? "");
}

function unused(headers: readonly string[], columns: Columns): string[] {
  const used = new Set([...columns.values()].map(({ at }) => at));
  const others = headers.filter((header, at) => !used.has(at) && header !== "");
  return others.length === 0 ? [] : [`columns not used: ${others.map(quoted).join(", ")}`];
}
