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
  parseQuantity,
  parseTime,
  prepareLand,
  type ReportFormat,
  type Units,
  unitsFor,
  windowPlan,
  writeInspection,
  writeReport,
  writeWindowCsv,
  writeWindowJson,
  writeWindowTable,
} from "../index.ts";
