import type { RouteStatus } from "../estimate/result.ts";
import type { MembersHeld } from "./ensemble.ts";
import type { CellFinding, WindowCell } from "./window-cell.ts";

/** By what the status of a whole is decided: a member, a what-if, the stated error, or, where there is none of these, the plain estimate. */
export interface DecidedBy {
  readonly member: number | null;
  /** Name of the what-if. */
  readonly whatIf: string | null;
  /** Under the stated forecast error the reserve, or the arrival asked for, holds with less than the probability asked for. */
  readonly error?: true;
}

/** What a departure comes to under everything that the plan names. */
export interface Sure {
  /** The worst of the plain estimate, the members, the what-ifs and, where a confidence is asked for, the stated error. */
  readonly status: RouteStatus;
  readonly decidedBy: DecidedBy;
  /** What is found there; `null` where there are notes at most. */
  readonly worst: CellFinding | null;
  /** How many other members and what-ifs are as bad as the one that decides; 0 where neither decides. */
  readonly asBad: number;
  /** In which members the reserve holds; `null` without an ensemble. */
  readonly ensemble: MembersHeld | null;
  /**
   * Probability that the reserve holds under the stated forecast error, 0..1; it decides the status where the plan asks for a confidence.
   * `null` where no error is stated or acts, or the route ends short.
   */
  readonly reserveHolds: number | null;
}

/** A cell that was put to the test. */
export interface SureCell extends WindowCell {
  readonly sure: Sure;
}

/** Bests that were put to the test. */
export interface SureBest {
  readonly time: SureCell | null;
  readonly use: SureCell | null;
  readonly latest: SureCell | null;
  /** What stops the departure after the latest, at the same route and speed; `null` where the window ends there. */
  readonly closedBy: CellFinding | null;
}

/** The bests by the plain estimate, and those that hold under everything that the plan names. */
export interface BestPair {
  readonly plain: SureBest;
  readonly sure: SureBest;
}
