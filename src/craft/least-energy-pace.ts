import type { Craft } from "./craft.ts";
import {
  accept,
  PACE_CANNOT_HOLD,
  type PaceSolution,
  type PaceSolver,
  type PaceStatus,
  refuse,
} from "./pace-solution.ts";
import { type PaceConditions, Propulsion } from "./propulsion.ts";
import { findRoot, type Residual } from "./root.ts";
import { type SpeedNodes, speedNodes } from "./speed-nodes.ts";
import { alongThrough } from "./triangle.ts";

/**
 * Least energy per metre over the ground: V in the craft's range minimises J = (E + hotel) / g.
 *
 * In q, the along-track part of V (see `propulsion.ts`), g = a + q, and J is stationary where
 *
 *     D(q) = E'(q) g - (E(q) + hotel) = 0,      D' = E'' g
 *
 * so D rises through 0 at a minimum, and only once where E is convex in q. D's sign is read at the nodes of the range; every rise
 * is refined to rounding as a root of D (the value J alone would fix V to half the digits), and the least J of these and
 * the ends of the range is the answer; the faster of equals.
 *
 * Where a following flow or wind makes the craft's own way not worth its price, the least J is at the least V of the range,
 * or is the limit V → |c|, at which the craft lies across the flow and is carried at g = a: V = 0 in a flow along the track.
 * With that limit V = |c| is the one case of `PACE_OK` in which V is not above |c|; g is above 0.
 */
export class LeastEnergyPace implements PaceSolver, Residual {
  readonly #propulsion: Propulsion;
  readonly #nodes: SpeedNodes;
  readonly #hotel: number;
  readonly #min: number;
  readonly #max: number;
  #v = 0;
  #g = 0;
  #rate = 0;
  #perMetre = 0;

  /** @throws InputError where the craft has no range of speeds within its power model's domain */
  constructor(craft: Craft, windKnown: boolean) {
    this.#propulsion = new Propulsion(craft, windKnown);
    this.#nodes = speedNodes(craft);
    this.#hotel = craft.hotelPerSecond;
    this.#min = this.#nodes.speed[0] as number;
    this.#max = this.#nodes.speed[this.#nodes.speed.length - 1] as number;
  }

  solve(conditions: PaceConditions, solution: PaceSolution): PaceStatus {
    const cross = Math.abs(conditions.cross);
    const { along } = conditions;
    const fastest = alongThrough(this.#max, cross);
    if (fastest === 0 || !(along + fastest > 0))
      return refuse(solution, PACE_CANNOT_HOLD, this.#max, fastest === 0 ? 0 : along + fastest);
    this.#propulsion.set(conditions);
    this.#perMetre = Number.POSITIVE_INFINITY;
    this.#search(cross, along, fastest);
    return accept(solution, this.#v, this.#g, this.#rate);
  }

  /** D(q), with the model asked at V = sqrt(q² + c²). */
  residual(q: number): number {
    const v = this.#speedAt(q);
    const { model } = this.#propulsion;
    return this.#rise(model.perSecond(v), model.slope(v), v, q);
  }

  #search(cross: number, along: number, fastest: number): void {
    const { speed, rate, slope } = this.#nodes;
    let i = speed.length - 1;
    let q = fastest;
    let rise = this.#rise(rate[i] as number, slope[i] as number, this.#max, q);
    this.#consider(rate[i] as number, this.#max, q);
    while (i > 0) {
      i--;
      const v = speed[i] as number;
      const qBelow = alongThrough(v, cross);
      if (qBelow === 0 || !(along + qBelow > 0)) {
        this.#searchToLimit(Math.max(0, -along), q, rise);
        return;
      }
      const riseBelow = this.#rise(rate[i] as number, slope[i] as number, v, qBelow);
      if (rise > 0 && !(riseBelow > 0)) this.#refine(qBelow, riseBelow, q, rise);
      q = qBelow;
      rise = riseBelow;
    }
    if (rise > 0) this.#consider(rate[0] as number, this.#min, q);
  }

  /** The last piece, which ends where the track can no longer be held: at g = 0, or at V = |c|. */
  #searchToLimit(limit: number, q: number, rise: number): void {
    if (!(rise > 0)) return;
    const atLimit = this.residual(limit);
    if (atLimit > 0) this.#considerAt(limit);
    else this.#refine(limit, atLimit, q, rise);
  }

  #refine(low: number, atLow: number, high: number, atHigh: number): void {
    this.#considerAt(findRoot(this, low, atLow, high, atHigh, this.#max));
  }

  #considerAt(q: number): void {
    const v = this.#speedAt(q);
    this.#consider(this.#propulsion.model.perSecond(v), v, q);
  }

  #consider(modelRate: number, v: number, q: number): void {
    const g = this.#propulsion.along + q;
    const rate = this.#propulsion.spent(modelRate, v, q) + this.#hotel;
    const perMetre = rate / g;
    if (!(perMetre < this.#perMetre)) return;
    this.#perMetre = perMetre;
    this.#v = v;
    this.#g = g;
    this.#rate = rate;
  }

  #rise(modelRate: number, modelSlope: number, v: number, q: number): number {
    const propulsion = this.#propulsion;
    const g = propulsion.along + q;
    const rate = propulsion.spent(modelRate, v, q) + this.#hotel;
    // Where nothing at all is spent, faster is better.
    if (rate === 0) return -Number.MIN_VALUE;
    return propulsion.change(modelRate, modelSlope, v, q) * g - rate;
  }

  /** Rounding must not carry V out of the range. */
  #speedAt(q: number): number {
    const { cross } = this.#propulsion;
    return Math.min(this.#max, Math.max(this.#min, Math.sqrt(q * q + cross * cross)));
  }
}
