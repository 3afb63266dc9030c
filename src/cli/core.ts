/*
 * The one module through which the command reaches the core.
 */
export {
  checkPlan,
  estimatePlan,
  fieldSummary,
  InputError,
  inspectField,
  type Land,
  type LandTopology,
  type OpenFile,
  prepareLand,
  type ReportInput,
  type Units,
  windowPlan,
  writeCsv,
  writeGeoJson,
  writeGpx,
  writeInspection,
  writeJson,
  writeTable,
  writeWindowCsv,
  writeWindowJson,
  writeWindowTable,
} from "../index.ts";
