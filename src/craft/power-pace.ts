import { requirePositive } from "./bounds.ts";
import type { Craft } from "./craft.ts";
import {
  accept,
  PACE_CANNOT_HOLD,
  PACE_OUTSIDE_TABLE,
  type PaceSolution,
  type PaceSolver,
  type PaceStatus,
  refuse,
} from "./pace-solution.ts";
import { type PaceConditions, Propulsion, perJoule, stillConditions } from "./propulsion.ts";
import { findRoot, type Residual } from "./root.ts";
import { firstHeld, type SpeedNodes, speedNodes } from "./speed-nodes.ts";
import { groundSpeedAlong } from "./triangle.ts";

/** In place of q: no speed of the range answers to the power. */
const NONE = -1;
/** In place of q: every speed that can hold the track asks for more than the power. */
const TOO_WEAK = -2;

/**
 * Constant power, hotel load apart: V in the craft's range solves P(V) + R V/η + climb = P₀; the faster root where there are
 * two. In q, the along-track part of V (see `propulsion.ts`), the nodes of the range are read from the fastest down until the
 * balance F(q) = E(q) - E₀ changes sign, or turns between two nodes and crosses 0 there; that bracket is
 * refined to rounding. Where neither windage nor climb acts, V is the same everywhere and is found once.
 */
export class PowerPace implements PaceSolver, Residual {
  readonly #propulsion: Propulsion;
  readonly #turn: Residual;
  readonly #nodes: SpeedNodes;
  readonly #target: number;
  readonly #hotel: number;
  readonly #min: number;
  readonly #max: number;
  /** V with neither windage nor climb, or why there is none. */
  readonly #plainSpeed: number;
  /** The upper end of the piece at hand. */
  #high = 0;
  #atHigh = 0;
  #changeHigh = 0;

  /** @throws InputError where the power is not above 0, or the craft lacks a range of speeds or a specific consumption */
  constructor(craft: Craft, power_W: number, windKnown: boolean) {
    requirePositive(power_W, "power", "W");
    this.#target = power_W * perJoule(craft, "the pace power");
    this.#propulsion = new Propulsion(craft, windKnown);
    this.#turn = { residual: (q) => this.#change(q) };
    this.#nodes = speedNodes(craft);
    this.#hotel = craft.hotelPerSecond;
    this.#min = this.#nodes.speed[0] as number;
    this.#max = this.#nodes.speed[this.#nodes.speed.length - 1] as number;
    this.#propulsion.set(stillConditions());
    this.#plainSpeed = this.#search();
  }

  solve(conditions: PaceConditions, solution: PaceSolution): PaceStatus {
    const { along, cross } = conditions;
    const g = groundSpeedAlong(this.#max, along, cross);
    if (!(g > 0)) return refuse(solution, PACE_CANNOT_HOLD, this.#max, g);
    this.#propulsion.set(conditions);
    if (this.#propulsion.plain) return this.#solvePlain(along, cross, solution);
    const q = this.#search();
    if (q === NONE) return refuse(solution, PACE_OUTSIDE_TABLE, 0, 0);
    if (q === TOO_WEAK || !(along + q > 0)) return refuse(solution, PACE_CANNOT_HOLD, 0, 0);
    this.residual(q);
    return accept(solution, this.#propulsion.v, along + q, this.#target + this.#hotel);
  }

  /** F(q), with the model asked at V = sqrt(q² + c²). */
  residual(q: number): number {
    this.#propulsion.at(q, this.#min, this.#max);
    return this.#propulsion.value - this.#target;
  }

  #solvePlain(along: number, cross: number, solution: PaceSolution): PaceStatus {
    const v = this.#plainSpeed;
    if (v < 0) return refuse(solution, PACE_OUTSIDE_TABLE, 0, 0);
    const g = groundSpeedAlong(v, along, cross);
    if (!(g > 0)) return refuse(solution, PACE_CANNOT_HOLD, v, g);
    return accept(solution, v, g, this.#target + this.#hotel);
  }

  /** q of the fastest root under the conditions at hand, or `NONE` or `TOO_WEAK`. */
  #search(): number {
    const propulsion = this.#propulsion;
    const first = firstHeld(this.#nodes, propulsion.along, propulsion.cross);
    let i = this.#nodes.speed.length - 1;
    propulsion.atNode(this.#nodes, i);
    this.#highIsHere();
    // Below the first node the track cannot be held: the last piece ends at V = |c|, or where g = 0.
    const end = first === 0 ? 0 : first - 1;
    while (i > end) {
      i--;
      if (i >= first) propulsion.atNode(this.#nodes, i);
      else propulsion.at(Math.max(0, -propulsion.along), this.#min, this.#max);
      const root = this.#between();
      if (root >= 0) return root;
      this.#highIsHere();
    }
    return first > 0 && this.#atHigh > 0 ? TOO_WEAK : NONE;
  }

  #highIsHere(): void {
    this.#high = this.#propulsion.q;
    this.#atHigh = this.#propulsion.value - this.#target;
    this.#changeHigh = this.#propulsion.change;
  }

  /** The greatest root between the place that the propulsion was asked last and the one above it, or `NONE`. */
  #between(): number {
    const low = this.#propulsion.q;
    const atLow = this.#propulsion.value - this.#target;
    const atHigh = this.#atHigh;
    if (atHigh === 0) return this.#high;
    if (atLow === 0 || atLow > 0 !== atHigh > 0)
      return findRoot(this, low, atLow, this.#high, atHigh, this.#max);
    // The same sign at both ends, but the curve turns towards 0 between them and may cross it twice.
    const change = this.#propulsion.change;
    const turns = atHigh > 0 ? change < 0 && this.#changeHigh > 0 : change > 0 && this.#changeHigh < 0;
    return turns ? this.#beyondTurn(low, change) : NONE;
  }

  #beyondTurn(low: number, changeLow: number): number {
    const here = findRoot(this.#turn, low, changeLow, this.#high, this.#changeHigh, this.#max);
    const atTurn = this.residual(here);
    if (atTurn === 0 || atTurn > 0 !== this.#atHigh > 0)
      return findRoot(this, here, atTurn, this.#high, this.#atHigh, this.#max);
    // Nothing found: the propulsion is put back to where it was.
    this.residual(low);
    return NONE;
  }

  #change(q: number): number {
    this.#propulsion.at(q, this.#min, this.#max);
    return this.#propulsion.change;
  }
}
