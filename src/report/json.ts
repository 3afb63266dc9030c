import type { DecidedEstimate, DecidedRoute } from "../choose/decided.ts";
import type {
  ArrivalAnswer,
  ArrivalSolution,
  ErrorBound,
  FieldAlong,
  FieldSummary,
  Finding,
  LegEstimate,
  Penalty,
  Reached,
  Spread,
  Still,
  Totals,
} from "../estimate/result.ts";
import { ensembleJson } from "./ensemble-json.ts";
import { turnBackJson } from "./turn-back-json.ts";
import { spreadJson, whatIfJson } from "./uncertainty-json.ts";

/*
 * Keys are written out one by one: their order is part of what is promised, and what an estimate may one day carry besides
 * does not slip into the file.
 */

function spread(value: Spread | null): Spread | null {
  return value && { mean: value.mean, min: value.min, max: value.max };
}

function fieldAlong(value: FieldAlong | null): FieldAlong | null {
  return (
    value && {
      alongTrackIntegral_m2_s: value.alongTrackIntegral_m2_s,
      meanAlongTrack_m_s: value.meanAlongTrack_m_s,
      meanCrossTrack_m_s: value.meanCrossTrack_m_s,
      maxSpeed_m_s: value.maxSpeed_m_s,
      covered: value.covered,
    }
  );
}

const still = ({ time_s, use }: Still): Still => ({ time_s, use });
const bound = (value: ErrorBound | null): ErrorBound | null =>
  value && { time_s: value.time_s, use: value.use };

function penalty(value: Penalty | null): Penalty | null {
  return (
    value && {
      time_s: value.time_s,
      use: value.use,
      alongTime_s: value.alongTime_s,
      crossTime_s: value.crossTime_s,
      firstOrderTime_s: value.firstOrderTime_s,
    }
  );
}

/** A leg with its keys in the order of the format. */
export function legJson(value: LegEstimate): LegEstimate {
  return {
    leg: value.leg,
    from: value.from,
    to: value.to,
    path: value.path,
    distance_m: value.distance_m,
    initialCourse_deg: value.initialCourse_deg,
    finalCourse_deg: value.finalCourse_deg,
    magneticCourse_deg: value.magneticCourse_deg,
    departure: value.departure,
    arrival: value.arrival,
    time_s: value.time_s,
    stay_s: value.stay_s,
    throughDistance_m: value.throughDistance_m,
    throughSpeed_m_s: spread(value.throughSpeed_m_s),
    groundSpeed_m_s: spread(value.groundSpeed_m_s),
    heading_deg: spread(value.heading_deg),
    crab_deg: spread(value.crab_deg),
    wind: fieldAlong(value.wind),
    current: fieldAlong(value.current),
    use: value.use,
    remaining: value.remaining,
    still: still(value.still),
    penalty: penalty(value.penalty),
    error: bound(value.error),
  };
}

function totals(value: Totals): Totals {
  return {
    distance_m: value.distance_m,
    time_s: value.time_s,
    stay_s: value.stay_s,
    throughDistance_m: value.throughDistance_m,
    wind: fieldAlong(value.wind),
    current: fieldAlong(value.current),
    use: value.use,
    remaining: value.remaining,
    still: still(value.still),
    penalty: penalty(value.penalty),
    error: bound(value.error),
  };
}

/** A finding with its keys in the order of the format. */
export function findingJson(value: Finding): Finding {
  return {
    code: value.code,
    severity: value.severity,
    leg: value.leg,
    at_m: value.at_m,
    to_m: value.to_m,
    lat: value.lat,
    lon: value.lon,
    message: value.message,
  };
}

const solution = (value: ArrivalSolution): ArrivalSolution => ({
  speed_m_s: value.speed_m_s,
  arrival: value.arrival,
  use: value.use,
  remaining: value.remaining,
  status: value.status,
});

function arrive(value: ArrivalAnswer): ArrivalAnswer {
  return {
    notBefore: value.notBefore,
    notAfter: value.notAfter,
    solutions: value.solutions.map(solution),
    chosen: value.chosen,
    ...(value.cheapest === undefined ? {} : { cheapest: value.cheapest }),
    ...(value.holds === undefined ? {} : { holds: value.holds }),
    nearest: value.nearest && solution(value.nearest),
    reason: value.reason,
  };
}

const reached = ({ leg: on, at_m, time_s, use }: Reached): Reached => ({ leg: on, at_m, time_s, use });

function route(value: DecidedRoute): DecidedRoute {
  return {
    name: value.name,
    status: value.status,
    departure: value.departure,
    arrival: value.arrival,
    storeUnit: value.storeUnit,
    usable: value.usable,
    reserve: value.reserve,
    ...(value.reached === undefined ? {} : { reached: reached(value.reached) }),
    ...(value.arrive === undefined ? {} : { arrive: arrive(value.arrive) }),
    totals: totals(value.totals),
    legs: value.legs.map(legJson),
    findings: value.findings.map(findingJson),
    ...(value.spread === undefined ? {} : { spread: value.spread && spreadJson(value.spread) }),
    ...(value.ensemble === undefined ? {} : { ensemble: ensembleJson(value.ensemble) }),
    ...(value.whatIf === undefined ? {} : { whatIf: value.whatIf.map(whatIfJson) }),
    ...(value.turnBack === undefined ? {} : { turnBack: turnBackJson(value.turnBack) }),
  };
}

/** A field's summary with its keys in the order of the format. */
export function fieldJson({ role, files, validFrom, validTo, members, unused }: FieldSummary): FieldSummary {
  return {
    role,
    files: [...files],
    validFrom,
    validTo,
    ...(members === undefined
      ? {}
      : { members: members.map((each) => ({ member: each.member, files: [...each.files] })) }),
    ...(unused === undefined ? {} : { unused: [...unused] }),
  };
}

/** For `JSON.stringify`: a number that JSON would write as null is a defect, never silent. */
export function refuseNotFinite(key: string, value: unknown): unknown {
  if (typeof value === "number" && !Number.isFinite(value))
    throw new Error(`${key} is ${value} in the estimate`);
  return value;
}

/**
 * The estimate as `legwork-estimate/1`: SI units with the unit in the key, keys in a fixed order, two spaces of indent, a final line end.
 *
 * @example
 * writeJson({ format: "legwork-estimate/1", advisory: "", plan: { title: "Two marks" }, fields: [], routes: [] }).slice(0, 34) // → "{\n  \"format\": \"legwork-estimate/1\""
 */
export function writeJson(estimate: DecidedEstimate): string {
  const whole: DecidedEstimate = {
    format: estimate.format,
    advisory: estimate.advisory,
    plan: { title: estimate.plan.title },
    fields: estimate.fields.map(fieldJson),
    routes: estimate.routes.map(route),
  };
  return `${JSON.stringify(whole, refuseNotFinite, 2)}\n`;
}
