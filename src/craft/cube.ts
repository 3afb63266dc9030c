import { InputError } from "../errors.ts";
import { requireFinite, requirePositive } from "./bounds.ts";
import type { PowerModel } from "./craft.ts";

/** One known point of a power law. */
export interface CubeParameters {
  readonly referenceSpeed_m_s: number;
  readonly referencePower_W: number;
  /** n of P ~ Vⁿ, at least 1 (below it the resistance would be infinite at rest); 3 unless given. */
  readonly exponent?: number;
}

/**
 * Power law through one point, P = P_ref (V / V_ref)ⁿ; with n = 3 the cube law behind the Admiralty coefficient
 * A = Δ^(2/3) V³ / P (any text of ship resistance and propulsion). Holds for displacement craft around the reference speed.
 *
 * @throws InputError where a reference is not above 0 or the exponent is below 1
 * @example
 * cubePower({ referenceSpeed_m_s: 5, referencePower_W: 1000 }).perSecond(10) // → 8000
 */
export function cubePower(given: CubeParameters): PowerModel {
  const speed = requirePositive(given.referenceSpeed_m_s, "reference speed", "m/s");
  const power = requirePositive(given.referencePower_W, "reference power", "W");
  const n = requireFinite(given.exponent ?? 3, "exponent", "");
  if (n < 1) throw new InputError(`the exponent of a power law is at least 1; found ${n}`);
  return {
    model: "cube",
    unit: "W",
    min: 0,
    max: Number.POSITIVE_INFINITY,
    perSecond:
      n === 3 ? (v) => power * (v / speed) * (v / speed) * (v / speed) : (v) => power * (v / speed) ** n,
    slope:
      n === 3
        ? (v) => ((3 * power) / speed) * (v / speed) * (v / speed)
        : (v) => ((n * power) / speed) * (v / speed) ** (n - 1),
    kinks: [],
    climbForce: 0,
  };
}
