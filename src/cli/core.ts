/*
 * The one module through which the command reaches the core.
 */
export {
  checkPlan,
  estimatePlan,
  InputError,
  inspectField,
  type Land,
  type LandTopology,
  type OpenFile,
  prepareLand,
  type ReportInput,
  type Units,
  writeCsv,
  writeGeoJson,
  writeGpx,
  writeInspection,
  writeJson,
  writeTable,
} from "../index.ts";
