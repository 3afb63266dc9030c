import type { Conditions } from "../estimate/conditions.ts";
import { estimateRoute } from "../estimate/estimate-route.ts";
import { isoTime } from "../estimate/leg-result.ts";
import { type PreparedRoute, prepareRoute } from "../estimate/prepare.ts";
import type { RouteEstimate } from "../estimate/result.ts";
import type { Field } from "../field/field.ts";
import { arrivalMiss, heldToArrival } from "./arrival-kept.ts";
import type { ArrivalWindow } from "./arrival-window.ts";
import { type Quantiles, quantiles } from "./quantiles.ts";
import type { Variant } from "./what-if-results.ts";
import { arrivalOf, worstFinding } from "./window-cell.ts";

/** A member of an ensemble: its own fields, those in use by the craft. */
export interface EnsembleMember {
  readonly member: number;
  readonly fields: readonly Field[];
}

/** Figures over the members that come so far; `null` where none does. */
export interface EnsembleFigures {
  /** How many members the figures are of. */
  readonly count: number;
  /** Time under way, s; arrival, ISO 8601 in UTC; use and what is left, store units. */
  readonly time_s: Quantiles | null;
  readonly arrival: Quantiles<string> | null;
  readonly use: Quantiles | null;
  readonly remaining: Quantiles | null;
}

export interface EnsembleLeg extends EnsembleFigures {
  readonly leg: number;
}

/** In which members of an ensemble the reserve holds. */
export interface MembersHeld {
  /** Ascending; the first is the control, of which the route's own figures are. */
  readonly members: readonly number[];
  /** Share of all members in which the route arrives with the reserve kept, 0..1. */
  readonly reserveHolds: number;
  /** Members in which the route arrives and the reserve is broken, and those in which it does not arrive. */
  readonly breaksReserve: readonly number[];
  readonly doesNotArrive: readonly number[];
}

/** In which members of an ensemble a route arrives when its pace asks for it, where it does. */
export interface MembersInTime {
  /** Share of all members in which it does, 0..1. */
  readonly arrivalHolds: number;
  /** Members in which it arrives, and too early or too late. */
  readonly arrivesEarly: readonly number[];
  readonly arrivesLate: readonly number[];
}

/** A route under every member of an ensemble. */
export interface EnsembleResult extends MembersHeld, Partial<MembersInTime>, EnsembleFigures {
  readonly legs: readonly EnsembleLeg[];
}

/** One member's own estimate of a route. */
export interface MemberRun {
  readonly member: number;
  readonly estimate: RouteEstimate;
}

/**
 * Estimates a route under one member: to the last bit the estimate on that member's fields alone.
 *
 * @param prepared for fields of the ensemble; prepared anew for a member with other axes
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Drone", "moves": "air", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * );
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const wind = (u) => {
 *   const slices = [Float64Array.of(u, 0, u, 0, u, 0, u, 0)];
 *   const axes = { lon: Float64Array.of(-1, 2), lat: Float64Array.of(-1, 1), height: null, times: null };
 *   const tile = { files: [], ...axes, slices, gusts: null, masks: [null], global: false, beyond: "stop" };
 *   return { role: "wind", tiles: [tile], outside: "stop" };
 * };
 * const conditions = { departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 10 }, reserve: null, fields: [wind(0)] };
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }, [wind(0)]);
 * memberRun(prepared, conditions, { member: 3, fields: [wind(2)] }).estimate.totals.time_s // → 9276.62
 */
export function memberRun(
  prepared: PreparedRoute,
  conditions: Conditions,
  { member, fields }: EnsembleMember,
): MemberRun {
  const own = preparedForMember(prepared, conditions.fields, fields);
  return { member, estimate: estimateRoute(own, { ...conditions, fields }).estimate };
}

/** A route prepared for a member's fields: as it is where they have the axes of the fields that it was prepared for. */
export function preparedForMember(
  prepared: PreparedRoute,
  on: readonly Field[],
  fields: readonly Field[],
): PreparedRoute {
  return haveSameAxes(on, fields) ? prepared : preparedAnew(prepared, fields);
}

/** The land stays as it was found. */
function preparedAnew(prepared: PreparedRoute, fields: readonly Field[]): PreparedRoute {
  const anew = prepareRoute(prepared.route, fields);
  const legs = anew.legs.map((leg, n) => ({ ...leg, land: prepared.legs[n]?.land ?? [] }));
  return { ...anew, legs, every_s: prepared.every_s };
}

function haveSameAxes(a: readonly Field[], b: readonly Field[]): boolean {
  const same = (p: Float64Array | null, q: Float64Array | null) =>
    p === q || (p !== null && q !== null && p.length === q.length && p.every((value, n) => value === q[n]));
  return a.every((field, n) => {
    const other = b[n]?.tiles ?? [];
    const tilesAgree = field.tiles.every((tile, t) => {
      const twin = other[t];
      return (
        twin !== undefined &&
        same(tile.lon, twin.lon) &&
        same(tile.lat, twin.lat) &&
        same(tile.height, twin.height)
      );
    });
    return field.tiles.length === other.length && tilesAgree;
  });
}

/**
 * What the runs of all members come to.
 *
 * @param runs at least one, ascending by member
 *
 * @example
 * const craft = readCraft(
 *   `{ "name": "Drone", "moves": "air", "power": { "model": "constant", "rate": "1 kW" },
 *      "store": { "capacity": "10 kWh" } }`,
 * );
 * const waypoint = (name, lon) => (
 *   { name, lat: 0, lon, path: "rhumb", speed_m_s: null, height_m: null, stay_s: 0 });
 * const wind = (u) => {
 *   const slices = [Float64Array.of(u, 0, u, 0, u, 0, u, 0)];
 *   const axes = { lon: Float64Array.of(-1, 2), lat: Float64Array.of(-1, 1), height: null, times: null };
 *   const tile = { files: [], ...axes, slices, gusts: null, masks: [null], global: false, beyond: "stop" };
 *   return { role: "wind", tiles: [tile], outside: "stop" };
 * };
 * const conditions = { departure: 0, craft, pace: { hold: "through-speed", speed_m_s: 10 }, reserve: null, fields: [wind(0)] };
 * const prepared = prepareRoute({ name: "East", waypoints: [waypoint("A", 0), waypoint("B", 1)] }, [wind(0)]);
 * const runs = [0, 2].map((u, member) => memberRun(prepared, conditions, { member, fields: [wind(u)] }));
 * ensembleResult(runs).time_s.p50 // → 10204.29
 */
export function ensembleResult(runs: readonly MemberRun[]): EnsembleResult {
  if (runs.length === 0) throw new Error("an ensemble has at least one member");
  const arrived = runs.filter(({ estimate }) => estimate.arrival !== null);
  const legCount = runs[0]?.estimate.legs.length ?? 0;
  const ends = runs.map(({ member, estimate: { arrival, reserve, totals } }) => ({
    member,
    arrives: arrival !== null,
    remaining: totals.remaining,
    reserve,
  }));
  return {
    ...membersHeld(ends),
    ...figures(arrived.map(({ estimate: { totals, arrival } }) => ({ ...totals, arrival }))),
    legs: Array.from({ length: legCount }, (_, n) => ({
      leg: n + 1,
      ...figures(
        runs.flatMap(({ estimate }) => estimate.legs[n] ?? []).filter(({ arrival }) => arrival !== null),
      ),
    })),
  };
}

/** How a route ends under one member. */
export interface MemberEnd {
  readonly member: number;
  readonly arrives: boolean;
  /** Store units; `null` where it does not arrive. */
  readonly remaining: number | null;
  readonly reserve: number | null;
}

/** Counts the members in which the reserve holds. */
export function membersHeld(ends: readonly MemberEnd[]): MembersHeld {
  const arrived = ends.filter(({ arrives }) => arrives);
  const broken = arrived.filter(({ remaining, reserve }) => (remaining as number) < (reserve as number));
  return {
    members: ends.map(({ member }) => member),
    reserveHolds: (arrived.length - broken.length) / ends.length,
    breaksReserve: broken.map(({ member }) => member),
    doesNotArrive: ends.filter(({ arrives }) => !arrives).map(({ member }) => member),
  };
}

type Figured = Pick<RouteEstimate["legs"][number], "time_s" | "arrival" | "use" | "remaining">;

function figures(of: readonly Figured[]): EnsembleFigures {
  const numbers = (figure: (one: Figured) => number | null) =>
    quantiles(of.map((one) => figure(one) as number));
  const arrivals = quantiles(of.map(({ arrival }) => Date.parse(arrival as string)));
  return {
    count: of.length,
    time_s: numbers(({ time_s }) => time_s),
    arrival: arrivals && {
      min: isoTime(arrivals.min),
      p10: isoTime(arrivals.p10),
      p50: isoTime(arrivals.p50),
      p90: isoTime(arrivals.p90),
      max: isoTime(arrivals.max),
    },
    use: numbers(({ use }) => use),
    remaining: numbers(({ remaining }) => remaining),
  };
}

/** Counts the members in which a route arrives when its pace asks for it. */
export function membersInTime(runs: readonly MemberRun[], asked: ArrivalWindow): MembersInTime {
  const misses = runs.flatMap(({ member, estimate }) => {
    const arrival = arrivalOf(estimate);
    return arrival === null ? [] : [{ member, miss: arrivalMiss(arrival, asked) }];
  });
  const those = (is: (miss: number) => boolean): number[] =>
    misses.filter(({ miss }) => is(miss)).map(({ member }) => member);
  return {
    arrivalHolds: those((miss) => miss === 0).length / runs.length,
    arrivesEarly: those((miss) => miss < 0),
    arrivesLate: those((miss) => miss > 0),
  };
}

/** Members as variants that may decide a route's status. @param asked the arrival that the route's pace asks for */
export function memberVariants(runs: readonly MemberRun[], asked: ArrivalWindow | null = null): Variant[] {
  return runs.map(({ member, estimate }) =>
    heldToArrival(
      {
        label: `member ${member}`,
        status: estimate.status,
        remaining: estimate.totals.remaining,
        worst: worstFinding(estimate.findings),
      },
      arrivalOf(estimate),
      asked,
    ),
  );
}
