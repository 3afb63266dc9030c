/*
 * The public surface of Legwork: explicit names, one core behind the page, the command and `import`.
 */

export { ADVISORY } from "./constants.ts";
// Craft.
export type { Craft, Limits, Pace, PowerModel, Reserve, Store, StoreUnit, Windage } from "./craft/craft.ts";
export { InputError, type Place } from "./errors.ts";
export type { Conditions } from "./estimate/conditions.ts";
export {
  type EstimateAnswer,
  type EstimateInput,
  estimate,
  estimatePrepared,
  fieldSummary,
  prepareRoutes,
} from "./estimate/estimate.ts";
export { estimateRoute, type RouteOutcome, type RouteRun, routeOutcome } from "./estimate/estimate-route.ts";
export { magneticCourse, magneticVariation } from "./estimate/magnetic.ts";
export { fieldsInUse, type PreparedRoute, prepareRoute } from "./estimate/prepare.ts";
export type {
  Estimate,
  FieldAlong,
  FieldSummary,
  Finding,
  FindingCode,
  LegEstimate,
  Penalty,
  Profile,
  Reached,
  RouteEstimate,
  RouteStatus,
  Severity,
  Spread,
  Totals,
} from "./estimate/result.ts";
export type { Route, Waypoint } from "./estimate/route.ts";

// Fields.
export { readGridFile } from "./field/csv.ts";
export type { BeyondPolicy, Field, FieldRole, GapPolicy, OutsidePolicy, Tile } from "./field/field.ts";
export type { GridFile } from "./field/grid-file.ts";
export { type FieldInspection, inspectGrid } from "./field/inspect.ts";
export { type FieldSource, mergeField } from "./field/merge.ts";
export { sampleField } from "./field/sample.ts";
export { cutAtAntimeridian, densify } from "./geodesy/drawn-line.ts";

// Geodesy.
export { geodesicDirect, geodesicInverse } from "./geodesy/geodesic.ts";
export { makeTrack } from "./geodesy/make-track.ts";
export type { PathKind, Position, Track, TrackPoint } from "./geodesy/track.ts";
// The main job.
export { checkPlan, estimatePlan, type PlanAnswer, type PlanRequest } from "./plan/estimate-plan.ts";
export { type InspectRequest, inspectField } from "./plan/inspect-field.ts";

// Plans.
export type { FieldReference, OpenFile, Plan } from "./plan/plan.ts";
