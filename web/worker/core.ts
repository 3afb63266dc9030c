/*
 * The one module through which the worker reaches the core.
 */
export { type LandTopology, prepareLand } from "../../src/coast/land.ts";
export type { Land } from "../../src/coast/land-cells.ts";
export { type LandFinder, landFinder } from "../../src/coast/land-finder.ts";
export { unrolledRing } from "../../src/coast/ring.ts";
export { type StillPoint, stillCurve, stillPoint } from "../../src/craft/still-curve.ts";
export { currentSet, windFrom } from "../../src/craft/triangle.ts";
export { fileKind } from "../../src/field/file-kind.ts";
export {
  LATTICE_COVERED,
  LATTICE_FILLED,
  LATTICE_GAP,
  LATTICE_HELD,
  sampleLattice,
} from "../../src/field/lattice.ts";
export { sampleField } from "../../src/field/sample.ts";
export {
  densify,
  type EstimateAnswer,
  type EstimateInput,
  estimatePrepared,
  type Field,
  type FieldInspection,
  type FieldReference,
  fieldsInUse,
  type GridFile,
  InputError,
  inspectField,
  inspectGrid,
  type Pace,
  type Plan,
  type PreparedRoute,
  type Profile,
  prepareRoute,
  readGridFile,
} from "../../src/index.ts";
export { readArchive, writeArchive } from "../../src/plan/archive.ts";
export { comparedStep } from "../../src/plan/compared-step.ts";
export { importRoutes } from "../../src/plan/import-routes.ts";
export { type FieldsRead, type MemberFields, mergeSources, roleSource } from "../../src/plan/merge-fields.ts";
export { readCraftDocument } from "../../src/plan/read-craft.ts";
export { readPlanDocument } from "../../src/plan/read-plan.ts";
export { serializeCraft, serializePlan } from "../../src/plan/write-plan.ts";
export type { ReportInput } from "../../src/report/input.ts";
export { writeReport } from "../../src/report/report.ts";
