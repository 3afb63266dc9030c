/*
 * The one module through which the command reaches the core.
 */
export { type Land, type LandTopology, prepareLand } from "../coast/land.ts";
export {
  checkPlan,
  estimatePlan,
  InputError,
  inspectField,
  type OpenFile,
} from "../index.ts";
export { writeCsv } from "../report/csv.ts";
export { writeGeoJson } from "../report/geojson.ts";
export { writeGpx } from "../report/gpx.ts";
export type { ReportInput, Units } from "../report/input.ts";
export { writeInspection } from "../report/inspection-text.ts";
export { writeJson } from "../report/json.ts";
export { writeTable } from "../report/table.ts";
