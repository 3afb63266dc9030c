import { estimatePlan, parseTime, type ReportFormat, type Units, writeReport } from "./core.ts";
import { loadLand } from "./load-land.ts";
import { tellOfOption } from "./option-fault.ts";
import { writeResult } from "./output.ts";
import { openPlan } from "./plan-files.ts";
import { noteUnits } from "./units-note.ts";

export interface EstimateOptions {
  readonly route?: readonly string[];
  readonly departure?: string;
  readonly format: ReportFormat;
  readonly units?: Units;
  readonly out?: string;
  readonly turnBack?: boolean;
}

/** Estimates a plan and writes the answer; 1 where some route ends in a stop. */
export async function estimateCommand(file: string, options: EstimateOptions): Promise<number> {
  if (options.departure !== undefined) parseTime(options.departure, "--departure");
  noteUnits(options.units, options.format);
  const inputs = new Set([file]);
  const source = await openPlan(file, inputs);
  const { estimate, plan } = await estimatePlan(source.text, {
    file,
    open: source.open,
    loadLand,
    ...(options.departure === undefined ? {} : { departure: options.departure }),
    ...(options.turnBack === undefined ? {} : { turnBack: options.turnBack }),
    ...(options.route === undefined ? {} : { routes: options.route }),
  }).catch(tellOfOption);
  const { routes, craft, pace } = plan;
  await writeResult(
    writeReport({ estimate, routes, craft, pace }, options.format, options.units),
    options.out,
    inputs,
  );
  return estimate.routes.some((route) => route.status === "stop") ? 1 : 0;
}
