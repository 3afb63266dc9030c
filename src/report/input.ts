import type { DecidedEstimate } from "../choose/decided.ts";
import type { Craft, Pace } from "../craft/craft.ts";
import type { Route } from "../estimate/route.ts";

/** What every writer of this room takes: the answer, and what it was asked about. */
export interface ReportInput {
  readonly estimate: DecidedEstimate;
  /** Geometry of the estimate's routes: as many, in the same order. */
  readonly routes: readonly Route[];
  readonly craft: Pick<Craft, "name" | "moves">;
  readonly pace: Pace;
}

/**
 * Units of the leg table.
 * `sea`: NM, kn, m of height, degrees and minutes. `air`: NM, kn, ft, degrees and minutes. `metric`: km, m/s, m, decimal degrees.
 */
export type Units = "sea" | "air" | "metric";
