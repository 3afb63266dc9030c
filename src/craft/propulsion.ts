import { InputError } from "../errors.ts";
import type { Craft, PowerModel } from "./craft.ts";
import type { SpeedNodes } from "./speed-nodes.ts";
import { alongThrough } from "./triangle.ts";
import { checkWindage, windageFactor } from "./windage.ts";

/** What acts on a craft at one place and time, resolved along its course: along + with the craft, cross + toward starboard. */
export interface PaceConditions {
  /** Components of the medium that the craft moves through, m/s. */
  along: number;
  cross: number;
  /** Components of the wind over the ground, m/s: read only where the craft has windage and the plan a wind. */
  windAlong: number;
  windCross: number;
  /** Slope of the track, metres of height per metre along it, positive climbing. */
  climbSlope: number;
}

/** Conditions of a still medium on a level track, to be filled in place. */
export function stillConditions(): PaceConditions {
  return { along: 0, cross: 0, windAlong: 0, windCross: 0, climbSlope: 0 };
}

/**
 * What propulsion spends, in store units per second, as a function of q = V h·T, the along-track part of the speed through
 * the medium: V = sqrt(q² + c²), g = a + q. In q every part is smooth where the craft lies square across its course (q = 0),
 * and dg/dq = 1.
 *
 *     E = max(0, P(V) + R V/η) + m g₀ max(0, dh/ds) g/η
 *
 * with R V = -½ ρ_a A C (|W| (W_a q - W_c c) + V g²), W_a = wind along - g, W_c = wind across (see `windage.ts`).
 *
 * It holds the conditions of one place at a time, and answers in its own fields: numbers that cross a call are boxed by the
 * engine, which at this depth took as long as the arithmetic.
 */
export class Propulsion {
  readonly model: PowerModel;
  along = 0;
  cross = 0;
  /** What was asked last: V and q in m/s, E, and dE/dq. */
  v = 0;
  q = 0;
  value = 0;
  change = 0;
  /** Store units per second for one unit of the model's rate. */
  readonly #perRate: number;
  /** ½ ρ_a A C / η in store units; 0 without windage or wind. */
  readonly #windFactor: number;
  /** Store units per metre climbed. */
  readonly #climbFactor: number;
  #windAlong = 0;
  #windCross = 0;
  /** Store units that the climb costs per metre along the track. */
  #perMetre = 0;

  /** @param windKnown whether the plan has a wind field, without which windage does not act */
  constructor(craft: Craft, windKnown: boolean) {
    this.model = craft.power;
    this.#perRate = craft.storePerRate;
    this.#climbFactor = craft.power.climbForce === 0 ? 0 : craft.power.climbForce * perJoule(craft, "climb");
    if (windKnown && craft.windage !== null && craft.moves === "water") {
      checkWindage(craft.windage);
      this.#windFactor =
        (windageFactor(craft.windage) / craft.windage.efficiency) * perJoule(craft, "windage");
    } else this.#windFactor = 0;
  }

  /** Takes the conditions of the place that the next calls are about. */
  set(conditions: PaceConditions): void {
    this.along = conditions.along;
    this.cross = conditions.cross;
    this.#windAlong = conditions.windAlong;
    this.#windCross = conditions.windCross;
    this.#perMetre = conditions.climbSlope > 0 ? this.#climbFactor * conditions.climbSlope : 0;
  }

  /** Whether the model alone decides here, since neither wind nor climb adds to it. */
  get plain(): boolean {
    return this.#windFactor === 0 && this.#perMetre === 0;
  }

  /** Evaluates at a node, which must be above |c|. */
  atNode(nodes: SpeedNodes, i: number): void {
    this.v = nodes.speed[i] as number;
    this.q = alongThrough(this.v, this.cross);
    this.value = (nodes.rate[i] as number) * this.#perRate;
    this.change = ((nodes.slope[i] as number) * this.#perRate * this.q) / this.v;
    this.#add();
  }

  /** Evaluates at q, with V kept within min and max, out of which rounding might carry it. */
  at(q: number, min: number, max: number): void {
    const { cross, model } = this;
    const v = Math.min(max, Math.max(min, Math.sqrt(q * q + cross * cross)));
    this.v = v;
    this.q = q;
    this.value = model.perSecond(v) * this.#perRate;
    // dV/dq = q/V; where V = 0 the cross-track part is 0, V is q, and the ratio is 1.
    this.change = model.slope(v) * this.#perRate * (v === 0 ? 1 : q / v);
    this.#add();
  }

  /** E at V and q, given the model's own rate at V. */
  spent(modelRate: number, v: number, q: number): number {
    this.v = v;
    this.q = q;
    this.value = modelRate * this.#perRate;
    this.change = 0;
    this.#add();
    return this.value;
  }

  /** Adds what windage and climb spend to what the model spends. */
  #add(): void {
    const g = this.along + this.q;
    if (this.#windFactor !== 0) this.#addWindage(g);
    this.value += this.#perMetre * g;
    this.change += this.#perMetre;
  }

  #addWindage(g: number): void {
    const { v, q } = this;
    const dv = v === 0 ? 1 : q / v;
    const wa = this.#windAlong - g;
    const wc = this.#windCross;
    const relative = Math.sqrt(wa * wa + wc * wc);
    const onHeading = wa * q - wc * this.cross;
    const turning = relative === 0 ? 0 : (-wa / relative) * onHeading;
    this.value -= this.#windFactor * (relative * onHeading + v * g * g);
    this.change -= this.#windFactor * (turning + relative * (wa - q) + dv * g * g + 2 * v * g);
    if (this.value < 0) {
      this.value = 0;
      this.change = 0;
    }
  }
}

/** Store units per joule of shaft power, which windage, climb and the pace `power` need. */
export function perJoule(craft: Craft, what: string): number {
  if (craft.storePerJoule === null)
    throw new InputError(
      `${what} needs a specific consumption where the power model is a fuel rate; found none`,
    );
  return craft.storePerJoule;
}
