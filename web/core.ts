/*
 * The one module through which the page reaches the core, so that what it leans on can be read in one place. The worker has its own,
 * with what computes; this one stays small, since it is part of the first load.
 */
export type { DecidedEstimate, DecidedRoute } from "../src/choose/decided.ts";
export type { EnsembleResult } from "../src/choose/ensemble.ts";
export type { ErrorSpread } from "../src/choose/error-spread.ts";
export type { InTime } from "../src/choose/in-time.ts";
export type { PaceCurve } from "../src/choose/pace-curve.ts";
export type { RefinedWindow } from "../src/choose/refine.ts";
export type { SensitivityProfile } from "../src/choose/sensitivity-profile.ts";
export type { Sure, SureCell } from "../src/choose/sure.ts";
export type { SureInTime } from "../src/choose/sure-in-time.ts";
export type { SureWindow } from "../src/choose/sure-window.ts";
export type { Reach, RoutePlace, TurnBack, TurnLimit } from "../src/choose/turn-back-result.ts";
export type { WindowCell } from "../src/choose/window-cell.ts";
export type { WindowBest, WindowSummary } from "../src/choose/window-summary.ts";
export { ADVISORY } from "../src/constants.ts";
export type { StoreUnit } from "../src/craft/craft.ts";
export type { StillCurve, StillPoint } from "../src/craft/still-curve.ts";
export type {
  ArrivalAnswer,
  ArrivalSolution,
  Estimate,
  Finding,
  LegEstimate,
  Profile,
  RouteEstimate,
  RouteStatus,
  Severity,
} from "../src/estimate/result.ts";
export { columnNames } from "../src/field/column-names.ts";
export type { FieldRole } from "../src/field/field.ts";
export type { FieldInspection } from "../src/field/inspect.ts";
export { LATTICE_COVERED, LATTICE_GAP } from "../src/field/lattice.ts";
export type { Position } from "../src/geodesy/track.ts";
export { parseCoordinate } from "../src/plan/position.ts";
export type { Units } from "../src/report/input.ts";
export { askedText, percentText } from "../src/report/percent-text.ts";
export type { ReportFormat } from "../src/report/report.ts";
export { fateText, triedText } from "../src/report/sure-text.ts";
export { routesClock, storeColumn } from "../src/report/table-units.ts";
export { type Clock, clockFor } from "../src/report/time-text.ts";
export { type Dimension, dimensionOf, fromUnit, symbolsOf, toUnit } from "../src/units.ts";
