import type { Pace } from "../craft/craft.ts";
import type { FieldRole } from "../field/field.ts";
import { normaliseCourse } from "../geodesy/angle.ts";
import { type DirectionRange, directionSpread } from "./direction-range.ts";
import type { FlowSums, LegSums } from "./leg-work.ts";
import { magneticCourse } from "./magnetic.ts";
import type { PreparedLeg } from "./prepare.ts";
import type { FieldAlong, LegEstimate, Penalty, Spread, Still } from "./result.ts";

/** What a leg came to: its sums under way, its stay, and the runs beside it. */
export interface LegOutcome {
  readonly sums: LegSums;
  readonly stayUse: number;
  readonly stayUseBound: number;
  /** Time of the run with the medium's cross-track component at zero, `null` where that run does not reach the waypoint. */
  readonly alongOnlyTime: number | null;
  /** Bound on the error of the departure's time, s. */
  readonly departureBound: number;
  /** ms since 1970. */
  readonly departure: number;
  /** Magnetic variation there, `null` outside the model's dates. */
  readonly variation: number | null;
  /** In the store after the leg and its stay. */
  readonly remaining: number;
}

/** The terms on which a leg is run. */
export interface LegTerms {
  readonly pace: Pace;
  readonly still: Still;
  /** Fields of the plan that act on the craft. */
  readonly roles: readonly FieldRole[];
  /** The field that the craft moves through, `null` where the plan has none. */
  readonly medium: FieldRole | null;
}

/** The account of a leg; `outcome` is `null` from the leg on in which the route stops. */
export function legEstimate(
  number: number,
  leg: PreparedLeg,
  terms: LegTerms,
  outcome: LegOutcome | null,
): LegEstimate {
  const { still, roles } = terms;
  const { track, from, to } = leg;
  const sums = outcome?.sums ?? null;
  const has = (role: FieldRole) => roles.includes(role);
  return {
    leg: number,
    from: from.name,
    to: to.name,
    path: to.path,
    distance_m: track.length,
    initialCourse_deg: normaliseCourse(track.initialCourse),
    finalCourse_deg: normaliseCourse(track.finalCourse),
    magneticCourse_deg:
      outcome === null || outcome.variation === null
        ? null
        : magneticCourse(track.initialCourse, outcome.variation),
    departure: outcome === null ? null : isoTime(outcome.departure),
    arrival: sums === null || outcome === null ? null : isoTime(outcome.departure + 1000 * sums.time),
    time_s: sums?.time ?? null,
    stay_s: to.stay_s,
    throughDistance_m: sums?.throughDistance ?? null,
    throughSpeed_m_s:
      sums === null
        ? null
        : meanWithin(sums.throughDistance / sums.time, sums.minThroughSpeed, sums.maxThroughSpeed),
    groundSpeed_m_s:
      sums === null ? null : meanWithin(track.length / sums.time, sums.minGroundSpeed, sums.maxGroundSpeed),
    heading_deg: sums === null ? null : headingSpread(sums.heading),
    crab_deg: sums === null ? null : directionSpread(sums.crab),
    wind: sums === null || !has("wind") ? null : fieldAlong(sums.flows.wind, track.length),
    current: sums === null || !has("current") ? null : fieldAlong(sums.flows.current, track.length),
    use: outcome === null ? null : outcome.sums.use + outcome.stayUse,
    remaining: outcome?.remaining ?? null,
    still,
    penalty: outcome === null ? null : legPenalty(outcome, terms),
    error:
      outcome === null
        ? null
        : {
            time_s: outcome.sums.timeBound + Math.abs(outcome.sums.growth) * outcome.departureBound,
            use:
              outcome.sums.useBound +
              outcome.stayUseBound +
              Math.abs(outcome.sums.growth * (outcome.sums.use / outcome.sums.time)) * outcome.departureBound,
          },
  };
}

/** ISO 8601 in UTC with milliseconds. */
export function isoTime(milliseconds: number): string {
  return new Date(Math.round(milliseconds)).toISOString();
}

/** The mean over time of a quantity whose extremes were read at stations lies within them but for rounding. */
function meanWithin(mean: number, min: number, max: number): Spread {
  return { mean, min: Math.min(min, mean), max: Math.max(max, mean) };
}

function headingSpread(heading: DirectionRange): Spread {
  const { mean, min, max } = directionSpread(heading);
  return { mean: normaliseCourse(mean), min: normaliseCourse(min), max: normaliseCourse(max) };
}

function fieldAlong(sums: FlowSums, length: number): FieldAlong {
  return {
    alongTrackIntegral_m2_s: sums.along,
    meanAlongTrack_m_s: sums.along / length,
    meanCrossTrack_m_s: sums.cross / length,
    maxSpeed_m_s: sums.maxSpeed,
    covered: Math.min(1, sums.covered / length),
  };
}

function legPenalty(outcome: LegOutcome, { pace, still, medium }: LegTerms): Penalty {
  const { sums, stayUse, alongOnlyTime } = outcome;
  const time = sums.time - still.time_s;
  const along = alongOnlyTime === null ? null : alongOnlyTime - still.time_s;
  return {
    time_s: time,
    use: sums.use + stayUse - still.use,
    alongTime_s: along,
    crossTime_s: along === null ? null : time - along,
    // To first order in w/V the penalty is -Γ/V², Γ the line integral of the medium along the leg.
    firstOrderTime_s:
      pace.hold !== "through-speed"
        ? null
        : medium === null
          ? 0
          : -sums.flows[medium].along / (pace.speed_m_s * pace.speed_m_s),
  };
}
