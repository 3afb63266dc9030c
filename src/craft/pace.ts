import { requirePositive } from "./bounds.ts";
import type { Craft, Pace } from "./craft.ts";
import { LeastEnergyPace } from "./least-energy-pace.ts";
import {
  accept,
  PACE_CANNOT_HOLD,
  PACE_OK,
  PACE_OUTSIDE_TABLE,
  type PaceSolution,
  type PaceSolver,
  type PaceStatus,
  refuse,
} from "./pace-solution.ts";
import { PowerPace } from "./power-pace.ts";
import { type PaceConditions, Propulsion } from "./propulsion.ts";
import { alongThrough } from "./triangle.ts";

/*
 * The pace: at a point of the track, the speed through the medium V, the ground speed g = a + q, q = ±sqrt(V² - c²), and
 * what is spent there. A solver is built once for a craft and a pace, and then asked at every point into one
 * solution object: no allocation, no state but the place at hand.
 */

/**
 * Prepares a pace for a craft.
 *
 * @param windKnown whether the plan has a wind field: without one, windage does not act
 * @throws InputError where the pace's speed or power is not above 0, or the craft lacks what the pace needs
 */
export function paceSolver(craft: Craft, pace: Pace, windKnown: boolean): PaceSolver {
  switch (pace.hold) {
    case "through-speed":
      return new ThroughSpeedPace(craft, pace.speed_m_s, windKnown);
    case "ground-speed":
      return new GroundSpeedPace(craft, pace.speed_m_s, windKnown);
    case "power":
      return new PowerPace(craft, pace.power_W, windKnown);
    case "least-energy":
      return new LeastEnergyPace(craft, windKnown);
  }
}

/** V is given; g = a + sqrt(V² - c²). */
class ThroughSpeedPace implements PaceSolver {
  readonly #propulsion: Propulsion;
  readonly #speed: number;
  readonly #modelRate: number;
  readonly #hotel: number;

  constructor(craft: Craft, speed: number, windKnown: boolean) {
    this.#speed = requirePositive(speed, "speed through the medium", "m/s");
    this.#propulsion = new Propulsion(craft, windKnown);
    const { power } = craft;
    this.#modelRate = speed >= power.min && speed <= power.max ? power.perSecond(speed) : -1;
    this.#hotel = craft.hotelPerSecond;
  }

  solve(conditions: PaceConditions, solution: PaceSolution): PaceStatus {
    const v = this.#speed;
    const q = alongThrough(v, conditions.cross);
    const g = q > 0 ? conditions.along + q : 0;
    if (!(g > 0)) return refuse(solution, PACE_CANNOT_HOLD, v, g);
    if (this.#modelRate < 0) return refuse(solution, PACE_OUTSIDE_TABLE, v, g);
    this.#propulsion.set(conditions);
    return accept(solution, v, g, this.#propulsion.spent(this.#modelRate, v, q) + this.#hotel);
  }
}

/** g is given; V = |g T - w|. Where g < a the craft stems the flow that carries it: q = g - a is below 0. */
class GroundSpeedPace implements PaceSolver {
  readonly #propulsion: Propulsion;
  readonly #speed: number;
  readonly #hotel: number;

  constructor(craft: Craft, speed: number, windKnown: boolean) {
    this.#speed = requirePositive(speed, "ground speed", "m/s");
    this.#propulsion = new Propulsion(craft, windKnown);
    this.#hotel = craft.hotelPerSecond;
  }

  solve(conditions: PaceConditions, solution: PaceSolution): PaceStatus {
    const q = this.#speed - conditions.along;
    const v = Math.sqrt(q * q + conditions.cross * conditions.cross);
    const { model } = this.#propulsion;
    if (v < model.min || v > model.max) return refuse(solution, PACE_OUTSIDE_TABLE, v, this.#speed);
    this.#propulsion.set(conditions);
    accept(solution, v, this.#speed, this.#propulsion.spent(model.perSecond(v), v, q) + this.#hotel);
    solution.stems = q < 0;
    return PACE_OK;
  }
}
