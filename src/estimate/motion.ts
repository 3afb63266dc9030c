import type { Craft, Pace } from "../craft/craft.ts";
import { paceSolver } from "../craft/pace.ts";
import {
  emptySolution,
  PACE_OK,
  type PaceSolution,
  type PaceSolver,
  type PaceStatus,
} from "../craft/pace-solution.ts";
import { type PaceConditions, stillConditions } from "../craft/propulsion.ts";

/** How the craft moves on one leg: the pace's solver with the conditions that it is asked about and its answer. */
export interface Motion {
  readonly solver: PaceSolver;
  readonly conditions: PaceConditions;
  readonly solution: PaceSolution;
  /** Speed through the medium where the pace holds one, m/s, else 0: then g = a + sqrt(V² - c²) without asking. */
  readonly throughSpeed: number;
  /** Store units per second where neither place nor fields change it, else -1. */
  readonly steadyRate: number;
  /** The ground speed does not depend on the fields. */
  readonly groundSpeedFixed: boolean;
  /** The wind acts on the choice of speed, not on the rate alone. */
  readonly windSetsSpeed: boolean;
}

/** @param climbSlope metres of height per metre along the leg, positive climbing */
export function makeMotion(craft: Craft, pace: Pace, windKnown: boolean, climbSlope: number): Motion {
  const solver = paceSolver(craft, pace, windKnown);
  const throughSpeed = pace.hold === "through-speed" ? pace.speed_m_s : 0;
  const steady =
    throughSpeed > 0 &&
    !(windKnown && craft.windage !== null) &&
    !(climbSlope > 0 && craft.power.climbForce > 0);
  return {
    solver,
    conditions: { ...stillConditions(), climbSlope },
    solution: emptySolution(),
    throughSpeed,
    steadyRate: steady ? rateInStillMedium(solver) : -1,
    groundSpeedFixed: pace.hold === "ground-speed",
    windSetsSpeed: craft.windage !== null && (pace.hold === "power" || pace.hold === "least-energy"),
  };
}

/** Rate at a held through-medium speed, -1 where the power model has none. */
function rateInStillMedium(solver: PaceSolver): number {
  const solution = emptySolution();
  return solver.solve(stillConditions(), solution) === PACE_OK ? solution.rate : -1;
}

/** Asks the pace at a place; the answer stands in `motion.solution`. */
export function move(
  motion: Motion,
  along: number,
  cross: number,
  windAlong: number,
  windCross: number,
): PaceStatus {
  const { conditions } = motion;
  conditions.along = along;
  conditions.cross = cross;
  conditions.windAlong = windAlong;
  conditions.windCross = windCross;
  return motion.solver.solve(conditions, motion.solution);
}

/** The same leg with every field at zero; `null` where the pace has no solution even there. */
export function stillMotion(motion: Motion): { readonly groundSpeed: number; readonly rate: number } | null {
  if (move(motion, 0, 0, 0, 0) !== PACE_OK) return null;
  return { groundSpeed: motion.solution.groundSpeed, rate: motion.solution.rate };
}
