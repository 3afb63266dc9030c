import type { Field } from "../field/field.ts";
import type { Conditions } from "./conditions.ts";
import { FindingBook, inOrder } from "./finding-book.ts";
import { statusOf } from "./findings.ts";
import { plainStay } from "./hover.ts";
import { motionOn } from "./leg-motion.ts";
import { LegWatch } from "./leg-watch.ts";
import type { Motion } from "./motion.ts";
import { mediumRole, type PreparedLeg, type PreparedRoute } from "./prepare.ts";
import type { Finding } from "./result.ts";
import type { RouteOutcome } from "./route-outcome.ts";
import { reachOf, SmoothFleet } from "./smooth-fleet.ts";
import { type SmoothLog, SUNK } from "./smooth-log.ts";
import { reserveAmount } from "./store-findings.ts";

/*
 * One route at many departures at once. Each goes by the same steps as alone; one that meets anything of which a route's findings
 * would tell (but for land, which does not depend on the departure) leaves the sweep and is to be worked out alone.
 */

/** Figures of the departures so far. */
interface Totals {
  /** s since departure at the last waypoint reached, before a stay there; and under way. */
  readonly arrived: Float64Array;
  readonly underWay: Float64Array;
  /** Store units. */
  readonly used: Float64Array;
  /** Store units per second on the last leg. */
  readonly rate: Float64Array;
}

/**
 * Outcomes of a route at several departures, `null` where one has to be worked out alone.
 *
 * @param departures ms since 1970, in place of the one in `conditions`
 */
export function sweepRoute(
  prepared: PreparedRoute,
  conditions: Conditions,
  departures: readonly number[],
): (RouteOutcome | null)[] {
  const field = soleMedium(conditions);
  const motions = field === null ? null : heldMotions(prepared, conditions);
  if (field === null || motions === null) return departures.map(() => null);
  const fleet = new SmoothFleet(field, departures, prepared.every_s);
  const totals = makeTotals(departures.length);
  prepared.legs.forEach((leg, n) => {
    goAlong(fleet, leg, motions[n] as Motion, conditions);
    arrive(fleet.log, totals, plainStay(conditions.craft, leg.to.stay_s).use, leg.to.stay_s);
  });
  return outcomes(fleet.log, totals, prepared, conditions);
}

/** The one field that there is, where it is the medium. */
function soleMedium({ craft, fields }: Conditions): Field | null {
  const [field] = fields;
  return fields.length === 1 && field?.role === mediumRole(craft) ? field : null;
}

/** How each leg is gone along; `null` where more is to be worked out than time and use at held speeds. */
function heldMotions({ legs }: PreparedRoute, conditions: Conditions): readonly Motion[] | null {
  const { craft } = conditions;
  const hovers = craft.moves === "air" && legs.some(({ to }) => to.stay_s > 0);
  const watchesGusts = craft.moves === "air" && craft.limits.gust_m_s !== null;
  if (hovers || watchesGusts || legs.some(({ to }) => plainStay(craft, to.stay_s).failure !== null))
    return null;
  const motions = legs.map((leg) => motionOn(conditions, leg));
  return motions.every(({ steadyRate }) => steadyRate >= 0) ? motions : null;
}

function makeTotals(count: number): Totals {
  const each = () => new Float64Array(count);
  return { arrived: each(), underWay: each(), used: each(), rate: each() };
}

/** So near its limit, as a share of the speed held, a ground speed could be below it by rounding. */
const LIMIT_MARGIN = 1e-12;

function goAlong(fleet: SmoothFleet, leg: PreparedLeg, motion: Motion, { craft }: Conditions): void {
  const { throughSpeed, steadyRate } = motion;
  // A medium no faster than this can neither exceed the wind limit nor bring the ground speed below its own.
  const windLimit = craft.moves === "air" ? craft.limits.wind_m_s : null;
  const slowest = craft.limits.groundSpeed_m_s;
  const reach = Math.min(
    reachOf(throughSpeed),
    windLimit ?? Number.POSITIVE_INFINITY,
    throughSpeed * (1 - LIMIT_MARGIN) - (slowest ?? Number.NEGATIVE_INFINITY),
  );
  fleet.setOut({ leg, cells: leg.cells[0] ?? [], speed: throughSpeed, rate: steadyRate, reach });
  for (let panel = 0; panel < leg.panels.piece.length; panel += 1) fleet.cross(panel);
}

/** Ends a leg with its stay. */
function arrive(log: SmoothLog, totals: Totals, stayUse: number, stay_s: number): void {
  const { begun, legTime, legUse } = log;
  for (let n = 0; n < log.count; n += 1) {
    const time = legTime[n] as number;
    const use = legUse[n] as number;
    const arrived = (begun[n] as number) + time;
    totals.underWay[n] = (totals.underWay[n] as number) + time;
    totals.arrived[n] = arrived;
    begun[n] = arrived + stay_s;
    totals.used[n] = (totals.used[n] as number) + (use + stayUse);
    totals.rate[n] = use / time;
  }
}

function outcomes(
  log: SmoothLog,
  totals: Totals,
  prepared: PreparedRoute,
  conditions: Conditions,
): (RouteOutcome | null)[] {
  const findings = hintsOf(prepared, conditions);
  const status = statusOf(findings);
  const { craft, reserve } = conditions;
  return Array.from(log.departure, (departure, n) => {
    const kept = reserveAmount(reserve, craft, totals.rate[n] as number);
    const use = totals.used[n] as number;
    // Where the store ends, or the reserve begins, is for a run that keeps samples.
    if (log.state[n] === SUNK || use > craft.store.usable - (kept ?? 0)) return null;
    return {
      status,
      arrival: departure + 1000 * (totals.arrived[n] as number),
      time_s: totals.underWay[n] as number,
      use,
      remaining: craft.store.usable - use,
      reserve: kept,
      reached: null,
      findings,
    };
  });
}

/** What is found on the route whatever the departure: hints of land. */
function hintsOf({ legs }: PreparedRoute, { craft, fields, departure }: Conditions): Finding[] {
  const book = new FindingBook(craft, fields, departure);
  legs.forEach((prepared, index) => {
    book.met({ number: index + 1, prepared }, new LegWatch(craft), prepared.track.length);
  });
  return inOrder(book.findings);
}
