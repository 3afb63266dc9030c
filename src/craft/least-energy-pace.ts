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
import { firstHeld, type SpeedNodes, speedNodes } from "./speed-nodes.ts";
import { alongThrough, groundSpeedAlong } from "./triangle.ts";

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
 * Where a following flow or wind makes the craft's own way not worth its price, the least J is at the least V of the range, or
 * is the limit V → |c|, at which the craft lies across the flow and is carried at g = a (V = 0 in a flow along the track): the
 * one case of `PACE_OK` in which V is not above |c|. Where a craft whose range begins at 0 spends nothing at rest in a
 * still medium, not to go is the cheapest, and the status is `PACE_CANNOT_HOLD`.
 */
export class LeastEnergyPace implements PaceSolver, Residual {
  readonly #propulsion: Propulsion;
  readonly #nodes: SpeedNodes;
  /** Per node, where neither windage nor climb acts: (E + hotel), and (dE/dV) / V, so that dE/dq is that times q. */
  readonly #plainRate: Float64Array;
  readonly #plainPull: Float64Array;
  readonly #hotel: number;
  readonly #min: number;
  readonly #max: number;
  readonly #risesOnce: boolean;
  /** The best so far. */
  #v = 0;
  #g = 0;
  #rate = 0;
  #perMetre = 0;

  /** @throws InputError where the craft has no range of speeds within its power model's domain */
  constructor(craft: Craft, windKnown: boolean) {
    this.#propulsion = new Propulsion(craft, windKnown);
    this.#nodes = speedNodes(craft);
    this.#hotel = craft.hotelPerSecond;
    const { speed, rate, slope } = this.#nodes;
    this.#plainRate = rate.map((value) => value * craft.storePerRate + craft.hotelPerSecond);
    // V = 0 is above no |c|, so its node is never asked.
    this.#plainPull = slope.map((value, i) =>
      speed[i] === 0 ? 0 : (value * craft.storePerRate) / (speed[i] as number),
    );
    this.#risesOnce = risesOnce(slope);
    this.#min = speed[0] as number;
    this.#max = speed[speed.length - 1] as number;
  }

  solve(conditions: PaceConditions, solution: PaceSolution): PaceStatus {
    const first = firstHeld(this.#nodes, conditions.along, conditions.cross);
    const last = this.#nodes.speed.length - 1;
    if (first > last) {
      const g = groundSpeedAlong(this.#max, conditions.along, conditions.cross);
      return refuse(solution, PACE_CANNOT_HOLD, this.#max, g);
    }
    this.#propulsion.set(conditions);
    this.#perMetre = Number.POSITIVE_INFINITY;
    this.#atNode(last);
    this.#consider();
    if (this.#risesOnce && this.#propulsion.plain) this.#refine(this.#onlyRise(last, first));
    else for (let i = this.#rise(last, first); i >= first; i = this.#rise(i, first)) this.#refine(i);
    this.#endBelow(first);
    if (this.#g === 0) return refuse(solution, PACE_CANNOT_HOLD, 0, 0);
    return accept(solution, this.#v, this.#g, this.#rate);
  }

  /** D(q), with the model asked at V = sqrt(q² + c²). */
  residual(q: number): number {
    this.#propulsion.at(q, this.#min, this.#max);
    return this.#d();
  }

  /** The greatest node below `top` from which D rises through 0 to the next; -1 where there is none down to `first`. */
  #rise(top: number, first: number): number {
    const { plain } = this.#propulsion;
    let above = (plain ? this.#plainD(top) : this.#atNode(top)) > 0;
    for (let i = top - 1; i >= first; i--) {
      const here = (plain ? this.#plainD(i) : this.#atNode(i)) > 0;
      if (above && !here) return i;
      above = here;
    }
    return -1;
  }

  /** The same where there is at most one. */
  #onlyRise(last: number, first: number): number {
    if (!(this.#plainD(last) > 0)) return -1;
    let low = first - 1;
    let high = last;
    while (high - low > 1) {
      const mid = (low + high) >> 1;
      if (this.#plainD(mid) > 0) high = mid;
      else low = mid;
    }
    return low < first ? -1 : low;
  }

  #refine(i: number): void {
    if (i < 0) return;
    const { cross } = this.#propulsion;
    const high = alongThrough(this.#nodes.speed[i + 1] as number, cross);
    const atHigh = this.#atNode(i + 1);
    const low = alongThrough(this.#nodes.speed[i] as number, cross);
    const atLow = this.#atNode(i);
    this.residual(findRoot(this, low, atLow, high, atHigh, this.#max));
    this.#consider();
  }

  /** The least V: an end of the range, or within the piece below it, where the track can no longer be held (g = 0, or V = |c|). */
  #endBelow(first: number): void {
    const atFirst = this.#atNode(first);
    if (!(atFirst > 0)) return;
    if (first === 0) {
      this.#consider();
      return;
    }
    const limit = Math.max(0, -this.#propulsion.along);
    const high = this.#propulsion.q;
    const atLimit = this.residual(limit);
    // E/g tends to E' where both vanish.
    const perMetreAtRest = this.#propulsion.change;
    if (!(atLimit > 0)) this.residual(findRoot(this, limit, atLimit, high, atFirst, this.#max));
    const g = this.#propulsion.along + this.#propulsion.q;
    if (g > Number.EPSILON * this.#max) this.#consider();
    else if (perMetreAtRest < this.#perMetre) this.#g = 0;
  }

  /** Keeps what the propulsion was asked last, if it is the best so far. */
  #consider(): void {
    const propulsion = this.#propulsion;
    const g = propulsion.along + propulsion.q;
    const rate = propulsion.value + this.#hotel;
    const perMetre = rate / g;
    if (!(perMetre < this.#perMetre)) return;
    this.#perMetre = perMetre;
    this.#v = propulsion.v;
    this.#g = g;
    this.#rate = rate;
  }

  #atNode(i: number): number {
    this.#propulsion.atNode(this.#nodes, i);
    return this.#d();
  }

  /** D from what the propulsion was asked last. */
  #d(): number {
    const propulsion = this.#propulsion;
    const rate = propulsion.value + this.#hotel;
    // Where nothing at all is spent, faster is better.
    if (rate === 0) return -Number.MIN_VALUE;
    return propulsion.change * (propulsion.along + propulsion.q) - rate;
  }

  /** D at a node where neither windage nor climb acts. */
  #plainD(i: number): number {
    const { along, cross } = this.#propulsion;
    const q = alongThrough(this.#nodes.speed[i] as number, cross);
    const rate = this.#plainRate[i] as number;
    if (rate === 0) return -Number.MIN_VALUE;
    return (this.#plainPull[i] as number) * q * (along + q) - rate;
  }
}

/**
 * Whether D can rise through 0 only once where neither windage nor climb acts: D < 0 where E' <= 0, and elsewhere D' has the sign
 * of E'' V q² + E' c² (derivatives by V), so it is enough that E' keeps rising once it is above 0.
 */
function risesOnce(slope: Float64Array): boolean {
  return slope.every((here, i) => {
    const before = i === 0 ? 0 : (slope[i - 1] as number);
    return before <= 0 || here >= before;
  });
}
