/*
 * The public surface of Legwork: explicit names, one core behind the page, the command and `import`.
 */

// Deciding: how far out one can still turn back.
export type { Alternate } from "./choose/alternate.ts";
// Deciding: when to leave and how fast.
export type { ArrivalWindow } from "./choose/arrival-window.ts";
export { solveArrival } from "./choose/arrive.ts";
export { estimateArriving } from "./choose/arriving-estimate.ts";
export { CellTrials, type TrialCounts } from "./choose/cell-trials.ts";
export type { DecidedEstimate, DecidedRoute } from "./choose/decided.ts";
export { type DepartureWindow, windowDepartures } from "./choose/departure-window.ts";
// Deciding: how sure it is.
export {
  type EnsembleFigures,
  type EnsembleLeg,
  type EnsembleMember,
  type EnsembleResult,
  type MembersHeld,
  type MembersInTime,
  ensembleResult,
  type MemberRun,
  memberRun,
} from "./choose/ensemble.ts";
export { type ErrorSpread, errorSpread, type SpreadAnswer } from "./choose/error-spread.ts";
export type { ForecastError } from "./choose/forecast-error.ts";
export { type InTime, latestInTime, type RouteInTime } from "./choose/in-time.ts";
export { type LatestDeparture, latestDeparture } from "./choose/latest-departure.ts";
export type { LegSpread } from "./choose/leg-spreads.ts";
export { erfc, normalProbability, normalQuantile } from "./choose/normal-distribution.ts";
export type { PaceBound } from "./choose/pace-bound.ts";
export { fastestWithReserve, leastUseSpeed, type PaceCurve, paceCurve } from "./choose/pace-curve.ts";
export { type Quantiles, quantiles } from "./choose/quantiles.ts";
export { type RefinedWindow, refineWindow } from "./choose/refine.ts";
export { type RoutePaces, routePaces } from "./choose/route-paces.ts";
export type { SensitivityProfile, WeakPlace } from "./choose/sensitivity-profile.ts";
export { type SpeedRange, speedRange } from "./choose/speed-range.ts";
export type { PacelessConditions } from "./choose/speed-trials.ts";
export { runSteps, type Steps } from "./choose/steps.ts";
export type { BestPair, DecidedBy, Sure, SureBest, SureCell } from "./choose/sure.ts";
export type { SureInTime } from "./choose/sure-in-time.ts";
export type { SurePaces } from "./choose/sure-paces.ts";
export {
  type PlainWindow,
  type SureRoutes,
  type SureWindow,
  sureWindow,
} from "./choose/sure-window.ts";
export type { Sweep } from "./choose/sweep.ts";
export { turnBack } from "./choose/turn-back.ts";
export { withTurnBack } from "./choose/turn-back-estimate.ts";
export type {
  EqualTimePoint,
  Goal,
  GoalKind,
  GoalSeries,
  Reach,
  ReachStretch,
  RoutePlace,
  TurnBack,
  TurnBackSamples,
  TurnLimit,
} from "./choose/turn-back-result.ts";
export {
  type UncertainAnswer,
  type UncertaintyAsked,
  withUncertainty,
} from "./choose/uncertain-estimate.ts";
export { type WhatIf, whatIfText } from "./choose/what-if.ts";
export { type WhatIfResult, whatIfResults } from "./choose/what-if-results.ts";
export { makeSweep, sweepCell, sweepCells, windowCells } from "./choose/window.ts";
export { type CellFinding, type WindowCell, windowCell } from "./choose/window-cell.ts";
export {
  type Refusal,
  type RouteSummary,
  summariseWindow,
  type WindowBest,
  type WindowSummary,
} from "./choose/window-summary.ts";
// Coarse land.
export { type LandTopology, prepareLand } from "./coast/land.ts";
export type { Land } from "./coast/land-cells.ts";
export { type LandStretch, landCrossings } from "./coast/land-crossings.ts";
export { type LandFinder, landFinder } from "./coast/land-finder.ts";
export { ADVISORY } from "./constants.ts";
// Craft: the triangle and the power models.
export { constantPower } from "./craft/constant.ts";
export type {
  Craft,
  Limits,
  Medium,
  Pace,
  PowerModel,
  Reserve,
  Store,
  StoreUnit,
  Windage,
} from "./craft/craft.ts";
export { cubePower } from "./craft/cube.ts";
export { madeGood } from "./craft/made-good.ts";
export { bladeProfilePower, glauertInducedSpeed, inducedPower, rotorPower } from "./craft/rotor.ts";
export { tablePower } from "./craft/table.ts";
export {
  componentsFromCurrent,
  componentsFromWind,
  currentSet,
  solveTriangle,
  throughSpeedFor,
  windFrom,
} from "./craft/triangle.ts";
export { windageResistance } from "./craft/windage.ts";
export { wingPower } from "./craft/wing.ts";
export {
  bestGlideSpeed,
  breguetEndurance,
  breguetRange,
  leastPowerSpeed,
  maxLiftThreeHalvesToDrag,
  maxLiftToDrag,
} from "./craft/wing-performance.ts";
export { InputError, type Place } from "./errors.ts";
// The estimate in two halves, for sweeps and for dragging.
export type { Conditions } from "./estimate/conditions.ts";
export {
  type EstimateAnswer,
  type EstimateInput,
  estimate,
  estimatePrepared,
  fieldSummary,
  prepareRoutes,
} from "./estimate/estimate.ts";
export { estimateRoute, type RouteRun } from "./estimate/estimate-route.ts";
export { routeOutcome, routeOutcomes } from "./estimate/route-outcomes.ts";
export type { RouteOutcome } from "./estimate/route-outcome.ts";
export { magneticCourse, magneticVariation } from "./estimate/magnetic.ts";
export { fieldsInUse, type PreparedRoute, prepareRoute } from "./estimate/prepare.ts";
export type {
  ArrivalAnswer,
  ArrivalSolution,
  ErrorBound,
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
  Still,
  Totals,
} from "./estimate/result.ts";
export type { Route, Waypoint } from "./estimate/route.ts";
// Fields.
export { readGridFile } from "./field/csv.ts";
export type {
  BeyondPolicy,
  Field,
  FieldOrigin,
  FieldRole,
  GapPolicy,
  MemberFiles,
  OutsidePolicy,
  Tile,
  UnusedFile,
} from "./field/field.ts";
export { applyGapPolicy } from "./field/gaps.ts";
export type { GridFile, GridMember } from "./field/grid-file.ts";
export { type FieldInspection, inspectGrid } from "./field/inspect.ts";
export { sampleLattice } from "./field/lattice.ts";
export { memberGrid } from "./field/member-grid.ts";
export { type FieldSource, mergeField } from "./field/merge.ts";
export { type FieldSample, sampleField } from "./field/sample.ts";
export { pressureAltitude, type StandardAir, standardAir } from "./field/standard-atmosphere.ts";
// Geodesy.
export { cutAtAntimeridian, type DrawnPoint, densify } from "./geodesy/drawn-line.ts";
export {
  type Ellipsoid,
  ellipsoid,
  meridianArc,
  meridionalParts,
  meridionalRadius,
  transverseRadius,
  WGS84,
} from "./geodesy/ellipsoid.ts";
export { geodesicDirect, geodesicInverse } from "./geodesy/geodesic.ts";
export { makeTrack, makeTrackOn } from "./geodesy/make-track.ts";
export { rhumbDirect, rhumbInverse } from "./geodesy/rhumb.ts";
export type { PathKind, Position, Track, TrackPoint } from "./geodesy/track.ts";
// The main job: a plan's text in, an estimate out.
export {
  checkPlan,
  estimatePlan,
  type PlanAnswer,
  type PlanChecked,
  type PlanRequest,
} from "./plan/estimate-plan.ts";
export { type InspectRequest, inspectField } from "./plan/inspect-field.ts";
// Plans and craft.
export { type Archive, readArchive, writeArchive } from "./plan/archive.ts";
export { importRoutes } from "./plan/import-routes.ts";
export type { ImportedRoutes } from "./plan/imported-routes.ts";
export type { FieldReference, OpenFile, Plan } from "./plan/plan.ts";
export { parseCoordinate } from "./plan/position.ts";
export { formatPosition } from "./plan/position-format.ts";
export { readCraft } from "./plan/read-craft.ts";
export type { FieldsRead, MemberFields } from "./plan/merge-fields.ts";
export { readMembers } from "./plan/read-fields.ts";
export { readPlan, readPlanDocument } from "./plan/read-plan.ts";
export { formatTime, parseTime } from "./plan/time.ts";
export { type WindowAnswer, type WindowRequest, windowPlan } from "./plan/window-plan.ts";
export { serializeCraft, serializePlan } from "./plan/write-plan.ts";
// Reports.
export { writeCsv } from "./report/csv.ts";
export { writeGeoJson } from "./report/geojson.ts";
export { writeGpx } from "./report/gpx.ts";
export type { ReportInput, Units } from "./report/input.ts";
export { writeInspection } from "./report/inspection-text.ts";
export { writeJson } from "./report/json.ts";
export { type ReportFormat, unitsFor, writeReport } from "./report/report.ts";
export { writeTable } from "./report/table.ts";
export { writeWindowCsv } from "./report/window-csv.ts";
export type { WindowReport } from "./report/window-input.ts";
export { writeWindowJson } from "./report/window-json.ts";
export { writeWindowTable } from "./report/window-table.ts";
export { type Dimension, fromUnit, parseQuantity, symbolsOf, toUnit } from "./units.ts";
