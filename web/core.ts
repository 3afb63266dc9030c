/*
 * The one module through which the page reaches the core, so that what it leans on can be read in one place.
 */
export { ADVISORY } from "../src/constants.ts";
export type { StoreUnit } from "../src/craft/craft.ts";
export type {
  Estimate,
  FieldAlong,
  FieldSummary,
  Finding,
  LegEstimate,
  Penalty,
  Profile,
  RouteEstimate,
  RouteStatus,
  Severity,
  Spread,
} from "../src/estimate/result.ts";
export type { FieldRole } from "../src/field/field.ts";
export type { Position } from "../src/geodesy/track.ts";
