import type { LandFinder } from "../coast/land-finder.ts";
import { ADVISORY } from "../constants.ts";
import type { Craft, Pace, Reserve } from "../craft/craft.ts";
import type { Field } from "../field/field.ts";
import { estimateRoute, type RouteRun } from "./estimate-route.ts";
import { fieldNotes } from "./field-notes.ts";
import { statusOf } from "./findings.ts";
import { isoTime } from "./leg-result.ts";
import { fieldsInUse, type PreparedRoute, prepareRoute } from "./prepare.ts";
import type { Estimate, FieldSummary, Finding, Profile } from "./result.ts";
import type { Route } from "./route.ts";

/** Everything that an estimate rests on, read and in SI units. */
export interface EstimateInput {
  readonly title: string;
  /** ms since 1970-01-01T00:00Z. */
  readonly departure: number;
  readonly craft: Craft;
  readonly pace: Pace;
  /** One per route, in place of `pace`. */
  readonly paces?: readonly Pace[];
  readonly reserve: Reserve | null;
  /** All fields of the plan; those that do not act on the craft are named in a note. */
  readonly fields: readonly Field[];
  readonly routes: readonly Route[];
  /** Coarse land for the hint `crosses-land`; `null` for none. */
  readonly land: LandFinder | null;
  /** Step of the departures that are compared, s, as {@link PreparedRoute} has it; left out for none. */
  readonly every_s?: number;
}

export interface EstimateAnswer {
  readonly estimate: Estimate;
  /** Figures along each route, in the order of the routes. */
  readonly profiles: readonly Profile[];
}

/**
 * Estimates every route of a plan: the main job.
 *
 * @throws InputError where a position is not on the globe, or the pace has no speed even with every field at zero
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Boat", "moves": "water", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * );
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const route = { name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] };
 * const pace = { hold: "through-speed", speed_m_s: 5 };
 * const still = { reserve: null, fields: [], land: null };
 * const input = { title: "East", departure: 0, craft, pace, routes: [route], ...still };
 * estimate(input).estimate.routes[0].totals.time_s // → 22263.898
 */
export function estimate(input: EstimateInput): EstimateAnswer {
  const prepared = prepareRoutes(input);
  return estimatePrepared(prepared, input);
}

/**
 * The first half for all routes, one prepared route a route of the input: reuse it while routes, the grids' axes and the
 * craft's medium stay the same.
 *
 * @throws InputError where a waypoint's position is not on the globe
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Boat", "moves": "water", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * );
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const route = { name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] };
 * const pace = { hold: "through-speed", speed_m_s: 5 };
 * const still = { reserve: null, fields: [], land: null };
 * const input = { title: "East", departure: 0, craft, pace, routes: [route], ...still };
 * prepareRoutes(input)[0].legs[0].track.length // → 111319.491
 */
export function prepareRoutes(input: EstimateInput): PreparedRoute[] {
  const fields = fieldsInUse(input.craft, input.fields);
  const land = input.craft.moves === "water" ? input.land : null;
  const { every_s = null } = input;
  return input.routes.map((route) => ({ ...prepareRoute(route, fields, land), every_s }));
}

/**
 * The second half for all routes.
 *
 * @param prepared by `prepareRoutes`, from an input with the same routes, axes and medium
 * @throws InputError where the pace has no speed even with every field at zero
 * @throws Error where the fields are not those that the routes were prepared for
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Boat", "moves": "water", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * );
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const route = { name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] };
 * const pace = { hold: "through-speed", speed_m_s: 5 };
 * const still = { reserve: null, fields: [], land: null };
 * const input = { title: "East", departure: 0, craft, pace, routes: [route], ...still };
 * const prepared = prepareRoutes(input);
 * const at = (speed_m_s) => estimatePrepared(prepared, { ...input, pace: { hold: "through-speed", speed_m_s } });
 * [5, 10].map((speed) => at(speed).estimate.routes[0].totals.time_s) // → [22263.898, 11131.949]
 */
export function estimatePrepared(prepared: readonly PreparedRoute[], input: EstimateInput): EstimateAnswer {
  const fields = fieldsInUse(input.craft, input.fields);
  const { departure, craft, reserve } = input;
  const notes = fieldNotes(input);
  const runs = prepared.map((route, index) => {
    const pace = input.paces?.[index] ?? input.pace;
    return withNotes(estimateRoute(route, { departure, craft, pace, reserve, fields }), notes);
  });
  return {
    estimate: {
      format: "legwork-estimate/1",
      advisory: ADVISORY,
      plan: { title: input.title },
      fields: input.fields.map(fieldSummary),
      routes: runs.map((run) => run.estimate),
    },
    profiles: runs.map((run) => run.profile),
  };
}

function withNotes(run: RouteRun, notes: readonly Finding[]): RouteRun {
  const findings = [...notes, ...run.estimate.findings];
  return { ...run, estimate: { ...run.estimate, status: statusOf(findings), findings } };
}

/**
 * Files and validity of a field: from its first valid time to its last; `null` where no tile of it is timed. Of an ensemble, those
 * of the control, and the files of every member beside them.
 *
 * @example
 * async function* open() {
 *   yield new TextEncoder().encode(
 *     "time,lat,lon,u,v\n2027-05-04T00:00:00Z,0,0,1,0\n2027-05-04T06:00:00Z,0,0,2,0\n");
 * }
 * const grid = await readGridFile(open, { file: "stream.csv", role: "current" });
 * fieldSummary(mergeField("current", [{ grid, gaps: "nearest", beyond: "stop", outside: "stop" }])) // → { files: ["stream.csv"], validFrom: "2027-05-04T00:00:00.000Z", validTo: "2027-05-04T06:00:00.000Z" }
 */
export function fieldSummary({ role, tiles, origin }: Field): FieldSummary {
  const times = tiles.flatMap((tile) =>
    tile.times === null ? [] : [tile.times[0] as number, tile.times[tile.times.length - 1] as number],
  );
  return {
    role,
    files: tiles.flatMap(({ files }) => files),
    validFrom: times.length === 0 ? null : isoTime(Math.min(...times)),
    validTo: times.length === 0 ? null : isoTime(Math.max(...times)),
    ...(origin === undefined || origin.members.length === 0 ? {} : { members: origin.members }),
    ...(origin === undefined || origin.unused.length === 0
      ? {}
      : { unused: origin.unused.map(({ file }) => file) }),
  };
}
