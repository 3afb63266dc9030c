import type { ReportInput } from "./core.ts";
import { writeCsv, writeGeoJson, writeGpx, writeJson, writeTable } from "./core.ts";
import type { ReportQuestion } from "./protocol.ts";

/** Writes an estimate as the command line does, or one route of it. */
export function writeReport(all: ReportInput, { format, units, route }: ReportQuestion): string {
  const input = route === null ? all : onlyRoute(all, route);
  switch (format) {
    case "table":
      return writeTable(input, units);
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

function onlyRoute(input: ReportInput, route: number): ReportInput {
  const keep = <T>(list: readonly T[]): readonly T[] => list.slice(route, route + 1);
  return {
    ...input,
    routes: keep(input.routes),
    estimate: { ...input.estimate, routes: keep(input.estimate.routes) },
  };
}
