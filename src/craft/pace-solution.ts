import type { PaceConditions } from "./propulsion.ts";

/** The pace can be kept here. */
export const PACE_OK = 0;
/** The track cannot be held: |c| >= V or g <= 0. */
export const PACE_CANNOT_HOLD = 1;
/** The power model has no value at the speed that the pace asks for, or no speed in range answers to the power. */
export const PACE_OUTSIDE_TABLE = 2;
export type PaceStatus = typeof PACE_OK | typeof PACE_CANNOT_HOLD | typeof PACE_OUTSIDE_TABLE;

/** What a pace comes to at one place. */
export interface PaceSolution {
  status: PaceStatus;
  /** V, m/s; 0 where the pace finds none. */
  throughSpeed: number;
  /** g, m/s; where the status is not `PACE_OK`, the speed that would come of V, or 0. */
  groundSpeed: number;
  /** Store units per second, hotel load included; 0 where the status is not `PACE_OK`. */
  rate: number;
  /** Whether the craft points against its course (h·T < 0): under a ground-speed pace, where the flow overtakes. */
  stems: boolean;
}

/** Answers for one craft and one pace. */
export interface PaceSolver {
  /** Writes the answer at these conditions into `solution` and returns its status. */
  solve(conditions: PaceConditions, solution: PaceSolution): PaceStatus;
}

/** Writes an answer that is none, with the speeds that would come of it, and returns its status. */
export function refuse(
  solution: PaceSolution,
  status: PaceStatus,
  throughSpeed: number,
  groundSpeed: number,
): PaceStatus {
  solution.status = status;
  solution.throughSpeed = throughSpeed;
  solution.groundSpeed = groundSpeed;
  solution.rate = 0;
  solution.stems = false;
  return status;
}

/** Writes an answer and returns its status. */
export function accept(
  solution: PaceSolution,
  throughSpeed: number,
  groundSpeed: number,
  rate: number,
): PaceStatus {
  solution.status = PACE_OK;
  solution.throughSpeed = throughSpeed;
  solution.groundSpeed = groundSpeed;
  solution.rate = rate;
  solution.stems = false;
  return PACE_OK;
}

/** A solution to be filled. */
export function emptySolution(): PaceSolution {
  return { status: PACE_OK, throughSpeed: 0, groundSpeed: 0, rate: 0, stems: false };
}
