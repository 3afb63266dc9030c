import type { StoreUnit } from "../craft/craft.ts";
import type { FieldRole, MemberFiles } from "../field/field.ts";
import type { PathKind } from "../geodesy/track.ts";

/*
 * The estimate as it is returned and as `--format json` writes it: SI units with the unit in the key, angles in degrees,
 * courses 0 <= c < 360 true, times ISO 8601 in UTC with milliseconds. `null` stands where a figure depends on time
 * that the route did not reach; never NaN.
 */

export type Severity = "note" | "caution" | "stop";
export type RouteStatus = "clear" | "caution" | "stop";

export type FindingCode =
  | "cannot-hold-track"
  | "outside-area"
  | "outside-time"
  | "gap"
  | "outside-power-table"
  | "store-empty"
  | "reserve-broken"
  | "reserve-unsure"
  | "wind-limit"
  | "gust-limit"
  | "arrival-missed"
  | "gap-filled"
  | "held-beyond"
  | "zero-outside"
  | "slow-over-ground"
  | "stems-flow"
  | "wind-against-current"
  | "crosses-land"
  | "height-outside-field"
  | "near-pole"
  | "field-unused"
  | "field-shared"
  | "no-field"
  | "no-variation"
  | "pace-found";

/** Something that the estimate wants read: where on the route, and by how much. `leg` is `null` for the whole route. */
export interface Finding {
  readonly code: FindingCode;
  readonly severity: Severity;
  readonly leg: number | null;
  readonly at_m: number | null;
  readonly to_m: number | null;
  readonly lat: number | null;
  readonly lon: number | null;
  readonly message: string;
}

export interface Spread {
  readonly mean: number;
  readonly min: number;
  readonly max: number;
}

/** The field along a leg, or along a whole route. */
export interface FieldAlong {
  /** Line integral of the field along the track, m²/s. */
  readonly alongTrackIntegral_m2_s: number;
  /** Mean over distance, m/s, positive with the craft. */
  readonly meanAlongTrack_m_s: number;
  /** Mean over distance, m/s, positive toward starboard. */
  readonly meanCrossTrack_m_s: number;
  readonly maxSpeed_m_s: number;
  /** Share of the distance with real data, 0..1. */
  readonly covered: number;
}

/** The same leg with every field at zero. */
export interface Still {
  /** Under way, as a leg's own `time_s`: without its stay. */
  readonly time_s: number;
  /** With its stay. */
  readonly use: number;
}

/** With the field minus still. `alongTime_s` + `crossTime_s` = `time_s`. */
export interface Penalty {
  readonly time_s: number;
  readonly use: number;
  readonly alongTime_s: number | null;
  readonly crossTime_s: number | null;
  /** The line-integral estimate -Γ/V²; `null` under every pace but `through-speed`. */
  readonly firstOrderTime_s: number | null;
}

/** Bounds on the numerical error. */
export interface ErrorBound {
  readonly time_s: number;
  readonly use: number;
}

export interface LegEstimate {
  readonly leg: number;
  readonly from: string;
  readonly to: string;
  readonly path: PathKind;
  readonly distance_m: number;
  readonly initialCourse_deg: number;
  readonly finalCourse_deg: number;
  readonly magneticCourse_deg: number | null;
  readonly departure: string | null;
  readonly arrival: string | null;
  /** Time under way, s. */
  readonly time_s: number | null;
  readonly stay_s: number;
  readonly throughDistance_m: number | null;
  readonly throughSpeed_m_s: Spread | null;
  readonly groundSpeed_m_s: Spread | null;
  readonly heading_deg: Spread | null;
  readonly crab_deg: Spread | null;
  readonly wind: FieldAlong | null;
  readonly current: FieldAlong | null;
  readonly use: number | null;
  readonly remaining: number | null;
  readonly still: Still;
  readonly penalty: Penalty | null;
  readonly error: ErrorBound | null;
}

export interface Totals {
  readonly distance_m: number;
  readonly time_s: number | null;
  readonly stay_s: number;
  readonly throughDistance_m: number | null;
  readonly wind: FieldAlong | null;
  readonly current: FieldAlong | null;
  readonly use: number | null;
  readonly remaining: number | null;
  readonly still: Still;
  readonly penalty: Penalty | null;
  readonly error: ErrorBound | null;
}

/** How far a route came that stops on the way. */
export interface Reached {
  readonly leg: number;
  /** Metres from that leg's start. */
  readonly at_m: number;
  /** Time and use since the route's departure. */
  readonly time_s: number;
  readonly use: number;
}

/** A constant through-speed that arrives when it should. */
export interface ArrivalSolution {
  readonly speed_m_s: number;
  readonly arrival: string;
  readonly use: number;
  readonly remaining: number;
  readonly status: RouteStatus;
}

/** The through-speeds at which a route arrives when the pace asks for it. */
export interface ArrivalAnswer {
  /** ISO 8601; `null` where arriving early is no fault. Both are equal where one time is asked for. */
  readonly notBefore: string | null;
  readonly notAfter: string;
  /** Ascending in speed. */
  readonly solutions: readonly ArrivalSolution[];
  /**
   * Index of the solution that the route is estimated at: of the cheapest, or, where a span of times is asked for, of the cheapest that holds
   * in everything that the plan names, where one is found; `null` where there is none.
   */
  readonly chosen: number | null;
  /**
   * Where a span of times is asked for and the plan names members, what-ifs or a confidence: index of the cheapest solution of the plain
   * estimate, and whether the chosen one holds in all of them.
   */
  readonly cheapest?: number | null;
  readonly holds?: boolean;
  /** Where there is none: the achievable arrival nearest to those asked for; `null` where no speed completes the route. */
  readonly nearest: ArrivalSolution | null;
  /** Where there is none: why. Where the cheapest does not hold: what stops it, or, where no other does, what stops the nearest to it. */
  readonly reason: string | null;
}

export interface RouteEstimate {
  readonly name: string;
  readonly status: RouteStatus;
  readonly departure: string;
  readonly arrival: string | null;
  readonly storeUnit: StoreUnit;
  readonly usable: number;
  /** The reserve in store units; 0 where the plan names none; `null` where it is a time at a rate that was not reached. */
  readonly reserve: number | null;
  readonly reached?: Reached;
  /** Where the pace asks for an arrival. */
  readonly arrive?: ArrivalAnswer;
  readonly totals: Totals;
  readonly legs: readonly LegEstimate[];
  readonly findings: readonly Finding[];
}

export interface FieldSummary {
  readonly role: FieldRole;
  readonly files: readonly string[];
  /** First and last valid time; `null` for a steady field. */
  readonly validFrom: string | null;
  readonly validTo: string | null;
  /** Of an ensemble: the files of each member, ascending; the keys above are of the first, the control. */
  readonly members?: readonly MemberFiles[];
  /** Files that the plan names and nothing is used of. */
  readonly unused?: readonly string[];
}

/** The whole answer to a plan: `legwork-estimate/1`. */
export interface Estimate {
  readonly format: "legwork-estimate/1";
  readonly advisory: string;
  readonly plan: { readonly title: string };
  readonly fields: readonly FieldSummary[];
  readonly routes: readonly RouteEstimate[];
}

/**
 * Figures along a route for drawing, one entry a sample, in order along the route; stays appear as two samples at one distance.
 * Along and cross are of the medium that the craft moves through (0 where the plan has none).
 */
export interface Profile {
  readonly leg: Int32Array;
  /** Metres from the route's start. */
  readonly distance_m: Float64Array;
  /** Seconds since departure. */
  readonly time_s: Float64Array;
  readonly lat: Float64Array;
  /** Continuous along each leg, degrees. */
  readonly lon: Float64Array;
  readonly along_m_s: Float64Array;
  readonly cross_m_s: Float64Array;
  readonly groundSpeed_m_s: Float64Array;
  readonly throughSpeed_m_s: Float64Array;
  /** Store units per second, hotel load included. */
  readonly usePerSecond: Float64Array;
  readonly remaining: Float64Array;
}
