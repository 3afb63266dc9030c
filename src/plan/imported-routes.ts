import { InputError, type Place } from "../errors.ts";
import { quoted } from "../found.ts";
import type { PlanDocument } from "./plan-schema.ts";

type RouteDocument = PlanDocument["routes"][number];
export type WaypointDocument = RouteDocument["waypoints"][number];

/** Routes read from a file of another kind, as a plan holds them. */
export interface ImportedRoutes {
  /** At least one; each has a name and at least two waypoints. */
  readonly routes: readonly (RouteDocument & { readonly name: string })[];
  /** What of the file is not in the routes, in sentences. */
  readonly notes: readonly string[];
}

/** A line of waypoints as it was found, still to be held to the rules of a route. */
export interface FoundLine {
  /** May be empty. */
  readonly name: string;
  /** What it is in its file, as `the track`. */
  readonly what: string;
  readonly place: Place;
  readonly waypoints: readonly WaypointDocument[];
}

/** Most waypoints of one route: beyond it a line is a recording, and a plan by it no plan. */
const MOST_WAYPOINTS = 2000;
const MOST_ROUTES = 100;

/** Largest text, UTF-16 units: a tree of its elements takes some fifty times as much memory. */
const LARGEST = 16_000_000;

/** @throws InputError where a text is larger than any file of routes should be */
export function checkSize(text: string, file: string): void {
  if (text.length > LARGEST) {
    const size = Math.round(text.length / 1e6);
    throw new InputError(`a file of routes is at most ${LARGEST / 1e6} MB; found ${size} MB`, { file });
  }
}

/**
 * Makes routes of lines: nameless ones are named for the file, and a waypoint where the one before it is is left out, since a leg
 * leads from one place to another.
 *
 * @throws InputError for no line at all, a line of fewer than two places or of more than {@link MOST_WAYPOINTS}, too many lines
 */
export function routesOf(
  lines: readonly FoundLine[],
  file: string,
  notes: readonly string[],
): ImportedRoutes {
  if (lines.length === 0)
    throw new InputError("a file of routes holds at least one route; found none", { file });
  if (lines.length > MOST_ROUTES) {
    throw new InputError(`a file holds at most ${MOST_ROUTES} routes; found ${lines.length}`, { file });
  }
  const repeats: string[] = [];
  const routes = lines.map((line, index) => {
    const name = lineText(line.name) || stemOf(file) + (lines.length === 1 ? "" : ` ${index + 1}`);
    const waypoints = line.waypoints.filter((waypoint, at) => !isSamePlace(line.waypoints[at - 1], waypoint));
    checkLength(waypoints.length, line, name);
    const left = line.waypoints.length - waypoints.length;
    if (left > 0) {
      const what = left === 1 ? "a waypoint that repeats" : `${left} waypoints that repeat`;
      repeats.push(`${quoted(name)}: left out ${what} the one before`);
    }
    return { name, waypoints };
  });
  return { routes, notes: [...notes, ...repeats] };
}

function checkLength(count: number, { what, place }: FoundLine, name: string): void {
  if (count < 2) {
    throw new InputError(`${what} ${quoted(name)} has at least 2 different places; found ${count}`, place);
  }
  if (count > MOST_WAYPOINTS) {
    const rule = `has at most ${MOST_WAYPOINTS} waypoints as a route`;
    throw new InputError(`${what} ${quoted(name)} ${rule}; found ${count}: thin it out first`, place);
  }
}

function isSamePlace(before: WaypointDocument | undefined, { lat, lon, stay }: WaypointDocument): boolean {
  return before !== undefined && stay === undefined && before.lat === lat && before.lon === lon;
}

/** A text as one line without control characters, as a name in a plan is. */
export function lineText(text: string): string {
  return text.replace(/[\p{Cc}\u2028\u2029\s]+/gu, " ").trim();
}

function stemOf(file: string): string {
  const last = file.split("/").at(-1) ?? "";
  return lineText(last.replace(/\.[^.]*$/, "")) || "Route";
}
