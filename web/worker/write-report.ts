import { type ReportInput, writeReport as write } from "./core.ts";
import type { ReportQuestion } from "./protocol.ts";

/** Writes an estimate as the command line does, or one route of it. */
export function writeReport(all: ReportInput, { format, units, route }: ReportQuestion): string {
  return write(route === null ? all : onlyRoute(all, route), format, units);
}

function onlyRoute(input: ReportInput, route: number): ReportInput {
  const keep = <T>(list: readonly T[]): readonly T[] => list.slice(route, route + 1);
  return {
    ...input,
    routes: keep(input.routes),
    estimate: { ...input.estimate, routes: keep(input.estimate.routes) },
  };
}
