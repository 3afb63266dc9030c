import type { Field } from "../field/field.ts";
import { type Passage, SmoothFleet } from "./smooth-fleet.ts";

/** A smooth step taken. */
interface Taken {
  /** Metres from the leg's start. */
  readonly to: number;
  /** s */
  readonly time: number;
  /** The valid time before, from which on its slices hold, s since departure. */
  readonly since: number;
}

/** One craft that goes along a leg by smooth steps where they serve: a fleet of one. */
export class SmoothLeg {
  readonly #fleet: SmoothFleet;
  #taken: Taken[] = [];

  /** @param departure ms since 1970 */
  constructor(field: Field, departure: number, alongOnly: boolean) {
    this.#fleet = new SmoothFleet(field, [departure], alongOnly, (_n, to, time, since) => {
      this.#taken.push({ to, time, since });
    });
  }

  /** The last valid time met, s since departure: the clock may be a little short of it. */
  get met(): number {
    return this.#fleet.met[0] as number;
  }

  setOut(passage: Passage): void {
    this.#fleet.setOut(passage);
  }

  /**
   * Goes over a panel as far as smooth steps lead.
   *
   * @param start s since departure at the leg's start
   * @param elapsed s since then
   */
  cross(panel: number, start: number, elapsed: number, met: number): readonly Taken[] {
    const fleet = this.#fleet;
    this.#taken = [];
    fleet.afloat[0] = 1;
    fleet.begun[0] = start;
    fleet.legTime[0] = elapsed;
    fleet.met[0] = met;
    fleet.cross(panel);
    return this.#taken;
  }
}
