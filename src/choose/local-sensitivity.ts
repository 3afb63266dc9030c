import { PACE_OK } from "../craft/pace-solution.ts";
import { type Motion, move } from "../estimate/motion.ts";

/** Components that a motion answers to, in this order: the medium's along and across the track, the wind's likewise. */
export const COMPONENTS = 4;

/** Ground speed and rate at a place, and how they change with each component. */
export interface LocalSensitivity {
  /** m/s, and store units per second. */
  groundSpeed: number;
  rate: number;
  /** Per m/s of each component. */
  readonly groundSpeedBy: Float64Array;
  readonly rateBy: Float64Array;
}

export function makeLocalSensitivity(): LocalSensitivity {
  return {
    groundSpeed: 0,
    rate: 0,
    groundSpeedBy: new Float64Array(COMPONENTS),
    rateBy: new Float64Array(COMPONENTS),
  };
}

/** Step of the central differences, m/s: at 10 m/s both their own error and that of rounding are below 1e-8. */
const STEP = 1e-3;

/**
 * Fills in the derivatives of g and of the rate by central differences of the pace's own answer, so that every pace and power
 * model is covered alike (under a held through-speed they are ∂g/∂a = 1 and ∂g/∂c = -c / sqrt(V² - c²)). Where the pace has no
 * answer on one side, the difference is from the place itself.
 *
 * @param components m/s, see {@link COMPONENTS}
 * @param feels whether the motion answers to each component at all
 * @returns `false` where the pace has an answer on neither side
 */
export function localSensitivity(
  motion: Motion,
  components: Float64Array,
  feels: readonly boolean[],
  into: LocalSensitivity,
): boolean {
  if (!ask(motion, components)) return false;
  const { solution } = motion;
  const g = solution.groundSpeed;
  const rate = solution.rate;
  into.groundSpeed = g;
  into.rate = rate;
  for (let j = 0; j < COMPONENTS; j += 1) {
    into.groundSpeedBy[j] = 0;
    into.rateBy[j] = 0;
    if (feels[j] !== true) continue;
    const at = components[j] as number;
    components[j] = at + STEP;
    const above = ask(motion, components);
    const upper = above ? { g: solution.groundSpeed, rate: solution.rate } : { g, rate };
    components[j] = at - STEP;
    const below = ask(motion, components);
    const lower = below ? { g: solution.groundSpeed, rate: solution.rate } : { g, rate };
    components[j] = at;
    const width = (above ? STEP : 0) + (below ? STEP : 0);
    if (width === 0) return false;
    into.groundSpeedBy[j] = (upper.g - lower.g) / width;
    into.rateBy[j] = (upper.rate - lower.rate) / width;
  }
  return true;
}

function ask(motion: Motion, components: Float64Array): boolean {
  const at = (j: number) => components[j] as number;
  return move(motion, at(0), at(1), at(2), at(3)) === PACE_OK;
}
