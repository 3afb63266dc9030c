/*
 * The one module through which the command reaches the core.
 */
export { InputError } from "../errors.ts";
export type { Estimate } from "../estimate/result.ts";
export type { OpenFile, Plan } from "../plan/plan.ts";
export { writeCsv } from "../report/csv.ts";
export { writeGeoJson } from "../report/geojson.ts";
export { writeGpx } from "../report/gpx.ts";
export type { ReportInput, Units } from "../report/input.ts";
export { writeJson } from "../report/json.ts";
export { writeTable } from "../report/table.ts";

import type { Estimate } from "../estimate/result.ts";
import type { FieldRole } from "../field/field.ts";
import type { OpenFile, Plan } from "../plan/plan.ts";

export interface PlanRequest {
  readonly file: string;
  readonly open: OpenFile;
  readonly departure?: string;
  readonly routes?: readonly string[];
}

export interface PlanAnswer {
  readonly estimate: Estimate;
  readonly plan: Plan;
}

export async function estimatePlan(_text: string, _request: PlanRequest): Promise<PlanAnswer> {
  throw new Error("the estimate is not built yet");
}
export async function checkPlan(_text: string, _request: PlanRequest): Promise<{ readonly plan: Plan }> {
  throw new Error("the check is not built yet");
}
export async function inspectField(
  _open: OpenFile,
  _request: { file: string; role?: FieldRole; columns: Readonly<Record<string, string>> },
): Promise<unknown> {
  throw new Error("the inspection is not built yet");
}
export function writeInspection(_inspection: unknown): string {
  throw new Error("the inspection is not built yet");
}
