import {
  estimatePlan,
  type ReportInput,
  type Units,
  writeCsv,
  writeGeoJson,
  writeGpx,
  writeJson,
  writeTable,
} from "./core.ts";
import { loadLand } from "./load-land.ts";
import { writeResult } from "./output.ts";
import { openPlan } from "./plan-files.ts";
import { noteUnits } from "./units-note.ts";

export interface EstimateOptions {
  readonly route?: readonly string[];
  readonly departure?: string;
  readonly format: "table" | "csv" | "json" | "geojson" | "gpx";
  readonly units?: Units;
  readonly out?: string;
  readonly turnBack?: boolean;
}

function written(input: ReportInput, { format, units }: EstimateOptions): string {
  switch (format) {
    case "table":
      return writeTable(input, units ?? (input.craft.moves === "air" ? "air" : "sea"));
    case "csv":
      return writeCsv(input);
    case "json":
      return writeJson(input.estimate);
    case "geojson":
      return writeGeoJson(input);
    case "gpx":
      return writeGpx(input);
  }
}

/** Estimates a plan and writes the answer; 1 where some route ends in a stop. */
export async function estimateCommand(file: string, options: EstimateOptions): Promise<number> {
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
  });
  const { routes, craft, pace } = plan;
  await writeResult(written({ estimate, routes, craft, pace }, options), options.out, inputs);
  return estimate.routes.some((route) => route.status === "stop") ? 1 : 0;
}
