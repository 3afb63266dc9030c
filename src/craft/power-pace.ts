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
import { type SpeedNodes, speedNodes } from "./speed-nodes.ts";
import { alongThrough } from "./triangle.ts";

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
    this.#plainSpeed = this.#search(0, 0, this.#max);
  }

  solve(conditions: PaceConditions, solution: PaceSolution): PaceStatus {
    const { along, cross } = conditions;
    const fastest = alongThrough(this.#max, cross);
    if (fastest === 0 || !(along + fastest > 0))
      return refuse(solution, PACE_CANNOT_HOLD, this.#max, fastest === 0 ? 0 : along + fastest);
    this.#propulsion.set(conditions);
    if (this.#propulsion.plain) return this.#solvePlain(along, cross, solution);
    const q = this.#search(Math.abs(cross), along, fastest);
    if (q === NONE) return refuse(solution, PACE_OUTSIDE_TABLE, 0, 0);
    if (q === TOO_WEAK || !(along + q > 0)) return refuse(solution, PACE_CANNOT_HOLD, 0, 0);
    return accept(solution, this.#speedAt(q), along + q, this.#target + this.#hotel);
  }

  /** F(q), with the model asked at V = sqrt(q² + c²). */
  residual(q: number): number {
    const v = this.#speedAt(q);
    return this.#propulsion.spent(this.#propulsion.model.perSecond(v), v, q) - this.#target;
  }

  #solvePlain(along: number, cross: number, solution: PaceSolution): PaceStatus {
    const v = this.#plainSpeed;
    if (v < 0) return refuse(solution, PACE_OUTSIDE_TABLE, 0, 0);
    const q = alongThrough(v, cross);
    if (q === 0 || !(along + q > 0)) return refuse(solution, PACE_CANNOT_HOLD, v, q === 0 ? 0 : along + q);
    return accept(solution, v, along + q, this.#target + this.#hotel);
  }

  /** q of the fastest root, or `NONE` or `TOO_WEAK`. */
  #search(cross: number, along: number, fastest: number): number {
    const { speed, rate, slope } = this.#nodes;
    const { model } = this.#propulsion;
    let i = speed.length - 1;
    let high = fastest;
    let atHigh = this.#propulsion.spent(rate[i] as number, this.#max, high) - this.#target;
    let changeHigh = this.#propulsion.change(rate[i] as number, slope[i] as number, this.#max, high);
    while (i > 0) {
      i--;
      let v = speed[i] as number;
      let low = alongThrough(v, cross);
      // Below this node the track cannot be held: the piece ends at V = |c|, or where g = 0.
      const limit = low === 0 || !(along + low > 0);
      if (limit) {
        low = Math.max(0, -along);
        v = this.#speedAt(low);
      }
      const modelRate = limit ? model.perSecond(v) : (rate[i] as number);
      const modelSlope = limit ? model.slope(v) : (slope[i] as number);
      const atLow = this.#propulsion.spent(modelRate, v, low) - this.#target;
      const changeLow = this.#propulsion.change(modelRate, modelSlope, v, low);
      const root = this.#between(low, atLow, changeLow, high, atHigh, changeHigh);
      if (root >= 0) return root;
      if (limit) return atLow > 0 ? TOO_WEAK : NONE;
      high = low;
      atHigh = atLow;
      changeHigh = changeLow;
    }
    return NONE;
  }

  /** The greatest root in one piece, or `NONE`. */
  #between(
    low: number,
    atLow: number,
    changeLow: number,
    high: number,
    atHigh: number,
    changeHigh: number,
  ): number {
    if (atHigh === 0) return high;
    if (atLow === 0 || atLow > 0 !== atHigh > 0) return findRoot(this, low, atLow, high, atHigh, this.#max);
    // The same sign at both ends, but the curve turns towards 0 between them and may cross it twice.
    const turns = atHigh > 0 ? changeLow < 0 && changeHigh > 0 : changeLow > 0 && changeHigh < 0;
    if (!turns) return NONE;
    const turn = findRoot(this.#turn, low, changeLow, high, changeHigh, this.#max);
    const atTurn = this.residual(turn);
    if (atTurn !== 0 && atTurn > 0 === atHigh > 0) return NONE;
    return findRoot(this, turn, atTurn, high, atHigh, this.#max);
  }

  #change(q: number): number {
    const v = this.#speedAt(q);
    const { model } = this.#propulsion;
    return this.#propulsion.change(model.perSecond(v), model.slope(v), v, q);
  }

  /** Rounding must not carry V out of the range. */
  #speedAt(q: number): number {
    const { cross } = this.#propulsion;
    return Math.min(this.#max, Math.max(this.#min, Math.sqrt(q * q + cross * cross)));
  }
}
